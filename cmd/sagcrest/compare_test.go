package main

import (
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/cmd/sagcrest/internal/wire"
)

// comparisonOf returns the document of a call of compare.
func comparisonOf(t *testing.T, code int, args ...string) (d wire.CompareDoc) {
	t.Helper()
	got := call(t, append([]string{"compare", "--json"}, args...)...)
	require.Equal(t, code, got.code, got.String())
	document(t, got.out)
	require.NoError(t, json.Unmarshal([]byte(got.out), &d))
	return d
}

func TestCompareRanksByCost(t *testing.T) {
	d := comparisonOf(t, exitDone, startRoad(t))
	assert.Equal(t, []string{"base", "higher"}, d.Order)
	assert.Equal(t, "cost", d.By)
	assert.Less(t, *d.Alternatives[0].Cost, *d.Alternatives[1].Cost)
	assert.NotNil(t, d.Basis.GroundSHA256)
	assert.Equal(t, "crowns", *d.Basis.Currency)
	for _, a := range d.Alternatives {
		assert.InDelta(t, float64(*a.Balance), float64(*a.Waste-*a.Borrow), 1e-6, "borrow and waste are the two sides of the balance")
		assert.Zero(t, min(*a.Borrow, *a.Waste))
	}
}

// One missing rate makes the costs incomparable: the volume decides, and the
// same documents say so.
func TestCompareRanksByVolumeWhereACostIsMissing(t *testing.T) {
	d := comparisonOf(t, exitDone, startRoad(t, `embankment = { rate = 4.00, per = "m3" }`, ""))
	assert.Equal(t, "volume", d.By)
	moved := func(c wire.Compared) wire.Volume { return *c.CutBank + *c.FillCompacted }
	assert.LessOrEqual(t, moved(d.Alternatives[0]), moved(d.Alternatives[1]))
	assert.Nil(t, d.Alternatives[0].Cost)
}

// A cheap road with an open error comes after a dear one without, and does not
// count for the exit code.
func TestCompareErrorsComeLast(t *testing.T) {
	d := comparisonOf(t, exitDone, startRoad(t, "name = \"higher\"\n", `name = "higher"
culvert = [ { id = "C-1", station = "0+152", inlet_side = "left", shape = "circular", diameter = "900 mm", wall = "75 mm", cover_rule = "reinforced concrete" } ]
`, `cover_rule = "reinforced concrete"`, "cover = \"9 m\"\ncover_datum = \"subgrade\""))
	assert.Equal(t, []string{"higher", "base"}, d.Order)
	assert.Equal(t, 1, d.Alternatives[1].Counts.E)
	assert.Equal(t, "D04", *d.Alternatives[1].Worst)
}

func TestCompareTwoRunsLineByLine(t *testing.T) {
	dir := startRoad(t)
	require.Equal(t, exitDone, call(t, "run", dir).code)
	require.Equal(t, exitDone, call(t, "run", dir, "--alternative", "higher").code)
	one, two := filepath.Join(dir, "out"), filepath.Join(dir, "out-higher")
	d := comparisonOf(t, exitDone, one, filepath.Join(two, resultsName))
	values := map[string]map[string]any{}
	for _, x := range d.Differences {
		values[x.Path] = x.Values
	}
	pvi := values["profile.curves[0+150.000].pvi.elev"]
	assert.Equal(t, 51.15, pvi[filepath.ToSlash(one)])
	assert.Equal(t, 51.40, pvi[filepath.ToSlash(filepath.Join(two, resultsName))])
	assert.NotContains(t, values, "alignment.length", "what is equal is left out")

	assert.Empty(t, comparisonOf(t, exitDone, dir, one).Differences, "a project and its run do not differ")
}

func TestCompareAnotherBasis(t *testing.T) {
	dir := startRoad(t)
	other := startRoad(t, "excavation = { rate = 6.00", "excavation = { rate = 7.00")
	points := filepath.Join(other, "survey", "points.csv")
	text, err := os.ReadFile(points)
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(points, []byte(strings.Replace(string(text), "\n1,", "\n9001,", 1)), 0o644))
	d := comparisonOf(t, exitFindings, dir, other)
	assert.Nil(t, d.Basis.GroundSHA256)
	require.Len(t, d.Findings, 2)
	for _, f := range d.Findings {
		assert.Equal(t, "Q21", f.Code)
	}
	assert.Contains(t, d.Findings[1].Message, "6")

	// The same inside one project: an alternative with prices of its own.
	d = comparisonOf(t, exitFindings, startRoad(t, "name = \"higher\"\n", "name = \"higher\"\nprices = { currency = \"crowns\", embankment = { rate = 1.0, per = \"m3\" } }\n"))
	require.NotEmpty(t, d.Findings)
	assert.Equal(t, "Q21", d.Findings[0].Code)
}

