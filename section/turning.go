package section

import (
	"math"

	"sagcrest/profile/station"
)

// TurnKind tells how a line turns.
type TurnKind string

// The grade passes through zero on a curve; it changes sign at an angular
// break; or the line is level over a stretch.
const (
	OnCurve TurnKind = "curve"
	AtAngle TurnKind = "angle"
	Level   TurnKind = "level"
)

// Turning is a low or a high point of a line of the section, strictly inside
// the road. To differs from At only for a level stretch.
type Turning struct {
	Line   LineID
	Low    bool
	Kind   TurnKind
	At, To station.Station
	Offset station.Offset
	Elev   float64
}

// flatGrade is the slope below which a line counts as level: grades are read
// from levels rounded to a millimetre, so 1e-12 is nothing but rounding.
const flatGrade = 1e-12

// monotone is a stretch of a line along which it only rises (sign +1), only
// falls (−1) or is level (0).
type monotone struct {
	from, to           station.Station
	sign               int
	fromGrade, toGrade float64
	fromElev, toElev   float64
	offset             float64
}

// Turnings returns the low and high points of every line, by line in the order
// of LineIDs, then by station. Between two neighbouring high points of a line
// nothing lies lower than the low point between them, because a line is
// monotone from one turning point to the next.
func (r *Road) Turnings() (out []Turning) {
	for _, id := range LineIDs() {
		out = append(out, turnings(id, r.stretches(id))...)
	}
	return out
}

func turnings(id LineID, ps []stretch) (out []Turning) {
	runs := merge(monotones(ps))
	for i, m := range runs {
		if m.sign == 0 {
			if 0 < i && i < len(runs)-1 && runs[i-1].sign*runs[i+1].sign < 0 {
				out = append(out, Turning{id, runs[i-1].sign < 0, Level, m.from, m.to,
					station.Offset(m.offset), m.fromElev})
			}
			continue
		}
		if i == 0 || runs[i-1].sign*m.sign >= 0 {
			continue
		}
		a := runs[i-1]
		kind := AtAngle
		// A tangent that is not level has a grade at its end; so where both
		// grades vanish, up to rounding, the line turns on a curve.
		if math.Abs(a.toGrade) < 1e-9 && math.Abs(m.fromGrade) < 1e-9 {
			kind = OnCurve
		}
		out = append(out, Turning{id, a.sign < 0, kind, m.from, m.from, station.Offset(m.offset), m.fromElev})
	}
	return out
}

// monotones cuts stretches at their own turning points.
func monotones(ps []stretch) (out []monotone) {
	for _, p := range ps {
		marks := []station.Station{p.over.From, p.over.To}
		if p.r != 0 {
			if s := p.over.From - station.Station(p.g/p.r); p.over.From < s && s < p.over.To {
				marks = []station.Station{p.over.From, s, p.over.To}
			}
		}
		for i := 1; i < len(marks); i++ {
			a, b := marks[i-1], marks[i]
			out = append(out, monotone{a, b, sign(p.grade((a + b) / 2)), p.grade(a), p.grade(b),
				p.level(a), p.level(b), p.offset})
		}
	}
	return out
}

// merge joins neighbours that run the same way.
func merge(in []monotone) (out []monotone) {
	for _, m := range in {
		if n := len(out); n > 0 && out[n-1].sign == m.sign {
			out[n-1].to, out[n-1].toGrade, out[n-1].toElev = m.to, m.toGrade, m.toElev
			continue
		}
		out = append(out, m)
	}
	return out
}

func sign(g float64) int {
	switch {
	case g > flatGrade:
		return 1
	case g < -flatGrade:
		return -1
	}
	return 0
}
