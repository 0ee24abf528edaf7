package calc

import (
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/criteria"
)

type superIn struct {
	Speed        *float64 `json:"speed" unit:"speed" doc:"design speed"`
	EMaxPct      *float64 `json:"emax_pct" unit:"percent" doc:"greatest superelevation"`
	Radius       *float64 `json:"radius" unit:"length" doc:"radius of the curve"`
	EPct         *float64 `json:"e_pct" unit:"percent" doc:"superelevation, instead of or beside the radius"`
	Friction     *float64 `json:"friction" unit:"ratio" doc:"side friction factor, else the standard's"`
	Standard     *string  `json:"standard" doc:"aashto"`
	LaneWidth    *float64 `json:"lane_width" unit:"length" doc:"width of a lane, 3.6 m or 12 ft"`
	LanesRotated *float64 `json:"lanes_rotated" unit:"count" doc:"lanes rotated, 1 to 3.5"`
	GradientPct  *float64 `json:"relative_gradient_pct" unit:"percent" doc:"relative gradient, else the standard's"`
	CrownPct     *float64 `json:"crown_pct" unit:"percent" doc:"normal crown, 2 %"`
}

type superOut struct {
	EPct       wire.Fine  `json:"e_pct"`
	RMin       wire.Fine  `json:"rmin"`
	RMinDesign wire.Fine  `json:"rmin_design"`
	Radius     *wire.Fine `json:"radius"`
	Runoff     wire.Fine  `json:"runoff"`
	Runout     wire.Fine  `json:"runout"`
}

const superSource = "AASHTO, A Policy on Geometric Design of Highways and Streets, ch. 3, superelevation by method 5; speeds, friction and gradients from memory"

func superelevation(in superIn, w *working) (out superOut, fault *Fault) {
	c, fault := in.side(w)
	if fault != nil {
		return out, fault
	}
	e, fault := in.rate(c, &out, w)
	if fault != nil {
		return out, fault
	}
	lane, lanes := or(in.LaneWidth, w.system.Lane()), or(in.LanesRotated, 1)
	gradient, crown := or(in.GradientPct, c.Gradient), or(in.CrownPct, 2)
	if !(lane > 0) || !(gradient > 0) || crown < 0 {
		return out, impossible("lane_width", "lane_width %v, relative_gradient_pct %v and crown_pct %v: the first two are more than 0, the crown 0 or more", lane, gradient, crown)
	}
	runoff, runout, ok := criteria.Runoff(lane, lanes, e, gradient, crown)
	if !ok {
		return out, impossible("lanes_rotated", "lanes_rotated is %v; it lies between 1 and 3.5", lanes)
	}
	out.EPct, out.RMin, out.RMinDesign = wire.Fine(e), wire.Fine(c.RMin), wire.Fine(c.RMinDesign)
	out.Runoff, out.Runout = wire.Fine(runoff), wire.Fine(runout)
	if e > 0 {
		w.step("L_r", "w·n·b_w·e/Δ", put("%v * %v * %v * %v / %v", lane, lanes, runoff*gradient/(lane*lanes*e), e, gradient), runoff, w.length(), superSource)
		w.step("L_t", "L_r·crown/e", put("%v * %v / %v", runoff, crown, e), runout, w.length(), superSource)
	}
	return out, nil
}

// side checks the inputs and returns the curve side of the speed.
func (in *superIn) side(w *working) (c criteria.Side, fault *Fault) {
	if in.Standard != nil && *in.Standard != "aashto" {
		return c, impossible("standard", "superelevation is computed for aashto only, not for %q", *in.Standard)
	}
	for i, v := range []*float64{in.Speed, in.EMaxPct} {
		if f := positive([2]string{"speed", "emax_pct"}[i], v); f != nil {
			return c, f
		}
	}
	if *in.EMaxPct > 20 {
		return c, impossible("emax_pct", "emax_pct is %v %%; no road is built beyond 20 %%", *in.EMaxPct)
	}
	if in.Friction != nil && *in.Friction < 0 {
		return c, impossible("friction", "friction is %v; it is 0 or more", *in.Friction)
	}
	c, err := criteria.NewSide(w.system, *in.Speed, *in.EMaxPct/100, in.Friction)
	if err != nil {
		return c, impossible("speed", "speed is %v: %v", *in.Speed, err)
	}
	w.step("R_min", w.pick("V²/(127(e_max + f))", "V²/(15(e_max + f))"),
		put(w.pick("%v^2 / (127 * (%v / 100 + %v))", "%v^2 / (15 * (%v / 100 + %v))"), *in.Speed, *in.EMaxPct, c.Friction), c.RMin, w.length(), superSource)
	return c, nil
}

// rate returns the superelevation in percent and fills the radius.
func (in *superIn) rate(c criteria.Side, out *superOut, w *working) (e float64, fault *Fault) {
	switch {
	case in.Radius == nil && in.EPct == nil:
		return 0, missing("radius", "give radius, or e_pct")
	case in.EPct != nil && (*in.EPct < 0 || *in.EPct > *in.EMaxPct):
		return 0, impossible("e_pct", "e_pct is %v %%; it lies between 0 and emax_pct, %v %%", *in.EPct, *in.EMaxPct)
	}
	if in.Radius == nil {
		if r, ok := c.RadiusOf(*in.EPct / 100); ok {
			out.Radius = some(r)
		}
		return *in.EPct, nil
	}
	if *in.Radius < c.RMinDesign {
		return 0, impossible("radius", "radius is %v; at %v the least is %v", *in.Radius, *in.Speed, c.RMinDesign)
	}
	out.Radius = some(*in.Radius)
	if in.EPct != nil {
		return *in.EPct, nil
	}
	return 100 * c.Rate(*in.Radius), nil
}
