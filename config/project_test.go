package config_test

import (
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config"
	"sagcrest/config/diag"
	"sagcrest/config/quantity"
	"sagcrest/drainage"
	"sagcrest/earthwork"
	"sagcrest/earthwork/bill"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

func TestValuesArriveInSI(t *testing.T) {
	p := full(t, ".toml", "base")
	assert.Equal(t, station.Labels{Start: 100}, p.Labels)
	assert.Equal(t, station.Station(360), p.PVI[1].At, "labels start at 0+100")
	assert.InDelta(t, 80/3.6, p.DesignSpeed, 1e-12)
	assert.Equal(t, 60.0, p.Alignment[1].SpiralIn)
	assert.Equal(t, 60.0, p.Alignment[1].SpiralOut)
	assert.Equal(t, 0.03, p.Survey.Accuracy.Independent)
	assert.InDelta(t, 20*math.Pi/180, p.Culverts[0].Skew, 1e-15)
	assert.Equal(t, 0.6, p.Culverts[0].Diameter, "600 mm is the float64 0.6")
	assert.Equal(t, -0.025, p.Typicals[0].Right.Lane.Crossfall, "-2.5 %")
	assert.InDelta(t, 2.5, p.Prices.Land.Amount, 1e-15, "25000 per hectare")
	assert.Equal(t, "m2", p.Prices.Land.Per)
	assert.Equal(t, bill.Rate{Amount: 1.5, Per: "m3"}, *p.Prices.Respread)
	assert.Equal(t, station.Interval{From: station.Station(math.Inf(-1)), To: 900}, p.Typicals[0].Over)
	assert.Equal(t, finding.Of(0.42, "m"), p.Accepts[0].Measured)
}

func TestBoundLayers(t *testing.T) {
	p := full(t, ".toml", "base")
	assert.Equal(t, 0.40, p.Typicals[0].Bound, "one thickness has one underside")
	assert.Equal(t, 0.15, p.Typicals[1].Bound)
	text := strings.Replace(fullText(t), `"0.25 m", bound = false }`, `"0.25 m", bound = false }, { name = "lean concrete", thickness = "0.2 m", bound = true }`, 1)
	d, problems := config.Read(memory(map[string]string{"road.toml": text}), "road.toml")
	require.Empty(t, problems)
	p, problems = d.Project("base")
	require.Empty(t, problems)
	assert.InDelta(t, 0.60, p.Typicals[1].Bound, 1e-12, "down to the underside of the lowest bound course")
}

func TestDefaults(t *testing.T) {
	text := fullText(t)
	from, to := strings.Index(text, "[earthwork]"), strings.Index(text, "[prices]")
	text = text[:from] + text[to:strings.Index(text, "[[alternative]]")]
	d, problems := config.Read(memory(map[string]string{"road.toml": text}), "road.toml")
	require.Empty(t, problems)
	p, problems := d.Project("base")
	require.Empty(t, problems)
	assert.Equal(t, earthwork.EndArea, p.Request.Method)
	assert.Equal(t, earthwork.InCompacted, p.Request.MassState)
	assert.Equal(t, 20.0, p.Request.PayStep)
	assert.True(t, p.Request.KeyPoints)
	assert.Equal(t, section.Stripping{}, p.Request.Stripping)
	assert.Equal(t, config.StripSeparate, p.StripBasis)
}

func TestAlternativeMergesTablesAndReplacesLists(t *testing.T) {
	base, draft, low := full(t, ".toml", "base"), full(t, ".toml", "first draft"), full(t, ".toml", "low")
	assert.Len(t, draft.PVI, 2)
	assert.Equal(t, base.DesignSpeed, draft.DesignSpeed, "a table merges by key")
	assert.Empty(t, draft.Culverts, "an array replaces the base array whole")
	assert.Equal(t, 0.30, low.Request.Stripping.Depth)
	assert.Equal(t, base.Request.Stripping.Margin, low.Request.Stripping.Margin)
	assert.Equal(t, base.PVI, low.PVI)
	assert.Equal(t, base.Accepts, draft.Accepts, "acceptances hold for every road")
}

func TestLocate(t *testing.T) {
	text := fullText(t)
	lines := strings.Split(text, "\n")
	base, draft := full(t, ".toml", "base"), full(t, ".toml", "first draft")
	tests := []struct {
		p       *config.Project
		key, at string
		ok      bool
	}{
		{base, "culvert[0].outlet_invert", "103.2", true},
		{base, "profile.pvi[1].elev", "99.7", true},
		{base, "profile.pvi[1].k", "{ station = \"0+460\"", true}, // absent: its table
		{base, "typical_section[1]", "typical_section", true},
		{base, "earthwork.nothing", "earthwork", true},
		{base, "haul.rate", "", false},
		{draft, "profile.pvi[1].elev", "107.42", true}, // the place in the alternative
		{draft, "profile.design_speed", `"80 km/h"`, true},
	}
	for _, tt := range tests {
		line, column, ok := tt.p.Locate(tt.key)
		require.Equal(t, tt.ok, ok, tt.key)
		if ok {
			assert.True(t, strings.HasPrefix(lines[line-1][column-1:], tt.at), "%s points at %s", tt.key, lines[line-1][column-1:])
		}
	}
}

func TestUnknownAlternativeNamesTheNearest(t *testing.T) {
	d, problems := config.Read(config.Disk(), "testdata/full.toml")
	require.Empty(t, problems)
	assert.Equal(t, []string{"first draft", "low"}, d.Alternatives())
	p, problems := d.Project("first drat")
	assert.Nil(t, p)
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("F03"), problems[0].Code)
	assert.Contains(t, problems[0].Help, `"first draft"`)
}

