package main

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// Roads with exact answers, from ../shared/checks/closed: their README says how
// `spec` is to be read and where each answer stands in the results.

// shared returns a folder beside the project, or skips; under CI it must exist.
func shared(t *testing.T, parts ...string) string {
	dir := filepath.Join(append([]string{"..", "..", "..", "shared"}, parts...)...)
	if _, err := os.Stat(dir); err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatalf("%s is missing", dir)
		}
		t.Skipf("%s is missing: roads with exact answers are not run", dir)
	}
	return dir
}

type closedSide struct{ Width, Crossfall float64 }

type closedRoad struct {
	Name string
	Spec struct {
		Ground    struct{ Kind, Path, Points string }
		Alignment struct {
			PI []struct{ N, E, Radius, Spiral float64 }
		}
		Profile struct {
			PVI []struct{ Station, Elev, Length float64 }
		}
		Section struct {
			Lanes, Shoulders struct{ Left, Right closedSide }
			Ditch            *struct {
				Depth, Bottom float64
				ForeSlope     float64 `json:"fore_slope"`
			}
			CutSlope    float64 `json:"cut_slope"`
			FillSlope   float64 `json:"fill_slope"`
			Pavement    float64
			Dressing    float64
			StripDepth  float64 `json:"strip_depth"`
			StripMargin float64 `json:"strip_margin"`
		}
		Superelevation [][]float64
		Culverts       []struct {
			ID             string
			Station        float64
			SkewDeg        float64 `json:"skew_deg"`
			SkewSide       string  `json:"skew_side"`
			Diameter, Wall float64
		}
	}
	InResults []struct {
		Path             string
		Value, Tolerance float64
		Needs            string
	} `json:"in_results"`
}

// project translates a spec into a project file.
func (r *closedRoad) project(dir string) string {
	var b strings.Builder
	p := func(format string, args ...any) { fmt.Fprintf(&b, format+"\n", args...) }
	s := r.Spec
	p("units = \"metric\"\n[survey]\nvertical_datum = \"any\"")
	if s.Ground.Kind == "grid" {
		p("grid = %q", filepath.Join(dir, s.Ground.Path))
	} else {
		p("points = %q\norder = \"id,northing,easting,elevation\"", filepath.Join(dir, s.Ground.Points))
	}
	p("[alignment]\npi = [")
	for _, q := range s.Alignment.PI {
		curve := ""
		if q.Radius > 0 {
			curve = fmt.Sprintf(", radius = \"%v m\"", q.Radius)
		}
		if q.Spiral > 0 {
			curve += fmt.Sprintf(", spiral = \"%v m\"", q.Spiral)
		}
		p("{ n = %v, e = %v%s },", q.N, q.E, curve)
	}
	p("]\n[profile]\npvi = [")
	for _, q := range s.Profile.PVI {
		length := ""
		if q.Length > 0 {
			length = fmt.Sprintf(", length = \"%v m\"", q.Length)
		}
		p("{ station = %v, elev = %v%s },", q.Station, q.Elev, length)
	}
	c := s.Section
	p("]\n[[typical_section]]\nname = \"only\"\nmaterial = \"earth\"")
	p("lanes = { left = { width = \"%v m\", crossfall = %v }, right = { width = \"%v m\", crossfall = %v } }", c.Lanes.Left.Width, c.Lanes.Left.Crossfall, c.Lanes.Right.Width, c.Lanes.Right.Crossfall)
	p("shoulders = { left = { width = \"%v m\", crossfall = %v }, right = { width = \"%v m\", crossfall = %v } }", c.Shoulders.Left.Width, c.Shoulders.Left.Crossfall, c.Shoulders.Right.Width, c.Shoulders.Right.Crossfall)
	if d := c.Ditch; d != nil {
		p("ditch = { depth = \"%v m\", fore_slope = %v, bottom = \"%v m\" }", d.Depth, d.ForeSlope, d.Bottom)
	}
	p("cut_slope = %v\nfill_slope = %v\npavement = \"%v m\"\ndressing = \"%v m\"", c.CutSlope, c.FillSlope, c.Pavement, c.Dressing)
	p("[[material]]\nname = \"earth\"\nshrinkage = 0\n[earthwork]\npay_method = \"end_area\"\npay_stations = \"20 m\"\nkey_points = false")
	p("strip_depth = \"%v m\"\nstrip_margin = \"%v m\"", c.StripDepth, c.StripMargin)
	for _, q := range s.Superelevation {
		p("[[superelevation]]\nat = %v\nleft_lane = %v\nright_lane = %v\nleft_shoulder = %v\nright_shoulder = %v", q[0], q[1], q[2], q[3], q[4])
	}
	for _, q := range s.Culverts {
		p("[[culvert]]\nid = %q\nstation = %v\nskew = %v\nskew_side = %q\nshape = \"circular\"\ndiameter = \"%v m\"\nwall = \"%v m\"\ncover = \"0.3 m\"\ncover_datum = \"subgrade\"",
			q.ID, q.Station, q.SkewDeg, q.SkewSide, q.Diameter, q.Wall)
	}
	return b.String()
}

