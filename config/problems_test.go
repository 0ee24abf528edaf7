package config_test

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config"
	"sagcrest/config/diag"
)

var update = flag.Bool("update", false, "rewrite golden files")

// blunder is one edit of the full project and the first complaint it must
// raise: code, key, and the text at which line and column point.
type blunder struct {
	name, old, new string
	code, key, at  string
}

func blunders() []blunder {
	const n = "\n"
	return []blunder{
		// F02: the file itself.
		{"syntax", "elev = 112.0\ngrade", "elev = = 112.0\ngrade", "F02", "", "= 112.0"},
		{"number with leading zero", "fill_slope = 2.0\npavement", "fill_slope = 02.0\npavement", "F02", "", ""},
		{"unclosed text", `title = "Hollow lane"`, `title = "Hollow lane`, "F02", "", ""},
		// F03: names.
		{"unknown key", "cut_slope = 1.5\nfill_slope = 2.0\npavement", "cut_slop = 1.5\nfill_slope = 2.0\npavement", "F03", "typical_section[0].cut_slop", "cut_slop"},
		{"unknown table", "[earthwork]", "[earthworks]", "F03", "earthworks", "earthworks"},
		{"unknown key in an alternative", "culvert = []", "culverts = []", "F03", "alternative[0].culverts", "culverts"},
		{"material of a section", `material = "glacial till"`, `material = "glacial tll"`, "F03", "typical_section[0].material", `"glacial tll"`},
		{"material of a stratum", `material = "rock"` + n + "from", `material = "rok"` + n + "from", "F03", "stratum[0].material", `"rok"`},
		{"material of a price", `material = "rock", rate`, `material = "sand", rate`, "F03", "prices.excavation_of[0].material", `"sand"`},
		{"cover rule", `"reinforced concrete"`, `"reinforced concret"`, "F03", "culvert[0].cover_rule", `"reinforced concret"`},
		{"criteria", `"aashto-metric"`, `"aashto-metrics"`, "F03", "profile.criteria", `"aashto-metrics"`},
		{"code of an acceptance", `code = "A09"`, `code = "A90"`, "F03", "accept[0].code", `"A90"`},
		{"thing of an acceptance", `at = "C"`, `at = "E"`, "F03", "accept[1].at", `"E"`},
		// F04 and U14: units.
		{"unit missing in text", `pavement = "0.40 m"`, `pavement = "0.40"`, "F04", "typical_section[0].pavement", `"0.40"`},
		{"unit missing, bare number", `pavement = "0.40 m"`, `pavement = 0.40`, "F04", "typical_section[0].pavement", "0.40"},
		{"unit foreign", `dressing = "0.15 m"`, `dressing = "0.15 metres"`, "F04", "typical_section[0].dressing", `"0.15 metres"`},
		{"unit of the wrong kind", `gap = "5.0 m"`, `gap = "5.0 m2"`, "F04", "clearance[0].gap", `"5.0 m2"`},
		{"units unknown", `units = "metric"` + n + "rounding", `units = "meters"` + n + "rounding", "F04", "units", `"meters"`},
		{"k with a unit", "k = 43.3 }", `k = "43.3 m" }`, "F04", "profile.pvi[2].k", `"43.3 m"`},
		{"rate per length of a volume", `embankment = { rate = 4.10, per = "m3" }`, `embankment = { rate = 4.10, per = "m" }`, "F04", "prices.embankment.per", `"m"`},
		{"hand quantity of the wrong kind", `quantity = "120 m3"`, `quantity = "120 m"`, "F04", "extra_quantity[0].quantity", `"120 m"`},
		{"text without unit", "elev = 112.0" + n + "grade", `elev = "112.0"` + n + "grade", "F04", "tie_in[0].elev", `"112.0"`},
		{"decimal comma", `pavement = "0.40 m"`, `pavement = "0,40 m"`, "U14", "typical_section[0].pavement", `"0,40 m"`},
		{"decimal comma in a station", `station = "1+760"`, `station = "1+760,5"`, "U14", "culvert[0].station", `"1+760,5"`},
		{"station as a date", `station = "1+760"`, `station = 2026-04-03`, "U14", "culvert[0].station", "2026-04-03"},
		{"station as a spreadsheet's date", `station = "1+760"`, `station = "3-Apr"`, "U14", "culvert[0].station", `"3-Apr"`},
		// F05: missing.
		{"no units", `units = "metric"` + n + "rounding", "rounding", "F05", "units", ""},
		{"no lanes", `lanes = { left = { width = "3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = "-2.5 %" } }`, "", "F05", "typical_section[0].lanes", "typical_section"},
		{"no crossfall", `width = "1.5 m", crossfall = 0.04 }`, `width = "1.5 m" }`, "F05", "typical_section[0].shoulders.left.crossfall", "{ width"},
		{"no pavement", `pavement = "0.40 m"`, "", "F05", "typical_section[0]", "typical_section"},
		{"no bound", `, bound = false`, "", "F05", "typical_section[1].layers[1].bound", "{ name"},
		{"no order", `order = "id,northing,easting,elevation"`, "", "F05", "survey.order", "survey"},
		{"no ground", `points = "survey/points.csv"`, "", "F05", "survey", "survey"},
		{"no wall", `wall = "75 mm"`, "", "F05", "culvert[0].wall", "culvert"},
		{"no side of a skew", `skew_side = "right_ahead"`, "", "F05", "culvert[0].skew_side", "culvert"},
		{"no rule and no cover", `cover_rule = "reinforced concrete"`, "", "F05", "culvert[0]", "culvert"},
		{"no datum of a cover", `cover_datum = "subgrade"`, "", "F05", "culvert[1].cover_datum", "culvert"},
		{"rule without a figure", `cover_rule = "reinforced concrete"`, `cover_rule = "military tables"`, "F05", "culvert[0].cover", "culvert"},
		{"one invert", "outlet_invert = 103.2", "", "F05", "culvert[0].outlet_invert", "culvert"},
		{"no place of a culvert", `station = "1+760"`, "", "F05", "culvert[0]", "culvert"},
		{"no diameter", `diameter = "600 mm"` + n, "", "F05", "culvert[0].diameter", "culvert"},
		{"no reason", `reason = "relief barrel"`, "", "F05", "accept[1].reason", "accept"},
		{"spiral without arc", `radius = "300 m", spiral`, "spiral", "F05", "alignment.pi[1].radius", "{ n"},
		{"no place of a hand quantity", `at = "0+700"`, "", "F05", "extra_quantity[0]", "extra_quantity"},
		{"no name of an alternative", `name = "low"`, "", "F05", "alternative[1].name", "alternative"},
		{"one end only", "  { n = 2267.369, e = 963.096, radius = \"300 m\", spiral = \"60 m\" },\n  { n = 2147.836, e = 2329.355 },\n", "", "F05", "alignment.pi", "pi"},
		{"no vertical datum", `vertical_datum = "local levelling"`, "", "U04", "survey.vertical_datum", "survey"},
		// F06: ranges and forms.
		{"width below zero", `width = "3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = "-2.5 %" }`, `width = "-3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = "-2.5 %" }`, "F06", "typical_section[0].lanes.left.width", `"-3.5 m"`},
		{"crossfall in percent", `crossfall = "-2.5 %"`, `crossfall = -2.5`, "F06", "typical_section[0].lanes.right.crossfall", "-2.5"},
		{"slope of zero", "cut_slope = 1.5\nfill_slope = 2.0\npavement", "cut_slope = 0\nfill_slope = 2.0\npavement", "F06", "typical_section[0].cut_slope", "0"},
		{"shrinkage of one", "shrinkage = 0.10", "shrinkage = 1.0", "F06", "material[0].shrinkage", "1.0"},
		{"skew of a right angle", "skew = 20.0", "skew = 90.0", "F06", "culvert[0].skew", "90.0"},
		{"not a number", "skew = 20.0", "skew = nan", "F06", "culvert[0].skew", "nan"},
		{"infinite", "elev_from = 108.2", "elev_from = inf", "F06", "clearance[0].elev_from", "inf"},
		{"half a barrel", "barrels = 2", "barrels = 1.5", "F06", "culvert[0].barrels", "1.5"},
		{"text for a number", "barrels = 2", `barrels = "two"`, "F06", "culvert[0].barrels", `"two"`},
		{"number for text", `id = "D"`, "id = 3", "F06", "culvert[1].id", "3"},
		{"table for a list", "culvert = []", "culvert = {}", "F06", "alternative[0].culvert", "{}"},
		{"station form", `station = "1+760"`, `station = "1+76"`, "F06", "culvert[0].station", `"1+76"`},
		{"word", `side = "under"`, `side = "udner"`, "F06", "clearance[0].side", `"udner"`},
		{"right of way on the other side", `right = [{ station = "0+100", offset = 24.0 }`, `right = [{ station = "0+100", offset = -24.0 }`, "F06", "right_of_way.right[0].offset", "-24.0"},
		{"acceptance of an error", `code = "A09"`, `code = "D04"`, "F06", "accept[0].code", `"D04"`},
		{"pay stations of nothing", `pay_stations = "25 m"`, `pay_stations = "0 m"`, "F06", "earthwork.pay_stations", `"0 m"`},
		{"three stations between", `between = ["0+400", "0+450"]`, `between = ["0+400", "0+450", "0+460"]`, "F06", "culvert[1].between", "between"},
		// F08: contradictions.
		{"key twice", `revision = "B"`, `revision = "B"` + n + `revision = "C"`, "F08", "revision", "revision"},
		{"table twice", "[prices]", "[earthwork]\n[prices]", "F08", "earthwork", "earthwork"},
		{"two grounds", `points = "survey/points.csv"`, `points = "survey/points.csv"` + n + `grid = "g.asc"`, "F08", "survey.grid", `"g.asc"`},
		{"two sizes of a curve", `length = "260 m" },` + n, `length = "260 m", k = 43 },` + n, "F08", "profile.pvi[1].k", "43 }"},
		{"pavement and layers", `dressing = "0.15 m"`, `layers = [{ name = "x", thickness = "1 m", bound = true }]`, "F08", "typical_section[0].layers", ""},
		{"station and between", `skew = 20.0`, `skew = 20.0` + n + `between = ["0+400", "0+450"]`, "F08", "culvert[0].between", ""},
		{"rule with a figure and cover", `spacing = "0.75 m"`, `cover = "0.5 m"`, "F08", "culvert[0].cover", `"0.5 m"`},
		{"equal tops", "[[material]]\nname = \"glacial till\"", "[[stratum]]\nmaterial = \"peat\"\ntop = \"0.5 m\"\n[[material]]\nname = \"glacial till\"", "F08", "stratum[1].top", `"0.5 m"`},
		{"span of a pipe", `diameter = "600 mm"` + n, `diameter = "600 mm"` + n + `span = "1 m"` + n, "F08", "culvert[0].span", `"1 m"`},
		{"culvert id twice", `id = "D"`, `id = "C"`, "F08", "culvert[1].id", `"C"`},
		{"material twice", `name = "peat"`, `name = "rock"`, "F08", "material[2].name", `"rock"`},
		{"alternative base", `name = "low"`, `name = "base"`, "F08", "alternative[1].name", `"base"`},
		{"alternative twice", `name = "low"`, `name = "first draft"`, "F08", "alternative[1].name", `"first draft"`},
		{"radius of an end", "{ n = 2147.836, e = 2329.355 }", `{ n = 2147.836, e = 2329.355, radius = "9 m" }`, "F08", "alignment.pi[2]", "{ n"},
		{"two levels", "elev_from = 108.2", "elev_from = 108.2\nelev = 108.0", "F08", "clearance[0].elev", "108.0"},
		{"order of a grid", `points = "survey/points.csv"`, `grid = "g.asc"`, "F08", "survey.order", ""},
		{"place twice", `at = "0+700"`, `at = "0+700"` + n + `from = "0+600"`, "F08", "extra_quantity[0].at", `"0+700"`},
		// F09: not built yet.
		{"widening", "[[stratum]]", "[[widening]]\nat = \"0+385\"\n[[stratum]]", "F09", "widening", "widening"},
		{"row of superelevation without a key", "[[stratum]]", "[[superelevation]]\nat = \"0+385\"\nleft_lane = 0.0\nright_lane = 0.0\nleft_shoulder = 0.0\n[[stratum]]", "F05", "superelevation[0].right_shoulder", "superelevation"},
		{"superelevation in percent", "[[stratum]]", "[[superelevation]]\nat = \"0+385\"\nleft_lane = 6\nright_lane = 0.0\nleft_shoulder = 0.0\nright_shoulder = 0.0\n[[stratum]]", "F06", "superelevation[0].left_lane", "6"},
		{"station equations", `start = "0+100"`, `start = "0+100"` + n + "equations = []", "F09", "alignment.equations", "equations"},
		{"degree of curve", `radius = "300 m", spiral`, `degree = 4, radius = "300 m", spiral`, "F09", "alignment.pi[1].degree", "degree"},
		{"curve to be solved", `length = "260 m" },` + n, `length = "solve" },` + n, "F09", "profile.pvi[1].length", `"solve"`},
		{"prismoidal", `pay_method = "pyramid"`, `pay_method = "prismoidal"`, "F09", "earthwork.pay_method", `"prismoidal"`},
		{"inlet of an alternative", "culvert = []", "inlet = []", "F09", "alternative[0].inlet", "inlet"},
		{"point cloud", `points = "survey/points.csv"`, `lidar = "cloud"`, "F09", "survey.lidar", "lidar"},
		// More of the same kinds, one for each rule.
		{"nothing claimed", `length = "260 m", k = 43.327, pvc = "0+330", pvt = "0+590" }`, "}", "F05", "profile.curve_table[0]", "{ pvi"},
		{"two tie-ins of one end", "[[clearance]]", "[[tie_in]]\nend = \"start\"\nelev = 1.0\n[[clearance]]", "F08", "tie_in[1].end", `"start"`},
		{"no level of a clearance", "elev_from = 108.2\nelev_to = 108.5", "", "F05", "clearance[0]", "clearance"},
		{"no first level", "elev_from = 108.2", "", "F05", "clearance[0].elev_from", "clearance"},
		{"no last level", "elev_to = 108.5", "", "F05", "clearance[0].elev_to", "clearance"},
		{"right of a clearance left of its left", "left = -6.0\nright = 6.0", "left = 6.0\nright = -6.0", "F06", "clearance[0].right", "-6.0"},
		{"one corner", `left = [{ station = "0+100", offset = -24.0 }, {`, "left = [{", "F05", "right_of_way.left", "left"},
		{"between goes back", `between = ["0+400", "0+450"]`, `between = ["0+450", "0+400"]`, "A01", "culvert[1].between", "between"},
		{"barrel priced twice", `{ shape = "box", span = "2 m", rise = "1.5 m", rate = 1900.0, per = "m" },`, `{ shape = "circular", diameter = "60 cm", rate = 1.0, per = "m" },`, "F08", "prices.culvert[1]", "{ shape"},
		{"rate below zero", "rate = 4.10", "rate = -4.10", "F06", "prices.embankment.rate", "-4.10"},
		{"hand quantity in percent", "quantity = 3", `quantity = "3 %"`, "F04", "extra_quantity[1].quantity", `"3 %"`},
		{"hand quantity as text without unit", "quantity = 3", `quantity = "3"`, "F04", "extra_quantity[1].quantity", `"3"`},
		{"acceptance without a reason", `reason = "relief barrel"`, `reason = " "`, "F05", "accept[1].reason", `" "`},
		{"figure of an acceptance", `value = "0.42 m"`, `value = "a lot"`, "F06", "accept[0].value", `"a lot"`},
		{"comma in a bare number", "k = 43.3 }", `k = "43,3" }`, "U14", "profile.pvi[2].k", `"43,3"`},
		{"length that is not a number", `dressing = "0.15 m"`, "dressing = nan", "F06", "typical_section[0].dressing", "nan"},
		{"station without its plus", `station = "1+760"`, `station = "1760"`, "F06", "culvert[0].station", `"1760"`},
		{"station as a power of ten", `station = "1+760"`, `station = "950E2862"`, "U14", "culvert[0].station", `"950E2862"`},
		{"first label", `start = "0+100"`, `start = "100"`, "F06", "alignment.start", `"100"`},
		{"lane of no width", `lanes = { left = { width = "3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = -0.025 } }`, `lanes = { left = { width = "0 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = -0.025 } }`, "F06", "typical_section[1].lanes.left.width", `"0 m"`},
		{"range of the correlated error", `, range = "50 m"`, "", "F05", "survey.accuracy.range", "{ independent"},
		{"empty path", `points = "survey/points.csv"`, `points = ""`, "F05", "survey.points", `""`},
		{"empty name of an alternative", `name = "low"`, `name = ""`, "F05", "alternative[1].name", `""`},
		// A01: order of stations.
		{"right of way goes back", `{ station = "1+900", offset = -24.0 }`, `{ station = "0+050", offset = -24.0 }`, "A01", "right_of_way.left[1].station", `"0+050"`},
		{"stretch goes back", `to = "1+535"`, `to = "1+505"`, "A01", "exclude[0].to", `"1+505"`},
	}
}

