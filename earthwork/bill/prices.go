package bill

import "sagcrest/section"

// Rate is a price per unit of quantity: Amount money per Per, where Per is one
// of "m3", "m2", "m", "" (a count), after units were brought to SI.
type Rate struct {
	Amount float64
	Per    string
}

// MaterialRate prices the excavation of one material.
type MaterialRate struct {
	Material section.MaterialID
	Rate     Rate
}

// BarrelRate prices a metre of barrel of one shape and size, inside, in metres.
type BarrelRate struct {
	Shape                string // "circular" | "box"
	Diameter, Span, Rise float64
	Rate                 Rate
}

// ItemRate prices an item that was entered by hand.
type ItemRate struct {
	Item section.ItemID
	Rate Rate
}

// Prices are the rates of a project; a nil or absent rate is unknown, never 0.
type Prices struct {
	Currency                                                     string
	Excavation, Embankment, Strip, Respread, Borrow, Waste, Land *Rate
	ExcavationOf                                                 []MaterialRate
	Culvert                                                      []BarrelRate
	Other                                                        []ItemRate
}
