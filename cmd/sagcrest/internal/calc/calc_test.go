package calc

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// published is a ready call of ../shared/checks/calc.json.
type published struct {
	Case, Topic, Units, Source string
	Inputs                     map[string]any
	Expect                     []struct {
		Path      string
		Value     any
		Tolerance *float64
	}
}

// Every published call of a topic that is built, to its tolerance.
func TestPublishedCalls(t *testing.T) {
	path := filepath.Join("..", "..", "..", "..", "..", "shared", "checks", "calc.json")
	text, err := os.ReadFile(path)
	if err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatal(err)
		}
		t.Skipf("%s is missing: its calls are not run", path)
	}
	var calls []published
	require.NoError(t, json.Unmarshal(text, &calls))
	n := 0
	for i, c := range calls {
		topic, ok := Find(c.Topic)
		if !ok {
			continue
		}
		n++
		t.Run(fmt.Sprintf("%d %s %s", i, c.Case, c.Topic), func(t *testing.T) {
			result, steps, fault := topic.Run(c.Inputs, System(c.Units))
			require.Nil(t, fault)
			text, err := json.Marshal(result)
			require.NoError(t, err)
			var doc any
			require.NoError(t, json.Unmarshal(text, &doc))
			for _, e := range c.Expect {
				got := follow(t, doc, e.Path)
				if e.Tolerance == nil {
					assert.Equal(t, fmt.Sprint(e.Value), fmt.Sprint(got), e.Path)
					continue
				}
				assert.InDelta(t, e.Value, got, *e.Tolerance+1e-12, "%s (%s)", e.Path, c.Source)
			}
			evaluate(t, steps)
		})
	}
	assert.Greater(t, n, 70)
}

func follow(t *testing.T, v any, path string) any {
	for _, key := range strings.Split(path, ".") {
		if i, err := strconv.Atoi(key); err == nil {
			list, ok := v.([]any)
			require.True(t, ok && i < len(list), path)
			v = list[i]
			continue
		}
		m, ok := v.(map[string]any)
		require.True(t, ok, path)
		v = m[key]
	}
	return v
}

// evaluate demands that every printed substitution gives the printed value.
func evaluate(t *testing.T, steps []Step) {
	for _, s := range steps {
		p := parser{text: strings.ReplaceAll(s.Substituted, " ", "")}
		got := p.sum()
		require.Equal(t, len(p.text), p.at, "%s: %s", s.Symbol, s.Substituted)
		assert.InDelta(t, s.Value, got, 1e-8*math.Max(1, math.Abs(s.Value)), "%s: %s", s.Symbol, s.Substituted)
	}
}

// parser evaluates sums, products, powers, parentheses and a few functions, whose
// angles are in degrees.
type parser struct {
	text string
	at   int
}

func (p *parser) eat(c string) bool {
	if strings.HasPrefix(p.text[p.at:], c) {
		p.at += len(c)
		return true
	}
	return false
}

func (p *parser) sum() float64 {
	v := p.product()
	for {
		switch {
		case p.eat("+"):
			v += p.product()
		case p.eat("-"):
			v -= p.product()
		default:
			return v
		}
	}
}

func (p *parser) product() float64 {
	v := p.power()
	for {
		switch {
		case p.eat("*"):
			v *= p.power()
		case p.eat("/"):
			v /= p.power()
		default:
			return v
		}
	}
}

func (p *parser) power() float64 {
	v := p.atom()
	if p.eat("^") {
		return math.Pow(v, p.atom())
	}
	return v
}

func (p *parser) atom() float64 {
	if p.eat("-") {
		return -p.power()
	}
	rad := math.Pi / 180
	for name, f := range map[string]func(float64) float64{"sqrt(": math.Sqrt, "abs(": math.Abs, "(": func(v float64) float64 { return v },
		"sin(": func(v float64) float64 { return math.Sin(v * rad) }, "cos(": func(v float64) float64 { return math.Cos(v * rad) },
		"tan(": func(v float64) float64 { return math.Tan(v * rad) }} {
		if p.eat(name) {
			v := p.sum()
			p.eat(")")
			return f(v)
		}
	}
	if p.eat("pi") {
		return math.Pi
	}
	end := p.at
	for end < len(p.text) && strings.ContainsRune("0123456789.eE", rune(p.text[end])) ||
		end > p.at && end < len(p.text) && strings.ContainsRune("+-", rune(p.text[end])) && strings.ContainsRune("eE", rune(p.text[end-1])) {
		end++
	}
	v, err := strconv.ParseFloat(p.text[p.at:end], 64)
	if err != nil {
		return math.NaN()
	}
	p.at = end
	return v
}

