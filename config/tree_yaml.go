package config

import (
	"bytes"
	"errors"
	"io"
	"math"
	"regexp"
	"strconv"
	"strings"

	"go.yaml.in/yaml/v3"
)

// fromYAML converts the nodes of the first and only document. Anchors, aliases
// and tags of one's own are refused by name: a value that stands elsewhere has
// no place of its own to point at, and aliases of aliases grow without bound.
func (t *tree) fromYAML() *node {
	d := yaml.NewDecoder(bytes.NewReader(t.data))
	var doc, second yaml.Node
	if err := d.Decode(&doc); err != nil {
		if errors.Is(err, io.EOF) { // an empty file is an empty table
			return &node{at: position{1, 1}}
		}
		t.yamlFault(err)
		return nil
	}
	if err := d.Decode(&second); err == nil {
		t.complain("F09", t.letter(second.Line, second.Column), "", "a second document begins here", "a project is one document")
		return nil
	} else if !errors.Is(err, io.EOF) {
		t.yamlFault(err)
		return nil
	}
	if len(doc.Content) == 0 {
		return &node{at: position{1, 1}}
	}
	root := t.yamlValue(doc.Content[0], 0)
	if root.kind != table {
		t.complain("F02", root.at, "", "a project is a mapping, this is "+root.kind.String(), "")
		return nil
	}
	return root
}

// yamlValue converts a node and all that is in it.
func (t *tree) yamlValue(y *yaml.Node, depth int) *node {
	n := &node{kind: text, at: t.letter(y.Line, y.Column), text: y.Value}
	if y.Kind == yaml.AliasNode || y.Anchor != "" {
		t.complain("F09", n.at, "", "anchors and aliases are not read", "write the value out")
		return n
	}
	if t.deep(depth, n.at) {
		return n
	}
	switch y.Kind {
	case yaml.MappingNode:
		n.kind = table
		for i := 0; i+1 < len(y.Content); i += 2 {
			t.yamlEntry(n, y.Content[i], y.Content[i+1], depth+1)
		}
	case yaml.SequenceNode:
		n.kind = list
		for _, item := range y.Content {
			n.items = append(n.items, t.yamlValue(item, depth+1))
		}
	default:
		t.yamlScalar(n, y)
	}
	return n
}

// yamlEntry takes the text of a key as its name, whatever type YAML sees in it:
// no key of a project is a number, so it ends as unknown.
func (t *tree) yamlEntry(n *node, key, value *yaml.Node, depth int) {
	at := t.letter(key.Line, key.Column)
	if key.Kind != yaml.ScalarNode {
		t.complain("F02", at, "", "a key is a name, this is a list, a table or an alias", "")
		return
	}
	t.add(n, entry{key.Value, at, t.yamlValue(value, depth)})
}

// yamlScalar sorts a scalar by the tag that the library gives it.
func (t *tree) yamlScalar(n *node, y *yaml.Node) {
	switch y.ShortTag() {
	case "!!str":
	case "!!null":
		n.kind = null
	case "!!bool":
		n.kind, n.truth = truth, strings.EqualFold(y.Value, "true")
	case "!!timestamp":
		n.kind = date
	case "!!int":
		n.kind, n.integer = number, true
		n.number = tomlNumber(y.Value, true) // the same forms: 0x, 0o, 0b, underscores
	case "!!float":
		n.kind = number
		n.number = yamlFloat(y.Value)
	default:
		t.complain("F09", n.at, "", "the tag "+y.Tag+" is not read", "write the plain value")
	}
}

// yamlFloat reads the words that YAML has for numbers without end, which are
// refused by name later, and leaves the digits to the common reader.
func yamlFloat(s string) float64 {
	switch strings.ToLower(strings.TrimLeft(s, "+-")) {
	case ".inf":
		if strings.HasPrefix(s, "-") {
			return math.Inf(-1)
		}
		return math.Inf(1)
	case ".nan":
		return math.NaN()
	}
	return tomlNumber(s, false)
}

// yamlLine finds the line in the library's messages: it gives no column.
var yamlLine = regexp.MustCompile(`line (\d+): `)

// yamlFault reports the library's fault at the first sign of its line.
func (t *tree) yamlFault(err error) {
	message := strings.TrimPrefix(err.Error(), "yaml: ")
	at := position{1, 1}
	if m := yamlLine.FindStringSubmatchIndex(message); m != nil {
		at.line, _ = strconv.Atoi(message[m[2]:m[3]])
		message = message[m[1]:]
	}
	at.line = min(max(at.line, 1), len(t.starts))
	raw := t.line(at.line)
	at.column += len(raw) - len(strings.TrimLeft(raw, " \t"))
	t.complain("F02", at, "", message, "the file is no YAML here")
}
