package earthwork_test

import (
	"encoding/json"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile/station"
)

func stations(v ...float64) (out []station.Station) {
	for _, s := range v {
		out = append(out, station.Station(s))
	}
	return out
}

// Average end areas, every interval exact. Source: Fundamentals of
// Transportation (LibreTexts Engineering, Wikibooks; CC BY-SA), sec. 7.3,
// example 1 (verified).
func TestEndAreas(t *testing.T) {
	each, sum, err := earthwork.FromAreas(earthwork.EndArea, stations(0, 50, 100, 150), []float64{40, 42, 19, 34}, nil)
	require.NoError(t, err)
	for i, want := range []float64{2050, 1525, 1325} {
		assert.Equal(t, want, float64(each[i].Cut))
		assert.Zero(t, each[i].Fill)
	}
	assert.Equal(t, 4900.0, float64(sum.Cut))
}

// Pyramids where an area runs out, cut and fill apart. Source: the same,
// sec. 7.3, sample problem (verified; tolerance 0.05 of its printed digits).
func TestPyramids(t *testing.T) {
	at := stations(0, 50, 75, 100, 115, 150)
	fill, cut := []float64{60, 50, 25, 5, 0, 0}, []float64{0, 0, 0, 10, 15, 30}
	each, sum, err := earthwork.FromAreas(earthwork.Pyramid, at, cut, fill)
	require.NoError(t, err)
	for i, want := range []float64{2750, 937.5, 375, 25, 0} {
		assert.InDelta(t, want, float64(each[i].Fill), 0.05)
	}
	for i, want := range []float64{0, 0, 83.33, 187.5, 787.5} {
		assert.InDelta(t, want, float64(each[i].Cut), 0.05)
	}
	assert.InDelta(t, 4087.5, float64(sum.Fill), 0.05)
	assert.InDelta(t, 1058.33, float64(sum.Cut), 0.05)
	assert.InDelta(t, 3029.17, float64(sum.Fill)-float64(sum.Cut), 0.05)
	_, plain, err := earthwork.FromAreas(earthwork.EndArea, at, cut, fill)
	require.NoError(t, err)
	assert.InDelta(t, 4100, float64(plain.Fill), 1e-9)
	assert.InDelta(t, 1100, float64(plain.Cut), 1e-9)
}

// Where an area runs out, end areas give half as much again as the pyramid, a
// third of their own figure too much. Source: W. L. Webb, Railroad
// Construction: Theory and Practice, art. on the prismoidal correction, p. 129
// of the later edition (verified).
func TestExtremeOfTheEndAreaError(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, l := rapid.Float64Range(0.5e-6, 1e4).Draw(t, "area"), rapid.Float64Range(0.01, 100).Draw(t, "length")
		end, pyramid := earthwork.EndArea.Volume(0, a, l), earthwork.Pyramid.Volume(a, 0, l)
		assert.InEpsilon(t, a*l/2, end, 1e-12)
		assert.InEpsilon(t, a*l/3, pyramid, 1e-12)
		assert.InEpsilon(t, 0.5, (end-pyramid)/pyramid, 1e-9)
		assert.InEpsilon(t, 1.0/3, (end-pyramid)/end, 1e-9)
	})
}

// The rule jumps exactly at 0.5e-6 m².
func TestWhereThePyramidBegins(t *testing.T) {
	assert.InDelta(t, 6*10/3.0, earthwork.Pyramid.Volume(6, 0.49e-6, 10), 1e-5)
	assert.InDelta(t, 6*10/2.0, earthwork.Pyramid.Volume(6, 0.5e-6, 10), 1e-5)
	assert.Zero(t, earthwork.Pyramid.Volume(0, 0, 10))
}

func TestAreasThatGiveNoVolume(t *testing.T) {
	for name, c := range map[string]struct {
		at        []station.Station
		cut, fill []float64
	}{
		"one station":     {stations(0), []float64{1}, nil},
		"areas missing":   {stations(0, 10), []float64{1}, nil},
		"areas too many":  {stations(0, 10), nil, []float64{1, 2, 3}},
		"negative area":   {stations(0, 10), []float64{1, -1}, nil},
		"stations return": {stations(0, 10, 9), []float64{1, 1, 1}, nil},
	} {
		each, _, err := earthwork.FromAreas(earthwork.EndArea, c.at, c.cut, c.fill)
		assert.Error(t, err, name)
		assert.Nil(t, each, name)
	}
}

// Cases that are not ours to copy are read where they lie, beside the checkout.
type published struct {
	ID             string
	Inputs         map[string]any
	Expected       map[string]any
	Tolerance      map[string]float64
	Source, Status string
}

func readCase(t *testing.T, id string) published {
	raw, err := os.ReadFile(filepath.Join("..", "..", "shared", "checks", "geometry-earthwork.json"))
	if err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatalf("the published cases are missing: %v", err)
		}
		t.Skip("the published cases do not lie beside this checkout")
	}
	var all []published
	require.NoError(t, json.Unmarshal(raw, &all))
	for _, c := range all {
		if c.ID == id {
			return c
		}
	}
	t.Fatalf("no case %s", id)
	return published{}
}

func numbers(v any) (out []float64) {
	for _, x := range v.([]any) {
		out = append(out, x.(float64))
	}
	return out
}

// End areas in hundreds of feet, square feet and cubic yards. Source: G-C11 of
// the published cases.
func TestEndAreasInFeet(t *testing.T) {
	c := readCase(t, "G-C11")
	var at []station.Station
	for _, s := range numbers(c.Inputs["stations"]) {
		at = append(at, station.Station(100*s))
	}
	each, _, err := earthwork.FromAreas(earthwork.EndArea, at, numbers(c.Inputs["cut"]), numbers(c.Inputs["fill"]))
	require.NoError(t, err)
	cut, fill := numbers(c.Expected["cut_yd3"]), numbers(c.Expected["fill_yd3"])
	require.Len(t, each, len(cut))
	for i, v := range each {
		assert.InDelta(t, cut[i], float64(v.Cut)/27, c.Tolerance["all"])
		assert.InDelta(t, fill[i], float64(v.Fill)/27, c.Tolerance["all"])
	}
}
