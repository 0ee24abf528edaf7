package main

import (
	"bytes"
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/cmd/sagcrest/internal/wire"
)

// quillmere is the demo road.
func quillmere() string { return filepath.Join("..", "..", "testdata", "roads", "quillmere") }

// demo runs the demo road, or an alternative of it, into a folder.
func demo(t *testing.T, alternative string) (dir string, r wire.Results, code int) {
	dir = filepath.Join(t.TempDir(), "out")
	done := call(t, "run", quillmere(), "--alternative", alternative, "--out", dir, "--json")
	require.Contains(t, []int{0, 1}, done.code, done.errw)
	require.NoError(t, json.Unmarshal([]byte(done.out), &r))
	return dir, r, done.code
}

// The base road is the sound one: no finding of severity E, near balance.
func TestDemoBaseIsSound(t *testing.T) {
	_, r, code := demo(t, "base")
	assert.Equal(t, 0, code)
	assert.Equal(t, "complete", r.Status)
	for _, f := range r.Findings {
		assert.NotEqual(t, "E", f.Severity, f.Message)
	}
	last := (*r.Result.Earthwork.Mass.Ordinates)[len(*r.Result.Earthwork.Mass.Ordinates)-1]
	assert.Less(t, math.Abs(float64(last.Value)), 0.03*float64(*r.Result.Earthwork.Totals.CutBank))
	for _, c := range r.Result.Drainage.Culverts {
		assert.Equal(t, "ok", c.Verdict, c.ID)
	}
}

// The first draft lacks cover at the outer edge of a shoulder in the dry valley,
// not at the centre, and crosses the right of way with one catch point.
func TestDemoDraftLacksCoverAtAShoulder(t *testing.T) {
	_, r, code := demo(t, "first draft")
	assert.Equal(t, 1, code)
	var codes []string
	for _, f := range r.Findings {
		codes = append(codes, f.Severity+" "+f.Code)
	}
	assert.Equal(t, []string{"E D04", "W A09"}, codes)

	var valley *wire.Culvert
	for i := range r.Result.Drainage.Culverts {
		if c := &r.Result.Drainage.Culverts[i]; c.Verdict == "short" {
			valley = c
		}
	}
	require.NotNil(t, valley)
	assert.InDelta(t, 0.1, float64(valley.CoverMin.Value), 0.02)
	assert.Contains(t, []string{"shoulder", "hinge"}, valley.CoverMin.Where)
	centre := math.Inf(1)
	for _, p := range *valley.CoverProfile {
		if math.Abs(float64(p.Offset)) < 1e-6 {
			centre = float64(*p.Datum - p.Crown)
		}
	}
	assert.InDelta(t, 0.32, centre, 0.005)
	assert.GreaterOrEqual(t, centre, float64(valley.CoverMin.Required))
	assert.Len(t, *r.Result.Land.Left.Beyond, 1)
	assert.NotEmpty(t, valley.Mends)
}

// Results and the other documents keep to their published schemas.
func TestDocumentsKeepToTheirSchema(t *testing.T) {
	validate := func(name string, doc []byte) {
		text, ok := wire.Schema(name)
		require.True(t, ok)
		schema, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
		require.NoError(t, err)
		c := jsonschema.NewCompiler()
		require.NoError(t, c.AddResource(name+".json", schema))
		s, err := c.Compile(name + ".json")
		require.NoError(t, err)
		v, err := jsonschema.UnmarshalJSON(bytes.NewReader(doc))
		require.NoError(t, err)
		assert.NoError(t, s.Validate(v), name)
	}
	for _, alternative := range []string{"base", "first draft"} {
		validate("results", []byte(call(t, "run", quillmere(), "--alternative", alternative, "--out", filepath.Join(t.TempDir(), "o"), "--json").out))
		validate("check", []byte(call(t, "check", quillmere(), "--alternative", alternative, "--json").out))
	}
	validate("compare", []byte(call(t, "compare", quillmere(), "--json").out))
	validate("new", []byte(call(t, "new", filepath.Join(t.TempDir(), "x"), "--json").out))
	validate("explain", []byte(call(t, "explain", "D04", "--json").out))
	validate("calc", []byte(call(t, "calc", "sight", "kind=crest", "sight=185m", "g1=2", "g2=-3.75", "--json").out))
	validate("error", []byte(call(t, "check", quillmere(), "--alternative", "third", "--json").out))
}

