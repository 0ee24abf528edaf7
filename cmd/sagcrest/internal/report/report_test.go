package report_test

import (
	"context"
	"go/constant"
	"go/token"
	"go/types"
	"html"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/cmd/sagcrest/internal/report"
	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config"
)

// files runs a project of testdata and returns its output folder by name.
func files(t *testing.T, alternative string, parts ...string) map[string]string {
	return made(t, alternative, filepath.Join(testdata(), filepath.Join(parts...)))
}

func testdata() string { return filepath.Join("..", "..", "..", "..", "testdata") }

// changed runs the demo road with parts of its text replaced, each once.
func changed(t *testing.T, replace ...string) map[string]string {
	from, dir := filepath.Join(testdata(), "roads", "quillmere"), t.TempDir()
	text, err := os.ReadFile(filepath.Join(from, "road.toml"))
	require.NoError(t, err)
	road := string(text)
	for i := 0; i < len(replace); i += 2 {
		require.Contains(t, road, replace[i])
		road = strings.Replace(road, replace[i], replace[i+1], 1)
	}
	require.NoError(t, os.WriteFile(filepath.Join(dir, "road.toml"), []byte(road), 0o600))
	require.NoError(t, os.CopyFS(filepath.Join(dir, "survey"), os.DirFS(filepath.Join(from, "survey"))))
	return made(t, "base", dir)
}

// made runs the project in a folder and returns its output folder by name.
func made(t *testing.T, alternative, dir string) map[string]string {
	opened, problems := study.Open(config.Disk(), filepath.Join(dir, "road.toml"), alternative)
	require.Empty(t, problems)
	o, problems := study.Run(context.Background(), opened, nil)
	require.Empty(t, problems)
	files, err := report.Files(o, wire.Build(o))
	require.NoError(t, err)
	out := map[string]string{}
	for _, f := range files {
		require.NotContains(t, out, f.Name, "two files of one name")
		out[f.Name] = string(f.Data)
	}
	return out
}

// tableOf cuts the table of a name out of a page.
func tableOf(t *testing.T, page, name string) string {
	t.Helper()
	from := strings.Index(page, `<table id="t-`+name+`"`)
	require.GreaterOrEqual(t, from, 0, name)
	return page[from : from+strings.Index(page[from:], "</table>")]
}

// The page tells bad news first and keeps the order in which a reviewer reads;
// tables repeat their heads and have a column to tick; every culvert has its
// working.
func TestPageOrder(t *testing.T) {
	page := files(t, "first draft", "roads", "quillmere")["report.html"]
	last := 0
	for _, id := range []string{"<h1>", "1 open error, 1 open warning", "D04 culvert", "NOT FOR CONSTRUCTION", `id="findings"`, `id="definitions"`,
		`id="inputs"`, `id="alignment"`, `id="grade-line"`, `id="sections"`, `id="earthwork"`, `id="drainage"`, `id="cost"`, `id="cautions"`} {
		at := strings.Index(page[last:], id)
		require.GreaterOrEqual(t, at, 0, id)
		last += at
	}
	assert.GreaterOrEqual(t, strings.Count(page, "NOT FOR CONSTRUCTION"), 10, "every sheet is marked")
	assert.Equal(t, 3, strings.Count(page, `class="working"`))
	for _, want := range []string{"D04", "NOT OK, short by 0.203 m", "max(OD/8, 0.300 m)", "AASHTO LRFD", "No superelevation is given", "bank", "compacted", "licensed engineer",
		"local levelling", "thead", `class="tick"`, "size: A3 landscape"} {
		assert.Contains(t, page, want)
	}
}

// A sound road is not marked, and says which checks had nothing to look at.
func TestSoundRoad(t *testing.T) {
	page := files(t, "base", "roads", "quillmere")["report.html"]
	assert.NotContains(t, page, "NOT FOR CONSTRUCTION")
	assert.Contains(t, page, "No check found anything.")
	page = files(t, "base", "roads", "volcano")["report.html"]
	assert.Contains(t, page, "nothing to look at")
	assert.Contains(t, page, "A09")
}