// call runs a topic with inputs as JSON.
func call(t *testing.T, topic, inputs string) (map[string]any, *Fault) {
	var raw map[string]any
	require.NoError(t, json.Unmarshal([]byte(inputs), &raw))
	x, ok := Find(topic)
	require.True(t, ok)
	result, steps, fault := x.Run(raw, "metric")
	if fault != nil {
		return nil, fault
	}
	evaluate(t, steps)
	text, err := json.Marshal(result)
	require.NoError(t, err)
	var out map[string]any
	require.NoError(t, json.Unmarshal(text, &out))
	return out, nil
}

// What cannot be: the fault names the field, and a misspelt name the nearest.
func TestFaults(t *testing.T) {
	for _, c := range []struct{ topic, inputs, field, code, says string }{
		{"curve", `{"pvi": {"station": 0, "elev": 0}, "g1": 1, "g2": 2, "lenght": 5}`, "lenght", "F03", "length"},
		{"curve", `{"pvi": {"statoin": 0, "elev": 0}, "g1": 1, "g2": 2, "length": 5}`, "pvi.statoin", "F03", "station"},
		{"curve", `{"g1": 1, "length": 5}`, "g2", "F05", ""},
		{"curve", `{"g1": 1, "g2": 1, "k": 5}`, "g2", "F06", "equal"},
		{"curve", `{"g1": 1, "g2": 2, "k": 5, "length": 100}`, "length", "F08", "twice"},
		{"curve", `{"g1": 1, "g2": 2, "length": -3}`, "length", "F06", "more than 0"},
		{"curve", `{"g1": 1, "g2": 2, "length": "3 kg"}`, "length", "F04", ""},
		{"curve", `{"pvi": {"station": 0, "elev": 100}, "g1": -3, "g2": 3, "clear_under": {"from": -5, "to": 5, "elev": 90, "gap": 5}}`, "clear_under", "F06", "no length"},
		{"curve", `{"pvi": {"station": 0, "elev": 100}, "g1": -3, "g2": 3, "through": {"station": 0, "elev": 90}}`, "through", "F06", "tangents"},
		{"sight", `{"kind": "crest", "sight": 100}`, "a_pct", "F05", ""},
		{"sight", `{"kind": "creast"}`, "kind", "F06", "crest"},
		{"sight", `{"kind": "stopping_distance", "speed": 50, "grade": -90}`, "grade", "F06", "brakes"},
		{"arc", `{"radius": 10}`, "delta", "F05", "two of"},
		{"arc", `{"tangent": 10, "length": 25}`, "tangent", "F06", "180"},
		{"spiral", `{"radius": 100, "length": 120, "delta": 60}`, "delta", "F06", "alone turn"},
		{"slope_stake", `{"hinge_elev": 100, "half_width": 5, "side_slope": 2, "ground": [[0, 90], [10, 90]]}`, "ground", "F06", "meet"},
		{"table", `{"name": "cover_rule"}`, "name", "F03", "cover_rules"},
	} {
		_, fault := call(t, c.topic, c.inputs)
		if !assert.NotNil(t, fault, c.inputs) {
			continue
		}
		assert.Equal(t, c.field, fault.Field, c.inputs)
		assert.Equal(t, c.code, string(fault.Code), c.inputs)
		assert.Contains(t, fault.Message+fault.Help, c.says, c.inputs)
	}
}

