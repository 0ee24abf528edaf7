package config_test

import (
	"bytes"
	"encoding/json"
	"os"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config"
)

func compiled(t *testing.T) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(config.Schema()))
	require.NoError(t, err)
	c := jsonschema.NewCompiler()
	require.NoError(t, c.AddResource("project.json", doc))
	s, err := c.Compile("project.json")
	require.NoError(t, err)
	return s
}

func TestSchemaAcceptsTheFullProject(t *testing.T) {
	data, err := os.ReadFile("testdata/full.json")
	require.NoError(t, err)
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(data))
	require.NoError(t, err)
	assert.NoError(t, compiled(t).Validate(doc))
}

func TestSchemaRefuses(t *testing.T) {
	s := compiled(t)
	data, err := os.ReadFile("testdata/full.json")
	require.NoError(t, err)
	for name, edit := range map[string]func(m map[string]any){
		"unknown key":                   func(m map[string]any) { m["titel"] = "x" },
		"missing table":                 func(m map[string]any) { delete(m, "profile") },
		"another word":                  func(m map[string]any) { m["units"] = "metres" },
		"bare length":                   func(m map[string]any) { first(m, "typical_section")["pavement"] = 0.4 },
		"missing key in a list":         func(m map[string]any) { delete(first(m, "culvert"), "wall") },
		"unknown key in an alternative": func(m map[string]any) { first(m, "alternative")["culverts"] = []any{} },
	} {
		var m map[string]any
		require.NoError(t, json.Unmarshal(data, &m))
		edit(m)
		assert.Error(t, s.Validate(m), name)
	}
}

func first(m map[string]any, key string) map[string]any {
	return m[key].([]any)[0].(map[string]any)
}

func TestSchemaIsTheSameEveryTime(t *testing.T) {
	assert.Equal(t, string(config.Schema()), string(config.Schema()))
}
