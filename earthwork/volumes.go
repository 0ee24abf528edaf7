package earthwork

import (
	"slices"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// sliver is the area in m² below which an end area is hardly more than none,
// while the pyramid rule treats it as something: totals say how much hangs on
// such areas.
const sliver = 0.1

// Between is what was measured from one pay station to the next. Known is false
// where an area is missing at either end: every figure is then 0 and means
// nothing. An exception is known and counts in nothing. Cut and Fill are by the
// method that is paid; volumes in m³ in place.
type Between struct {
	From, To station.Station
	First    int // index of the pay station at From
	Known    bool
	Excepted bool

	Cut             Bank
	Fill            Compacted
	Strip, Respread float64
	Land            [2]float64      // plan area left and right, m²
	Methods         [2]MethodVolume // by end areas, by the pyramid rule
	Parts           []PartVolume    // cut by material, by the method that is paid
}

// MethodVolume is a volume by one rule. SliverCut and SliverFill are what of it
// lies in intervals with an end area below a tenth of a square metre that is
// not zero: the pyramid rule would give another figure were that area none.
type MethodVolume struct {
	Method     Method
	Cut        Bank
	Fill       Compacted
	SliverCut  Bank
	SliverFill Compacted
}

// PartVolume is the cut of one material.
type PartVolume struct {
	Material section.MaterialID
	Cut      Bank
}

// measureBetween computes the volumes between two slices.
//
// Strip, re-spread and land are end areas too: strip area, re-spread area and
// the width from the reference line to the strip limit are averaged, whatever
// method pays, and never corrected for the curvature of the alignment.
func measureBetween(a, b *section.Slice, pay Method) Between {
	v := Between{From: a.At, To: b.At, Known: a.OK && b.OK}
	if !v.Known {
		return v
	}
	l := float64(b.At - a.At)
	for i, m := range Methods() {
		v.Methods[i] = m.between(a, b, l)
		if m == pay {
			v.Cut, v.Fill = v.Methods[i].Cut, v.Methods[i].Fill
		}
	}
	v.Parts = partsBetween(a, b, pay.factor(a.Cut.Area, b.Cut.Area)*l)
	v.Strip = EndArea.Volume(a.StripArea, b.StripArea, l)
	v.Respread = EndArea.Volume(a.RespreadArea, b.RespreadArea, l)
	v.Land = [2]float64{
		EndArea.Volume(a.Left.StripWidth, b.Left.StripWidth, l),
		EndArea.Volume(a.Right.StripWidth, b.Right.StripWidth, l),
	}
	return v
}

// between applies one rule to cut and fill apart.
func (m Method) between(a, b *section.Slice, length float64) MethodVolume {
	v := MethodVolume{
		Method: m,
		Cut:    Bank(m.Volume(a.Cut.Area, b.Cut.Area, length)),
		Fill:   Compacted(m.Volume(a.Fill.Area, b.Fill.Area, length)),
	}
	if isSliver(a.Cut.Area) || isSliver(b.Cut.Area) {
		v.SliverCut = v.Cut
	}
	if isSliver(a.Fill.Area) || isSliver(b.Fill.Area) {
		v.SliverFill = v.Fill
	}
	return v
}

func isSliver(a float64) bool { return a >= zeroArea && a < sliver }

// partsBetween sums the areas of each material at both ends, times a factor.
func partsBetween(a, b *section.Slice, factor float64) (out []PartVolume) {
	for _, s := range []*section.Slice{a, b} {
		for _, p := range s.Parts {
			if p.Item == section.Excavation {
				out = addPart(out, p.Material, Bank(p.Cut.Area*factor))
			}
		}
	}
	return out
}

// addPart adds cut to its material, which joins the list where it is new.
func addPart(parts []PartVolume, id section.MaterialID, cut Bank) []PartVolume {
	i := slices.IndexFunc(parts, func(p PartVolume) bool { return p.Material == id })
	if i < 0 {
		return append(parts, PartVolume{id, cut})
	}
	parts[i].Cut += cut
	return parts
}
