package config

import (
	"strconv"
	"strings"
)

// kind is what a value of the project file looks like, the same for the three
// formats.
type kind byte

// The kinds of value that the three formats have between them.
const (
	table kind = iota
	list
	text
	number
	truth
	null
	date // a bare TOML or YAML date; its text is kept as written
)

// String names the kind for messages.
func (k kind) String() string {
	return [...]string{"a table", "a list", "text", "a number", "true or false", "null", "a date"}[k]
}

// position is a place in the file, line and column counted from 1, columns in
// bytes.
type position struct{ line, column int }

// node is a value with the place where it stands. Merging shares nodes, so
// that every value keeps the place where somebody typed it. A node is never
// changed once the file is read.
type node struct {
	kind    kind
	at      position
	text    string  // of text, number and date: as written, without quotes
	number  float64 // may be NaN or infinite where the format has words for them
	integer bool
	truth   bool
	entries []entry // of a table, in the order of the file
	items   []*node // of a list

	// How a TOML table came about decides whether it may be opened again.
	headed, closed bool
}

// entry is a key of a table with its place and value.
type entry struct {
	key   string
	at    position
	value *node
}

// get returns the value of a key of a table, nil when it is absent or n is no
// table.
func (n *node) get(key string) *node {
	if e := n.entry(key); e != nil {
		return e.value
	}
	return nil
}

// entry returns a key of a table with its place, nil when it is absent. A table
// has few keys: searching them in turn keeps the order of the file for free.
func (n *node) entry(key string) *entry {
	if n == nil || n.kind != table {
		return nil
	}
	for i := range n.entries {
		if n.entries[i].key == key {
			return &n.entries[i]
		}
	}
	return nil
}

// string returns the text of a text node, "" for every other.
func (n *node) string() string {
	if n == nil || n.kind != text {
		return ""
	}
	return n.text
}

// locate follows a key path such as "profile.pvi[1].elev" as far as it leads
// and returns the last node reached and how many steps that were. Counts in
// brackets start at 0.
func (n *node) locate(path string) (*node, int) {
	depth := 0
	for _, step := range steps(path) {
		next := n.get(step)
		if i, err := strconv.Atoi(step); next == nil && err == nil && n.kind == list && i >= 0 && i < len(n.items) {
			next = n.items[i]
		}
		if next == nil {
			break
		}
		n = next
		depth++
	}
	return n, depth
}

// steps splits "a.b[2].c" into a, b, 2, c.
func steps(path string) []string {
	return strings.FieldsFunc(path, func(r rune) bool { return r == '.' || r == '[' || r == ']' })
}

// same reports whether two values say the same thing, wherever they stand.
func same(a, b *node) bool {
	if a == nil || b == nil {
		return a == b
	}
	if a.kind != b.kind || len(a.entries) != len(b.entries) || len(a.items) != len(b.items) {
		return false
	}
	switch a.kind {
	case number: // 1 and 1.0 are one number
		return a.number == b.number || a.text == b.text
	case truth:
		return a.truth == b.truth
	case table:
		for _, e := range a.entries {
			if !same(e.value, b.get(e.key)) {
				return false
			}
		}
	case list:
		for i := range a.items {
			if !same(a.items[i], b.items[i]) {
				return false
			}
		}
	default:
		return a.text == b.text
	}
	return true
}

// plain returns the value as the maps, slices and scalars that viper takes.
func (n *node) plain() any {
	switch n.kind {
	case table:
		m := make(map[string]any, len(n.entries))
		for _, e := range n.entries {
			m[e.key] = e.value.plain()
		}
		return m
	case list:
		s := make([]any, len(n.items))
		for i, item := range n.items {
			s[i] = item.plain()
		}
		return s
	case number:
		return n.number
	case truth:
		return n.truth
	}
	return n.text
}
