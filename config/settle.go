package config

import (
	"fmt"
	"reflect"
	"slices"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// reading turns the decoded file into a Project. It holds what every stage
// needs: the merged tree for places, units and labels for numbers, and the
// complaints so far.
type reading struct {
	*source
	root     *node
	units    quantity.System
	labels   station.Labels
	things   []string // ids and names in the file, for acceptances
	problems []diag.Problem
}

// complain reports an error at the value of a key, or at its nearest ancestor.
func (r *reading) complain(code finding.Code, key, message, help string) *diag.Problem {
	n, _ := r.root.locate(key)
	r.problems = append(r.problems, r.problem(code, n.at, key, message, help))
	return &r.problems[len(r.problems)-1]
}

// has reports whether a key is in the file, whatever its value is worth.
func (r *reading) has(key string) bool {
	_, depth := r.root.locate(key)
	return depth == len(steps(key))
}

// settle goes through a decoded file type and brings every number to SI:
// unit, form and range are checked here and nowhere else.
func (r *reading) settle(v reflect.Value, path string, f field) {
	if n, ok := asNumeric(v); ok {
		r.number(n, path, f.limits)
		return
	}
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			r.settle(v.Elem(), path, f)
		}
	case reflect.Slice:
		for i := range v.Len() {
			r.settle(v.Index(i), fmt.Sprintf("%s[%d]", path, i), f)
		}
	case reflect.Struct:
		for _, sub := range fields(v.Type()) {
			r.settle(v.Field(sub.index), join(path, sub.key), sub)
		}
	case reflect.String:
		r.word(v.String(), path, f.words)
	}
}

// word checks a text that is one of a few words.
func (r *reading) word(s, path string, words []string) {
	if words == nil || !r.has(path) || slices.Contains(words, s) {
		return
	}
	code := finding.Code("F06")
	switch path {
	case "units", "survey.units":
		code = "F04"
	case "profile.criteria": // a name, not a choice of form
		code = "F03"
	}
	if later(path, s) {
		r.complain("F09", path, fmt.Sprintf("%s %q: %s", path, s, notBuilt), "known are "+strings.Join(words, ", "))
		return
	}
	r.complain(code, path, fmt.Sprintf("%s is %q", path, s), suggest(s, words))
}

// later names the words that stand in the project file's description and have
// no effect yet.
func later(path, word string) bool {
	return path == "earthwork.pay_method" && (word == "prismoidal" || word == "integrated")
}

// unique complains of a name that is taken. An empty one is missing, which is
// another complaint.
func (r *reading) unique(seen map[string]bool, name, key string) {
	if name != "" && seen[name] {
		r.complain("F08", key, fmt.Sprintf("%s %q is taken", key, name), "names tell things apart: choose another")
	}
	seen[name] = true
}
