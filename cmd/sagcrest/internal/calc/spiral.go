package calc

import (
	"math"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/alignment"
)

type spiralIn struct {
	Radius    *float64 `json:"radius" unit:"length" doc:"radius at its end"`
	Length    *float64 `json:"length" unit:"length" doc:"length"`
	Parameter *float64 `json:"parameter" unit:"length" doc:"√(R·L)"`
	Delta     *float64 `json:"delta" unit:"angle" doc:"deflection of the whole curve"`
	PIStation *float64 `json:"pi_station" unit:"station" doc:"station of the PI"`
	Chords    *float64 `json:"chords" unit:"count" doc:"rows of the table"`
}

type spiralRow struct {
	L          wire.Fine `json:"l"`
	AngleRad   wire.Fine `json:"angle_rad"`
	X          wire.Fine `json:"x"`
	Y          wire.Fine `json:"y"`
	Chord      wire.Fine `json:"chord"`
	Deflection wire.Fine `json:"deflection"`
}

type spiralOut struct {
	Radius    wire.Fine    `json:"radius"`
	Length    wire.Fine    `json:"length"`
	Parameter wire.Fine    `json:"parameter"`
	AngleDeg  wire.Fine    `json:"angle_deg"`
	X         wire.Fine    `json:"x"`
	Y         wire.Fine    `json:"y"`
	Shift     wire.Fine    `json:"shift"`
	Abscissa  wire.Fine    `json:"abscissa"`
	Tangent   *wire.Fine   `json:"tangent,omitempty"`
	External  *wire.Fine   `json:"external,omitempty"`
	ArcLength *wire.Fine   `json:"arc_length,omitempty"`
	Stations  *[]wire.Fine `json:"stations,omitempty"`
	Table     *[]spiralRow `json:"table,omitempty"`
}

const spiralSource = "T. F. Hickerson, Route Location and Design, 5th ed., clothoids"

// noArc is the shortage of deflection in radians that still counts as no arc.
const noArc = 1e-6

func spiral(in spiralIn, w *working) (out spiralOut, fault *Fault) {
	r, l, fault := in.size(w)
	if fault != nil {
		return out, fault
	}
	s := alignment.NewSpiral(r, l)
	deg := s.Angle * 180 / math.Pi
	out = spiralOut{Radius: wire.Fine(r), Length: wire.Fine(l), Parameter: wire.Fine(s.Parameter), AngleDeg: wire.Fine(deg),
		X: wire.Fine(s.X), Y: wire.Fine(s.Y), Shift: wire.Fine(s.Shift), Abscissa: wire.Fine(s.Abscissa)}
	w.step("θ", "L/(2R)·180/π", put("%v / (2 * %v) * 180 / pi", l, r), deg, "deg", spiralSource)
	w.step("p", "y - R(1 - cos θ)", put("%v - %v * (1 - cos(%v))", s.Y, r, deg), s.Shift, w.length(), spiralSource)
	w.step("k", "x - R·sin θ", put("%v - %v * sin(%v)", s.X, r, deg), s.Abscissa, w.length(), spiralSource)
	if in.Chords != nil {
		if n := *in.Chords; n < 1 || n != math.Trunc(n) || n > 1e5 {
			return out, impossible("chords", "chords is %v; it is a whole number from 1 to 100000", n)
		}
		out.Table = spiralTable(s, int(*in.Chords))
	}
	if in.Delta == nil {
		if in.PIStation != nil {
			return out, missing("delta", "stations need the deflection of the whole curve")
		}
		return out, nil
	}
	return out, in.between(&out, s, w)
}

// size returns radius and length from any two of three.
func (in *spiralIn) size(w *working) (r, l float64, fault *Fault) {
	n := 0
	for i, v := range []*float64{in.Radius, in.Length, in.Parameter} {
		if v == nil {
			continue
		}
		n++
		if fault := positive([3]string{"radius", "length", "parameter"}[i], v); fault != nil {
			return 0, 0, fault
		}
	}
	switch {
	case n < 2:
		return 0, 0, missing("radius", "a clothoid is known by two of radius, length, parameter")
	case n > 2:
		return 0, 0, contradiction("parameter", "radius, length and parameter are one too many")
	case in.Parameter == nil:
		r, l = *in.Radius, *in.Length
		w.step("A", "√(R·L)", put("sqrt(%v * %v)", r, l), math.Sqrt(r*l), w.length(), spiralSource)
	case in.Length == nil:
		r = *in.Radius
		l = *in.Parameter * *in.Parameter / r
		w.step("L", "A²/R", put("%v^2 / %v", *in.Parameter, r), l, w.length(), spiralSource)
	default:
		l = *in.Length
		r = *in.Parameter * *in.Parameter / l
		w.step("R", "A²/L", put("%v^2 / %v", *in.Parameter, l), r, w.length(), spiralSource)
	}
	// Beyond this a clothoid has wound round its own end twice and more.
	if l > 8*math.Pi*r {
		return 0, 0, impossible("length", "a clothoid of length %v to radius %v turns by more than two full circles", l, r)
	}
	return r, l, nil
}

// between solves the circle between two equal clothoids.
func (in *spiralIn) between(out *spiralOut, s alignment.Spiral, w *working) *Fault {
	delta := *in.Delta * math.Pi / 180
	if !(delta > 0) || delta >= math.Pi {
		return impossible("delta", "delta is %v; it lies between 0 and 180 degrees", *in.Delta)
	}
	t, e, arc := s.Between(delta)
	if delta < 2*s.Angle-noArc {
		return impossible("delta", "delta is %v degrees, but the two clothoids alone turn by %v", *in.Delta, 2*s.Angle*180/math.Pi)
	}
	arc = math.Max(arc, 0)
	w.step("T", "k + (R + p)·tan(Δ/2)", put("%v + (%v + %v) * tan(%v / 2)", s.Abscissa, s.Radius, s.Shift, *in.Delta), t, w.length(), spiralSource)
	w.step("E", "(R + p)/cos(Δ/2) - R", put("(%v + %v) / cos(%v / 2) - %v", s.Radius, s.Shift, *in.Delta, s.Radius), e, w.length(), spiralSource)
	w.step("L_c", "R(Δ - 2θ)·π/180", put("%v * (%v - 2 * %v) * pi / 180", s.Radius, *in.Delta, s.Angle*180/math.Pi), arc, w.length(), spiralSource)
	out.Tangent, out.External, out.ArcLength = some(t), some(e), some(arc)
	if in.PIStation != nil {
		ts := *in.PIStation - t
		out.Stations = &[]wire.Fine{wire.Fine(ts), wire.Fine(ts + s.Length), wire.Fine(ts + s.Length + arc), wire.Fine(ts + 2*s.Length + arc)}
	}
	return nil
}

func spiralTable(s alignment.Spiral, n int) *[]spiralRow {
	rows := []spiralRow{}
	for i := 1; i <= n; i++ {
		l := s.Length * float64(i) / float64(n)
		x, y, angle := s.At(l)
		rows = append(rows, spiralRow{wire.Fine(l), wire.Fine(angle), wire.Fine(x), wire.Fine(y),
			wire.Fine(math.Hypot(x, y)), wire.Fine(math.Atan2(y, x) * 180 / math.Pi)})
	}
	return &rows
}