// Units: a text with its unit is brought to the units of the call; labels and
// sexagesimal angles are read.
func TestUnits(t *testing.T) {
	out, fault := call(t, "curve", `{"pvi": {"station": "1+250", "elev": "100 ft"}, "g1": "-2 %", "g2": 3, "length": "0.2 km", "stations": ["1+250"]}`)
	require.Nil(t, fault)
	assert.InDelta(t, 1150, follow(t, out, "pvc.station"), 1e-9)
	assert.InDelta(t, 30.48, follow(t, out, "pvi.elev"), 1e-9)
	assert.InDelta(t, 200, out["length"], 1e-9)
	out, fault = call(t, "arc", `{"radius": 300, "delta": "50-30-00"}`)
	require.Nil(t, fault)
	assert.InDelta(t, 50.5, out["delta"], 1e-9)
	_, fault = call(t, "arc", `{"radius": 300, "delta": "50-61-00"}`)
	require.NotNil(t, fault)
}

// The ends belong to the curve; equal grades turn nowhere; interval rows are
// whole multiples with both ends.
func TestCurveEdges(t *testing.T) {
	out, _ := call(t, "curve", `{"pvc": {"station": 5, "elev": 10}, "g1": 0, "g2": 2, "length": 100, "interval": 25}`)
	assert.InDelta(t, 5, follow(t, out, "turning.station"), 1e-12)
	var rows []float64
	for _, r := range out["table"].([]any) {
		rows = append(rows, r.(map[string]any)["station"].(float64))
	}
	assert.Equal(t, []float64{5, 25, 50, 75, 100, 105}, rows)
	out, _ = call(t, "curve", `{"pvc": {"station": 5, "elev": 10}, "g1": 1, "g2": 1, "length": 100}`)
	assert.Nil(t, out["turning"])
	assert.Nil(t, out["k"])
	assert.Equal(t, "none", out["kind"])
	out, _ = call(t, "curve", `{"pvi": {"station": 500, "elev": 10}, "g1": -3, "g2": 2, "length": 100, "shape": "circular"}`)
	assert.InDelta(t, 100, out["length"], 1e-9)
	out, _ = call(t, "curve", `{"pvi": {"station": 500, "elev": 100}, "g1": 4, "g2": -3, "clear_under": {"from": 490, "to": 505, "elev_from": 102, "elev_to": 102.4, "gap": 4.5}}`)
	assert.Equal(t, "minimum", out["length_is"])
}

// Every topic has a title, a chapter, and inputs with words.
func TestList(t *testing.T) {
	for _, x := range Topics() {
		assert.NotEmpty(t, x.Title)
		assert.NotEmpty(t, x.Chapter)
		assert.NotEmpty(t, x.Inputs())
		for _, in := range x.Inputs() {
			assert.NotEmpty(t, in.Doc, "%s %s", x.Name, in.Name)
		}
	}
	assert.True(t, slices.Contains(Names(), "curve"))
}

// FuzzRun feeds any JSON to any topic: a result or a fault, never a panic, and
// nothing that JSON cannot carry.
func FuzzRun(f *testing.F) {
	f.Add(0, `{"pvi": {"station": 0, "elev": 0}, "g1": -3, "g2": 3, "k": 51, "flat_below_pct": 0.3, "interval": 10}`)
	f.Add(1, `{"kind": "crest", "sight": 185, "g1": 2, "g2": -3.75}`)
	f.Add(2, `{"degree": "5-37-00", "delta": "42-15-00"}`)
	f.Add(3, `{"radius": 600, "length": 120, "delta": 40.5, "chords": 4}`)
	f.Add(4, `{"hinge_elev": 499, "half_width": 22, "side_slope": 3, "ground": [[0, 494.5], [90, 480]]}`)
	f.Add(5, `{"name": "cover_rules", "id": "military tables"}`)
	f.Fuzz(func(t *testing.T, n int, inputs string) {
		var raw map[string]any
		if json.Unmarshal([]byte(inputs), &raw) != nil {
			return
		}
		all := Topics()
		result, steps, fault := all[((n%len(all))+len(all))%len(all)].Run(raw, "metric")
		if fault != nil {
			return
		}
		if _, err := json.Marshal(result); err != nil {
			t.Fatal(err)
		}
		for _, s := range steps {
			if math.IsNaN(s.Value) || math.IsInf(s.Value, 0) {
				t.Fatalf("%s = %v", s.Symbol, s.Value)
			}
		}
	})
}
