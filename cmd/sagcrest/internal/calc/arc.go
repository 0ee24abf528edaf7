package calc

import (
	"math"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/alignment"
)

type arcIn struct {
	Radius     *float64 `json:"radius" unit:"length" doc:"radius"`
	Degree     *float64 `json:"degree" unit:"angle" doc:"degree of curve, per 100 ft"`
	Definition *string  `json:"definition" doc:"of the degree: arc or chord"`
	Delta      *float64 `json:"delta" unit:"angle" doc:"deflection, below 180 degrees"`
	Tangent    *float64 `json:"tangent" unit:"length" doc:"tangent"`
	Length     *float64 `json:"length" unit:"length" doc:"length along the arc"`
	External   *float64 `json:"external" unit:"length" doc:"PI to the middle of the arc"`
	PIStation  *float64 `json:"pi_station" unit:"station" doc:"station of the PI"`
}

type arcOut struct {
	Radius   wire.Fine  `json:"radius"`
	Degree   *wire.Fine `json:"degree"`
	Delta    wire.Fine  `json:"delta"`
	Tangent  wire.Fine  `json:"tangent"`
	Length   wire.Fine  `json:"length"`
	External wire.Fine  `json:"external"`
	Middle   wire.Fine  `json:"middle"`
	Chord    wire.Fine  `json:"chord"`
	PC       *wire.Fine `json:"pc,omitempty"`
	PT       *wire.Fine `json:"pt,omitempty"`
}

const arcSource = "T. F. Hickerson, Route Location and Design, 5th ed., circular curves"

func arc(in arcIn, w *working) (out arcOut, fault *Fault) {
	chord := false
	if in.Definition != nil {
		switch *in.Definition {
		case "chord":
			chord = true
		case "arc":
		default:
			return out, impossible("definition", "definition is %q; it is arc or chord", *in.Definition)
		}
	}
	known, fault := in.known(w, chord)
	if fault != nil {
		return out, fault
	}
	c, err := alignment.Solve(known[0].name, known[0].v, known[1].name, known[1].v)
	if err != nil {
		return out, impossible(string(known[0].name), "%s %v and %s %v: %v", known[0].name, known[0].shown, known[1].name, known[1].shown, err)
	}
	in.write(&out, c, w, chord)
	return out, nil
}

// fact is one known figure: in radians for angles, as given when shown.
type fact struct {
	name     alignment.Known
	v, shown float64
}

// known collects the two figures that the arc is solved from.
func (in *arcIn) known(w *working, chord bool) (out []fact, fault *Fault) {
	if in.Degree != nil {
		if in.Radius != nil {
			return nil, contradiction("degree", "degree and radius say the same twice")
		}
		if !(*in.Degree > 0) || *in.Degree >= 180 {
			return nil, impossible("degree", "degree is %v; it lies between 0 and 180", *in.Degree)
		}
		r := alignment.RadiusOfDegree(*in.Degree*math.Pi/180, chord) * w.perFoot()
		if chord {
			w.step("R", "50 / sin(D/2)", put("50 / sin(%v / 2) * %v", *in.Degree, w.perFoot()), r, w.length(), arcSource)
		} else {
			w.step("R", "100·180 / (π·D)", put("100 * 180 / (pi * %v) * %v", *in.Degree, w.perFoot()), r, w.length(), arcSource)
		}
		in.Radius = &r
	}
	for _, f := range []struct {
		name  alignment.Known
		v     *float64
		scale float64
	}{{alignment.ByRadius, in.Radius, 1}, {alignment.ByDelta, in.Delta, math.Pi / 180}, {alignment.ByTangent, in.Tangent, 1},
		{alignment.ByLength, in.Length, 1}, {alignment.ByExternal, in.External, 1}} {
		if f.v == nil {
			continue
		}
		if fault := positive(string(f.name), f.v); fault != nil {
			return nil, fault
		}
		out = append(out, fact{f.name, *f.v * f.scale, *f.v})
	}
	switch {
	case len(out) < 2:
		return nil, missing("delta", "an arc is solved from two of radius (or degree), delta, tangent, length, external")
	case len(out) > 2:
		return nil, contradiction(string(out[2].name), "an arc has two figures of its own; %s, %s and %s are one too many", out[0].name, out[1].name, out[2].name)
	}
	return out, nil
}

// perFoot is the length of a foot in the units of the call.
func (w *working) perFoot() float64 {
	if w.system == "us" {
		return 1
	}
	return foot
}

func (in *arcIn) write(out *arcOut, c alignment.Circle, w *working, chord bool) {
	deg := c.Delta * 180 / math.Pi
	out.Radius, out.Delta, out.Tangent, out.Length = wire.Fine(c.Radius), wire.Fine(deg), wire.Fine(c.Tangent), wire.Fine(c.Length)
	out.External, out.Middle, out.Chord = wire.Fine(c.External), wire.Fine(c.Middle), wire.Fine(c.Chord)
	if d, ok := alignment.DegreeOfRadius(c.Radius/w.perFoot(), chord); ok {
		out.Degree = some(d * 180 / math.Pi)
	}
	w.step("T", "R·tan(Δ/2)", put("%v * tan(%v / 2)", c.Radius, deg), c.Tangent, w.length(), arcSource)
	w.step("L", "R·Δ·π/180", put("%v * %v * pi / 180", c.Radius, deg), c.Length, w.length(), arcSource)
	w.step("E", "R(1/cos(Δ/2) - 1)", put("%v * (1 / cos(%v / 2) - 1)", c.Radius, deg), c.External, w.length(), arcSource)
	w.step("M", "R(1 - cos(Δ/2))", put("%v * (1 - cos(%v / 2))", c.Radius, deg), c.Middle, w.length(), arcSource)
	w.step("C", "2R·sin(Δ/2)", put("2 * %v * sin(%v / 2)", c.Radius, deg), c.Chord, w.length(), arcSource)
	if in.PIStation != nil {
		pc := *in.PIStation - c.Tangent
		out.PC, out.PT = some(pc), some(pc+c.Length)
		w.step("PC", "PI - T", put("%v - %v", *in.PIStation, c.Tangent), pc, w.length(), arcSource)
		w.step("PT", "PC + L", put("%v + %v", pc, c.Length), pc+c.Length, w.length(), arcSource)
	}
}