func TestClosedRoads(t *testing.T) {
	dir, err := filepath.Abs(shared(t, "checks", "closed"))
	require.NoError(t, err)
	files, err := filepath.Glob(filepath.Join(dir, "*.json"))
	require.NoError(t, err)
	require.NotEmpty(t, files)
	for _, file := range files {
		text, err := os.ReadFile(file)
		require.NoError(t, err)
		var road closedRoad
		require.NoError(t, json.Unmarshal(text, &road))
		t.Run(road.Name, func(t *testing.T) {
			project := filepath.Join(t.TempDir(), "road.toml")
			require.NoError(t, os.WriteFile(project, []byte(road.project(dir)), 0o644))
			done := call(t, "run", project, "--json")
			require.Equal(t, 0, done.code, "%s%s", done.errw, done.out)
			var doc struct{ Result any }
			require.NoError(t, json.Unmarshal([]byte(done.out), &doc))
			n := 0
			for _, want := range road.InResults {
				if want.Needs != "main" && want.Needs != "geometry" {
					continue
				}
				n++
				got, err := follow(doc.Result, want.Path)
				if assert.NoError(t, err) {
					assert.InDelta(t, want.Value, got, want.Tolerance, want.Path)
				}
			}
			assert.Positive(t, n)
		})
	}
}

// follow follows a path such as `sections[place.distance=20].cut_area`: a
// selector in brackets is an index, or a key with the value that is nearest (a
// number) or equal (a text); a further [0] takes the first of those.
func follow(v any, path string) (float64, error) {
	for path != "" {
		if path[0] == '.' {
			path = path[1:]
		}
		if path[0] == '[' {
			end := strings.IndexByte(path, ']')
			next, err := choose(v, path[1:end])
			if err != nil {
				return 0, err
			}
			v, path = next, path[end+1:]
			continue
		}
		end := strings.IndexAny(path, ".[")
		if end < 0 {
			end = len(path)
		}
		if l, ok := v.([]any); ok {
			v = l[0]
		}
		m, ok := v.(map[string]any)
		if !ok {
			return 0, fmt.Errorf("%s: no object", path)
		}
		v, path = m[path[:end]], path[end:]
	}
	f, ok := v.(float64)
	if !ok {
		return 0, fmt.Errorf("%v is no number", v)
	}
	return f, nil
}

func choose(v any, selector string) (any, error) {
	list, ok := v.([]any)
	if !ok || len(list) == 0 {
		return nil, fmt.Errorf("[%s]: no list", selector)
	}
	key, want, named := strings.Cut(selector, "=")
	if !named {
		i, err := strconv.Atoi(selector)
		if err != nil || i >= len(list) {
			return nil, fmt.Errorf("no row %s", selector)
		}
		return list[i], nil
	}
	number, err := strconv.ParseFloat(want, 64)
	best := math.Inf(1)
	var rows []any
	for _, row := range list {
		var at any = row
		for _, k := range strings.Split(key, ".") {
			at = at.(map[string]any)[k]
		}
		if f, ok := at.(float64); ok && err == nil {
			if d := math.Abs(f - number); d < best {
				best, rows = d, []any{row}
			}
		} else if at == want {
			rows = append(rows, row)
		}
	}
	if len(rows) == 0 {
		return nil, fmt.Errorf("no row with %s", selector)
	}
	return rows, nil
}
