package config

import (
	"fmt"
	"reflect"
	"regexp"
	"slices"
	"strings"

	"sagcrest/config/diag"
)

// The file types (fileProject and all below it) are the one table of known
// keys: their tags name each key (json), say whether it is required and which
// words it takes (jsonschema), which range its number has (range) and what it
// means (jsonschema_description). Reading, complaining and the published
// schema all come from there.

// field is one known key of a table.
type field struct {
	key      string
	required bool
	words    []string // the words that a text may be; nil for any
	limits   string
	index    int
	typ      reflect.Type
}

// fields lists the known keys of a file type in the order of the struct.
func fields(t reflect.Type) []field {
	var all []field
	for i := range t.NumField() {
		f := t.Field(i)
		key, _, _ := strings.Cut(f.Tag.Get("json"), ",")
		out := field{key: key, limits: f.Tag.Get("range"), index: i, typ: f.Type}
		for _, word := range strings.Split(f.Tag.Get("jsonschema"), ",") {
			if word == "required" {
				out.required = true
			} else if w, ok := strings.CutPrefix(word, "enum="); ok {
				out.words = append(out.words, w)
			}
		}
		all = append(all, out)
	}
	return all
}

// unbuilt reports whether a key belongs to the project file but to a part of
// it that has no effect yet. Such a key must neither be unknown nor ignored.
func unbuilt(path string) bool {
	path = strings.TrimPrefix(counts.ReplaceAllString(path, ""), "alternative.")
	switch path {
	case "superelevation_rule", "widening", "point",
		"haul", "borrow", "waste", "barrier", "rainfall", "inlet", "ditch",
		"survey.lidar", "alignment.equations",
		"alignment.pi.degree", "alignment.pi.definition", "alignment.pi.spiral_in", "alignment.pi.spiral_out",
		"profile.pvi.lengths", "profile.pvi.shape", "profile.pvi.for", "profile.pvi.step",
		"typical_section.kerb", "typical_section.transition":
		return true
	}
	return false
}

// counts matches the "[2]" of a key path.
var counts = regexp.MustCompile(`\[\d+\]`)

// What is said of a key that has no effect yet. The text names no date and no
// version: neither is known to the program.
const (
	notBuilt     = "its effect on geometry or quantities is not built yet, and nothing is ever ignored"
	notBuiltHelp = "leave it out for now"
)

// inspector goes through a tree beside the file types.
type inspector struct {
	*source
	problems []diag.Problem
}

// add keeps a complaint; the order of the file is the order of the list.
func (in *inspector) add(p diag.Problem) { in.problems = append(in.problems, p) }

// inspect returns a copy of n that fits type t: unknown keys and values of the
// wrong form are complained of and left out. nil means that nothing is left.
func (in *inspector) inspect(n *node, t reflect.Type, path string) *node {
	for t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	if n.kind == null {
		in.add(in.problem("F05", n.at, path, path+" has no value", "give it one, or leave the key out"))
		return nil
	}
	switch {
	case isNumeric(t):
		return in.leaf(n, path, reflect.Zero(t).Interface().(interface{ form() form }).form().what, text, number)
	case t.Kind() == reflect.String:
		return in.leaf(n, path, "text in quotes", text, date)
	case t.Kind() == reflect.Bool:
		return in.leaf(n, path, "true or false", truth)
	case t.Kind() == reflect.Slice:
		return in.list(n, t.Elem(), path)
	}
	return in.table(n, t, path)
}

// leaf accepts a scalar of one of the given kinds.
func (in *inspector) leaf(n *node, path, what string, kinds ...kind) *node {
	for _, k := range kinds {
		if n.kind == k {
			return n
		}
	}
	if n.kind == date && kinds[0] == text { // a spreadsheet's idea of a station
		in.add(in.problem("U14", n.at, path, fmt.Sprintf("%s is the date %s", path, n.text), "write "+what))
		return nil
	}
	in.add(in.problem("F06", n.at, path, fmt.Sprintf("%s is %s", path, n.kind), "write "+what))
	return nil
}

