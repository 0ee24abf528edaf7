package profile_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile"
	"sagcrest/profile/station"
)

// drawVertical draws a curve of any shape.
func drawVertical(t *rapid.T) profile.Vertical {
	at := profile.Point{At: station.Station(rapid.Float64Range(-500, 5000).Draw(t, "at")), Elev: rapid.Float64Range(-50, 900).Draw(t, "z")}
	fix := rapid.SampledFrom([]profile.Fix{profile.AtPVI, profile.AtPVC, profile.AtPVT}).Draw(t, "fix")
	g1, g2 := rapid.Float64Range(-0.09, 0.09).Draw(t, "g1"), rapid.Float64Range(-0.09, 0.09).Draw(t, "g2")
	l1, l2 := rapid.Float64Range(5, 400).Draw(t, "l1"), rapid.Float64Range(5, 400).Draw(t, "l2")
	if rapid.Bool().Draw(t, "circular") {
		return profile.NewCircular(fix, at, g1, g2, l1+l2)
	}
	return profile.NewVertical(fix, at, g1, g2, l1, l2)
}

// Laws of every shape: level and grade join both tangents and are continuous
// under the PVI; the grade is the slope of the level; the turning point has
// grade zero and is extreme; hung on any of its points it is the same curve.
func TestVerticalLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := drawVertical(t)
		for _, p := range []profile.Point{v.PVC, v.PVT} {
			z, _ := v.At(float64(p.At))
			assert.InDelta(t, p.Elev, z, 1e-9)
		}
		for _, c := range []struct {
			s float64
			g float64
		}{{float64(v.PVC.At), v.G1}, {float64(v.PVT.At), v.G2}} {
			_, before := v.At(c.s - 1e-7)
			_, after := v.At(c.s + 1e-7)
			assert.InDelta(t, c.g, before, 1e-7)
			assert.InDelta(t, c.g, after, 1e-7)
		}
		s := float64(v.PVC.At) + rapid.Float64Range(0.01, 0.99).Draw(t, "x")*v.Length()
		z0, _ := v.At(s - 1e-4)
		z1, g := v.At(s)
		z2, _ := v.At(s + 1e-4)
		assert.InDelta(t, g, (z2-z0)/2e-4, 1e-6)
		high, low := v.Extremes()
		assert.LessOrEqual(t, z1, high.Elev+1e-9)
		assert.GreaterOrEqual(t, z1, low.Elev-1e-9)
		if turn := v.Turning(); turn != nil {
			_, g := v.At(float64(turn.At))
			assert.InDelta(t, 0, g, 1e-9)
		}
		if !v.Circular {
			w := profile.NewVertical(profile.AtPVC, v.PVC, v.G1, v.G2, v.L1, v.L2)
			assert.InDelta(t, v.PVT.Elev, w.PVT.Elev, 1e-9)
		}
		limit := rapid.Float64Range(0.001, 0.05).Draw(t, "limit")
		if from, to, ok := v.Flat(limit); ok {
			_, ga := v.At((from + to) / 2)
			assert.Less(t, math.Abs(ga), limit+1e-9)
		}
	})
}

// A circle: every point lies at one distance from its centre.
func TestCircular(t *testing.T) {
	v := profile.NewCircular(profile.AtPVC, profile.Point{}, -0.04, 0.03, 300)
	r := 300 / (math.Sin(math.Atan(0.03)) - math.Sin(math.Atan(-0.04)))
	cx, cz := r*math.Sin(math.Atan(0.04)), r*math.Cos(math.Atan(0.04))
	for x := 0.0; x <= 300; x += 10 {
		z, _ := v.At(x)
		assert.InDelta(t, r, math.Hypot(x-cx, z-cz), 1e-9)
	}
	turn := v.Turning()
	require.NotNil(t, turn)
	assert.InDelta(t, cx, float64(turn.At), 1e-9)
	assert.InDelta(t, cz-r, turn.Elev, 1e-9)
}

// Law: every root leads through the point; admissible ones hold it inside; and
// the length that was drawn is among them.
func TestThrough(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		h := profile.Hung{Fix: rapid.SampledFrom([]profile.Fix{profile.AtPVI, profile.AtPVC, profile.AtPVT}).Draw(t, "fix"),
			At: profile.Point{At: 1000, Elev: 100}, G1: rapid.Float64Range(-0.08, -0.01).Draw(t, "g1"), G2: rapid.Float64Range(0.005, 0.08).Draw(t, "g2")}
		l := rapid.Float64Range(20, 600).Draw(t, "l")
		v := h.With(l)
		s := v.PVC.At + station.Station(rapid.Float64Range(0.05, 0.95).Draw(t, "x")*l)
		z, _ := v.At(float64(s))
		near := math.Inf(1)
		for _, r := range h.Through(profile.Point{At: s, Elev: z}) {
			near = math.Min(near, math.Abs(r.Length-l))
			if r.Admissible {
				got, _ := h.With(r.Length).At(float64(s))
				assert.InDelta(t, z, got, 1e-7)
			}
		}
		assert.Less(t, near, 1e-5*l)
	})
}

// Law: solving for a clearance and measuring it gives the gap back at the
// critical edge; the solution is exactly where the check flips.
func TestClear(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g1, g2 := rapid.Float64Range(-0.06, 0.06).Draw(t, "g1"), rapid.Float64Range(-0.06, 0.06).Draw(t, "g2")
		if math.Abs(g1-g2) < 0.01 {
			return
		}
		h := profile.Hung{At: profile.Point{At: 1000, Elev: 100}, G1: g1, G2: g2}
		from := rapid.Float64Range(850, 1150).Draw(t, "from")
		w := profile.Window{From: from, To: from + rapid.Float64Range(0, 40).Draw(t, "width"), Gap: 5,
			ElevFrom: rapid.Float64Range(96, 112).Draw(t, "a"), ElevTo: rapid.Float64Range(96, 112).Draw(t, "b"), Under: rapid.Bool().Draw(t, "under")}
		l, minimum, err := h.Clear(w)
		if err != nil {
			return
		}
		room, _ := w.Spare(h.With(l))
		assert.InDelta(t, 0, room, 1e-9)
		longer, _ := w.Spare(h.With(l * 1.001))
		shorter, _ := w.Spare(h.With(l / 1.001))
		if minimum {
			assert.GreaterOrEqual(t, longer, -1e-12)
			assert.Less(t, shorter, 1e-12)
		} else {
			assert.GreaterOrEqual(t, shorter, -1e-12)
			assert.Less(t, longer, 1e-12)
		}
	})
}

func TestClearWithoutSolution(t *testing.T) {
	h := profile.Hung{At: profile.Point{At: 0, Elev: 100}, G1: -0.03, G2: 0.03}
	_, _, err := h.Clear(profile.Window{From: -5, To: 5, ElevFrom: 90, ElevTo: 90, Gap: 5, Under: true})
	assert.ErrorIs(t, err, profile.ErrNever)
	_, _, err = h.Clear(profile.Window{From: -5, To: 5, ElevFrom: 90, ElevTo: 90, Gap: 5})
	assert.ErrorIs(t, err, profile.ErrAlways)
}
