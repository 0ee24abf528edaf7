package alignment_test

import (
	"math"
	"testing"

	"github.com/paulmach/orb"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
)

// sharp is one tight bend with long clothoids on map coordinates, so that
// points at common offsets lie close to the centres of curvature.
func sharp(t *rapid.T) *alignment.Alignment {
	r := rapid.Float64Range(50, 200).Draw(t, "radius")
	in := rapid.SampledFrom([]float64{0, 30, 60, 100}).Draw(t, "in")
	out := rapid.SampledFrom([]float64{0, 30, 60, 100}).Draw(t, "out")
	az := rapid.Float64Range(0, 2*math.Pi).Draw(t, "azimuth")
	d := (in+out)/(2*r) + rapid.SampledFrom([]float64{0, 0.2, 0.7}).Draw(t, "arc")
	if d == 0 {
		d = 0.3
	}
	d = math.Copysign(d, rapid.Float64Range(-1, 1).Draw(t, "side"))
	at := rapid.SampledFrom([]float64{0, 5.3e6}).Draw(t, "origin")
	return lay(t,
		alignment.PI{E: at - 900*math.Sin(az), N: at - 900*math.Cos(az)},
		alignment.PI{E: at, N: at, Radius: r, SpiralIn: in, SpiralOut: out},
		alignment.PI{E: at + 900*math.Sin(az+d), N: at + 900*math.Cos(az+d)})
}

// somewhere draws a station: anywhere, an end, or where two elements meet.
func somewhere(t *rapid.T, a *alignment.Alignment) station.Station {
	special := append(a.Breaks(), 0, a.Length())
	if rapid.Bool().Draw(t, "special") {
		return rapid.SampledFrom(special).Draw(t, "s")
	}
	return station.Station(rapid.Float64Range(0, float64(a.Length())).Draw(t, "s"))
}

// Law: whatever is set out on this side of the centre of curvature is found
// again, and no place of a fine walk along the alignment is nearer.
func TestLocateFindsTheNearest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := sharp(t)
		s := somewhere(t, a)
		o := rapid.Float64Range(-180, 180).Draw(t, "o")
		if k := a.Curvature(s); k*o > 0.97 {
			o = 0.97 / k
		}
		p := a.Point(s, station.Offset(o))
		gs, g, ok := a.Locate(p)
		require.True(t, ok)
		back := a.Point(gs, g)
		assert.InDelta(t, p[0], back[0], 1e-7, "it is a foot")
		assert.InDelta(t, p[1], back[1], 1e-7)
		for i := range 400 {
			q := a.At(a.Length() * station.Station(i) / 399).XY
			require.GreaterOrEqual(t, math.Hypot(q[0]-p[0], q[1]-p[1]), math.Abs(float64(g))-1e-8)
		}
	})
}

// Law: from a close hint the very foot is found; from any hint the search comes
// to rest where the alignment lies square to the point.
func TestLocateNearComesToRest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := sharp(t)
		s := somewhere(t, a)
		o := rapid.Float64Range(-40, 40).Draw(t, "o")
		p := a.Point(s, station.Offset(o))
		gs, g, ok := a.LocateNear(p, s+station.Station(rapid.Float64Range(-5, 5).Draw(t, "near")))
		require.True(t, ok)
		assert.InDelta(t, float64(s), float64(gs), 1e-8)
		assert.InDelta(t, o, float64(g), 1e-8)

		gs, _, ok = a.LocateNear(p, station.Station(rapid.Float64Range(-500, 2500).Draw(t, "far")))
		if ok {
			pose := a.At(gs)
			assert.InDelta(t, 0, (p[0]-pose.XY[0])*math.Sin(pose.Azimuth)+(p[1]-pose.XY[1])*math.Cos(pose.Azimuth), 1e-7)
		}
	})
}

// Beyond the ends lies no foot, but LocateNear goes on straight; the centre of an
// arc and a point that is no number have none.
func TestLocateOffTheAlignment(t *testing.T) {
	a := lay(t, bend(200, 0, 0, 500)...)
	for _, s := range []station.Station{-0.001, a.Length() + 0.001} {
		p := a.Point(s, 12)
		_, _, ok := a.Locate(p)
		assert.False(t, ok)
		gs, g, ok := a.LocateNear(p, s)
		require.True(t, ok)
		assert.InDelta(t, float64(s), float64(gs), 1e-9)
		assert.InDelta(t, 12, float64(g), 1e-9)
	}
	_, _, ok := a.LocateNear(orb.Point{200, 300}, 450)
	assert.False(t, ok, "the centre")
	_, _, ok = a.LocateNear(orb.Point{math.NaN(), 0}, 450)
	assert.False(t, ok)
	_, _, ok = a.Locate(orb.Point{math.NaN(), 0})
	assert.False(t, ok)
	// Beyond the centre the arc is the farthest around; both tangents are nearer.
	s, o, ok := a.Locate(orb.Point{350, 150})
	require.True(t, ok)
	assert.InDelta(t, 150, float64(s), 1e-9, "equally near: the lower station")
	assert.InDelta(t, 350, float64(o), 1e-9)
}
