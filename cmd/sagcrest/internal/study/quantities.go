package study

import (
	"sagcrest/config"
	"sagcrest/earthwork"
	"sagcrest/earthwork/bill"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// site tells which material a typical section names.
type site struct{ road *section.Road }

func (s site) MaterialAt(at station.Station) section.MaterialID {
	if k := s.road.TypicalAt(at, false); k >= 0 {
		return s.road.Typicals()[k].Material
	}
	return ""
}

// quantities measures what was cut.
func (o *Outcome) quantities() (found []finding.Finding) {
	o.Quantities, found = earthwork.Measure(o.Project.Request, o.cuts(), o.Project.Materials, site{o.Road})
	return found
}

// price makes the bill of a project that has prices.
func (o *Outcome) price() {
	if !o.Project.HasPrices {
		return
	}
	q := &o.Quantities
	known := func(v float64) bill.Quantity { return bill.Quantity{Value: v, Known: q.Known} }
	w := bill.Work{
		Cut: known(float64(q.Cut + q.ExtraCut)), Fill: known(float64(q.Fill + q.ExtraFill)), Strip: known(q.Strip), Respread: known(q.Respread),
		Land: known(q.Land[0] + q.Land[1]), StripInCut: o.Project.StripBasis == config.StripInCut,
	}
	if q.Mass != nil {
		w.Balance = bill.Some(q.Mass.End())
	}
	for _, m := range q.Materials {
		w.CutOf = append(w.CutOf, bill.MaterialCut{Material: m.Material.ID, Cut: float64(m.Cut)})
	}
	for _, l := range o.Culverts {
		n := float64(max(l.Culvert.Barrels, 1))
		w.Barrels = append(w.Barrels, bill.Barrels{ID: l.Culvert.ID, Shape: string(l.Culvert.Shape),
			Diameter: l.Culvert.Diameter, Span: l.Culvert.Span, Rise: l.Culvert.Rise,
			Length: bill.Quantity{Value: n * l.Length, Known: l.Ended}})
	}
	for _, x := range o.Project.Request.Extras {
		if x.Item != section.Excavation && x.Item != section.Embankment {
			w.Extras = append(w.Extras, bill.Extra{Item: x.Item, Quantity: x.Quantity, Unit: x.Unit})
		}
	}
	b := bill.Price(w, o.Project.Prices)
	o.Bill = &b
}
