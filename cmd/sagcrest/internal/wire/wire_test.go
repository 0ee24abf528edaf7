package wire

import (
	"bytes"
	"encoding/json"
	"math"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// Numbers have no exponent, no trailing zeros and no negative zero, and keep
// nine decimals (six for volumes).
func TestNumbers(t *testing.T) {
	for v, want := range map[float64]string{
		0: "0", math.Copysign(1e-300, -1): "0", -1e-12: "0", 1: "1", 0.1: "0.1", -2.5: "-2.5", 1e15: "1000000000000000",
		1.0 / 3: "0.333333333", 514.2857142857142: "514.285714286", 1e-9: "0.000000001", 100: "100",
	} {
		text, err := json.Marshal(Fine(v))
		require.NoError(t, err)
		assert.Equal(t, want, string(text))
	}
	text, err := json.Marshal(Volume(1.0 / 3))
	require.NoError(t, err)
	assert.Equal(t, "0.333333", string(text))
	_, err = json.Marshal(Fine(math.NaN()))
	assert.Error(t, err, "a result that is no number is a fault, not a null")
}

// Law: what is written reads back to half of what is written.
func TestNumbersReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e7, 1e7).Draw(t, "v")
		text, err := json.Marshal(Fine(v))
		require.NoError(t, err)
		var back float64
		require.NoError(t, json.Unmarshal(text, &back))
		assert.InDelta(t, v, back, 0.51e-9+math.Abs(v)*1e-15)
	})
}

// A stop makes null what stands at its path, and only that; a verdict says it
// in words; what is null already stays so.
func TestWithhold(t *testing.T) {
	f, v := Fine(3), Volume(7)
	r := Result{
		Sections: []Section{{CutArea: &f, FillArea: &f}, {CutArea: &f}},
		Drainage: Drainage{Culverts: []Culvert{{Verdict: "ok", Slope: &f}}},
	}
	r.Earthwork.Totals.CutBank = &v
	withhold(&r, "sections[0].cut_area")
	withhold(&r, "earthwork.totals.cut_bank")
	withhold(&r, "drainage.culverts[0].verdict")
	withhold(&r, "cost.total")
	withhold(&r, "earthwork.mass.ordinates")
	assert.Nil(t, r.Sections[0].CutArea)
	assert.NotNil(t, r.Sections[0].FillArea)
	assert.NotNil(t, r.Sections[1].CutArea)
	assert.Nil(t, r.Earthwork.Totals.CutBank)
	assert.Equal(t, "withheld", r.Drainage.Culverts[0].Verdict)
	assert.NotNil(t, r.Drainage.Culverts[0].Slope)
	assert.Panics(t, func() { withhold(&r, "sections[0].width") }, "a path of nothing is a mistake")
	assert.Panics(t, func() { withhold(&r, "sections[9].cut_area") })
}

// Every document has a schema in which pointers may be null and new keys may
// appear.
func TestSchemas(t *testing.T) {
	for _, name := range Documents() {
		text, ok := Schema(name)
		require.True(t, ok, name)
		var v map[string]any
		require.NoError(t, json.Unmarshal(text, &v), name)
	}
	_, ok := Schema("nothing")
	assert.False(t, ok)
	text, _ := Schema("results")
	assert.Contains(t, string(text), `"null"`)
}

// A document in which everything that may be withheld is null keeps to its
// schema, as does one with keys of a later version; one that lacks a key, or
// holds a word that is not of its list, does not.
func TestWithheldKeepsToTheSchema(t *testing.T) {
	text, ok := Schema("results")
	require.True(t, ok)
	source, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	require.NoError(t, err)
	c := jsonschema.NewCompiler()
	require.NoError(t, c.AddResource("results.json", source))
	schema, err := c.Compile("results.json")
	require.NoError(t, err)
	valid := func(doc string) error {
		v, err := jsonschema.UnmarshalJSON(strings.NewReader(doc))
		require.NoError(t, err)
		return schema.Validate(v)
	}

	end := Place{0, "0+000.000"}
	r := &Results{Head: head("results"), Inputs: []Input{}, Alternative: "base", Status: "withheld",
		Findings: []Finding{{Code: "A06", Severity: "E", Stops: []string{"earthwork.totals.cut_bank"}}},
		Result: Result{
			Alignment: Alignment{Elements: []Element{{Kind: "tangent", From: end, To: end}}},
			Profile: Profile{Curves: []Curve{{Kind: "sag", Shape: "parabola"}}, LowPoints: []Turning{}, HighPoints: []Turning{},
				Ends: []LineEnd{}, Clearances: []Clearance{{Name: "lane", Side: "under"}}},
			Sections: []Section{{Place: end}},
			Earthwork: Earthwork{Totals: Totals{PayMethod: "end_area", Methods: []Method{{Name: "end_area"}}, Materials: []Material{{}}},
				Intervals: []Interval{{From: end, To: end}}, Mass: Mass{State: "bank"}},
			Drainage: Drainage{Culverts: []Culvert{{ID: "C", Shape: "circular", Verdict: "withheld", Mends: []Mend{}}}},
			Cost:     &Cost{Lines: []Line{{Item: "strip"}}},
		}}
	text, err = Encode(r)
	require.NoError(t, err)
	doc := string(text)
	require.NoError(t, valid(doc))
	assert.NoError(t, valid(strings.Replace(doc, `"alternative"`, `"of_a_later_version": {}, "alternative"`, 1)))
	assert.Error(t, valid(strings.Replace(doc, `"cut_bank": null,`, "", 1)), "null is not absent")
	assert.Error(t, valid(strings.Replace(doc, `"withheld"`, `"half done"`, 1)))
	assert.Error(t, valid(strings.Replace(doc, `"finished_elev": 0`, `"finished_elev": null`, 1)), "what always exists is never null")
}