func TestAnotherBasisIsQ21AndDoesNotEndTheRun(t *testing.T) {
	text := fullText(t)
	other := strings.Replace(text, "culvert = []", "culvert = []\nprices = { currency = \"marks\" }", 1)
	d, problems := config.Read(memory(map[string]string{"road.toml": other}), "road.toml")
	require.Empty(t, problems)
	p, problems := d.Project("first draft")
	require.NotNil(t, p)
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("Q21"), problems[0].Code)

	alike := strings.Replace(text, "culvert = []", "culvert = []\nprices = { currency = \"crowns\" }\nunits = \"metric\"", 1)
	d, _ = config.Read(memory(map[string]string{"road.toml": alike}), "road.toml")
	_, problems = d.Project("first draft")
	assert.Empty(t, problems, "what is the same does not differ")
}

func TestFeet(t *testing.T) {
	text := strings.NewReplacer(`units = "metric"`, `units = "us survey feet"`, "rounding = \"m-0.001\"\n", "",
		`"0+100"`, `"10+00"`, `"0+460"`, `"14+60"`, `"0+980"`, `"19+80"`, `"1+520"`, `"25+20"`, `"1+900"`, `"29+00"`,
		`"0+330"`, `"13+30"`, `"0+590"`, `"15+90"`, `"25 m"`, `"100 us_ft"`).Replace(fullText(t))
	// every other metric label reads as a fault of form: keep the road bare
	for _, table := range []string{"[[clearance]]", "[[stratum]]", "[[culvert]]", "[[exclude]]", "[[extra_quantity]]", "[[alternative]]", "[[accept]]"} {
		for strings.Contains(text, table) {
			from := strings.Index(text, table)
			end := strings.Index(text[from+2:], "\n[")
			if end < 0 {
				text = text[:from]
				continue
			}
			next := from + 2 + end + 1
			if strings.HasPrefix(text[next:], "[alternative.") {
				next += strings.Index(text[next:], "[[accept]]")
			}
			text = text[:from] + text[next:]
		}
	}
	text = strings.NewReplacer("to = \"1+000\"\n", "to = \"20+00\"\n", "from = \"1+000\"\n", "from = \"20+00\"\n").Replace(text)
	d, problems := config.Read(memory(map[string]string{"road.toml": text}), "road.toml")
	require.Empty(t, problems)
	p, problems := d.Project("base")
	require.Empty(t, problems)
	foot := quantity.USSurveyFoot
	assert.InDelta(t, 460*foot, float64(p.PVI[1].At), 1e-9)
	assert.InDelta(t, 99.7*foot, p.PVI[1].Elev, 1e-12)
	assert.InDelta(t, 43.3*foot, p.PVI[2].K, 1e-12)
	assert.Equal(t, 260.0, p.PVI[1].Length, "text keeps its own unit")
	assert.Equal(t, 100.0, p.Request.PayStep, "an interval of the label")
	assert.True(t, p.Paper().Feet())
}

