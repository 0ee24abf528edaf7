package alignment

import (
	"math"

	"github.com/paulmach/orb"

	"sagcrest/profile/station"
)

// footEnd is the length in metres at which the search for a foot ends: far below
// anything measured, but not below the last bits of map coordinates.
func footEnd(p orb.Point) float64 {
	const bits = 4e-16 // two units in the last place
	return 1e-11 + bits*math.Max(math.Abs(p[0]), math.Abs(p[1]))
}

// LocateNear returns the foot of a point near a station: where the alignment,
// gone on straight beyond its ends, lies square to it. It is Newton's method on
// the distance along the direction; from a hint on the same side of every
// centre it converges quadratically. ok is false when it does not.
func (a *Alignment) LocateNear(p orb.Point, hint station.Station) (s station.Station, o station.Offset, ok bool) {
	s = hint
	end := footEnd(p)
	for range 60 {
		pose := a.At(s)
		along, right := pose.project(p)
		room := 1 - pose.Curvature*right
		if room <= 1e-9 {
			// At or beyond the centre the distance no longer falls: step by the
			// plain projection, which leads out of the evolute.
			room = 1
		}
		step := along / room
		s += station.Station(step)
		if math.Abs(step) <= end {
			_, right = a.At(s).project(p)
			return s, station.Offset(right), true
		}
	}
	return s, 0, false
}

// project returns where a point lies, ahead and to the right.
func (p Pose) project(q orb.Point) (along, right float64) {
	sin, cos := math.Sincos(p.Azimuth)
	dx, dy := q[0]-p.XY[0], q[1]-p.XY[1]
	return dx*sin + dy*cos, dx*cos - dy*sin
}

// Locate returns the nearest foot of a point on the alignment; ok is false when
// no line square to the alignment passes through it.
func (a *Alignment) Locate(p orb.Point) (s station.Station, o station.Offset, ok bool) {
	best := math.Inf(1)
	for i := range a.elements {
		e := &a.elements[i]
		for _, l := range e.feet(p) {
			if _, right := e.at(l).project(p); math.Abs(right) < best {
				best, s, o, ok = math.Abs(right), e.Over.From+station.Station(l), station.Offset(right), true
			}
		}
	}
	return s, o, ok
}

// feet returns the lengths along an element at which it lies square to a point,
// with a hair of room at its ends so that none is lost between two elements.
func (e *Element) feet(p orb.Point) (out []float64) {
	const hair = 1e-9
	length := e.Over.Length()
	keep := func(l float64) {
		if l >= -hair && l <= length+hair {
			out = append(out, math.Min(math.Max(l, 0), length))
		}
	}
	start := e.at(0)
	along, right := start.project(p)
	switch e.Kind {
	case Tangent:
		keep(along)
	case Arc:
		// Angle at the centre, which lies R to the right of the start.
		r := e.RadiusFrom
		angle := math.Atan2(along, r-right)
		if r < 0 {
			angle = -math.Atan2(along, right-r)
		}
		keep(angle * r)
		keep((angle + math.Copysign(2*math.Pi, r)) * r)
	default:
		out = e.clothoidFeet(p)
	}
	return out
}

// clothoidFeet brackets the feet on a clothoid between close stations and
// halves: at most one lies between two of them, since a clothoid turns by less
// than a right angle in a twelfth of any length that is laid.
func (e *Element) clothoidFeet(p orb.Point) (out []float64) {
	const parts = 12
	length := e.Over.Length()
	f := func(l float64) float64 { v, _ := e.at(l).project(p); return v }
	a, fa := 0.0, f(0)
	if fa == 0 {
		out = append(out, 0)
	}
	for i := 1; i <= parts; i++ {
		b := length * float64(i) / parts
		fb := f(b)
		if fb == 0 {
			out = append(out, b)
		} else if fa*fb < 0 {
			out = append(out, e.refine(f, p, a, b, fa))
		}
		a, fa = b, fb
	}
	return out
}

// refine narrows a bracket to a foot by Newton's method kept inside it.
func (e *Element) refine(f func(float64) float64, p orb.Point, a, b, fa float64) float64 {
	l := (a + b) / 2
	for range 80 {
		pose := e.at(l)
		v, right := pose.project(p)
		if (v > 0) == (fa > 0) {
			a, fa = l, v
		} else {
			b = l
		}
		next := l + v/(1-pose.Curvature*right)
		if !(next > a && next < b) {
			next = (a + b) / 2
		}
		if math.Abs(next-l) <= footEnd(p) {
			return next
		}
		l = next
	}
	return l
}
