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

// hair is the room in metres beyond the ends of an element in which a foot still
// belongs to it. Start and end of neighbours differ by the rounding of their
// coordinates, and a foot between the two must not be lost: some units in the
// last place of a map coordinate, below anything measured.
func hair(p orb.Point) float64 { return 1e-9 + 8*footEnd(p) }

// foot is how a point lies as seen from a place of the line: ahead, to the
// right, and how fast the first falls as the place moves on, 1 − curvature·right.
// Where room is not positive the point lies at or beyond the centre of curvature,
// the place is the farthest around and no foot.
type foot struct{ along, right, room float64 }

// sight returns how q lies as seen from a pose.
func (p Pose) sight(q orb.Point) foot {
	sin, cos := math.Sincos(p.Azimuth)
	dx, dy := q[0]-p.XY[0], q[1]-p.XY[1]
	right := dx*cos - dy*sin
	return foot{dx*sin + dy*cos, right, 1 - p.Curvature*right}
}

// away returns the distance of the point.
func (f foot) away() float64 { return math.Hypot(f.along, f.right) }

// sure is the step in metres below which Newton's method is trusted without
// looking: distances to points far away do not resolve what such a step gains.
const sure = 1e-3

// leastRoom keeps a step finite where a point lies at the centre of curvature.
const leastRoom = 1e-6

// LocateNear returns the foot of a point near a station: where the alignment,
// gone on straight beyond its ends, lies square to it and nearer than around. It
// is Newton's method on the distance along the direction, halved as long as it
// leads away from the point, so that it comes to rest from any hint; from a close
// one it converges quadratically to the foot there, to 1e-9 m (some units in the
// last place of map coordinates). ok is false for a point that is not finite and
// for the centre of an arc, which has no foot of its own.
func (a *Alignment) LocateNear(p orb.Point, hint station.Station) (s station.Station, o station.Offset, ok bool) {
	s = hint
	end := footEnd(p)
	here := a.At(s).sight(p)
	for range 100 {
		// Beyond the centre the line comes nearer in the same direction, so the
		// sign of room does not matter; at the centre any length would do.
		step := here.along / math.Max(math.Abs(here.room), leastRoom)
		next := a.At(s + station.Station(step)).sight(p)
		for math.Abs(step) > sure && next.away() > here.away() {
			step /= 2
			next = a.At(s + station.Station(step)).sight(p)
		}
		s, here = s+station.Station(step), next
		if math.Abs(step) <= end {
			return s, station.Offset(here.right), here.room > 0
		}
	}
	return s, 0, false
}

// Locate returns the nearest foot of a point on the alignment; of two that are
// equally near, the one with the lower station. ok is false when no line square
// to the alignment passes through the point on this side of the centre of
// curvature.
func (a *Alignment) Locate(p orb.Point) (s station.Station, o station.Offset, ok bool) {
	// The nearest place is at most as far as the nearest joint. Mostly it is a
	// foot, so elements farther away need no search; where it is an end of the
	// alignment, a foot may lie anywhere.
	joint := math.Inf(1)
	for i := range a.elements {
		joint = math.Min(joint, a.elements[i].fromStart(p))
	}
	if s, o, ok = a.within(p, joint); ok && math.Abs(float64(o)) <= joint {
		return s, o, ok
	}
	return a.within(p, math.Inf(1))
}

// fromStart returns how far a point lies from the start of an element.
func (e *Element) fromStart(p orb.Point) float64 {
	return math.Hypot(p[0]-e.Start[0], p[1]-e.Start[1])
}

// within looks for the nearest foot on elements that reach within a distance of
// the point: no place of an element is farther from its start than its length.
func (a *Alignment) within(p orb.Point, reach float64) (s station.Station, o station.Offset, ok bool) {
	best := math.Inf(1)
	for i := range a.elements {
		e := &a.elements[i]
		if e.fromStart(p)-e.Over.Length() > math.Min(best, reach) {
			continue
		}
		for _, l := range e.feet(p) {
			if right := e.at(l).sight(p).right; math.Abs(right) < best {
				best, s, o, ok = math.Abs(right), e.Over.From+station.Station(l), station.Offset(right), true
			}
		}
	}
	return s, o, ok
}

// feet returns the lengths along an element, increasing, at which it lies square
// to a point.
func (e *Element) feet(p orb.Point) []float64 {
	start := e.at(0).sight(p)
	switch e.Kind {
	case Tangent:
		return e.inside(p, start.along)
	case Arc:
		// Angle at the centre, which lies R to the right of the start.
		r := e.RadiusFrom
		if r < 0 {
			return e.inside(p, r*math.Atan2(-start.along, start.right-r))
		}
		return e.inside(p, r*math.Atan2(start.along, r-start.right))
	}
	return e.clothoidFeet(p, start)
}

// inside returns a length as the one foot, moved onto the element from a hair
// beside it, and none if it lies farther off.
func (e *Element) inside(p orb.Point, l float64) []float64 {
	length, room := e.Over.Length(), hair(p)
	if l < -room || l > length+room {
		return nil
	}
	return []float64{math.Min(math.Max(l, 0), length)}
}

// parts is the number of stretches in which a clothoid is searched. In a twelfth
// of the longest that is laid (three times its radius) the direction turns by at
// most a quarter of a radian, so that a point changes sides of the centre of
// curvature once at most.
const parts = 12

// clothoidFeet looks for feet stretch by stretch. Where room stays positive the
// distance ahead only falls, so a stretch has one foot at most and the signs at
// its ends tell; a stretch where room changes its sign is cut there first.
func (e *Element) clothoidFeet(p orb.Point, start foot) (out []float64) {
	length := e.Over.Length()
	stretch := func(a, b float64, fa, fb foot) {
		if fa.along >= 0 && fb.along < 0 && fa.room+fb.room > 0 {
			out = append(out, e.refine(p, a, b))
		}
	}
	a, fa := 0.0, start
	if fa.along < 0 && fa.along > -hair(p) && fa.room > 0 {
		out = append(out, 0)
	}
	for i := 1; i <= parts; i++ {
		b := length * float64(i) / parts
		fb := e.at(b).sight(p)
		switch {
		case fa.room > 0 == (fb.room > 0):
			stretch(a, b, fa, fb)
		default:
			c := e.centreAbreast(p, a, b, fa.room > 0)
			fc := e.at(c).sight(p)
			stretch(a, c, fa, fc)
			stretch(c, b, fc, fb)
		}
		a, fa = b, fb
	}
	if fa.along >= 0 && fa.along < hair(p) && fa.room > 0 {
		out = append(out, length)
	}
	return out
}

// centreAbreast halves down to the place between a and b where the point
// changes sides of the centre of curvature.
func (e *Element) centreAbreast(p orb.Point, a, b float64, positive bool) float64 {
	for range 50 {
		m := (a + b) / 2
		if (e.at(m).sight(p).room > 0) == positive {
			a = m
		} else {
			b = m
		}
	}
	return (a + b) / 2
}

// refine narrows a bracket to a foot by Newton's method kept inside it.
func (e *Element) refine(p orb.Point, a, b float64) float64 {
	l, end := (a+b)/2, footEnd(p)
	for range 80 {
		f := e.at(l).sight(p)
		if f.along >= 0 {
			a = l
		} else {
			b = l
		}
		next := l + f.along/f.room
		if !(next >= a && next <= b) {
			next = (a + b) / 2
		}
		if math.Abs(next-l) <= end {
			return next
		}
		l = next
	}
	return l
}
