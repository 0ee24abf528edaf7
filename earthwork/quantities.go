package earthwork

import (
	"fmt"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// Cuts are the slices of the road at its pay stations: Before[i] is cut with
// what ends at Stations[i], After[i] with what begins there; they are one where
// nothing changes. There are two stations or more, and as many slices of each.
type Cuts struct {
	Stations      []PayStation
	Before, After []*section.Slice
}

// over returns the stretch from the first to the last station.
func (c Cuts) over() station.Interval {
	return station.Interval{From: c.Stations[0].At, To: c.Stations[len(c.Stations)-1].At}
}

// Site tells what an extra quantity at a station is made of.
type Site interface {
	// MaterialAt returns the material that the typical section at a station
	// names for its cut.
	MaterialAt(s station.Station) section.MaterialID
}

// Quantities is everything that was measured, before prices. Known is false
// where a slice without areas makes the totals unknown: they then hold the sum
// of what is known and are not to be shown.
type Quantities struct {
	Method    Method
	Between   []Between // one between each two pay stations, exceptions included
	Known     bool
	Methods   [2]MethodVolume // by end areas, by the pyramid rule
	Cut       Bank
	Fill      Compacted
	Strip     float64         // m³ of topsoil stripped
	Respread  float64         // m³ of topsoil laid outside the hinges
	Land      [2]float64      // plan area left and right of the reference line, m²
	Materials []MaterialTotal // in the order of the project's list
	Mass      *Mass           // nil when it cannot be known
	// ExtraCut and ExtraFill are hand quantities, not in the totals above; Hand
	// says where they lie.
	ExtraCut  Bank
	ExtraFill Compacted
	Hand      []HandPart
}

// MaterialTotal is the cut of one material in its three states; a state without
// a factor is nil.
type MaterialTotal struct {
	Material  Material
	Cut       Bank
	Compacted *Compacted
	Loose     *Loose
}

// noVolume is half of the last digit in m³ that volumes are written with: less
// is the rounding of sums, not work.
const noVolume = 0.5e-6

// Measure turns cuts into quantities: volumes by every rule, materials, topsoil,
// land, and the mass ordinates. A request without method or state is by end
// areas and in compacted volumes. Findings: Q01 (cut without shrinkage), Q22
// (slivers), Q24 (hand quantities of measured items), F08 (mass in bank volumes
// where that is not defined).
func Measure(req Request, cuts Cuts, materials []Material, site Site) (Quantities, []finding.Finding) {
	if req.Method == "" {
		req.Method = EndArea
	}
	if req.MassState == "" {
		req.MassState = InCompacted
	}
	q := Quantities{Method: req.Method, Known: true}
	for i, m := range Methods() {
		q.Methods[i].Method = m
	}
	closed := closedLengths(req.Exclusions, cuts.over())
	for i := 1; i < len(cuts.Stations); i++ {
		a, b := cuts.After[i-1], cuts.Before[i]
		v := Between{From: a.At, To: b.At, Known: true, Excepted: true}
		if !strictlyInside(closed, (a.At+b.At)/2) {
			v = measureBetween(a, b, req.Method)
		}
		v.First = i - 1
		q.add(v)
	}
	q.addHand(req.Extras, cuts.over(), site)
	book := newBook(materials)
	q.Materials = materialTotals(q.Between, book)
	found := append(q.checkItems(req.Extras), q.slivers()...)
	return q, append(found, q.balance(req.MassState, book, site)...)
}

// balance makes the mass diagram where it can be known.
func (q *Quantities) balance(state MassState, b *book, site Site) []finding.Finding {
	unknown := q.unknownShrinkage(b)
	if !q.Known || len(unknown) > 0 {
		return unknown
	}
	shrinkage := 0.0
	if state == InBank {
		s, found := q.bankShrinkage(b, site)
		if found != nil {
			return found
		}
		shrinkage = s
	}
	q.Mass = q.mass(b, state, shrinkage)
	return nil
}

// add counts an interval.
func (q *Quantities) add(v Between) {
	q.Between = append(q.Between, v)
	q.Known = q.Known && v.Known
	for i, w := range v.Methods {
		m := &q.Methods[i]
		m.Cut += w.Cut
		m.Fill += w.Fill
		m.SliverCut += w.SliverCut
		m.SliverFill += w.SliverFill
	}
	q.Cut += v.Cut
	q.Fill += v.Fill
	q.Strip += v.Strip
	q.Respread += v.Respread
	q.Land[0] += v.Land[0]
	q.Land[1] += v.Land[1]
}

// materialTotals sums the cut by material: in the order of the project's list,
// then what it does not name, in the order met along the road.
func materialTotals(bs []Between, b *book) (out []MaterialTotal) {
	var met []PartVolume
	for _, v := range bs {
		for _, p := range v.Parts {
			met = addPart(met, p.Material, p.Cut)
		}
	}
	for _, p := range b.sort(met) {
		if p.Cut < noVolume {
			continue
		}
		t := MaterialTotal{Material: b.of(p.Material), Cut: p.Cut}
		if c, ok := t.Material.Compact(p.Cut); ok {
			t.Compacted = &c
		}
		if l, ok := t.Material.Loosen(p.Cut); ok {
			t.Loose = &l
		}
		out = append(out, t)
	}
	return out
}

// slivers says how much of the pyramid totals hangs on areas that are nearly
// none, where those totals are paid (Q22).
func (q *Quantities) slivers() []finding.Finding {
	m := q.Methods[1]
	hangs := float64(m.SliverCut) + float64(m.SliverFill)
	if q.Method != Pyramid || hangs < noVolume {
		return nil
	}
	total := float64(m.Cut) + float64(m.Fill)
	return []finding.Finding{{Code: "Q22", Severity: finding.Note,
		At:       finding.Place{Key: "earthwork.pay_method"},
		Measured: finding.Of(hangs, "m3"), Limit: finding.Of(total, "m3"),
		Args: []any{finding.Of(hangs, "m3"), finding.Of(100*hangs/total, "%"), finding.Of(total, "m3")}}}
}

// Withheld lists the result paths that an unknown interval withholds.
// Exceptions have no row in `earthwork.intervals`.
func (q *Quantities) Withheld() (out []string) {
	if q.Known {
		return nil
	}
	each := func(path string, keys ...string) {
		for _, k := range keys {
			out = append(out, path+"."+k)
		}
	}
	row := 0
	for _, b := range q.Between {
		if !b.Known {
			each(fmt.Sprintf("earthwork.intervals[%d]", row), "cut_bank", "fill_compacted", "strip")
		}
		if !b.Excepted {
			row++
		}
	}
	each("earthwork.totals", "cut_bank", "fill_compacted", "strip", "respread")
	for i := range q.Methods {
		each(fmt.Sprintf("earthwork.totals.methods[%d]", i), "cut_bank", "fill_compacted", "strip")
	}
	for i := range q.Materials {
		each(fmt.Sprintf("earthwork.totals.materials[%d]", i), "cut_bank", "cut_compacted", "cut_loose")
	}
	return append(out, "earthwork.mass.ordinates", "earthwork.mass.balance_points",
		"land.left.take", "land.right.take", "cost.total")
}
