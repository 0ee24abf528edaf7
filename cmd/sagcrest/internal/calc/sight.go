package calc

import (
	"math"
	"slices"
	"strings"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/criteria"
)

type sightIn struct {
	Kind         *string  `json:"kind" doc:"stopping_distance, crest, sag_headlight, sag_underpass, sag_comfort, sag_appearance, drainage, curve_clearance, k_table"`
	Standard     *string  `json:"standard" doc:"aashto, irc, rhd"`
	Speed        *float64 `json:"speed" unit:"speed" doc:"speed"`
	Grade        *float64 `json:"grade" unit:"percent" doc:"grade, downhill negative"`
	Reaction     *float64 `json:"reaction" unit:"seconds" doc:"reaction time, 2.5 s"`
	Deceleration *float64 `json:"deceleration" unit:"count" doc:"deceleration, 3.4 m/s² or 11.2 ft/s²"`
	Friction     *float64 `json:"friction" unit:"ratio" doc:"friction instead of a deceleration"`
	Sight        *float64 `json:"sight" unit:"length" doc:"sight distance"`
	Eye          *float64 `json:"eye" unit:"length" doc:"height of the eye"`
	Object       *float64 `json:"object" unit:"length" doc:"height of the object"`
	Headlight    *float64 `json:"headlight" unit:"length" doc:"height of the headlight"`
	BeamDeg      *float64 `json:"beam_deg" unit:"angle" doc:"upward angle of the beam instead of the printed constant"`
	Clearance    *float64 `json:"clearance" unit:"length" doc:"clearance of the structure"`
	APct         *float64 `json:"a_pct" unit:"percent" doc:"change of grade"`
	G1           *float64 `json:"g1" unit:"percent" doc:"grade before, with g2 instead of a_pct"`
	G2           *float64 `json:"g2" unit:"percent" doc:"grade after"`
	Radius       *float64 `json:"radius" unit:"length" doc:"radius of the centre line"`
	Lane         *float64 `json:"lane" unit:"length" doc:"width of the inner lane, 3.6 m or 12 ft"`
	Criterion    *string  `json:"criterion" doc:"of k_table: stopping, passing, headlight"`
}

type branchOut struct {
	Branch  string    `json:"branch"`
	Length  wire.Fine `json:"length"`
	Applies bool      `json:"applies"`
}

type controlRow struct {
	Speed wire.Fine `json:"speed"`
	Sight wire.Fine `json:"sight"`
	K     wire.Fine `json:"k"`
}

type sightOut struct {
	ReactionDistance *wire.Fine    `json:"reaction_distance,omitempty"`
	Braking          *wire.Fine    `json:"braking,omitempty"`
	Total            *wire.Fine    `json:"total,omitempty"`
	Design           *wire.Fine    `json:"design,omitempty"`
	Length           *wire.Fine    `json:"length,omitempty"`
	K                *wire.Fine    `json:"k,omitempty"`
	Branch           *string       `json:"branch,omitempty"`
	Branches         *[]branchOut  `json:"branches,omitempty"`
	Constant         *wire.Fine    `json:"constant,omitempty"`
	KMax             *wire.Fine    `json:"k_max,omitempty"`
	Middle           *wire.Fine    `json:"middle,omitempty"`
	FromEdge         *wire.Fine    `json:"from_edge,omitempty"`
	Rows             *[]controlRow `json:"rows,omitempty"`
}

func some(v float64) *wire.Fine {
	f := wire.Fine(v)
	return &f
}

// or returns a given figure or its default.
func or(v *float64, def float64) float64 {
	if v == nil {
		return def
	}
	return *v
}