// What a finding withholds says so by its code, on paper and as an empty cell
// in the tables; everything else stands.
func TestWithheld(t *testing.T) {
	out := files(t, "base", "bad", "A06")
	assert.Contains(t, out["report.html"], "withheld: A06")
	assert.Contains(t, out["totals.csv"], "end")
	for line := range strings.Lines(out["totals.csv"]) {
		if strings.HasPrefix(line, "average end areas") {
			assert.Equal(t, "average end areas,,,,,paid\n", line)
		}
	}
	assert.NotContains(t, out["sections.csv"], "NaN")
}

// Every table of the page is a CSV beside it, with units in its head.
func TestTables(t *testing.T) {
	out := files(t, "base", "roads", "quillmere")
	for name, head := range map[string]string{
		"sections.csv": "station,station_distance [m],why,ground [m],finished [m],subgrade [m],cut [m2],fill [m2],strip_width [m]",
		"volumes.csv":  "from,from_distance [m],to,to_distance [m],distance [m],cut [m3 bank],fill [m3 compacted]",
		"mass.csv":     "station,station_distance [m],cut [m3 compacted]",
		"culverts.csv": "id,station,station_distance [m],skew,size,length [m]",
		"cost.csv":     "item,quantity,unit,rate,amount",
	} {
		assert.True(t, strings.HasPrefix(out[name], head), "%s: %s", name, strings.SplitN(out[name], "\n", 2)[0])
	}
}

// A culvert that cannot be placed withholds its own figures and no other's: the
// rows beyond the hinges of the next one have no datum, which is no withholding.
func TestWithheldIsOfItsOwnCulvert(t *testing.T) {
	page := changed(t, `station = "0+430"`, `station = "2+430"`)["report.html"]
	assert.Contains(t, tableOf(t, page, "culverts"), "withheld: A03")
	for _, other := range []string{"cover_Sedge-brook", "cover_Dry-valley"} {
		cover := tableOf(t, page, other)
		assert.NotContains(t, cover, "withheld")
		assert.Contains(t, cover, "–")
	}
}

// Ids that differ only in case or signs keep a table each.
func TestCulvertsOfLikeNames(t *testing.T) {
	out := changed(t, `id = "Sedge brook"`, `id = "quill-brook"`, `id = "Dry valley"`, `id = "Quill  brook"`)
	for _, name := range []string{"cover_Quill-brook.csv", "cover_quill-brook_2.csv", "cover_Quill-brook_3.csv"} {
		assert.Contains(t, out, name)
	}
}

// A finding prints where its limit comes from, what it changes, and a way to its
// place. Every link of the page arrives.
func TestFindingsLead(t *testing.T) {
	page := files(t, "first draft", "roads", "quillmere")["report.html"]
	findings := tableOf(t, page, "findings")
	for _, want := range []string{"source of the limit", "what it changes", "AASHTO LRFD", "Land outside the right of way would be used."} {
		assert.Contains(t, findings, want)
	}
	assert.Regexp(t, `<a href="#cover-3">Dry valley, 1\+760.000`, findings)
	place := regexp.MustCompile(`<a href="#(section-\d+)">0\+620.000`).FindStringSubmatch(findings)
	require.Len(t, place, 2)
	assert.Contains(t, page, `<td id="`+place[1]+`">0+620.000</td>`)

	withheld := files(t, "base", "bad", "A06")["report.html"]
	assert.Regexp(t, `It withholds \d+ figures\.`, tableOf(t, withheld, "findings"))
	for _, p := range []string{page, withheld} {
		seen := map[string]bool{}
		for _, id := range regexp.MustCompile(` id="([^"]+)"`).FindAllStringSubmatch(p, -1) {
			assert.False(t, seen[id[1]], "twice: "+id[1])
			seen[id[1]] = true
		}
		for _, link := range regexp.MustCompile(`href="#([^"]+)"`).FindAllStringSubmatch(p, -1) {
			assert.True(t, seen[link[1]], link[1])
		}
	}
}