func TestWhichFoot(t *testing.T) {
	text := strings.NewReplacer(`units = "metric"`+"\nrounding", `units = "ft"`+"\nrounding").Replace(fullText(t))
	assert.NotContains(t, codesOf(read("road.toml", text, "base")), "U01", "a local grid")
	text = strings.Replace(text, "n = 2000.0", "n = 102000.0", 1)
	assert.Contains(t, codesOf(read("road.toml", text, "base")), "U01", "map coordinates")
}

func codesOf(problems []diag.Problem) (all []string) {
	for _, p := range problems {
		all = append(all, string(p.Code))
	}
	return all
}

func TestAllComplaintsAtOnce(t *testing.T) {
	text := strings.NewReplacer(
		`pavement = "0.40 m"`, `pavement = "0.40"`,
		"cut_slope = 1.5", "cut_slop = 1.5",
		`wall = "75 mm"`, "",
		"barrels = 2", "barrels = 0",
		`name = "peat"`, `name = "rock"`,
	).Replace(fullText(t))
	problems := read("road.toml", text, "base")
	assert.ElementsMatch(t, []string{"F03", "F03", "F04", "F05", "F06", "F08"}, codesOf(problems))
}

func TestUnreadableFiles(t *testing.T) {
	for name, tt := range map[string]struct{ path, text, code string }{
		"byte order mark":    {"a.toml", "\ufefftitle = 1", "U14"},
		"not UTF-8":          {"a.toml", "title = \"\xff\"", "F02"},
		"NUL":                {"a.yaml", "title: \x00", "F02"},
		"ending":             {"a.txt", "", "F09"},
		"brackets":           {"a.json", strings.Repeat("[", 5000), "F02"},
		"JSON cut off":       {"a.json", `{"title": "x"`, "F02"},
		"JSON list":          {"a.json", `[]`, "F02"},
		"JSON twice":         {"a.json", `{"title": "x", "title": "y"}`, "F08"},
		"JSON deep":          {"a.json", strings.Repeat(`{"a":`, 100) + "1" + strings.Repeat("}", 100), "F02"},
		"JSON null":          {"a.json", `{"title": null}`, "F05"},
		"YAML indentation":   {"a.yaml", "title: x\n  units: y\n", "F02"},
		"YAML alias":         {"a.yaml", "title: &a x\ndate: *a\n", "F09"},
		"YAML twice":         {"a.yaml", "title: x\ntitle: y\n", "F08"},
		"YAML two documents": {"a.yaml", "title: x\n---\ntitle: y\n", "F09"},
		"YAML tag":           {"a.yaml", "title: !mine x\n", "F09"},
		"YAML list":          {"a.yaml", "- x\n", "F02"},
		"many keys":          {"a.toml", manyKeys(100_000), "F02"},
		"long key":           {"a.toml", strings.Repeat("k", 1<<20) + " = 1", "F03"},
		"too large":          {"a.toml", strings.Repeat("#\n", 3<<20), "F02"},
	} {
		problems := read(tt.path, tt.text, "base")
		require.NotEmpty(t, problems, name)
		assert.Equal(t, tt.code, string(problems[0].Code), "%s: %v", name, problems)
		assert.Positive(t, problems[0].Line, name)
	}
	_, problems := config.Read(memory(nil), "gone.toml")
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("F01"), problems[0].Code)
	_, problems = config.Read(config.Disk(), "testdata")
	assert.Equal(t, finding.Code("F01"), problems[0].Code, "a folder is no file")
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		fmt.Fprintf(&b, "k%d = 1\n", i)
	}
	return b.String()
}

func TestEmptyProjectAsksForWhatIsRequired(t *testing.T) {
	for _, name := range []string{"a.toml", "a.yaml", "a.json"} {
		text := ""
		if name == "a.json" {
			text = "{}"
		}
		var keys []string
		for _, p := range read(name, text, "base") {
			assert.Equal(t, finding.Code("F05"), p.Code)
			keys = append(keys, p.Key)
		}
		assert.Equal(t, []string{"units", "survey", "alignment", "profile", "typical_section"}, keys, name)
	}
}

