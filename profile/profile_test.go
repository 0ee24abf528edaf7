package profile_test

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

	"sagcrest/profile"
	"sagcrest/profile/station"
)

func build(t require.TestingT, pvi ...profile.PVI) *profile.Profile {
	p, found := profile.New(pvi)
	require.Empty(t, found)
	require.NotNil(t, p)
	return p
}

// one builds a grade line with one curve from its PVI and grades (ratios).
func one(t require.TestingT, at, elev, g1, g2, length float64) *profile.Profile {
	arm := length/2 + 1000
	return build(t,
		profile.PVI{At: station.Station(at - arm), Elev: elev - g1*arm},
		profile.PVI{At: station.Station(at), Elev: elev, Length: length},
		profile.PVI{At: station.Station(at + arm), Elev: elev + g2*arm})
}

func elev(t *testing.T, p *profile.Profile, s float64) float64 {
	z, _, ok := p.At(station.Station(s))
	require.True(t, ok)
	return z
}

// Case G-A08: metric sag. Source: LibreTexts/Wikibooks, Fundamentals of
// Transportation (CC BY-SA), section 7.5, example 1; printed results.
func TestMetricSagG_A08(t *testing.T) {
	c := one(t, 10250, 990, -0.04, 0.02, 500).Curves()[0]
	assert.InDelta(t, 10000, float64(c.PVC.At), 0.005)
	assert.InDelta(t, 1000, c.PVC.Elev, 0.005)
	assert.InDelta(t, 10500, float64(c.PVT.At), 0.005)
	assert.InDelta(t, 995, c.PVT.Elev, 0.005)
	require.NotNil(t, c.Turning)
	assert.InDelta(t, 10333.33, float64(c.Turning.At), 0.005)
	assert.InDelta(t, 993.33, c.Turning.Elev, 0.005)
}

// Case G-A09: offset of a crest from its first tangent, 8.75 m after 1,000 of
// 2,000 m. Source: the same, example 2.
func TestTangentOffsetG_A09(t *testing.T) {
	p := one(t, 1000, 0, 0.03, -0.005, 2000)
	assert.InDelta(t, 8.75, 0.03*1000-30-elev(t, p, 1000), 0.005)
}

// Case G-A14: L = K·A, K 38 and A 3.5. Source: Indiana DOT Design Manual,
// example 44-3.2, seen in a text that quotes it.
func TestLengthFromKG_A14(t *testing.T) {
	p := build(t, profile.PVI{At: 0, Elev: 1.5 * 10}, profile.PVI{At: 1000, Elev: 0, K: 38}, profile.PVI{At: 2000, Elev: 20})
	assert.InDelta(t, 133, p.Curves()[0].Length, 0.5)
	// The radius at the vertex is 100·K.
	q := build(t, profile.PVI{At: 0, Elev: 15}, profile.PVI{At: 1000, Elev: 0, Radius: 3800}, profile.PVI{At: 2000, Elev: 20})
	assert.InDelta(t, p.Curves()[0].Length, q.Curves()[0].Length, 1e-9)
}

// sharedCase reads a case that is not shipped.
func sharedCase(t *testing.T, id string) (inputs, expected json.RawMessage) {
	path := filepath.Join("..", "..", "shared", "checks", "geometry-earthwork.json")
	text, err := os.ReadFile(path)
	if err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatal(err)
		}
		t.Skipf("%s is missing: its cases are not run", path)
	}
	var cases []struct {
		ID               string
		Inputs, Expected json.RawMessage
	}
	require.NoError(t, json.Unmarshal(text, &cases))
	for _, c := range cases {
		if c.ID == id {
			return c.Inputs, c.Expected
		}
	}
	t.Fatalf("no case %s", id)
	return nil, nil
}

func read[T any](t *testing.T, raw json.RawMessage) (v T) {
	require.NoError(t, json.Unmarshal(raw, &v))
	return v
}

