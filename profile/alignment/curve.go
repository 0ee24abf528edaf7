package alignment

import (
	"errors"
	"math"
)

// Circle is a circular arc by itself, in any unit of length; Delta in radians.
// Tangent runs from its start to the PI, Length along the arc, External from the
// PI to the middle of the arc, Middle from the chord to the middle of the arc.
type Circle struct {
	Radius, Delta, Tangent, Length, External, Middle, Chord float64
}

// NewCircle returns the arc of a radius and a deflection below 180 degrees.
func NewCircle(radius, delta float64) Circle {
	half := delta / 2
	return Circle{Radius: radius, Delta: delta, Tangent: radius * math.Tan(half), Length: radius * delta,
		External: radius * (1/math.Cos(half) - 1), Middle: radius * (1 - math.Cos(half)), Chord: 2 * radius * math.Sin(half)}
}

// DegreeLength is the 100 ft that a degree of curve belongs to, in feet.
const DegreeLength = 100.0

// RadiusOfDegree returns the radius in feet of a degree of curve, given in
// radians: of an arc of 100 ft, or of a chord of 100 ft (T. F. Hickerson, Route
// Location and Design).
func RadiusOfDegree(d float64, chord bool) float64 {
	if chord {
		return DegreeLength / 2 / math.Sin(d/2)
	}
	return DegreeLength / d
}

// DegreeOfRadius is the inverse; ok is false where no chord of 100 ft fits.
func DegreeOfRadius(feet float64, chord bool) (d float64, ok bool) {
	if !chord {
		return DegreeLength / feet, true
	}
	sin := DegreeLength / 2 / feet
	return 2 * math.Asin(sin), sin <= 1
}

// ErrNoArc says that two figures belong to no arc below 180 degrees.
var ErrNoArc = errors.New("no arc of less than 180 degrees has these two figures")

// Known names what is known of an arc.
type Known string

// What an arc can be solved from, any two.
const (
	ByRadius   Known = "radius"
	ByDelta    Known = "delta"
	ByTangent  Known = "tangent"
	ByLength   Known = "length"
	ByExternal Known = "external"
)

// Solve returns the arc with two known figures, or ErrNoArc.
func Solve(a Known, va float64, b Known, vb float64) (Circle, error) {
	v := map[Known]float64{a: va, b: vb}
	r, haveR := v[ByRadius]
	d, haveD := v[ByDelta]
	switch {
	case haveR && haveD:
	case haveR:
		d = deltaOf(r, v)
	case haveD:
		r = radiusOf(d, v)
	default:
		d = deltaOfPair(v)
		r = radiusOf(d, v)
	}
	if !(r > 0) || !(d > 0) || d >= math.Pi || math.IsInf(r, 0) {
		return Circle{}, ErrNoArc
	}
	return NewCircle(r, d), nil
}

// deltaOf returns the deflection from a radius and one more figure.
func deltaOf(r float64, v map[Known]float64) float64 {
	if t, ok := v[ByTangent]; ok {
		return 2 * math.Atan(t/r)
	}
	if l, ok := v[ByLength]; ok {
		return l / r
	}
	return 2 * math.Acos(r/(r+v[ByExternal]))
}

// radiusOf returns the radius from a deflection and one more figure.
func radiusOf(d float64, v map[Known]float64) float64 {
	if t, ok := v[ByTangent]; ok {
		return t / math.Tan(d/2)
	}
	if l, ok := v[ByLength]; ok {
		return l / d
	}
	return v[ByExternal] / (1/math.Cos(d/2) - 1)
}

// deltaOfPair returns the deflection from two of tangent, length and external,
// NaN where none fits. E/T = tan(Δ/4); T/L and E/L grow with Δ, so they are
// halved down to it.
func deltaOfPair(v map[Known]float64) float64 {
	t, haveT := v[ByTangent]
	l, haveL := v[ByLength]
	e, haveE := v[ByExternal]
	switch {
	case haveT && haveE:
		return 4 * math.Atan(e/t)
	case haveT && haveL:
		return grow(t/l, func(d float64) float64 { return math.Tan(d/2) / d })
	case haveL && haveE:
		return grow(e/l, func(d float64) float64 { return (1/math.Cos(d/2) - 1) / d })
	}
	return math.NaN()
}

// grow solves f(Δ) = want for an f that grows between 0 and 180 degrees.
func grow(want float64, f func(float64) float64) float64 {
	lo, hi := 1e-9, math.Pi*(1-1e-15)
	if !(want > f(lo)) || !(want < f(hi)) {
		return math.NaN()
	}
	for range 100 {
		m := (lo + hi) / 2
		if f(m) < want {
			lo = m
		} else {
			hi = m
		}
	}
	return (lo + hi) / 2
}

// Spiral is a clothoid from a tangent to a circle: the angle it turns by, its
// end along (X) and square to (Y) the tangent, the Shift of the circle, and the
// Abscissa of the shifted centre. Parameter is √(R·L).
type Spiral struct {
	Radius, Length, Parameter, Angle, X, Y, Shift, Abscissa float64

	rule *rule
}

// NewSpiral returns the clothoid of a radius and a length (T. F. Hickerson,
// Route Location and Design).
func NewSpiral(radius, length float64) Spiral {
	q := newRule()
	s := q.spiralAt(length, radius)
	return Spiral{radius, length, math.Sqrt(radius * length), s.angle, s.x, s.y, s.shift, s.abscissa, q}
}

// At returns the point of the clothoid a length l from its start, and the angle
// turned by there.
func (s Spiral) At(l float64) (x, y, angle float64) {
	c := 1 / (s.Radius * s.Length)
	x, y = s.rule.run(0, 0, c, l)
	return x, y, c * l * l / 2
}

// Between returns tangent, external and arc length of a circle with this
// clothoid on both sides that turns by delta in all; the arc is negative where
// the two clothoids turn by more.
func (s Spiral) Between(delta float64) (tangent, external, arc float64) {
	half := delta / 2
	tangent = s.Abscissa + (s.Radius+s.Shift)*math.Tan(half)
	external = (s.Radius+s.Shift)/math.Cos(half) - s.Radius
	return tangent, external, s.Radius * (delta - 2*s.Angle)
}