// The same input gives the same bytes, under another time zone and with any
// number of processors; the page asks for nothing from outside.
func TestSameBytes(t *testing.T) {
	first, _, _ := demo(t, "first draft")
	t.Setenv("TZ", "Pacific/Auckland")
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(1))
	second, _, _ := demo(t, "first draft")
	files, err := os.ReadDir(first)
	require.NoError(t, err)
	require.Greater(t, len(files), 15)
	for _, f := range files {
		a, err := os.ReadFile(filepath.Join(first, f.Name()))
		require.NoError(t, err)
		b, err := os.ReadFile(filepath.Join(second, f.Name()))
		require.NoError(t, err)
		assert.True(t, bytes.Equal(a, b), f.Name())
	}
	page, err := os.ReadFile(filepath.Join(first, "report.html"))
	require.NoError(t, err)
	for _, outside := range []string{"http", "src=", "@import", "url("} {
		assert.NotContains(t, string(page), outside)
	}
	assert.Less(t, len(page), 2<<20*19/50, "2 MB for 5 km of road")
	assert.Equal(t, strings.Count(string(page), "<svg"), strings.Count(string(page), `role="img"`))
}

// Law: a road laid backwards, its length a whole number of pay intervals, has
// the same volumes, mirrored catch points and the same barrel.
func TestBackwardsRoad(t *testing.T) {
	survey, err := filepath.Abs(filepath.Join(quillmere(), "survey", "points.csv"))
	require.NoError(t, err)
	write := func(pi, pvi, at string) wire.Results {
		dir := t.TempDir()
		require.NoError(t, os.WriteFile(filepath.Join(dir, "road.toml"), []byte(`units = "metric"
[survey]
points = "`+survey+`"
order = "id,northing,easting,elevation,code"
vertical_datum = "local levelling"
[alignment]
pi = [ `+pi+` ]
[profile]
pvi = [ `+pvi+` ]
[[typical_section]]
name = "two lanes"
material = "till"
lanes = { left = { width = "3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = -0.025 } }
shoulders = { left = { width = "1.5 m", crossfall = 0.04 }, right = { width = "1.5 m", crossfall = -0.04 } }
ditch = { depth = "0.6 m", fore_slope = 3.0, bottom = "0.5 m" }
cut_slope = 1.5
fill_slope = 2.0
pavement = "0.40 m"
dressing = "0.15 m"
[[material]]
name = "till"
shrinkage = 0.1
[earthwork]
strip_depth = "0.25 m"
key_points = false
[[culvert]]
id = "C"
station = "`+at+`"
skew = 15
skew_side = "right_ahead"
shape = "circular"
diameter = "600 mm"
wall = "75 mm"
cover_rule = "reinforced concrete"
`), 0o644))
		done := call(t, "run", dir, "--json")
		require.Contains(t, []int{0, 1}, done.code, done.errw)
		var r wire.Results
		require.NoError(t, json.Unmarshal([]byte(done.out), &r))
		return r
	}
	// 400 m along the demo's first tangent, over ground that the demo surveyed.
	const a, b = "{ n = 2025, e = 543.3012701892219 }", "{ n = 2225, e = 889.7114317029974 }"
	forth := write(a+", "+b, `{ station = 0, elev = 110.5 }, { station = 400, elev = 100 }`, "0+360")
	back := write(b+", "+a, `{ station = 0, elev = 100 }, { station = 400, elev = 110.5 }`, "0+040")

	ft, bt := forth.Result.Earthwork.Totals, back.Result.Earthwork.Totals
	assert.InDelta(t, float64(*ft.CutBank), float64(*bt.CutBank), 1e-6)
	assert.InDelta(t, float64(*ft.FillCompacted), float64(*bt.FillCompacted), 1e-6)
	assert.InDelta(t, float64(*ft.Strip), float64(*bt.Strip), 1e-6)
	n := len(forth.Result.Sections)
	require.Len(t, back.Result.Sections, n)
	for i, s := range forth.Result.Sections {
		m := back.Result.Sections[n-1-i]
		assert.InDelta(t, float64(s.LeftCatch.Offset), -float64(m.RightCatch.Offset), 1e-8)
		assert.InDelta(t, float64(*s.CutArea), float64(*m.CutArea), 1e-8)
	}
	fc, bc := forth.Result.Drainage.Culverts[0], back.Result.Drainage.Culverts[0]
	require.NotNil(t, fc.Length)
	assert.InDelta(t, float64(*fc.Length), float64(*bc.Length), 1e-8)
	assert.InDelta(t, float64(*fc.Slope), float64(*bc.Slope), 1e-9)
	assert.InDelta(t, float64(fc.CoverMin.Value), float64(bc.CoverMin.Value), 1e-8)
}
