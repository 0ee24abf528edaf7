package bill_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/earthwork/bill"
)

func rate(v float64) *bill.Rate { return &bill.Rate{Amount: v, Per: "m3"} }

// Invented figures: 1,000 m³ of cut of which 200 are rock.
func work() bill.Work {
	return bill.Work{Cut: bill.Some(1000), Fill: bill.Some(600), Strip: bill.Some(90), Respread: bill.Some(30), Balance: bill.Some(-50), Land: bill.Some(4000),
		CutOf:   []bill.MaterialCut{{Material: "till", Cut: 800}, {Material: "rock", Cut: 200}},
		Barrels: []bill.Barrels{{ID: "C", Shape: "circular", Diameter: 0.6, Length: bill.Some(40)}}}
}

func prices() bill.Prices {
	return bill.Prices{Excavation: rate(6), Embankment: rate(4), Strip: rate(3), Respread: rate(2), Borrow: rate(11), Waste: rate(5), Land: rate(2.5),
		ExcavationOf: []bill.MaterialRate{{Material: "rock", Rate: *rate(19)}},
		Culvert:      []bill.BarrelRate{{Shape: "circular", Diameter: 0.6, Rate: *rate(310)}}}
}

func TestPrice(t *testing.T) {
	b := bill.Price(work(), prices())
	require.NotNil(t, b.Total)
	assert.InDelta(t, 800*6+200*19+600*4+90*3+30*2+50*11+0*5+4000*2.5+40*310, *b.Total, 1e-9)
	assert.Equal(t, "excavation", b.Lines[0].Item)
	assert.InDelta(t, 800, b.Lines[0].Quantity.Value, 1e-12, "less the materials with a rate of their own")
}

// Stripping billed as excavation moves its volume there and drops its line.
func TestStripInCut(t *testing.T) {
	w := work()
	w.StripInCut = true
	b := bill.Price(w, prices())
	assert.InDelta(t, 890, b.Lines[0].Quantity.Value, 1e-12)
	for _, l := range b.Lines {
		assert.NotEqual(t, "strip", l.Item)
	}
}

// What is measured without a rate, or withheld, makes the total unknown; it is
// never taken for zero.
func TestUnknownIsNeverZero(t *testing.T) {
	p := prices()
	p.Embankment = nil
	b := bill.Price(work(), p)
	assert.Nil(t, b.Total)

	w := work()
	w.Balance = bill.Quantity{}
	b = bill.Price(w, prices())
	assert.Nil(t, b.Total)

	w = work()
	w.Barrels[0].Diameter = 0.75
	b = bill.Price(w, prices())
	assert.Nil(t, b.Total, "no rate for that size")

	w = work()
	w.Extras = []bill.Extra{{Item: "guard rail", Quantity: 10, Unit: "m"}}
	assert.Nil(t, bill.Price(w, prices()).Total)
	p = prices()
	p.Other = []bill.ItemRate{{Item: "guard rail", Rate: bill.Rate{Amount: 70, Per: "m"}}}
	require.NotNil(t, bill.Price(w, p).Total)
}

// Law: the total is the sum of the amounts, and scales with the rates.
func TestTotalIsTheSum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := work()
		w.Cut = bill.Some(rapid.Float64Range(200, 1e6).Draw(t, "cut"))
		w.Balance = bill.Some(rapid.Float64Range(-1e5, 1e5).Draw(t, "balance"))
		b := bill.Price(w, prices())
		sum := 0.0
		for _, l := range b.Lines {
			require.NotNil(t, l.Amount)
			sum += *l.Amount
		}
		assert.InDelta(t, sum, *b.Total, 1e-6)
	})
}

// Where every cut has a rate of its own, what the sums leave over (a few 1e-13)
// is no common excavation that lacks a rate.
func TestRoundingIsNoWork(t *testing.T) {
	w := bill.Work{Cut: bill.Some(0.1 + 0.2), Fill: bill.Some(0), Strip: bill.Some(0), Respread: bill.Some(0), Balance: bill.Some(0), Land: bill.Some(0),
		CutOf: []bill.MaterialCut{{Material: "till", Cut: 0.1}, {Material: "rock", Cut: 0.2 - 1e-13}}}
	p := bill.Prices{ExcavationOf: []bill.MaterialRate{{Material: "till", Rate: *rate(1)}, {Material: "rock", Rate: *rate(2)}}}
	b := bill.Price(w, p)
	require.NotNil(t, b.Total)
	assert.Len(t, b.Lines, 2)
	assert.InDelta(t, 0.5, *b.Total, 1e-9)
}

// A withheld quantity keeps its rate and loses its amount; surplus and shortage
// are never both billed.
func TestSidesAndWithheld(t *testing.T) {
	w := work()
	w.Cut.Known = false
	b := bill.Price(w, prices())
	for _, l := range b.Lines[:2] {
		assert.NotNil(t, l.Rate, l.Item)
		assert.Nil(t, l.Amount, l.Item)
	}
	assert.Nil(t, b.Total)

	rapid.Check(t, func(t *rapid.T) {
		w := work()
		balance := rapid.Float64Range(-1e5, 1e5).Draw(t, "balance")
		w.Balance = bill.Some(balance)
		found := map[string]float64{}
		for _, l := range bill.Price(w, prices()).Lines {
			found[l.Item] = l.Quantity.Value
		}
		assert.InDelta(t, balance, found["waste"]-found["borrow"], 1e-6)
		assert.Zero(t, min(found["waste"], found["borrow"]))
	})
}