// Case G-A01: symmetrical crest with its station table, in feet.
func TestCrestTableG_A01(t *testing.T) {
	in, out := sharedCase(t, "G-A01")
	c := read[struct {
		At float64 `json:"pvi_station"`
		Z  float64 `json:"pvi_elev"`
		G1 float64
		G2 float64
		L  float64
	}](t, in)
	want := read[struct {
		Table [][3]float64
		High  [2]float64 `json:"high_point_computed"`
	}](t, out)
	p := one(t, c.At, c.Z, c.G1/100, c.G2/100, c.L)
	for _, row := range want.Table {
		z, g, ok := p.At(station.Station(row[0]))
		require.True(t, ok)
		assert.InDelta(t, row[1], z, 0.0005)
		assert.InDelta(t, row[2], 100*g, 0.05)
	}
	turn := p.Curves()[0].Turning
	assert.InDelta(t, want.High[0], float64(turn.At), 0.001)
	assert.InDelta(t, want.High[1], turn.Elev, 0.0005)
}

// Case G-A03: crest given by its ends and the PVI's level.
func TestCrestFromEndsG_A03(t *testing.T) {
	in, out := sharedCase(t, "G-A03")
	c := read[struct {
		BVC, EVC [2]float64
		Z        float64 `json:"pvi_elev"`
	}](t, in)
	want := read[struct {
		Table [][2]float64
		High  [2]float64 `json:"high_point"`
	}](t, out)
	mid := (c.BVC[0] + c.EVC[0]) / 2
	p := build(t, profile.PVI{At: station.Station(c.BVC[0]), Elev: c.BVC[1]},
		profile.PVI{At: station.Station(mid), Elev: c.Z, Length: c.EVC[0] - c.BVC[0]}, profile.PVI{At: station.Station(c.EVC[0]), Elev: c.EVC[1]})
	for _, row := range want.Table {
		assert.InDelta(t, row[1], elev(t, p, row[0]), 0.0005)
	}
	assert.InDelta(t, want.High[0], float64(p.Curves()[0].Turning.At), 0.0005)
	assert.InDelta(t, want.High[1], p.Curves()[0].Turning.Elev, 0.0005)
}

// Cases G-A04 and G-A12: ends, turning point and rows from a PVI, in feet.
func TestEndsG_A04_A12(t *testing.T) {
	for _, id := range []string{"G-A04", "G-A12"} {
		in, out := sharedCase(t, id)
		c := read[struct {
			PVI       [2]float64
			G1, G2, L float64
		}](t, in)
		want := read[struct {
			BVC, EVC [2]float64
			Low      [2]float64 `json:"low_point"`
			High     [2]float64 `json:"high_point_computed"`
			Table    [][2]float64
			Rows     [][2]float64 `json:"computed_rows"`
		}](t, out)
		p := one(t, c.PVI[0], c.PVI[1], c.G1/100, c.G2/100, c.L)
		v := p.Curves()[0]
		assert.InDelta(t, want.BVC[0], float64(v.PVC.At), 0.005, id)
		assert.InDelta(t, want.BVC[1], v.PVC.Elev, 0.005, id)
		assert.InDelta(t, want.EVC[1], v.PVT.Elev, 0.005, id)
		turn := [2]float64{math.Max(want.Low[0], want.High[0]), math.Max(want.Low[1], want.High[1])}
		assert.InDelta(t, turn[0], float64(v.Turning.At), 0.005, id)
		assert.InDelta(t, turn[1], v.Turning.Elev, 0.005, id)
		for _, row := range slices.Concat(want.Table, want.Rows) {
			assert.InDelta(t, row[1], elev(t, p, row[0]), 0.005, id)
		}
	}
}

