package section

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"
)

// The closed forms of a linear piece against a midpoint sum of 20,000 slabs.
func TestPieceAgainstSummation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := piece{
			u1: rapid.Float64Range(0, 20).Draw(t, "u1"),
			h1: rapid.Float64Range(-5, 5).Draw(t, "h1"),
			h2: rapid.Float64Range(-5, 5).Draw(t, "h2"),
		}
		p.u2 = p.u1 + rapid.Float64Range(0.01, 10).Draw(t, "width")
		top := rapid.Float64Range(0, 3).Draw(t, "top")
		const n = 20000
		var area, moment float64
		for i := range n {
			x := (float64(i) + 0.5) / n
			u, h := p.u1+x*(p.u2-p.u1), p.h1+x*(p.h2-p.h1)-top
			if h > 0 {
				area += h * (p.u2 - p.u1) / n
				moment += u * h * (p.u2 - p.u1) / n
			}
		}
		a, m := p.above(top)
		assert.InDelta(t, area, a, 1e-5)
		assert.InDelta(t, moment, m, 3e-4)
	})
}

// Cut above plus fill below is the area of the absolute difference, and their
// difference the signed one, to rounding.
func TestPieceSplitsWithoutLoss(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := piece{0, rapid.Float64Range(-9, 9).Draw(t, "h1"), rapid.Float64Range(0.1, 30).Draw(t, "u"), rapid.Float64Range(-9, 9).Draw(t, "h2")}
		cut, mc := p.above(0)
		fill, mf := p.below()
		assert.InDelta(t, p.u2*(p.h1+p.h2)/2, cut-fill, 1e-12)
		assert.InDelta(t, p.u2*p.u2*(p.h1+2*p.h2)/6, mc-mf, 1e-10)
		assert.GreaterOrEqual(t, math.Min(cut, fill), 0.0)
	})
}

// A fill slope of 1 in 2 from a hinge at 5 m, 3 m above level ground, meets it
// 6 m farther out; the ditch of a cut is passed before the slope rises.
func TestFirstMeeting(t *testing.T) {
	level := []Point{{0, 100}, {100, 100}}
	typ := &Typical{CutSlope: 1.5, FillSlope: 2, Ditch: &Ditch{Depth: 0.6, ForeSlope: 3, Bottom: 0.5}}

	fill := typ.outside(nil, Point{5, 103}, false)
	m := firstMeeting(fill, 0, level, 5, false)
	assert.True(t, m.found)
	assert.InDelta(t, 11, m.u, 1e-12)

	cut := typ.outside(nil, Point{5, 97}, true)
	m = firstMeeting(cut, 0, level, 5, true)
	// 5 + 0.6·3 + 0.5 = 7.3 at 96.4; 3.6 m up at 1 in 1.5 is 5.4 m.
	assert.InDelta(t, 12.7, m.u, 1e-12)
	assert.Equal(t, 7.3, cut.ditchEnd)

	falling := []Point{{0, 100}, {5, 97.1}, {6, 96.0}, {50, 50}}
	m = firstMeeting(cut, 0, falling, 5, true)
	assert.True(t, m.found)
	assert.Less(t, m.u, 6.8, "the ground is met on the fore slope")

	m = firstMeeting(fill, 0, []Point{{0, 100}, {7, 100}}, 5, false)
	assert.False(t, m.found)
	assert.Equal(t, 7.0, m.until)
}

// A back slope of its own ends at hinge level; then the cut slope goes on.
func TestBackSlopeEndsAtHingeLevel(t *testing.T) {
	typ := &Typical{CutSlope: 1.5, FillSlope: 2, Ditch: &Ditch{Depth: 0.6, ForeSlope: 3, Bottom: 0.5, BackSlope: 2}}
	r := typ.outside(nil, Point{5, 97}, true)
	assert.InDelta(t, 97, r.at(5+1.8+0.5+1.2), 1e-12)
	assert.InDelta(t, 98, r.at(5+1.8+0.5+1.2+1.5), 1e-12)
}