func sight(in sightIn, w *working) (out sightOut, fault *Fault) {
	kinds := []string{"stopping_distance", "crest", "sag_headlight", "sag_underpass", "sag_comfort", "sag_appearance", "drainage", "curve_clearance", "k_table"}
	if in.Kind == nil {
		return out, missing("kind", "kind is one of "+strings.Join(kinds, ", "))
	}
	name := "aashto"
	if in.Standard != nil {
		name = *in.Standard
	}
	std, ok := criteria.Find(name, w.system)
	if !ok {
		return out, impossible("standard", "there is no standard %q; known: %s", name, strings.Join(criteria.Standards(), ", "))
	}
	switch *in.Kind {
	case "stopping_distance":
		fault = in.stopping(&out, w)
	case "crest", "sag_headlight", "sag_underpass":
		fault = in.needed(&out, w, std)
	case "sag_comfort":
		fault = in.comfort(&out, w, std)
	case "sag_appearance":
		if in.Speed == nil {
			return out, missing("speed", "appearance needs the speed")
		}
		out.Length = some(w.system.Appearance(*in.Speed))
		w.step("L", w.pick("0.6·V", "3·V"), put(w.pick("0.6 * %v", "3 * %v"), *in.Speed), float64(*out.Length), w.length(), std.Source)
	case "drainage":
		out.KMax = some(w.system.DrainageK())
	case "curve_clearance":
		fault = in.clearance(&out, w)
	case "k_table":
		fault = in.table(&out, w)
	default:
		fault = impossible("kind", "there is no kind %q; known: %s", *in.Kind, strings.Join(kinds, ", "))
	}
	return out, fault
}

// positive demands a figure above zero.
func positive(name string, v *float64) *Fault {
	if v == nil {
		return missing(name, name+" is needed here")
	}
	if !(*v > 0) {
		return impossible(name, "%s is %v; it is more than 0", name, *v)
	}
	return nil
}

// stop computes the stopping distance of the inputs.
func (in *sightIn) stop(w *working, grade float64) (criteria.Stopping, *Fault) {
	if f := positive("speed", in.Speed); f != nil {
		return criteria.Stopping{}, f
	}
	if in.Reaction != nil && *in.Reaction < 0 {
		return criteria.Stopping{}, impossible("reaction", "reaction is %v s; it is 0 or more", *in.Reaction)
	}
	for i, v := range []*float64{in.Deceleration, in.Friction} {
		if v != nil && !(*v > 0) {
			name := [2]string{"deceleration", "friction"}[i]
			return criteria.Stopping{}, impossible(name, "%s is %v; it is more than 0", name, *v)
		}
	}
	if in.Deceleration != nil && in.Friction != nil {
		return criteria.Stopping{}, contradiction("friction", "deceleration and friction say the same twice")
	}
	b := criteria.Braker{Deceleration: or(in.Deceleration, w.system.Deceleration()), Friction: in.Friction}
	d, err := w.system.StoppingDistance(*in.Speed, or(in.Reaction, 2.5), b, grade/100)
	if err != nil {
		return d, impossible("grade", "grade is %v %%: %v", grade, err)
	}
	return d, nil
}

func (in *sightIn) stopping(out *sightOut, w *working) *Fault {
	grade := or(in.Grade, 0)
	d, fault := in.stop(w, grade)
	if fault != nil {
		return fault
	}
	const source = "AASHTO, A Policy on Geometric Design of Highways and Streets, ch. 3, stopping sight distance"
	v, t, a := *in.Speed, or(in.Reaction, 2.5), or(in.Deceleration, w.system.Deceleration())
	w.step("d_r", w.pick("0.278·V·t", "1.47·V·t"), put(w.pick("0.278 * %v * %v", "1.47 * %v * %v"), v, t), d.Reaction, w.length(), source)
	switch {
	case d.Level:
		w.step("d_b", w.pick("0.039·V²/a", "1.075·V²/a"), put(w.pick("0.039 * %v^2 / %v", "1.075 * %v^2 / %v"), v, a), d.Braking, w.length(), source)
	case in.Friction != nil:
		w.step("d_b", w.pick("V² / (254(f + G))", "V² / (30(f + G))"), put(w.pick("%v^2 / (254 * (%v + %v / 100))", "%v^2 / (30 * (%v + %v / 100))"), v, *in.Friction, grade), d.Braking, w.length(), source)
	default:
		w.step("d_b", w.pick("V² / (254(a/9.81 + G))", "V² / (30(a/32.2 + G))"), put(w.pick("%v^2 / (254 * (%v / 9.81 + %v / 100))", "%v^2 / (30 * (%v / 32.2 + %v / 100))"), v, a, grade), d.Braking, w.length(), source)
	}
	w.step("S", "d_r + d_b", put("%v + %v", d.Reaction, d.Braking), d.Total, w.length(), source)
	out.ReactionDistance, out.Braking, out.Total, out.Design = some(d.Reaction), some(d.Braking), some(d.Total), some(d.Design)
	return nil
}

