package calc

import (
	"fmt"
	"math"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/section"
)

type stakeIn struct {
	HingeElev *float64 `json:"hinge_elev" unit:"length" doc:"level of the hinge"`
	HalfWidth *float64 `json:"half_width" unit:"length" doc:"hinge to centre"`
	SideSlope *float64 `json:"side_slope" unit:"ratio" doc:"horizontal per vertical"`
	Ground    any      `json:"ground" doc:"a level, or a polyline [[offset, elev] …] outward from the centre"`
}

type stakeOut struct {
	Cut    *wire.Fine `json:"cut,omitempty"`
	Fill   *wire.Fine `json:"fill,omitempty"`
	Offset wire.Fine  `json:"offset"`
}

const stakeSource = "Indiana DOT, Survey Procedures, ch. 6, slope stakes"

func slopeStake(in stakeIn, w *working) (out stakeOut, fault *Fault) {
	if in.HingeElev == nil {
		return out, missing("hinge_elev", "hinge_elev is the level of the hinge")
	}
	if in.HalfWidth == nil || *in.HalfWidth < 0 {
		return out, missing("half_width", "half_width is the distance of the hinge from the centre, 0 or more")
	}
	if f := positive("side_slope", in.SideSlope); f != nil {
		return out, f
	}
	ground, fault := in.ground(w.system)
	if fault != nil {
		return out, fault
	}
	s, ok := section.SlopeStake(section.Point{O: *in.HalfWidth, Z: *in.HingeElev}, *in.SideSlope, ground)
	if !ok {
		return out, impossible("ground", "the slope of %v to 1 from %v at %v does not meet the ground that is given", *in.SideSlope, *in.HalfWidth, *in.HingeElev)
	}
	out.Offset = wire.Fine(s.Offset)
	if s.Cut {
		out.Cut = some(s.Depth)
	} else {
		out.Fill = some(s.Depth)
	}
	w.step("d", "b + s·h", put("%v + %v * %v", *in.HalfWidth, *in.SideSlope, s.Depth), s.Offset, w.length(), stakeSource)
	return out, nil
}

// ground turns a level or a polyline into a line outward from the centre.
func (in *stakeIn) ground(s System) ([]section.Point, *Fault) {
	if in.Ground == nil {
		return nil, missing("ground", "ground is a level, or a polyline [[offset, elev] …]")
	}
	if list, ok := in.Ground.([]any); ok {
		return polyline(list, s)
	}
	z, err := number(in.Ground, aLength, s)
	if err != nil {
		return nil, &Fault{"F04", "ground", fmt.Sprintf("ground: %v", err), "write a level, or a polyline [[offset, elev] …]", nil}
	}
	// Level ground is met at the latest where the slope has covered the height.
	reach := *in.HalfWidth + math.Abs(z-*in.HingeElev)**in.SideSlope + 1
	return []section.Point{{O: 0, Z: z}, {O: reach, Z: z}}, nil
}

func polyline(list []any, s System) (out []section.Point, fault *Fault) {
	for i, item := range list {
		name := fmt.Sprintf("ground[%d]", i)
		pair, ok := item.([]any)
		if !ok || len(pair) != 2 {
			return nil, impossible(name, "%s is no pair [offset, elev]", name)
		}
		o, errO := number(pair[0], aLength, s)
		z, errZ := number(pair[1], aLength, s)
		if errO != nil || errZ != nil {
			return nil, impossible(name, "%s is no pair of numbers", name)
		}
		// Left sides may be written negative; they run outward all the same.
		p := section.Point{O: math.Abs(o), Z: z}
		if n := len(out); n > 0 && p.O <= out[n-1].O {
			return nil, impossible(name, "%s lies at offset %v, not beyond the one before it, %v", name, p.O, out[n-1].O)
		}
		out = append(out, p)
	}
	if len(out) < 2 {
		return nil, impossible("ground", "a polyline has two points and more")
	}
	return out, nil
}
