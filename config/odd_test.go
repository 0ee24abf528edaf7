package config_test

import (
	"encoding/json"
	"fmt"
	"os"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// leaf is a place in a decoded JSON document whose value can be exchanged.
type leaf struct {
	path string
	set  func(any)
}

func leaves(v any, path string, set func(any)) (all []leaf) {
	all = append(all, leaf{path, set})
	switch c := v.(type) {
	case map[string]any:
		keys := make([]string, 0, len(c))
		for k := range c {
			keys = append(keys, k)
		}
		slices.Sort(keys)
		for _, k := range keys {
			all = append(all, leaves(c[k], path+"."+k, func(x any) { c[k] = x })...)
		}
	case []any:
		for i := range c {
			all = append(all, leaves(c[i], fmt.Sprintf("%s[%d]", path, i), func(x any) { c[i] = x })...)
		}
	}
	return all
}

// Any value may stand anywhere: reading never panics, and what can be no value
// of any key is always complained of.
func TestOddValuesAnywhere(t *testing.T) {
	data, err := os.ReadFile("testdata/full.json")
	require.NoError(t, err)
	rapid.Check(t, func(t *rapid.T) {
		var root any
		if err := json.Unmarshal(data, &root); err != nil {
			t.Fatal(err)
		}
		at := rapid.SampledFrom(leaves(root, "", func(any) {})[1:]).Draw(t, "leaf")
		odd := rapid.SampledFrom([]any{
			nil, true, 0.0, -1.0, 1e300, "", "x", "5 m", "1+000", "-9 %", []any{}, []any{nil}, map[string]any{}, map[string]any{"x": []any{}},
		}).Draw(t, "odd")
		at.set(odd)
		text, err := json.Marshal(root)
		if err != nil {
			t.Fatal(err)
		}
		problems := append(read("a.json", string(text), "base"), read("a.json", string(text), "first draft")...)
		if odd == nil && len(problems) == 0 {
			t.Fatalf("null at %s is taken", at.path)
		}
		for _, p := range problems {
			if p.Code == "" || p.Message == "" || p.Line == 0 || p.Column == 0 {
				t.Fatalf("%s = %v: %+v", at.path, odd, p)
			}
		}
	})
}