// change returns A in percent.
func (in *sightIn) change() (float64, *Fault) {
	switch {
	case in.APct != nil && (in.G1 != nil || in.G2 != nil):
		return 0, contradiction("a_pct", "a_pct and g1, g2 say the same twice")
	case in.APct != nil:
		if *in.APct == 0 {
			return 0, impossible("a_pct", "a_pct is 0: a line without a change of grade needs no curve")
		}
		return math.Abs(*in.APct), nil
	case in.G1 == nil || in.G2 == nil:
		return 0, missing("a_pct", "give a_pct, or g1 and g2")
	case *in.G1 == *in.G2:
		return 0, impossible("g2", "g1 and g2 are equal, %v %%: no curve is needed", *in.G1)
	}
	return math.Abs(*in.G2 - *in.G1), nil
}

func (in *sightIn) needed(out *sightOut, w *working, std criteria.Standard) *Fault {
	a, fault := in.change()
	if fault != nil {
		return fault
	}
	if f := positive("sight", in.Sight); f != nil {
		return f
	}
	s := *in.Sight
	var n criteria.Needed
	switch *in.Kind {
	case "crest":
		h1, h2 := or(in.Eye, std.Eye), or(in.Object, std.Object)
		if h1 < 0 || h2 < 0 || h1+h2 <= 0 {
			return impossible("eye", "eye and object are %v and %v high; neither is below 0 and one is above", h1, h2)
		}
		n = criteria.Crest(s, h1, h2, a)
		w.step("C", "100(√(2h1) + √(2h2))²", put("100 * (sqrt(2 * %v) + sqrt(2 * %v))^2", h1, h2), n.Constant, w.length(), std.Source)
	case "sag_headlight":
		h := or(in.Headlight, std.Headlight)
		var beam *float64
		if in.BeamDeg != nil {
			b := *in.BeamDeg * math.Pi / 180
			beam = &b
			w.step("C", "200(h + S·tan β)", put("200 * (%v + %v * tan(%v))", h, s, *in.BeamDeg), criteria.Headlight(s, h, beam, a).Constant, w.length(), std.Source)
		} else {
			w.step("C", "200h + 3.5S", put("200 * %v + 3.5 * %v", h, s), criteria.Headlight(s, h, nil, a).Constant, w.length(), std.Source)
		}
		n = criteria.Headlight(s, h, beam, a)
	default:
		if f := positive("clearance", in.Clearance); f != nil {
			return f
		}
		h1, h2 := or(in.Eye, std.UnderEye), or(in.Object, std.UnderObject)
		n = criteria.Underpass(s, *in.Clearance, h1, h2, a)
		w.step("C", "800(c - (h1 + h2)/2)", put("800 * (%v - (%v + %v) / 2)", *in.Clearance, h1, h2), n.Constant, w.length(), std.Source)
	}
	if n.Constant <= 0 {
		return impossible("clearance", "the sight line does not fit: the constant is %v", n.Constant)
	}
	in.branches(out, n, s, a, w, std.Source)
	return nil
}

