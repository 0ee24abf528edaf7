package alignment_test

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
)

func lay(t require.TestingT, pi ...alignment.PI) *alignment.Alignment {
	a, found := alignment.New(pi)
	require.Empty(t, found)
	require.NotNil(t, a)
	return a
}

// The end of a clothoid from infinite radius to R after L metres, against the
// Fresnel integrals of SciPy 1.10.1 (x = A√π·C(t), y = A√π·S(t), t = L/(A√π)),
// for L/R up to 3.
func TestClothoidAgainstFresnel(t *testing.T) {
	for _, c := range []struct{ r, l, x, y float64 }{
		{300, 100, 99.722579217827, 5.544542365629},
		{100, 50, 49.688402921479, 4.148102426855},
		{100, 100, 97.528768820034, 16.371404737570},
		{100, 200, 180.904847580054, 62.053660344676},
		{100, 300, 239.177159201371, 127.552552886243},
		{50, 150, 119.588579600686, 63.776276443121},
		{1200, 60, 59.996250108505, 0.499977679015},
	} {
		// A PI that turns by the clothoid's angle and a little more, so that the
		// clothoid stands at the start of the curve.
		turn := c.l/(2*c.r) + 0.2
		a := lay(t,
			alignment.PI{E: 0, N: -2000}, alignment.PI{E: 0, N: 0, Radius: c.r, SpiralIn: c.l},
			alignment.PI{E: 2000 * math.Sin(turn), N: 2000 * math.Cos(turn)})
		e := a.Elements()[1]
		require.Equal(t, alignment.Clothoid, e.Kind)
		p := a.At(e.Over.To).XY
		assert.InDelta(t, c.y, p[0]-e.Start[0], 1e-9, "R %v L %v", c.r, c.l)
		assert.InDelta(t, c.x, p[1]-e.Start[1], 1e-9, "R %v L %v", c.r, c.l)
	}
}

// drawn makes a random alignment of bends to either side that fits: tangents of
// 400 m carry curves of at most 30 degrees.
func drawn(t *rapid.T) []alignment.PI {
	out := []alignment.PI{{E: 4.7e5, N: 5.3e6}}
	az := rapid.Float64Range(0, 2*math.Pi).Draw(t, "azimuth")
	for i := range rapid.IntRange(1, 4).Draw(t, "bends") {
		last := out[len(out)-1]
		p := alignment.PI{E: last.E + 400*math.Sin(az), N: last.N + 400*math.Cos(az)}
		p.Radius = rapid.Float64Range(150, 400).Draw(t, "radius")
		p.SpiralIn = rapid.SampledFrom([]float64{0, 30, 45}).Draw(t, "in")
		p.SpiralOut = rapid.SampledFrom([]float64{0, 30, 60}).Draw(t, "out")
		turn := rapid.Float64Range(0.4, 0.52).Draw(t, "turn")
		if i%2 == 1 {
			turn = -turn
		}
		az += turn
		out = append(out, p)
	}
	last := out[len(out)-1]
	return append(out, alignment.PI{E: last.E + 400*math.Sin(az), N: last.N + 400*math.Cos(az)})
}

// Laws of any alignment: elements follow each other without step, kink or (at a
// clothoid) jump of curvature; the end is the last PI; station → x,y → station
// closes to 1e-9 m.
func TestLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pi := drawn(t)
		a := lay(t, pi...)
		es := a.Elements()
		for i := 1; i < len(es); i++ {
			before, after := a.At(es[i].Over.From-1e-7), a.At(es[i].Over.From)
			assert.InDelta(t, before.XY[0], after.XY[0], 1e-6)
			assert.InDelta(t, before.XY[1], after.XY[1], 1e-6)
			assert.InDelta(t, 0, math.Remainder(before.Azimuth-after.Azimuth, 2*math.Pi), 1e-8)
			if es[i].Kind == alignment.Clothoid || es[i-1].Kind == alignment.Clothoid {
				assert.InDelta(t, before.Curvature, after.Curvature, 1e-8)
			}
		}
		last := pi[len(pi)-1]
		end := a.At(a.Length()).XY
		assert.InDelta(t, last.E, end[0], 2e-9)
		assert.InDelta(t, last.N, end[1], 2e-9)

		s := station.Station(rapid.Float64Range(0, float64(a.Length())).Draw(t, "s"))
		o := station.Offset(rapid.Float64Range(-60, 60).Draw(t, "o"))
		p := a.Point(s, o)
		gs, g, ok := a.LocateNear(p, s+station.Station(rapid.Float64Range(-20, 20).Draw(t, "hint")))
		require.True(t, ok)
		// Map coordinates of 5e6 m carry 1e-9 m.
		assert.InDelta(t, float64(s), float64(gs), 3e-9)
		assert.InDelta(t, float64(o), float64(g), 3e-9)
		_, nearest, ok := a.Locate(p)
		require.True(t, ok)
		assert.LessOrEqual(t, math.Abs(float64(nearest)), math.Abs(float64(o))+1e-8, "no foot is nearer")
	})
}

