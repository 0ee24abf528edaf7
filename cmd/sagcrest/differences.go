package main

import (
	"encoding/json"
	"fmt"
	"maps"
	"reflect"
	"slices"
	"strings"

	"sagcrest/cmd/sagcrest/internal/wire"
)

// differences lists every figure that is not the same in all contenders, in the
// order of the document. Rows of a list are matched by what names them (id,
// name, item, or place with its line), so that a pay station more in one road
// does not shift the rest; lists without such names are matched by number.
func differences(cs []contender) []wire.Difference {
	w := walk{out: []wire.Difference{}}
	trees := make([]any, len(cs))
	for i, c := range cs {
		w.names = append(w.names, c.name)
		trees[i] = tree(c.results.Result)
	}
	w.compare("", trees)
	return w.out
}

// tree turns a document into maps, lists, numbers and text.
func tree(doc any) (out any) {
	text, err := wire.Encode(doc)
	if err == nil {
		err = json.Unmarshal(text, &out)
	}
	if err != nil {
		panic(err) // it was or will be written to disk as it is
	}
	return out
}

// walk collects differences.
type walk struct {
	names []string
	out   []wire.Difference
}

// compare looks at what stands at one path in every contender.
func (w *walk) compare(path string, values []any) {
	switch {
	case all(values, isTable):
		w.tables(path, values)
	case all(values, isList):
		w.lists(path, values)
	case !same(values):
		d := wire.Difference{Path: path, Values: map[string]any{}}
		for i, name := range w.names {
			d.Values[name] = values[i]
		}
		w.out = append(w.out, d)
	}
}

func (w *walk) tables(path string, values []any) {
	keys := map[string]bool{}
	for _, v := range values {
		for k := range v.(map[string]any) {
			keys[k] = true
		}
	}
	for _, k := range slices.Sorted(maps.Keys(keys)) {
		inner := make([]any, len(values))
		for i, v := range values {
			inner[i] = v.(map[string]any)[k]
		}
		at := k
		if path != "" {
			at = path + "." + k
		}
		w.compare(at, inner)
	}
}

func (w *walk) lists(path string, values []any) {
	rows := make([]map[string]any, len(values))
	var order []string
	for i, v := range values {
		rows[i] = byName(v.([]any))
		for _, name := range namesOf(v.([]any)) {
			if !slices.Contains(order, name) {
				order = append(order, name)
			}
		}
	}
	for _, name := range order {
		inner := make([]any, len(values))
		for i := range values {
			inner[i] = rows[i][name] // nil where the row is missing
		}
		w.compare(path+"["+name+"]", inner)
	}
}

// byName finds the rows of a list by their names.
func byName(list []any) map[string]any {
	out := map[string]any{}
	for i, name := range namesOf(list) {
		out[name] = list[i]
	}
	return out
}

// namesOf names every row; a name that is taken already gets its number
// behind it (two sections stand where the typical section changes).
func namesOf(list []any) (names []string) {
	taken := map[string]int{}
	for i, row := range list {
		name := nameOf(row)
		if name == "" {
			name = fmt.Sprint(i)
		}
		if taken[name]++; taken[name] > 1 {
			name = fmt.Sprintf("%s, %d", name, taken[name])
		}
		names = append(names, name)
	}
	return names
}

// nameOf returns what names a row, "" where nothing does.
func nameOf(row any) string {
	t, ok := row.(map[string]any)
	if !ok {
		return ""
	}
	for _, key := range []string{"id", "name", "item"} {
		if s, ok := t[key].(string); ok {
			return s
		}
	}
	line, _ := t["line"].(string)
	if end, ok := t["end"].(string); ok {
		return strings.TrimSpace(line + " " + end)
	}
	for _, key := range []string{"place", "from", "pvi"} {
		if s := labelOf(t[key]); s != "" {
			return strings.TrimSpace(line + " " + s)
		}
	}
	return ""
}

// labelOf returns the station of a place, or of a level at a place.
func labelOf(v any) string {
	t, ok := v.(map[string]any)
	if !ok {
		return ""
	}
	if s, ok := t["station"].(string); ok {
		return s
	}
	return labelOf(t["place"])
}

func isTable(v any) bool { _, ok := v.(map[string]any); return ok }
func isList(v any) bool  { _, ok := v.([]any); return ok }

func all(values []any, is func(any) bool) bool {
	return !slices.ContainsFunc(values, func(v any) bool { return !is(v) })
}

func same(values []any) bool {
	return !slices.ContainsFunc(values[1:], func(v any) bool { return !reflect.DeepEqual(v, values[0]) })
}