// branches copies both branches and the one that applies.
func (in *sightIn) branches(out *sightOut, n criteria.Needed, s, a float64, w *working, source string) {
	w.step("L(S<=L)", "A·S²/C", put("%v * %v^2 / %v", a, s, n.Constant), n.Lengths[0], w.length(), source)
	w.step("L(S>L)", "2S - C/A", put("2 * %v - %v / %v", s, n.Constant, a), n.Lengths[1], w.length(), source)
	branch := string(n.Branch)
	out.Length, out.K, out.Constant, out.Branch = some(n.Length), some(n.K), some(n.Constant), &branch
	out.Branches = &[]branchOut{
		{string(criteria.Within), wire.Fine(n.Lengths[0]), n.Branch == criteria.Within},
		{string(criteria.Beyond), wire.Fine(n.Lengths[1]), n.Branch == criteria.Beyond}}
	w.step("K", "L / A", put("%v / %v", n.Length, a), n.K, w.k(), source)
}

func (in *sightIn) comfort(out *sightOut, w *working, std criteria.Standard) *Fault {
	a, fault := in.change()
	if fault != nil {
		return fault
	}
	if f := positive("speed", in.Speed); f != nil {
		return f
	}
	l := w.system.Comfort(std.ID, *in.Speed, a)
	if std.ID == "irc" {
		if w.system == criteria.Metric {
			w.step("L", "2√(N·v³/0.6)", put("2 * sqrt(%v / 100 * (%v / 3.6)^3 / 0.6)", a, *in.Speed), l, w.length(), std.Source)
		}
	} else {
		w.step("L", w.pick("A·V²/395", "A·V²/46.5"), put(w.pick("%v * %v^2 / 395", "%v * %v^2 / 46.5"), a, *in.Speed), l, w.length(), std.Source)
	}
	out.Length, out.K = some(l), some(l/a)
	return nil
}

func (in *sightIn) clearance(out *sightOut, w *working) *Fault {
	if f := positive("radius", in.Radius); f != nil {
		return f
	}
	if in.Sight != nil && in.Speed != nil {
		return contradiction("sight", "sight and speed both give the sight distance")
	}
	s := in.Sight
	if s == nil && in.Speed != nil {
		d, fault := in.stop(w, 0)
		if fault != nil {
			return fault
		}
		s = &d.Total
	}
	if f := positive("sight", s); f != nil {
		return f
	}
	lane := or(in.Lane, w.system.Lane())
	c, err := criteria.CurveClearance(*in.Radius, *s, lane)
	if err != nil {
		return impossible("radius", "radius %v, sight %v, lane %v: %v", *in.Radius, *s, lane, err)
	}
	const source = "AASHTO, A Policy on Geometric Design of Highways and Streets, ch. 3, sight distance on horizontal curves"
	w.step("R'", "R - lane/2", put("%v - %v / 2", *in.Radius, lane), c.InnerRadius, w.length(), source)
	w.step("M", "R'(1 - cos(S/(2R')))", put("%v * (1 - cos(%v / (2 * %v) * 180 / pi))", c.InnerRadius, *s, c.InnerRadius), c.Middle, w.length(), source)
	w.step("M_edge", "M - lane/2", put("%v - %v / 2", c.Middle, lane), c.FromEdge, w.length(), source)
	out.Middle, out.FromEdge = some(c.Middle), some(c.FromEdge)
	return nil
}

func (in *sightIn) table(out *sightOut, w *working) *Fault {
	if in.Standard != nil && *in.Standard != "aashto" {
		return impossible("standard", "only the tables of aashto are made; %q gives constants only", *in.Standard)
	}
	if in.Criterion == nil || !slices.Contains(criteria.Criteria(), *in.Criterion) {
		return missing("criterion", "criterion is one of "+strings.Join(criteria.Criteria(), ", "))
	}
	controls, _ := criteria.Table(w.system, *in.Criterion)
	rows := []controlRow{}
	for _, c := range controls {
		rows = append(rows, controlRow{wire.Fine(c.Speed), wire.Fine(c.Sight), wire.Fine(c.K)})
	}
	out.Rows = &rows
	return nil
}