func TestEmptyTablesAreNoTables(t *testing.T) {
	text := "units = \"metric\"\n[survey]\n[alignment]\n[profile]\n[earthwork]\n[right_of_way]\n[[typical_section]]\n[[culvert]]"
	var keys []string
	for _, p := range read("a.toml", text, "base") {
		keys = append(keys, p.Key)
	}
	assert.Equal(t, []string{
		"alignment.pi", "profile.pvi", "typical_section[0].lanes", "typical_section[0].cut_slope", "typical_section[0].fill_slope",
		"culvert[0].id", "culvert[0].shape", "culvert[0].wall",
		"survey", "survey.vertical_datum", "typical_section[0]", "culvert[0]", "culvert[0]",
	}, keys)
}

func TestEveryCoverRuleMayBeNamed(t *testing.T) {
	for _, rule := range drainage.CoverRules() {
		line := `cover_rule = "` + rule.ID + `"`
		if !rule.HasNumber {
			line += "\ncover = \"0.3 m\""
		}
		text := strings.Replace(fullText(t), `cover_rule = "reinforced concrete"`, line, 1)
		assert.Empty(t, read("road.toml", text, "base"), rule.ID)
	}
}

func TestOtherWaysToWriteIt(t *testing.T) {
	text := strings.NewReplacer(
		`start = "0+100"`, "start = 100",
		`station = "1+760"`, "station = 1660.0",
		`inlet_side = "left"`, `inlet_side = "right"`,
		"skew = 20.0\nskew_side = \"right_ahead\"\n", "skew_side = \"right_ahead\"\n",
		`at = "1+300"`, "at = 1200", `value = "0.42 m"`, "value = \"1\u202f234 m²\"",
		`rate = 70.0, per = "m"`, `rate = 70.0, per = "ft"`,
		"[[material]]\nname = \"peat\"\n", "[[material]]\nname = \"rubble\"\n",
		"elev_from = 108.2\nelev_to = 108.5", `elev = "108.2 m"`,
	).Replace(fullText(t))
	d, problems := config.Read(memory(map[string]string{"road.toml": text}), "road.toml")
	require.Empty(t, problems)
	p, problems := d.Project("base")
	require.Empty(t, problems)
	assert.Equal(t, station.Labels{Start: 100}, p.Labels)
	assert.Equal(t, station.Station(1660), *p.Culverts[0].Station, "a bare number counts from the start")
	assert.Equal(t, 1, p.Culverts[0].InletSide)
	assert.False(t, p.Culverts[0].RightAhead, "a square barrel has no end ahead")
	assert.Equal(t, station.Station(1200), *p.Accepts[0].Station)
	assert.Equal(t, "1+300.000", p.Accepts[0].At)
	assert.Equal(t, finding.Of(1234, "m2"), p.Accepts[0].Measured, "the typography of the report is read")
	assert.InDelta(t, 70/0.3048, p.Prices.Other[0].Rate.Amount, 1e-9, "per foot to per metre")
	assert.Equal(t, 108.2, p.Obstacles[0].ElevTo)
	assert.Equal(t, "road.toml", p.File())
}

func TestInput(t *testing.T) {
	d, problems := config.Read(config.Disk(), "testdata/full.json")
	require.Empty(t, problems)
	data, err := os.ReadFile("testdata/full.json")
	require.NoError(t, err)
	assert.Equal(t, "full.json", d.Input().Path)
	assert.Equal(t, len(data), d.Input().Bytes)
	assert.Len(t, d.Input().SHA256, 64)
}

func FuzzRead(f *testing.F) {
	for _, ext := range []string{".toml", ".yaml", ".json"} {
		data, err := os.ReadFile("testdata/full" + ext)
		require.NoError(f, err)
		f.Add(ext, string(data), "first draft")
	}
	f.Add(".toml", "[a]\nb.c = 1\n[a.b]\n", "base")
	f.Add(".toml", "[[alternative]]\nname='x'\nprofile=3", "x")
	f.Add(".yaml", "? [a]\n: b\n", "base")
	f.Add(".json", `{"culvert":[null,{"between":[1,"x"]}]}`, "base")
	f.Fuzz(func(t *testing.T, ext, text, alternative string) {
		for _, p := range read("road"+ext, text, alternative) {
			if p.Code == "" || p.Message == "" {
				t.Fatalf("a complaint says nothing: %+v", p)
			}
		}
	})
}
