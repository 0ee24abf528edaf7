package config

import (
	"testing"

	"pgregory.net/rapid"
)

// drawTable makes a small tree of tables, lists and numbers.
func drawTable(t *rapid.T, depth int) *node {
	n := &node{}
	for _, key := range []string{"a", "b", "c"} {
		switch rapid.IntRange(0, 3).Draw(t, key) {
		case 1:
			n.entries = append(n.entries, entry{key: key, value: &node{kind: number, number: float64(rapid.IntRange(0, 9).Draw(t, "n"))}})
		case 2:
			n.entries = append(n.entries, entry{key: key, value: &node{kind: list, items: []*node{{kind: truth}}}})
		case 3:
			if depth > 0 {
				n.entries = append(n.entries, entry{key: key, value: drawTable(t, depth-1)})
			}
		}
	}
	return n
}

// Laws of laying one table over another: nothing over it changes nothing, it
// over itself changes nothing, the last layer wins, and layers may be put
// together in any grouping.
func TestMergeLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b, c := drawTable(t, 2), drawTable(t, 2), drawTable(t, 2)
		if !same(merge(a, &node{}), a) || !same(merge(&node{}, a), a) || !same(merge(a, a), a) {
			t.Fatal("nothing, or itself, changes a table")
		}
		if !same(merge(merge(a, b), b), merge(a, b)) {
			t.Fatal("the same layer twice is not the layer once")
		}
		for _, e := range b.entries {
			if e.value.kind != table && merge(a, b).get(e.key) != e.value {
				t.Fatalf("%s is not taken from the upper layer", e.key)
			}
		}
		if !nested(a, b, c) && !same(merge(merge(a, b), c), merge(a, merge(b, c))) {
			t.Fatal("layers depend on their grouping")
		}
	})
}

// nested reports whether a key is a table in one layer and not in another: a
// value in the middle then hides what lies below it in one grouping only.
func nested(layers ...*node) bool {
	for _, key := range []string{"a", "b", "c"} {
		kinds := map[bool][]*node{}
		for _, l := range layers {
			if v := l.get(key); v != nil {
				kinds[v.kind == table] = append(kinds[v.kind == table], v)
			}
		}
		if len(kinds[true]) > 0 && len(kinds[false]) > 0 || len(kinds[true]) > 1 && nested(kinds[true]...) {
			return true
		}
	}
	return false
}

// Every place of the tree can be found again by its path.
func TestLocateFindsEveryPath(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		root := drawTable(t, 3)
		var walk func(n *node, path string, depth int)
		walk = func(n *node, path string, depth int) {
			for _, e := range n.entries {
				here := join(path, e.key)
				found, reached := root.locate(here)
				if found != e.value || reached != depth+1 {
					t.Fatalf("%s is not found", here)
				}
				if _, reached := root.locate(here + ".nothing"); reached != depth+1 {
					t.Fatalf("below %s something is found", here)
				}
				walk(e.value, here, depth+1)
			}
		}
		walk(root, "", 0)
	})
}
