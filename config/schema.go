package config

import (
	"bytes"
	"encoding/json"
	"reflect"
	"strings"

	"github.com/invopop/jsonschema"
)

// Schema returns the JSON Schema of the project file (draft 2020-12), made
// from the same types that read it. Units, ranges and contradictions are
// beyond it: check reports those.
func Schema() []byte {
	r := &jsonschema.Reflector{
		Anonymous: true, RequiredFromJSONSchemaTags: true, ExpandedStruct: true,
		Namer: definition,
		Mapper: func(t reflect.Type) *jsonschema.Schema {
			if isNumeric(t) {
				return reflect.Zero(t).Interface().(interface{ form() form }).form().schema()
			}
			return nil
		},
	}
	s := r.Reflect(&fileProject{})
	s.Title = "project file"
	s.Description = "a road segment: alignment, grade line, typical sections, ground, soils, prices, structures"
	loosen(s)
	var out bytes.Buffer
	e := json.NewEncoder(&out)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(s); err != nil {
		panic("config: schema: " + err.Error()) // it holds nothing that cannot be written
	}
	return out.Bytes()
}

// definition names a type in the schema by its table; a number has a name of
// its own, since rate is both a table and a number. Types without a name (lists,
// pointers) keep none and are written out where they stand.
func definition(t reflect.Type) string {
	if t.Name() == "" {
		return ""
	}
	if name, found := strings.CutPrefix(t.Name(), "file"); found {
		return strings.ToLower(name)
	}
	return "number_" + strings.ToLower(t.Name())
}

// loosen gives the tables of an alternative copies that require nothing: they
// merge by key with the base, which has the rest.
func loosen(s *jsonschema.Schema) {
	alternative := s.Definitions[definition(reflect.TypeFor[fileAlternative]())]
	for pair := alternative.Properties.Oldest(); pair != nil; pair = pair.Next() {
		name, found := strings.CutPrefix(pair.Value.Ref, "#/$defs/")
		if !found {
			continue
		}
		loose := *s.Definitions[name]
		loose.Required = nil
		s.Definitions["alternative_"+name] = &loose
		pair.Value.Ref = "#/$defs/alternative_" + name
	}
}
