package bill

import (
	"math"

	"sagcrest/section"
)

// Quantity is a figure that may be withheld.
type Quantity struct {
	Value float64
	Known bool
}

// Some returns a known quantity.
func Some(v float64) Quantity { return Quantity{v, true} }

// MaterialCut is the cut of one material in m³ bank.
type MaterialCut struct {
	Material section.MaterialID
	Cut      float64
}

// Barrels is the laid length of one culvert: length along the slope times the
// number of barrels, in metres.
type Barrels struct {
	ID                   string
	Shape                string // "circular" | "box"
	Diameter, Span, Rise float64
	Length               Quantity
}

// Extra is a hand quantity of an item that is not measured.
type Extra struct {
	Item     section.ItemID
	Quantity float64
	Unit     string // "m3", "m2", "m", "" for a count
}

// Work is what is billed. Cut is all excavation (m³ bank, hand quantities
// included), of which CutOf says what the materials are; StripInCut bills the
// strip as excavation. Balance is the last mass ordinate.
type Work struct {
	Cut, Fill, Strip, Respread, Balance, Land Quantity
	CutOf                                     []MaterialCut
	StripInCut                                bool
	Barrels                                   []Barrels
	Extras                                    []Extra
}

// Line is one item. Rate and Amount are nil where no rate is known or the
// quantity is withheld.
type Line struct {
	Item     string
	Quantity Quantity
	Unit     string
	Rate     *float64
	Amount   *float64
}

// Bill is the priced list. Total is nil when any measured item has no amount.
type Bill struct {
	Lines []Line
	Total *float64
}

// Price makes the bill. An item of which nothing was measured and that has no
// rate is left out.
func Price(w Work, p Prices) Bill {
	b := Bill{Total: new(float64)}
	b.excavation(w, p)
	b.add("embankment", w.Fill, "m3", p.Embankment)
	if !w.StripInCut {
		b.add("strip", w.Strip, "m3", p.Strip)
	}
	b.add("respread", w.Respread, "m3", p.Respread)
	b.add("borrow", side(w.Balance, -1), "m3", p.Borrow)
	b.add("waste", side(w.Balance, 1), "m3", p.Waste)
	b.add("land", w.Land, "m2", p.Land)
	for _, c := range w.Barrels {
		b.add("culvert "+c.ID, c.Length, "m", p.barrel(c))
	}
	for _, x := range w.Extras {
		b.add(string(x.Item), Some(x.Quantity), x.Unit, p.other(x))
	}
	return b
}

// excavation splits the cut into the materials that have a rate of their own
// and the rest.
func (b *Bill) excavation(w Work, p Prices) {
	rest, own := w.Cut, make([]Quantity, len(p.ExcavationOf))
	for i, r := range p.ExcavationOf {
		own[i].Known = w.Cut.Known
		for _, c := range w.CutOf {
			if c.Material == r.Material {
				own[i].Value += c.Cut
			}
		}
		rest.Value -= own[i].Value
	}
	if w.StripInCut {
		rest.Value += w.Strip.Value
		rest.Known = rest.Known && w.Strip.Known
	}
	b.add("excavation", rest, "m3", p.Excavation)
	for i := range own {
		b.add("excavation of "+string(p.ExcavationOf[i].Material), own[i], "m3", &p.ExcavationOf[i].Rate)
	}
}

// side returns what a balance leaves over on one side: +1 surplus, −1 shortage.
func side(balance Quantity, sign float64) Quantity {
	balance.Value = math.Max(sign*balance.Value, 0)
	return balance
}

// nothing is half of the last digit that quantities are written with (1e-6 of
// their unit): less is what is left of a difference of sums, not work to pay.
const nothing = 0.5e-6

func (b *Bill) add(item string, q Quantity, unit string, r *Rate) {
	if math.Abs(q.Value) < nothing {
		q.Value = 0
	}
	if r == nil && q.Known && q.Value == 0 {
		return
	}
	l := Line{Item: item, Quantity: q, Unit: unit}
	if r != nil {
		l.Rate = &r.Amount
	}
	if r != nil && q.Known {
		amount := q.Value * r.Amount
		l.Amount = &amount
	}
	if l.Amount == nil {
		b.Total = nil
	} else if b.Total != nil {
		*b.Total += *l.Amount
	}
	b.Lines = append(b.Lines, l)
}

// sameSize is the difference in metres below which two barrel sizes are one.
const sameSize = 1e-6

// barrel finds the rate of a shape and size.
func (p Prices) barrel(c Barrels) *Rate {
	for i := range p.Culvert {
		r := &p.Culvert[i]
		if r.Shape == c.Shape && math.Abs(r.Diameter-c.Diameter) < sameSize &&
			math.Abs(r.Span-c.Span) < sameSize && math.Abs(r.Rise-c.Rise) < sameSize {
			return &r.Rate
		}
	}
	return nil
}

// other finds the rate of a hand quantity, which must be per the same unit.
func (p Prices) other(x Extra) *Rate {
	for i := range p.Other {
		if r := &p.Other[i]; r.Item == x.Item && r.Rate.Per == x.Unit {
			return &r.Rate
		}
	}
	return nil
}
