package wire

import (
	"encoding/json"
	"reflect"
	"strings"

	"github.com/invopop/jsonschema"
)

// documents lists what Schema knows, in the order in which it is offered.
func documents() []struct {
	name string
	doc  any
} {
	return []struct {
		name string
		doc  any
	}{
		{"results", Results{}}, {"check", CheckDoc{}}, {"compare", CompareDoc{}}, {"calc", CalcDoc{}}, {"error", ErrorDoc{}},
		{"new", NewDoc{}}, {"explain", ExplainDoc{}},
	}
}

// Documents returns the names that Schema knows.
func Documents() []string {
	var out []string
	for _, d := range documents() {
		out = append(out, d.name)
	}
	return out
}

// Schema returns the JSON Schema of a document; ok is false for an unknown name. Unknown keys are allowed in documents, as they may
// grow.
func Schema(name string) (text []byte, ok bool) {
	for _, d := range documents() {
		if d.name != name {
			continue
		}
		r := jsonschema.Reflector{AllowAdditionalProperties: true, Anonymous: true}
		s := r.Reflect(d.doc)
		s.Title = "sagcrest/" + name
		nullable(s.Definitions, reflect.TypeOf(d.doc), map[reflect.Type]bool{})
		text, err := json.MarshalIndent(s, "", "  ")
		if err != nil {
			panic(err) // the types are fixed
		}
		return append(text, '\n'), true
	}
	return nil, false
}

// nullable lets every pointer without omitempty be null: that is what null
// means in the documents.
func nullable(defs jsonschema.Definitions, t reflect.Type, seen map[reflect.Type]bool) {
	for t.Kind() == reflect.Pointer || t.Kind() == reflect.Slice {
		t = t.Elem()
	}
	if t.Kind() != reflect.Struct || seen[t] {
		return
	}
	seen[t] = true
	for i := range t.NumField() {
		f := t.Field(i)
		nullable(defs, f.Type, seen)
		key, options, _ := strings.Cut(f.Tag.Get("json"), ",")
		def := defs[t.Name()]
		if f.Type.Kind() != reflect.Pointer || options == "omitempty" || def == nil || def.Properties == nil {
			continue
		}
		if p, ok := def.Properties.Get(key); ok {
			def.Properties.Set(key, &jsonschema.Schema{AnyOf: []*jsonschema.Schema{p, {Type: "null"}}})
		}
	}
}
