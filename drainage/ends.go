package drainage

import (
	"math"
	"slices"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// End is one end of the middle axis. Side is −1 left, +1 right; X the distance
// along the axis from the crossing. Ground is the original ground there.
type End struct {
	Side        int
	X           float64
	At          station.Station
	Offset      station.Offset
	Invert      float64
	Ground      float64
	GroundKnown bool
}

// trouble tells why a barrel has no end on one side.
type trouble byte

const (
	fine trouble = iota
	offRoad
	inCut
	noGround
)

// findEnd finds the end of the barrel on one side. With no invert given the
// barrel ends where the finished side slope, cut along the barrel, first meets
// the original ground, which is the invert; else where the slope reaches the
// invert.
func findEnd(w *section.Scratch, a axis, side int, invert *float64) (End, trouble) {
	hinge, ok := a.hinge(side)
	if !ok {
		return End{Side: side}, offRoad
	}
	s, o := a.at(hinge)
	e := End{Side: side, X: hinge, At: s, Offset: station.Offset(o)}
	if cut, known := a.road.InCut(w, s, side); !known {
		return e, noGround
	} else if cut {
		return e, inCut
	}
	target := func(x float64) (float64, bool) {
		if invert != nil {
			return *invert, true
		}
		s, o := a.at(x)
		return a.road.Ground().Level(w, s, o)
	}
	x, why := firstFall(w, a, hinge, side, target)
	e.X = x
	s, o = a.at(x)
	e.At, e.Offset = s, station.Offset(o)
	if why != fine {
		return e, why
	}
	e.Ground, e.GroundKnown = a.road.Ground().Level(w, s, o)
	e.Invert = e.Ground
	if invert != nil {
		e.Invert = *invert
	}
	if !e.GroundKnown {
		return e, noGround
	}
	return e, fine
}

// firstFall walks outward from the hinge to the first place where the finished
// slope is no longer above the target.
func firstFall(w *section.Scratch, a axis, hinge float64, side int, target func(float64) (float64, bool)) (float64, trouble) {
	why := fine
	h := func(x float64) float64 {
		z, _, okZ := a.finished(x)
		g, okG := target(x)
		switch {
		case !okZ:
			why = offRoad
		case !okG:
			why = noGround
		}
		return z - g
	}
	prev, prevH := hinge, h(hinge)
	if why != fine || prevH <= 0 {
		return hinge, why
	}
	for reach := 0.0; reach < farthest; reach += 20 {
		for _, x := range walk(w, a, hinge+float64(side)*reach, hinge+float64(side)*(reach+20)) {
			if x == prev {
				continue
			}
			v := h(x)
			if why != fine {
				return prev, why
			}
			if root, ok := fallBetween(h, prev, prevH, x, v); ok {
				return root, fine
			}
			prev, prevH = x, v
		}
	}
	return prev, noGround
}

// walk returns the places between two x, from the first to the second, where
// the ground may bend, with no step longer than marchStep.
func walk(w *section.Scratch, a axis, from, to float64) []float64 {
	lo, hi := math.Min(from, to), math.Max(from, to)
	xs := a.road.Ground().Corners(w, []float64{lo, hi}, a.ray, lo, hi)
	for x := lo + marchStep; x < hi; x += marchStep {
		xs = append(xs, x)
	}
	slices.Sort(xs)
	xs = slices.Compact(xs)
	if from > to {
		slices.Reverse(xs)
	}
	return xs
}

// fallBetween looks for the first zero of h between a (h > 0) and b. A slope
// that dips to zero and rises again inside the step is found by the parabola
// through three values, which is the slope itself on a straight road.
func fallBetween(h func(float64) float64, a, ha, b, hb float64) (float64, bool) {
	if hb <= 0 {
		return bisect(h, a, b), true
	}
	m := a + (b-a)/2
	hm := h(m)
	curve := ha - 2*hm + hb
	if curve <= 0 {
		return 0, false
	}
	v := m + (b-a)/2*(ha-hb)/(2*curve)
	if (v-a)*(v-b) >= 0 {
		return 0, false
	}
	if h(v) <= 0 {
		return bisect(h, a, v), true
	}
	return 0, false
}