// What is given is listed to be ticked, with what is left unsaid; what is not
// given has no table.
func TestGivenIsEchoed(t *testing.T) {
	page := changed(t, `pavement = "0.40 m"`, `layers = [ { name = "asphalt", thickness = "0.15 m", bound = true }, { name = "gravel", thickness = "0.25 m", bound = false } ]`)["report.html"]
	for name, wants := range map[string][]string{
		"culverts_given": {"Quill brook", "20.00 deg, right ahead", "reinforced concrete", "unsaid: the ground at the two ends", "unsaid: one outside diameter or span"},
		"obstacles":      {"Tansy Lane", "under", "108.200", "108.500", "5.000"},
		"right_of_way":   {"-11.000", "0+620.000"},
		"tie_ins":        {"old road", "start", "112.000"},
		"layers":         {"asphalt", "gravel", "0.250"},
		"echo":           {"every 20 m of the labels"},
	} {
		for _, want := range wants {
			assert.Contains(t, tableOf(t, page, name), want, name)
		}
	}
	bare := files(t, "base", "roads", "volcano")["report.html"]
	for _, name := range []string{"culverts_given", "obstacles", "right_of_way", "tie_ins", "layers"} {
		assert.NotContains(t, bare, `id="t-`+name+`"`)
	}
	assert.Contains(t, page, "in the title block: originator, checker.")
}

// A project in feet is drawn in feet: axes are marked at round feet and yards,
// and offsets of the sections stand where they say.
func TestFeetAreDrawnInFeet(t *testing.T) {
	page := files(t, "base", "bad", "U01", "near")["report.html"]
	at := func(words string) float64 {
		found := regexp.MustCompile(`<text x="([-\d.]+)" y="[-\d.]+" transform="scale\(1, -1\)"\s+style="font-size:6px">` + regexp.QuoteMeta(words) + `</text>`).FindStringSubmatch(page)
		require.Len(t, found, 2, words)
		x, err := strconv.ParseFloat(found[1], 64)
		require.NoError(t, err)
		return x
	}
	for _, want := range []string{">0+20.00<", ">1+80.00<", ">51.50<", ">-50<", "yd³ compacted, rising in cut", "offsets in ft"} {
		assert.Contains(t, page, want)
	}
	assert.NotContains(t, page, ">0+32.81<", "marks at round metres")
	// The road's half width is 4 m = 13.12 ft: ten feet lie inside it by the scale
	// of the sheet, which shows 2·(half + 2 m) on 340 points.
	half := func() float64 {
		csv := files(t, "base", "bad", "U01", "near")["sections.csv"]
		most := 0.0
		for _, line := range strings.Split(strings.TrimSpace(csv), "\n")[1:] {
			cells := strings.Split(line, ",")
			o, err := strconv.ParseFloat(cells[len(cells)-2], 64)
			require.NoError(t, err)
			most = max(most, o)
		}
		return most
	}()
	assert.InDelta(t, 10*1200.0/3937*340/(2*(half+2)), at("20.00")-at("10.00"), 1.5)
}

// Law: every line of a working evaluates to its printed result, to the place in
// which its numbers are posted.
func TestWorkingsEvaluate(t *testing.T) {
	row := regexp.MustCompile(`<tr><td>([^<]*)</td><td>[^<]*</td><td>([^<]*)</td><td class="n">(\S+) (m|ft)</td>`)
	plain := strings.NewReplacer("−", "-", "·", "*", "\u202f", "")
	for name, rule := range map[string]string{
		"one eighth or a floor": "reinforced concrete", "a floor": "storm drain under highway", "a half": "two thirds of the fill",
		"a share of the span": "corrugated metal",
	} {
		out := changed(t, `cover_rule = "reinforced concrete"`, `cover_rule = "`+rule+`"`)
		page := out["report.html"]
		lines := row.FindAllStringSubmatch(page[strings.Index(page, `class="working"`):], -1)
		require.Len(t, lines, 15, name)
		for _, l := range lines {
			text := plain.Replace(html.UnescapeString(l[2]))
			v, err := types.Eval(token.NewFileSet(), nil, token.NoPos, "float64("+text+")")
			require.NoError(t, err, "%s: %s", l[1], text)
			got, _ := constant.Float64Val(v.Value)
			want, err := strconv.ParseFloat(l[3], 64)
			require.NoError(t, err)
			// Three numbers put in, each off by half a millimetre at most, and the
			// result by half a millimetre.
			assert.InDelta(t, want, got, 0.0021, "%s: %s %s", name, l[1], text)
		}
	}
}