// read returns all complaints about a text, of the file and of one road.
func read(name, text, alternative string) []diag.Problem {
	d, problems := config.Read(memory(map[string]string{name: text}), name)
	if d == nil {
		return problems
	}
	_, more := d.Project(alternative)
	return append(problems, more...)
}

// memory is a disk of texts.
func memory(texts map[string]string) config.Files {
	return func(path string) ([]byte, error) {
		text, ok := texts[path]
		if !ok {
			return nil, os.ErrNotExist
		}
		return []byte(text), nil
	}
}

func fullText(t testing.TB) string {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("testdata", "full.toml"))
	require.NoError(t, err)
	return string(data)
}

func TestEveryBlunderIsLocated(t *testing.T) {
	text := fullText(t)
	var golden strings.Builder
	for _, b := range blunders() {
		require.Equal(t, 1, min(1, strings.Count(text, b.old)), b.name)
		bad := strings.Replace(text, b.old, b.new, 1)
		problems := read("road.toml", bad, "base")
		fmt.Fprintf(&golden, "== %s\n", b.name)
		for _, p := range problems {
			fmt.Fprintln(&golden, p)
		}
		if !assert.NotEmpty(t, problems, b.name) {
			continue
		}
		p := problems[0]
		assert.Len(t, problems, 1, "%s: one fault, one complaint: %v", b.name, problems)
		assert.Equal(t, b.code, string(p.Code), b.name)
		assert.Equal(t, b.key, p.Key, b.name)
		assert.NotEmpty(t, p.Help, b.name)
		line := strings.Split(bad, "\n")[p.Line-1]
		assert.Equal(t, line, p.Excerpt, b.name)
		assert.LessOrEqual(t, p.Column, len(line)+1, b.name)
		assert.True(t, strings.HasPrefix(line[p.Column-1:], b.at), "%s points at %q", b.name, line[p.Column-1:])
	}
	same(t, "problems.golden", golden.String())
}

// same holds text against a golden file.
func same(t *testing.T, name, got string) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		require.NoError(t, os.WriteFile(path, []byte(got), 0o644))
	}
	want, err := os.ReadFile(path)
	require.NoError(t, err)
	assert.Equal(t, string(want), got)
}
