package config

import "fmt"

// baseName is the name of the road as planned; no alternative may have it.
const baseName = "base"

// fileAlternative is another road, as what differs from the base. Survey,
// prices and units are known here only to be refused where they differ.
type fileAlternative struct {
	Name           string           `json:"name" jsonschema:"required"`
	Units          string           `json:"units" jsonschema:"enum=metric,enum=international feet,enum=us survey feet,enum=ft" jsonschema_description:"may not differ from the base"`
	Survey         *fileSurvey      `json:"survey" jsonschema_description:"may not differ from the base"`
	Alignment      *fileAlignment   `json:"alignment"`
	Profile        *fileProfile     `json:"profile"`
	TieIn          []fileTieIn      `json:"tie_in"`
	Clearance      []fileClearance  `json:"clearance"`
	TypicalSection []fileTypical    `json:"typical_section"`
	Superelevation []fileCrossfalls `json:"superelevation"`
	Stratum        []fileStratum    `json:"stratum"`
	Material       []fileMaterial   `json:"material"`
	Earthwork      *fileEarthwork   `json:"earthwork"`
	Prices         *filePrices      `json:"prices" jsonschema_description:"may not differ from the base"`
	Culvert        []fileCulvert    `json:"culvert"`
	RightOfWay     *fileRightOfWay  `json:"right_of_way"`
	Exclude        []fileExclude    `json:"exclude"`
	ExtraQuantity  []fileExtra      `json:"extra_quantity"`
}

// merge lays an alternative over the base: a table merges by key, everything
// else, lists included, is replaced whole. Neither input is changed, and every
// value keeps its place in the file.
func merge(base, over *node) *node {
	if base == nil || base.kind != table || over.kind != table {
		return over
	}
	out := &node{at: base.at}
	for _, e := range base.entries {
		if o := over.entry(e.key); o != nil {
			e = entry{e.key, o.at, merge(e.value, o.value)}
		}
		out.entries = append(out.entries, e)
	}
	for _, e := range over.entries {
		if base.entry(e.key) == nil {
			out.entries = append(out.entries, e)
		}
	}
	return out
}

// without returns a table less one key.
func (n *node) without(key string) *node {
	out := &node{kind: n.kind, at: n.at}
	for _, e := range n.entries {
		if e.key != key {
			out.entries = append(out.entries, e)
		}
	}
	return out
}

// alternatives returns the tables of the alternatives in the order of the file.
func (d *Document) alternatives() []*node {
	list := d.root.get("alternative")
	if list == nil {
		return nil
	}
	return list.items
}

// Alternatives returns the names of the alternatives in the order of the file,
// without the base.
func (d *Document) Alternatives() []string {
	var all []string
	for _, n := range d.alternatives() {
		if name := n.get("name").string(); name != "" {
			all = append(all, name)
		}
	}
	return all
}

// nameAlternatives complains of names that are missing, taken, or the base's.
func (d *Document) nameAlternatives(in *inspector) {
	seen := map[string]bool{}
	for i, n := range d.alternatives() {
		key := fmt.Sprintf("alternative[%d]", i)
		name := n.get("name")
		switch {
		case name == nil:
			in.add(in.problem("F05", n.at, key+".name", key+".name is missing", "an alternative is called by its name"))
		case name.string() == "":
			in.add(in.problem("F05", name.at, key+".name", key+".name is empty", "an alternative is called by its name"))
		case name.string() == baseName:
			in.add(in.problem("F08", name.at, key+".name", `the name "base" is taken by the road as planned`, "choose another"))
		case seen[name.string()]:
			in.add(in.problem("F08", name.at, key+".name", fmt.Sprintf("the name %q is taken by another alternative", name.text), "choose another"))
		}
		seen[name.string()] = true
	}
}

// differing complains where an alternative stands on another basis (Q21). It
// does not end the run: what is compared says so itself.
func (r *reading) differing(base *node) {
	for _, key := range []string{"units", "survey", "prices"} {
		if !same(base.get(key), r.root.get(key)) {
			r.complain("Q21", key, fmt.Sprintf("%s of the alternative differ from those of the base", key),
				"alternatives are compared on one ground, in one set of units and at the same prices: leave "+key+" out")
		}
	}
}
