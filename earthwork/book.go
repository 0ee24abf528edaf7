package earthwork

import (
	"fmt"
	"slices"

	"sagcrest/profile/finding"
	"sagcrest/section"
)

// book finds the project's materials by name. A name that nobody listed, the
// empty one included, has no factors.
type book struct {
	list []Material
	at   map[section.MaterialID]int
}

func newBook(list []Material) *book {
	b := &book{list: list, at: make(map[section.MaterialID]int, len(list))}
	for i, m := range list {
		if _, twice := b.at[m.ID]; !twice {
			b.at[m.ID] = i
		}
	}
	return b
}

func (b *book) of(id section.MaterialID) Material {
	if i, ok := b.at[id]; ok {
		return b.list[i]
	}
	return Material{ID: id}
}

// sort puts the parts of listed materials into the order of the list; others
// follow as they were met.
func (b *book) sort(parts []PartVolume) []PartVolume {
	place := func(p PartVolume) int {
		if i, ok := b.at[p.Material]; ok {
			return i
		}
		return len(b.list)
	}
	out := slices.Clone(parts)
	slices.SortStableFunc(out, func(x, y PartVolume) int { return place(x) - place(y) })
	return out
}

// ByMaterial returns all cut by material, hand quantities included: the
// materials measured, in their order, then those that are cut by hand only.
func (q *Quantities) ByMaterial() (all []PartVolume) {
	for _, t := range q.Materials {
		all = append(all, PartVolume{t.Material.ID, t.Cut})
	}
	for _, h := range q.Hand {
		if h.Cut > 0 {
			all = addPart(all, h.Material, h.Cut)
		}
	}
	return all
}

// unknownShrinkage finds cut whose shrinkage nobody stated (Q01), measured and
// entered by hand alike: what it makes in an embankment is unknown.
func (q *Quantities) unknownShrinkage(b *book) (out []finding.Finding) {
	for i, p := range q.ByMaterial() {
		m := b.of(p.Material)
		if m.Unsuitable || m.Shrinkage != nil || p.Cut < noVolume {
			continue
		}
		stops := []string{"earthwork.mass.ordinates", "earthwork.mass.balance_points", "cost.total"}
		if i < len(q.Materials) {
			stops = append(stops, fmt.Sprintf("earthwork.totals.materials[%d].cut_compacted", i))
		}
		name, key := string(p.Material), "typical_section"
		if name == "" {
			name = "no named material"
		}
		if k, ok := b.at[p.Material]; ok {
			key = fmt.Sprintf("material[%d]", k)
		}
		out = append(out, finding.Finding{Code: "Q01", Severity: finding.Error,
			At:       finding.Place{Key: key}.Named(string(p.Material)),
			Measured: finding.Of(float64(p.Cut), "m3"),
			Args:     []any{finding.Of(float64(p.Cut), "m3"), name},
			Stops:    stops})
	}
	return out
}
