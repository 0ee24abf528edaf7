package config

import (
	"errors"
	"strconv"
	"strings"

	"github.com/pelletier/go-toml/v2"
	"github.com/pelletier/go-toml/v2/unstable"
)

// fromTOML reads expressions one by one with the low-level parser, since it
// alone tells where every key and value stands. That parser knows no
// semantics; a second, strict pass of the same library finds what is left
// (digits, dates) once the tree is free of complaints.
func (t *tree) fromTOML() *node {
	p := &unstable.Parser{}
	p.Reset(t.data)
	root := &node{at: position{1, 1}, headed: true}
	current := root
	for p.NextExpression() {
		e := p.Expression()
		switch e.Kind {
		case unstable.Table:
			current = t.header(root, keys(t, e.Key()))
		case unstable.ArrayTable:
			current = t.arrayHeader(root, keys(t, e.Key()))
		case unstable.KeyValue:
			t.keyValue(current, e, 1)
		}
	}
	if err := p.Error(); err != nil {
		t.tomlFault(p, err)
		return nil
	}
	if len(t.problems) == 0 {
		t.strict()
	}
	return root
}

// part is one step of a dotted key with its place.
type part struct {
	key string
	at  position
}

// keys lists the parts of a dotted key with their places.
func keys(t *tree, it unstable.Iterator) []part {
	var parts []part
	for it.Next() {
		n := it.Node()
		parts = append(parts, part{string(n.Data), t.position(int(n.Raw.Offset))})
	}
	return parts
}

// header opens [a.b.c] and returns its table. A header that may not stand
// returns a table that hangs nowhere, so that reading goes on.
func (t *tree) header(root *node, parts []part) *node {
	parent := t.walk(root, parts[:len(parts)-1])
	last := parts[len(parts)-1]
	old := parent.entry(last.key)
	if old == nil {
		n := &node{at: last.at, headed: true}
		t.push(parent, entry{last.key, last.at, n})
		return n
	}
	if old.value.kind != table || old.value.headed || old.value.closed {
		t.twice(last.key, last.at, old.at)
		return &node{at: last.at}
	}
	old.value.headed = true // [a.b] came before [a]
	return old.value
}

// arrayHeader opens the next table of [[a.b.c]].
func (t *tree) arrayHeader(root *node, parts []part) *node {
	parent := t.walk(root, parts[:len(parts)-1])
	last := parts[len(parts)-1]
	n := &node{at: last.at, headed: true}
	old := parent.entry(last.key)
	switch {
	case old == nil:
		t.push(parent, entry{last.key, last.at, &node{kind: list, at: last.at, headed: true, items: []*node{n}}})
	case old.value.kind == list && old.value.headed:
		old.value.items = append(old.value.items, n)
	default:
		t.twice(last.key, last.at, old.at)
	}
	return n
}

// walk goes down the leading parts of a key, making tables where none are; of
// an array of tables it enters the last.
func (t *tree) walk(n *node, parts []part) *node {
	for _, p := range parts {
		old := n.entry(p.key)
		switch {
		case old == nil:
			next := &node{at: p.at}
			t.push(n, entry{p.key, p.at, next})
			n = next
		case old.value.kind == list && old.value.headed:
			n = old.value.items[len(old.value.items)-1]
		case old.value.kind == table && !old.value.closed:
			n = old.value
		default:
			t.twice(p.key, p.at, old.at)
			return &node{at: p.at}
		}
	}
	return n
}

// keyValue puts a.b = value into a table.
func (t *tree) keyValue(to *node, e *unstable.Node, depth int) {
	parts := keys(t, e.Key())
	last := parts[len(parts)-1]
	to = t.walk(to, parts[:len(parts)-1])
	t.add(to, entry{last.key, last.at, t.tomlValue(e.Value(), last.at, depth)})
}

// tomlValue converts a value; fallback is the place for lists, of which the
// parser keeps none.
func (t *tree) tomlValue(v *unstable.Node, fallback position, depth int) *node {
	n := &node{kind: text, at: fallback, text: string(v.Data)}
	if v.Raw.Length > 0 {
		n.at = t.position(int(v.Raw.Offset))
	}
	switch v.Kind {
	case unstable.Array:
		n.kind, n.text = list, ""
		if t.deep(depth, n.at) {
			return n
		}
		for it := v.Children(); it.Next(); {
			n.items = append(n.items, t.tomlValue(it.Node(), n.at, depth+1))
		}
	case unstable.InlineTable:
		n.kind, n.text = table, ""
		if t.deep(depth, n.at) {
			return n
		}
		for it := v.Children(); it.Next(); {
			t.keyValue(n, it.Node(), depth+1)
		}
		n.closed = true // only now: its own dotted keys may still open it
	case unstable.Bool:
		n.kind, n.truth = truth, string(v.Data) == "true"
	case unstable.Integer, unstable.Float:
		n.kind, n.integer = number, v.Kind == unstable.Integer
		n.number = tomlNumber(n.text, n.integer)
	case unstable.LocalDate, unstable.LocalTime, unstable.LocalDateTime, unstable.DateTime:
		n.kind = date
	}
	return n
}

// tomlNumber reads what the parser has recognised as a number; a form that it
// let pass by mistake is caught by the strict pass.
func tomlNumber(s string, integer bool) float64 {
	s = strings.ReplaceAll(s, "_", "")
	if integer {
		if i, err := strconv.ParseInt(s, 0, 64); err == nil {
			return float64(i)
		}
	}
	v, _ := strconv.ParseFloat(s, 64)
	return v
}

// tomlFault reports a fault of form where the parser met it.
func (t *tree) tomlFault(p *unstable.Parser, err error) {
	at := t.position(len(t.data))
	message := err.Error()
	var fault *unstable.ParserError
	if errors.As(err, &fault) {
		message = fault.Message
		if len(fault.Highlight) > 0 {
			at = t.position(int(p.Range(fault.Highlight).Offset))
		}
	}
	t.complain("F02", at, "", message, "the file is no TOML from here on")
}

// strict lets the library judge the rest: it knows that 01 is no number and that
// February has no 30th.
func (t *tree) strict() {
	var all map[string]any
	err := toml.Unmarshal(t.data, &all)
	if err == nil {
		return
	}
	at := position{1, 1}
	message := strings.TrimPrefix(err.Error(), "toml: ")
	var fault *toml.DecodeError
	if errors.As(err, &fault) {
		at.line, at.column = fault.Position()
	}
	t.complain("F02", at, "", message, "the file is no TOML here")
}
