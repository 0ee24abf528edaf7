package earthwork

import (
	"fmt"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// HandPart is what a hand quantity puts between two pay stations: Cut of a
// Material, or Fill. Extra counts the project's hand quantities, Between the
// intervals, both from 0.
type HandPart struct {
	Extra, Between int
	Material       section.MaterialID
	Cut            Bank
	Fill           Compacted
}

// addHand places the hand quantities of excavation and embankment. They count
// wherever they lie, in an exception too: their author knows that they are done.
func (q *Quantities) addHand(extras []Extra, road station.Interval, site Site) {
	for i, x := range extras {
		if x.Item != section.Excavation && x.Item != section.Embankment {
			continue
		}
		for k, v := range q.Between {
			share, at := x.share(station.Interval{From: v.From, To: v.To}, road)
			if share == 0 {
				continue
			}
			h := HandPart{Extra: i, Between: k}
			if x.Item == section.Excavation {
				h.Material, h.Cut = site.MaterialAt(at), Bank(x.Quantity*share)
			} else {
				h.Fill = Compacted(x.Quantity * share)
			}
			q.ExtraCut += h.Cut
			q.ExtraFill += h.Fill
			q.Hand = append(q.Hand, h)
		}
	}
}

// share returns which part of a quantity lies in an interval, and a station of
// the place. A single one lies in the interval that ends at or after it, so
// that the ordinate at its station holds it; at the road's start it lies in the
// first. One that is spread evenly is cut by length. What lies off the road is
// no part of any interval.
func (x Extra) share(v, road station.Interval) (part float64, at station.Station) {
	if x.Point || x.Over.Empty() {
		if x.Over.From < road.From-station.Same || x.Over.From > road.To+station.Same {
			return 0, 0
		}
		at = min(max(x.Over.From, road.From), road.To)
		if v.From < at && at <= v.To || at == road.From && at == v.From {
			return 1, at
		}
		return 0, at
	}
	on := x.Over.Intersect(road)
	here := on.Intersect(v)
	if here.Empty() {
		return 0, 0
	}
	return here.Length() / on.Length(), (here.From + here.To) / 2
}

// CheckExtras finds hand quantities that lie off the road (A03). Earth that
// cannot be placed withholds the mass ordinates; the bill waits for every item.
func CheckExtras(in []Extra, over station.Interval) (out []finding.Finding) {
	for i, x := range in {
		from, to := x.Over.From, max(x.Over.From, x.Over.To)
		before, after := from < over.From-station.Same, to > over.To+station.Same
		if !before && !after {
			continue
		}
		key := "to"
		switch {
		case x.Point:
			key = "at"
		case before:
			key = "from"
		}
		stops := []string{"cost.total"}
		if x.Item == section.Excavation || x.Item == section.Embankment {
			stops = append(stops, "earthwork.mass.ordinates", "earthwork.mass.balance_points")
		}
		out = append(out, finding.Finding{Code: "A03", Severity: finding.Error,
			At:    finding.Between(from, to).Under(fmt.Sprintf("extra_quantity[%d].%s", i, key)).Named(string(x.Item)),
			Args:  []any{"hand quantity of " + string(x.Item), over.From, over.To},
			Stops: stops})
	}
	return out
}

// checkItems warns of hand quantities of items that the program measures too
// (Q24).
func (q *Quantities) checkItems(extras []Extra) (out []finding.Finding) {
	for i, x := range extras {
		measured, ok := q.measured(x.Item)
		if !ok {
			continue
		}
		out = append(out, finding.Finding{Code: "Q24", Severity: finding.Warning,
			At:       finding.Between(x.Over.From, max(x.Over.From, x.Over.To)).Under(fmt.Sprintf("extra_quantity[%d].item", i)).Named(string(x.Item)),
			Measured: finding.Of(x.Quantity, x.Unit), Limit: measured,
			Args: []any{finding.Of(x.Quantity, x.Unit), string(x.Item), measured}})
	}
	return out
}

// measured returns the program's own figure of an item; it is unknown where
// totals are. ok is false for items that are not measured.
func (q *Quantities) measured(item section.ItemID) (m finding.Measure, ok bool) {
	switch item {
	case section.Excavation:
		m = finding.Of(float64(q.Cut), "m3")
	case section.Embankment:
		m = finding.Of(float64(q.Fill), "m3")
	case section.Strip:
		m = finding.Of(q.Strip, "m3")
	case "respread": // this and land as package bill names them
		m = finding.Of(q.Respread, "m3")
	case "land":
		m = finding.Of(q.Land[0]+q.Land[1], "m2")
	default:
		return m, false
	}
	m.Known = q.Known
	return m, true
}
