package section

import "math"

// Stake is where a side slope from a hinge meets the ground: its distance from
// the centre, and how far the ground lies above (Cut) or below the hinge there.
type Stake struct {
	Offset float64
	Depth  float64
	Cut    bool
}

// SlopeStake walks outward from the hinge to the first meeting of a slope
// (horizontal per vertical) and the ground, a polyline whose offsets grow. The
// slope rises where the ground lies above the hinge. ok is false where they do
// not meet. Lengths in one unit.
func SlopeStake(hinge Point, slope float64, ground []Point) (s Stake, ok bool) {
	if len(ground) == 0 || ground[0].O > hinge.O || ground[len(ground)-1].O < hinge.O {
		return s, false
	}
	g := levelAt(ground, hinge.O)
	s.Cut = g >= hinge.Z
	r := run{pts: []Point{hinge}, rise: -1 / slope}
	if s.Cut {
		r.rise = 1 / slope
	}
	m := firstMeeting(r, 0, ground, hinge.O, s.Cut)
	if !m.found {
		return s, false
	}
	s.Offset, s.Depth = m.u, math.Abs(r.at(m.u)-hinge.Z)
	return s, true
}
