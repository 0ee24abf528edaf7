package drainage

import (
	"math"
	"slices"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// CoverPoint is one place along a barrel. Crown is the outside of the wall.
// Datum is the level to which cover is measured; Required says that the place
// lies between the hinges, where cover is judged. Levels in metres.
type CoverPoint struct {
	X              float64
	At             station.Station
	Offset         station.Offset
	Invert, Crown  float64
	Surface, Datum float64
	SurfaceKnown   bool
	Required       bool
	What           section.Place
}

// Cover returns the depth from the datum to the crown in metres.
func (p CoverPoint) Cover() float64 { return p.Datum - p.Crown }

// coverTie is the difference in metres below which two covers are equal, so
// that the lower station and then the lower offset decides.
const coverTie = 1e-9

// barrelLine is a barrel along its axis: the invert runs straight between the
// two ends of the middle axis.
type barrelLine struct {
	axis
	datum      Datum
	left, fall float64 // invert at x = leftX; rise per metre of x
	leftX      float64
	height     float64 // from invert to the outside of the crown
}

// stepAside is how far in metres to either side of a change of typical section
// the surface is read: it moves a level by less than results are written with.
const stepAside = 1e-8

// point measures one place along the barrel.
func (b barrelLine) point(x float64, required bool) CoverPoint {
	s, o := b.at(x)
	p := CoverPoint{X: x, At: s, Offset: station.Offset(o), Required: required}
	p.Invert = b.left + b.fall*(x-b.leftX)
	p.Crown = p.Invert + b.height
	z, t, ok := b.road.Finished(s, o)
	if !ok {
		return p
	}
	p.Surface, p.SurfaceKnown, p.What = z, true, t.What(o)
	p.Datum = z - b.datum.depth(t)
	return p
}

// depth returns how far a datum lies below the finished surface.
func (d Datum) depth(t *section.Typical) float64 {
	switch d {
	case ToSubgrade:
		return t.Pavement
	case ToPavement:
		return t.Bound
	}
	return 0
}

// least returns the least cover between the hinges of the barrel's own axis and
// the places at which its section bends. ok is false when the axis leaves the
// road before a hinge.
func (b barrelLine) least() (best CoverPoint, bends []float64, ok bool) {
	left, okL := b.hinge(-1)
	right, okR := b.hinge(+1)
	if !okL || !okR {
		return CoverPoint{}, nil, false
	}
	bends = b.bends(left, right)
	marks := b.fine(bends)
	cover := func(x float64) float64 { return b.point(x, true).Cover() }
	best = b.point(left, true)
	for i := 1; i < len(marks); i++ {
		for _, x := range leastBetween(cover, marks[i-1], marks[i]) {
			best = lesser(best, b.point(x, true))
		}
	}
	return best, bends, true
}

// lesser returns the point with less cover; of equal ones the lower station,
// then the lower offset.
func lesser(a, b CoverPoint) CoverPoint {
	d := b.Cover() - a.Cover()
	switch {
	case d < -coverTie:
		return b
	case d > coverTie:
		return a
	case b.At < a.At-coverTie || math.Abs(float64(b.At-a.At)) <= coverTie && b.Offset < a.Offset:
		return b
	}
	return a
}

// bends returns, from left to right, the hinges and every x in between where
// the surface above the axis bends: centre, lane edges, ends of curves and
// sections.
func (b barrelLine) bends(left, right float64) []float64 {
	xs := []float64{left, right, b.centre()}
	lane := func(side int) func(*section.Typical) float64 {
		return func(t *section.Typical) float64 { return t.Side(side).Lane.Width }
	}
	for _, side := range []int{-1, 1} {
		if x, ok := b.crossing(b.centre(), side, lane(side)); ok {
			xs = append(xs, x)
		}
	}
	sl, _ := b.at(left)
	sr, _ := b.at(right)
	over := station.Interval{From: min(sl, sr), To: max(sl, sr)}
	for _, s := range b.road.Breaks(over) {
		x := bisect(func(x float64) float64 { at, _ := b.at(x); return float64(at - s) }, left, right)
		// Typical sections may change there: both sides of the step count.
		xs = append(xs, x-stepAside, x, x+stepAside)
	}
	inside := slices.DeleteFunc(xs, func(x float64) bool { return x < left || x > right })
	slices.Sort(inside)
	return slices.CompactFunc(inside, func(a, c float64) bool { return math.Abs(c-a) < 1e-9 })
}

// fine cuts the stretches between bends into steps of marchStep where the
// alignment is curved, so that each is a parabola as good as exactly; on a
// straight road it already is one.
func (b barrelLine) fine(bends []float64) []float64 {
	sl, _ := b.at(bends[0])
	sr, _ := b.at(bends[len(bends)-1])
	if b.road.Line().Straight(station.Interval{From: min(sl, sr), To: max(sl, sr)}) {
		return bends
	}
	out := bends[:1:1]
	for i := 1; i < len(bends); i++ {
		n := math.Ceil((bends[i] - bends[i-1]) / marchStep)
		for k := 1.0; k < n; k++ {
			out = append(out, bends[i-1]+(bends[i]-bends[i-1])*k/n)
		}
		out = append(out, bends[i])
	}
	return out
}

// leastBetween returns both ends and the vertex of the parabola through three
// values, if it lies inside.
func leastBetween(f func(float64) float64, a, b float64) []float64 {
	m := a + (b-a)/2
	fa, fm, fb := f(a), f(m), f(b)
	curve := fa - 2*fm + fb
	if curve <= 1e-13 { // straight but for rounding, or highest in the middle
		return []float64{a, b}
	}
	v := m + (b-a)/2*(fa-fb)/(2*curve)
	if v <= a || v >= b {
		return []float64{a, b}
	}
	return []float64{a, v, b}
}