func TestCompareRefusesForeignResults(t *testing.T) {
	dir := startRoad(t)
	for text, code := range map[string]string{
		"no json": "F02", `{"schema":"sagcrest/check","schema_version":1}`: "F09", `{"schema":"sagcrest/results","schema_version":2}`: "F09",
	} {
		file := filepath.Join(t.TempDir(), resultsName)
		require.NoError(t, os.WriteFile(file, []byte(text), 0o644))
		got := call(t, "compare", dir, file)
		assert.Equal(t, exitInput, got.code)
		assert.Contains(t, got.errw, code)
	}
	assert.Equal(t, exitUsage, call(t, "compare", dir, dir).code)
}

// Rows are matched by what names them, so that one more row shifts nothing.
func TestDifferencesMatchRowsByName(t *testing.T) {
	var w walk
	w.names = []string{"a", "b"}
	row := func(at string, v float64) any {
		return map[string]any{"place": map[string]any{"station": at}, "value": v}
	}
	w.compare("rows", []any{
		[]any{row("0+000", 1), row("0+020", 2), row("0+020", 3)},
		[]any{row("0+000", 1), row("0+010", 9), row("0+020", 2), row("0+020", 4)},
	})
	require.Len(t, w.out, 2)
	assert.Equal(t, "rows[0+020, 2].value", w.out[0].Path)
	assert.Equal(t, map[string]any{"a": 3.0, "b": 4.0}, w.out[0].Values)
	assert.Equal(t, "rows[0+010]", w.out[1].Path)
	assert.Nil(t, w.out[1].Values["a"])
}

func FuzzReadResults(f *testing.F) {
	f.Add([]byte(oursJSON))
	f.Add([]byte(`{"schema":"sagcrest/results","schema_version":1,"inputs":[{}],"result":{"cost":null}}`))
	f.Add([]byte(`[]`))
	f.Fuzz(func(t *testing.T, data []byte) {
		r, err := readResults("x", data)
		if err != nil {
			return
		}
		d := rank([]contender{{name: "a", results: r}, {name: "b", results: r}}, nil)
		if len(d.Order) != 2 || len(d.Differences) != 0 {
			t.Errorf("a run differs from itself: %v", d.Differences)
		}
	})
}

func TestCompareWritesAPageOnlyWhereAsked(t *testing.T) {
	dir := startRoad(t)
	before := listed(t, dir)
	require.Equal(t, exitDone, call(t, "compare", dir).code)
	assert.Equal(t, before, listed(t, dir))

	out := filepath.Join(t.TempDir(), "comparison")
	require.Equal(t, exitDone, call(t, "compare", dir, "--out", out, "--dry-run").code)
	assert.NoDirExists(t, out)
	got := call(t, "compare", dir, "--out", out, "--json")
	require.Equal(t, exitDone, got.code, got.String())
	held := read(t, out)
	assert.Equal(t, got.out, held["compare.json"])
	page := held["compare.html"]
	for _, text := range []string{"<svg", "base", "higher", "Starter road", "licensed engineer"} {
		assert.Contains(t, page, text)
	}
	assert.NotRegexp(t, `(src|href)="http`, page, "it opens without the network")

	require.Equal(t, exitDone, call(t, "compare", dir, "--out", out).code, "an earlier comparison is replaced")
	require.Equal(t, exitDone, call(t, "run", dir).code)
	assert.Equal(t, exitDone, call(t, "compare", dir, filepath.Join(dir, "out"), "--out", out).code, "what was only read has no drawing")
	assert.Equal(t, exitFiles, call(t, "compare", dir, "--out", filepath.Join(dir, "out")).code, "a run is not replaced by a comparison")
	assert.Equal(t, exitFiles, call(t, "run", dir, "--out", out).code, "nor the other way round")
	assert.Equal(t, exitFiles, call(t, "compare", dir, "--out", filepath.Join(dir, "survey"), "--force").code)
}
