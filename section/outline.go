package section

import "slices"

// Outline is the shape of a slice from left to right, between its catch points
// (to the hinge on a side without one). The earthwork line jumps at the hinges,
// where it has two points of one offset.
type Outline struct{ Finished, Earthwork []Point }

// Outline returns the lines of a slice for drawings; it is empty where no single
// typical section holds.
func (r *Road) Outline(s *Slice) (o Outline) {
	if s.Typical < 0 {
		return o
	}
	t := r.shape(s.Typical, s.At)
	lf, le := t.half(s, -1)
	rf, re := t.half(s, +1)
	slices.Reverse(lf)
	slices.Reverse(le)
	// Both halves begin at the reference line.
	return Outline{append(lf, rf[1:]...), append(le, re[1:]...)}
}

// half returns the two lines of one side, outward from the reference line, with
// signed offsets.
func (t *Typical) half(s *Slice, side int) (finished, earthwork []Point) {
	f := s.Left
	if side > 0 {
		f = s.Right
	}
	signed := func(u, z float64) Point { return Point{float64(side) * u, z} }
	deck := t.deck(nil, side, s.Finished)
	for _, p := range deck {
		finished = append(finished, signed(p.O, p.Z))
		earthwork = append(earthwork, signed(p.O, p.Z-t.Pavement))
	}
	if f.State != Caught && f.State != Folded {
		return finished, earthwork
	}
	out := t.outside(nil, deck[len(deck)-1], f.Cut)
	end := float64(side) * f.Catch.O
	for _, p := range append(out.pts, Point{end, out.at(end)}) {
		if p.O <= end {
			finished = append(finished, signed(p.O, p.Z))
			earthwork = append(earthwork, signed(p.O, p.Z-t.Dressing))
		}
	}
	return finished, earthwork
}

// LongGround returns the original ground under the reference line, as station
// and level, at every place where it bends; it is cut where nothing is known.
func (r *Road) LongGround(w *Scratch) (out []Point) {
	for _, s := range r.groundStations(w, r.over) {
		if z, ok := r.ground.Level(w, s, 0); ok {
			out = append(out, Point{float64(s), z})
		}
	}
	return out
}
