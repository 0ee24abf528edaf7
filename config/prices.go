package config

import (
	"fmt"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/earthwork/bill"
	"sagcrest/section"
)

// Rates by item. A rate that is missing is unknown, never zero: what is measured
// without one leaves the total open.
type filePrices struct {
	Currency     string             `json:"currency" jsonschema_description:"a label"`
	Excavation   *fileRate          `json:"excavation" jsonschema_description:"per bank volume"`
	ExcavationOf []fileMaterialRate `json:"excavation_of" jsonschema_description:"of materials with a rate of their own"`
	Embankment   *fileRate          `json:"embankment" jsonschema_description:"per compacted volume"`
	Strip        *fileRate          `json:"strip" jsonschema_description:"per volume stripped"`
	Respread     *fileRate          `json:"respread" jsonschema_description:"per volume of topsoil laid again"`
	Borrow       *fileRate          `json:"borrow"`
	Waste        *fileRate          `json:"waste"`
	Land         *fileRate          `json:"land" jsonschema_description:"per plan area of the take"`
	Culvert      []fileBarrelRate   `json:"culvert" jsonschema_description:"per length of barrel along the slope"`
	Other        []fileItemRate     `json:"other" jsonschema_description:"items of [[extra_quantity]]"`
}

// A price per unit of quantity. Money below zero is no price.
type fileRate struct {
	Rate rate   `json:"rate" jsonschema:"required" range:"[0,]"`
	Per  string `json:"per" jsonschema:"required"`
}

// The price of excavating one material.
type fileMaterialRate struct {
	Material string `json:"material" jsonschema:"required"`
	Rate     rate   `json:"rate" jsonschema:"required" range:"[0,]"`
	Per      string `json:"per" jsonschema:"required"`
}

// The price of a metre of barrel, told apart by shape and inside size.
type fileBarrelRate struct {
	Shape    string `json:"shape" jsonschema:"required,enum=circular,enum=box"`
	Diameter length `json:"diameter" range:"(0,100]"`
	Span     length `json:"span" range:"(0,100]"`
	Rise     length `json:"rise" range:"(0,100]"`
	Rate     rate   `json:"rate" jsonschema:"required" range:"[0,]"`
	Per      string `json:"per" jsonschema:"required"`
}

// The price of an item that was entered by hand.
type fileItemRate struct {
	Item string `json:"item" jsonschema:"required"`
	Rate rate   `json:"rate" jsonschema:"required" range:"[0,]"`
	Per  string `json:"per" jsonschema_description:"absent: per piece"`
}

// prices brings every rate to SI. An item is tied to its kind of unit: soil is
// paid by volume, land by area, barrels by length.
func (r *reading) prices(f *filePrices) bill.Prices {
	if f == nil {
		return bill.Prices{}
	}
	p := bill.Prices{Currency: f.Currency}
	volumes := []struct {
		key string
		f   *fileRate
		to  **bill.Rate
	}{
		{"excavation", f.Excavation, &p.Excavation}, {"embankment", f.Embankment, &p.Embankment}, {"strip", f.Strip, &p.Strip},
		{"borrow", f.Borrow, &p.Borrow}, {"waste", f.Waste, &p.Waste},
	}
	for _, v := range volumes {
		*v.to = r.plainRate(v.f, "prices."+v.key, quantity.Volume)
	}
	p.Land = r.plainRate(f.Land, "prices.land", quantity.Area)
	r.excavationOf(f.ExcavationOf, &p)
	r.barrelRates(f.Culvert, &p)
	r.otherRates(f.Other, &p)
	return p
}

// plainRate returns nil for a rate that nobody gave.
func (r *reading) plainRate(f *fileRate, key string, want quantity.Kind) *bill.Rate {
	if f == nil {
		return nil
	}
	per := r.per(f.Rate, f.Per, key, want)
	return &per
}

// per brings a rate to SI: money per yd³ becomes money per m³. want empty
// allows any length, area or volume, or nothing for a rate per piece.
func (r *reading) per(v rate, token, key string, want quantity.Kind) bill.Rate {
	if token == "" && (want == "" || !r.has(key+".per")) { // a missing one is complained of already
		return bill.Rate{Amount: v.si}
	}
	unit, ok := quantity.Find(token)
	legal := []quantity.Kind{want}
	if want == "" {
		legal = []quantity.Kind{quantity.Length, quantity.Area, quantity.Volume}
	}
	var tokens []string
	for _, k := range legal {
		tokens = append(tokens, quantity.Tokens(k)...)
		if ok && unit.Kind == k {
			return bill.Rate{Amount: v.si / unit.SI, Per: unit.Kind.SI()}
		}
	}
	message := fmt.Sprintf("%s.per is %q, an unknown unit", key, token)
	if ok {
		message = fmt.Sprintf("%s.per is %q, which measures %s", key, token, unit.Kind)
	}
	r.complain("F04", key+".per", message, "write one of "+strings.Join(tokens, ", "))
	return bill.Rate{}
}

// excavationOf takes materials out of the common excavation; each may be named
// once, or it would be paid twice.
func (r *reading) excavationOf(files []fileMaterialRate, p *bill.Prices) {
	seen := map[string]bool{}
	for i, f := range files {
		key := fmt.Sprintf("prices.excavation_of[%d]", i)
		r.unique(seen, f.Material, key+".material")
		r.material(f.Material, key+".material")
		p.ExcavationOf = append(p.ExcavationOf, bill.MaterialRate{
			Material: section.MaterialID(f.Material), Rate: r.per(f.Rate, f.Per, key, quantity.Volume),
		})
	}
}

// barrelRates compares sizes in SI: "600 mm" and "60 cm" are one barrel.
func (r *reading) barrelRates(files []fileBarrelRate, p *bill.Prices) {
	for i, f := range files {
		key := fmt.Sprintf("prices.culvert[%d]", i)
		r.dimensions(f.Shape, key)
		b := bill.BarrelRate{
			Shape: f.Shape, Diameter: f.Diameter.or(0), Span: f.Span.or(0), Rise: f.Rise.or(0),
			Rate: r.per(f.Rate, f.Per, key, quantity.Length),
		}
		for _, old := range p.Culvert {
			if old.Shape == b.Shape && old.Diameter == b.Diameter && old.Span == b.Span && old.Rise == b.Rise {
				r.complain("F08", key, key+" prices a barrel that has a rate already", "keep one")
			}
		}
		p.Culvert = append(p.Culvert, b)
	}
}

// otherRates prices hand quantities. An item that is priced but never entered
// costs nothing and is no fault.
func (r *reading) otherRates(files []fileItemRate, p *bill.Prices) {
	seen := map[string]bool{}
	for i, f := range files {
		key := fmt.Sprintf("prices.other[%d]", i)
		r.unique(seen, f.Item, key+".item")
		p.Other = append(p.Other, bill.ItemRate{Item: section.ItemID(f.Item), Rate: r.per(f.Rate, f.Per, key, "")})
	}
}