// list keeps the count of its items: a bad one becomes an empty table, so that
// paths of the others stay right.
func (in *inspector) list(n *node, t reflect.Type, path string) *node {
	if n.kind != list {
		in.add(in.problem("F06", n.at, path, fmt.Sprintf("%s is %s; it is a list", path, n.kind), "write [ … ], or [["+path+"]] for each"))
		return nil
	}
	out := &node{kind: list, at: n.at}
	for i, item := range n.items {
		clean := in.inspect(item, t, fmt.Sprintf("%s[%d]", path, i))
		if clean != nil {
			out.items = append(out.items, clean)
		} else if t.Kind() == reflect.Struct && !isNumeric(t) {
			out.items = append(out.items, &node{at: item.at})
		}
	}
	return out
}

// table sorts the keys of one table into known, known but not built, and unknown.
func (in *inspector) table(n *node, t reflect.Type, path string) *node {
	if n.kind != table {
		in.add(in.problem("F06", n.at, path, fmt.Sprintf("%s is %s; it is a table", path, n.kind), "write { key = value, … }"))
		return nil
	}
	known := fields(t)
	out := &node{at: n.at}
	for _, e := range n.entries {
		here := join(path, e.key)
		f, ok := find(known, e.key)
		switch {
		case ok:
			if clean := in.inspect(e.value, f.typ, here); clean != nil {
				out.entries = append(out.entries, entry{e.key, e.at, clean})
			}
		case unbuilt(here):
			in.add(in.problem("F09", e.at, here, here+": "+notBuilt, notBuiltHelp))
		default:
			in.add(in.problem("F03", e.at, here, fmt.Sprintf("%q is no key of %s", e.key, title(path)), suggest(e.key, names(known))))
		}
	}
	return out
}

// demand complains of required keys that are missing from n.
func (in *inspector) demand(n *node, t reflect.Type, path string) {
	for t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	switch {
	case t.Kind() == reflect.Slice && n.kind == list:
		for i, item := range n.items {
			in.demand(item, t.Elem(), fmt.Sprintf("%s[%d]", path, i))
		}
	case t.Kind() == reflect.Struct && !isNumeric(t) && n.kind == table:
		for _, f := range fields(t) {
			v, here := n.get(f.key), join(path, f.key)
			if v != nil {
				in.demand(v, f.typ, here)
			} else if f.required && !misspelt(n, f.key, names(fields(t))) {
				in.add(in.problem("F05", n.at, here, here+" is missing", "add it to "+title(path)))
			}
		}
	}
}

// misspelt reports whether an unknown key of n was probably meant to be key: it
// has been complained of already, and one fault is one complaint.
func misspelt(n *node, key string, known []string) bool {
	for _, e := range n.entries {
		if !slices.Contains(known, e.key) && nearest(e.key, known) == key {
			return true
		}
	}
	return false
}

// find returns the known field with a key.
func find(known []field, key string) (field, bool) {
	for _, f := range known {
		if f.key == key {
			return f, true
		}
	}
	return field{}, false
}

// names lists the known keys of a table for messages.
func names(known []field) []string {
	var all []string
	for _, f := range known {
		all = append(all, f.key)
	}
	return all
}

// join puts a key behind the path of its table.
func join(path, key string) string {
	if path == "" {
		return key
	}
	return path + "." + key
}

// title names a table in messages.
func title(path string) string {
	if path == "" {
		return "the project file"
	}
	return path
}

// suggest names the nearest known name, or all of them when none is near.
func suggest(name string, known []string) string {
	if near := nearest(name, known); near != "" {
		return fmt.Sprintf("did you mean %q?", near)
	}
	return "known are " + strings.Join(known, ", ")
}

// longestName is more letters than any known name has: a longer one is near to
// none, and comparing megabytes letter by letter would take for ever.
const longestName = 64

// nearest is diag.Nearest within that limit.
func nearest(name string, known []string) string {
	if len(name) > longestName {
		return ""
	}
	return diag.Nearest(name, known)
}