// The four curves of a public alignment file in feet: K, turning point and PVT.
// Source: buildingSMART IFC rules repository (MIT),
// pass-alb012-correct_radius_parabolic_curve_type.ifc, values; stations are
// distances along. Feet × 0.3048 give the metres of that file.
func TestGoldenCurves(t *testing.T) {
	for _, unit := range []float64{1, 0.3048} {
		at := func(ft float64) station.Station { return station.Station(ft * unit) }
		p := build(t,
			profile.PVI{At: 0, Elev: 100 * unit},
			profile.PVI{At: at(2000), Elev: 135 * unit, Length: 1600 * unit},
			profile.PVI{At: at(5000), Elev: 105 * unit, Length: 1200 * unit},
			profile.PVI{At: at(7400), Elev: 153 * unit, Length: 2000 * unit},
			profile.PVI{At: at(9800), Elev: 105 * unit, Length: 800 * unit},
			profile.PVI{At: at(12800), Elev: 90 * unit})
		want := []struct{ pvc, z, k, turn, turnZ, pvtMetres float64 }{
			{1200, 121, 581.82, 2218.182, 129.9091, 38.7096},
			{4400, 111, 400, 4800, 109, 35.6616},
			{6400, 133, 500, 7400, 143, 40.5384},
			{9400, 113, 533.33, 0, 0, 31.3944},
		}
		for i, c := range p.Curves() {
			w := want[i]
			assert.InDelta(t, w.pvc*unit, float64(c.PVC.At), 1e-9)
			assert.InDelta(t, w.z*unit, c.PVC.Elev, 1e-9)
			assert.InDelta(t, w.k*unit, c.K, 0.005)
			assert.InDelta(t, w.pvtMetres, c.PVT.Elev/unit*0.3048, 0.00005)
			if w.turn == 0 {
				assert.Nil(t, c.Turning, "it would turn beyond its end")
				continue
			}
			assert.InDelta(t, w.turn*unit, float64(c.Turning.At), 0.0005)
			assert.InDelta(t, w.turnZ*unit, c.Turning.Elev, 0.00005)
		}
	}
}

// Laws of any grade line: level and, on curves, grade are continuous; ends of
// curves lie on both tangents; turned round it is the same line.
func TestLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pvi := []profile.PVI{{At: 0, Elev: 100}}
		for s := station.Station(100); s <= 500; s += 100 {
			pvi = append(pvi, profile.PVI{At: s, Elev: 100 + rapid.Float64Range(-6, 6).Draw(t, "z"), Length: rapid.Float64Range(1, 100).Draw(t, "l")})
		}
		pvi = append(pvi, profile.PVI{At: 600, Elev: 101})
		p := build(t, pvi...)
		for _, s := range p.Breaks() {
			z0, _, _ := p.At(s - 1e-9)
			z1, g1, _ := p.At(s)
			g0, _ := p.GradeBefore(s)
			assert.InDelta(t, z0, z1, 1e-8)
			assert.InDelta(t, g0, g1, 1e-9)
		}
		back := slices.Clone(pvi)
		slices.Reverse(back)
		for i := range back {
			back[i].At = 600 - back[i].At
		}
		q := build(t, back...)
		s := station.Station(rapid.Float64Range(0, 600).Draw(t, "s"))
		z, g, _ := p.At(s)
		zb, _, _ := q.At(600 - s)
		gb, _ := q.GradeBefore(600 - s)
		assert.InDelta(t, z, zb, 1e-9)
		assert.InDelta(t, g, -gb, 1e-9)
	})
}

// Off the grade line there is no level; at a break the grade ahead counts,
// except at the end.
func TestOddPlaces(t *testing.T) {
	p := build(t, profile.PVI{At: 0, Elev: 0}, profile.PVI{At: 100, Elev: 1}, profile.PVI{At: 200, Elev: 0})
	for _, s := range []station.Station{-1e-9, 200.001, station.Station(math.NaN()), station.Station(math.Inf(1))} {
		_, _, ok := p.At(s)
		assert.False(t, ok, "%v", s)
	}
	_, g, _ := p.At(100)
	assert.InDelta(t, -0.01, g, 1e-12)
	_, g, _ = p.At(200)
	assert.InDelta(t, -0.01, g, 1e-12)
	c := p.Curves()[0]
	assert.Equal(t, profile.Break, c.Shape)
	require.NotNil(t, c.Turning)
	assert.Equal(t, station.Station(100), c.Turning.At)
}
