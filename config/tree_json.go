package config

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"strconv"
)

// fromJSON checks the form of the whole text first, which tells where a fault
// is, and then walks its tokens; the decoder's offsets give their places.
func (t *tree) fromJSON() *node {
	var all json.RawMessage
	if err := json.Unmarshal(t.data, &all); err != nil {
		at := len(t.data)
		var fault *json.SyntaxError
		if errors.As(err, &fault) {
			at = int(fault.Offset) - 1 // bytes read, the bad one included
		}
		t.complain("F02", t.position(at), "", err.Error(), "the file is no JSON from here on")
		return nil
	}
	d := json.NewDecoder(bytes.NewReader(t.data))
	d.UseNumber()
	w := &jsonWalk{tree: t, d: d}
	root := w.value(0)
	if root.kind != table {
		t.complain("F02", root.at, "", "a project is an object, this is "+root.kind.String(), "")
		return nil
	}
	return root
}

// jsonWalk is the decoder on its way through the tokens.
type jsonWalk struct {
	*tree
	d *json.Decoder
}

// next returns the next token and where it starts: after the blanks, commas
// and colons that follow the last one. The form was checked before, so the
// only error left is the end of the text, which no caller runs into.
func (w *jsonWalk) next() (json.Token, position) {
	from := int(w.d.InputOffset())
	for from < len(w.data) && bytes.IndexByte([]byte(" \t\r\n,:"), w.data[from]) >= 0 {
		from++
	}
	token, err := w.d.Token()
	if err != nil && !errors.Is(err, io.EOF) {
		panic("config: the form of the JSON text was not checked: " + err.Error())
	}
	return token, w.position(from)
}

// value reads the next value with all that is in it.
func (w *jsonWalk) value(depth int) *node {
	token, at := w.next()
	n := &node{kind: null, at: at}
	switch v := token.(type) {
	case json.Delim:
		w.container(n, v, depth+1)
	case string:
		n.kind, n.text = text, v
	case json.Number:
		n.kind, n.text = number, v.String()
		n.number, _ = strconv.ParseFloat(n.text, 64) // ±Inf beyond the range: refused as such later
		_, err := strconv.ParseInt(n.text, 10, 64)
		n.integer = err == nil
	case bool:
		n.kind, n.truth = truth, v
	}
	return n
}

// container reads up to the closing bracket. What lies too deep is read over, so
// that the decoder stays in step, and not kept.
func (w *jsonWalk) container(n *node, open json.Delim, depth int) {
	tooDeep := depth > maxDepth
	if depth == maxDepth+1 {
		w.deep(depth, n.at)
	}
	n.kind = table
	if open == '[' {
		n.kind = list
	}
	for w.d.More() {
		if n.kind == list {
			if item := w.value(depth); !tooDeep {
				n.items = append(n.items, item)
			}
			continue
		}
		key, at := w.next()
		name, _ := key.(string) // keys of an object are always text
		if v := w.value(depth); !tooDeep {
			w.add(n, entry{name, at, v})
		}
	}
	w.next() // the closing bracket
}
