package drainage

import (
	"math"
	"slices"

	"sagcrest/section"
)

// Spot is a place along a barrel: metres from the reference line, and a level.
type Spot struct{ X, Z float64 }

// Drawing is a culvert along the axis of the barrel that governs, from left to
// right. Datum runs between the hinges.
type Drawing struct {
	Ground, Surface, Datum []Spot
	Invert, Soffit, Crown  []Spot
	Hinges                 [2]float64
	Least                  Spot // on the crown
}

// Draw returns the lines of a culvert that is judged; ok is false otherwise.
func (l *Laid) Draw(r *section.Road, w *section.Scratch) (d Drawing, ok bool) {
	if !l.Judged {
		return d, false
	}
	try := *l
	b, bends, ok := try.leastOver(r)
	if !ok {
		return d, false
	}
	left, right := l.Ends[0].X, l.Ends[1].X
	first, last := bends[0], bends[len(bends)-1]
	d.Hinges = [2]float64{first, last}
	d.Least = Spot{l.Least.X, l.Least.Crown}
	for _, x := range []float64{left, right} {
		p := b.point(x, false)
		d.Invert = append(d.Invert, Spot{x, p.Invert})
		d.Soffit = append(d.Soffit, Spot{x, p.Invert + l.Culvert.Height()})
		d.Crown = append(d.Crown, Spot{x, p.Crown})
	}
	for _, x := range b.fine(bends) {
		p := b.point(x, true)
		d.Datum = append(d.Datum, Spot{x, p.Datum})
	}
	d.ground(b, w, left, right, bends)
	return d, true
}

// beside is how far beyond the ends ground and slope are drawn, in metres.
const beside = 4.0

func (d *Drawing) ground(b barrelLine, w *section.Scratch, left, right float64, bends []float64) {
	xs := append(walk(w, b.axis, left-beside, right+beside), bends...)
	xs = append(xs, left, right)
	for _, x := range slices.Sorted(slices.Values(xs)) {
		s, o := b.at(x)
		if z, ok := b.road.Ground().Level(w, s, o); ok {
			d.Ground = append(d.Ground, Spot{x, z})
		}
		if z, _, ok := b.road.Finished(s, o); ok && x >= math.Min(left, bends[0]) && x <= math.Max(right, bends[len(bends)-1]) {
			d.Surface = append(d.Surface, Spot{x, z})
		}
	}
}