// Law: turned round, an alignment has the same length and mirrored offsets.
func TestReversing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pi := drawn(t)
		back := slices.Clone(pi)
		slices.Reverse(back)
		for i := range back {
			back[i].SpiralIn, back[i].SpiralOut = back[i].SpiralOut, back[i].SpiralIn
		}
		a, b := lay(t, pi...), lay(t, back...)
		assert.InDelta(t, float64(a.Length()), float64(b.Length()), 1e-8)
		s := station.Station(rapid.Float64Range(0, float64(a.Length())).Draw(t, "s"))
		p, q := a.Point(s, 12), b.Point(a.Length()-s, -12)
		assert.InDelta(t, p[0], q[0], 1e-7)
		assert.InDelta(t, p[1], q[1], 1e-7)
		assert.InDelta(t, a.Curvature(s), -b.Curvature(b.Length()-s), 1e-9)
	})
}

// A plain arc: T = R·tan(Δ/2), L = R·Δ (any surveying text).
func TestArc(t *testing.T) {
	a := lay(t, alignment.PI{N: 0}, alignment.PI{N: 500, Radius: 200}, alignment.PI{N: 500, E: 500})
	r := a.PITable()[0]
	assert.InDelta(t, math.Pi/2, r.Deflection, 1e-12, "right turns are positive")
	assert.InDelta(t, 200, r.TangentIn, 1e-9)
	assert.InDelta(t, 100*math.Pi, r.ArcLength, 1e-9)
	assert.InDelta(t, 200*(math.Sqrt2-1), r.External, 1e-9)
	assert.InDelta(t, 600+100*math.Pi, float64(a.Length()), 1e-9)
	assert.InDelta(t, 1.0/200, a.Curvature(400), 1e-15)
	assert.True(t, a.Straight(station.Interval{From: 0, To: 300}))
	assert.False(t, a.Straight(station.Interval{From: 0, To: 300.1}))

	s, o, ok := a.Locate(a.Point(450, 150))
	require.True(t, ok)
	assert.InDelta(t, 450, float64(s), 1e-9)
	assert.InDelta(t, 150, float64(o), 1e-9)
	_, _, ok = a.Locate([2]float64{0, -1})
	assert.False(t, ok, "before the start")
}

// Beyond its ends the alignment goes on straight.
func TestBeyondTheEnds(t *testing.T) {
	a := lay(t, alignment.PI{N: 0}, alignment.PI{N: 100})
	assert.InDelta(t, -7, a.At(-7).XY[1], 1e-12)
	assert.InDelta(t, 103, a.Point(103, 0)[1], 1e-12)
	assert.Zero(t, a.Curvature(-7))
}

// Lengths of the roads with exact answers beside the project.
func TestClosedRoadLengths(t *testing.T) {
	for _, name := range []string{"pappus_cut_right", "pappus_cut_right_spiral"} {
		path := filepath.Join("..", "..", "..", "shared", "checks", "closed", name+".json")
		text, err := os.ReadFile(path)
		if err != nil {
			if os.Getenv("CI") == "true" {
				t.Fatal(err)
			}
			t.Skipf("%s is missing", path)
		}
		var c struct {
			Spec struct {
				Alignment struct {
					PI []struct{ N, E, Radius, Spiral float64 }
				}
			}
			Exact struct{ Length, Tangent float64 }
		}
		require.NoError(t, json.Unmarshal(text, &c))
		var pi []alignment.PI
		for _, p := range c.Spec.Alignment.PI {
			pi = append(pi, alignment.PI{E: p.E, N: p.N, Radius: p.Radius, SpiralIn: p.Spiral, SpiralOut: p.Spiral})
		}
		a := lay(t, pi...)
		assert.InDelta(t, c.Exact.Length, float64(a.Length()), 1e-9, name)
		assert.InDelta(t, c.Exact.Tangent, a.PITable()[0].TangentIn, 1e-9, name)
	}
}
