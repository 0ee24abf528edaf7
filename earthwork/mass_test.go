package earthwork_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

func till(a float64) map[section.MaterialID]float64 {
	if a == 0 {
		return nil
	}
	return map[section.MaterialID]float64{"till": a}
}

// drawExtra draws a hand quantity somewhere on a road.
func drawExtra(t *rapid.T, c earthwork.Cuts) earthwork.Extra {
	place := func(name string) station.Station {
		if rapid.Bool().Draw(t, name+" at a pay station") {
			return rapid.SampledFrom(c.Stations).Draw(t, name).At
		}
		first, last := c.Stations[0].At, c.Stations[len(c.Stations)-1].At
		return first + station.Station(rapid.Float64Range(0, 1).Draw(t, name))*(last-first)
	}
	x := earthwork.Extra{Item: rapid.SampledFrom([]section.ItemID{section.Excavation, section.Embankment, "guard rail"}).Draw(t, "item"),
		Quantity: rapid.Float64Range(0, 500).Draw(t, "quantity"), Point: rapid.Bool().Draw(t, "point")}
	a, b := place("from"), place("to")
	x.Over = station.Interval{From: min(a, b), To: max(a, b)}
	return x
}

// Law (Q19): the last ordinate is adjusted cut − fill + hand quantities, from
// the totals by material and not from the steps.
func TestMassEndsAtTheBalance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		for range rapid.IntRange(0, 3).Draw(t, "extras") {
			req.Extras = append(req.Extras, drawExtra(t, c))
		}
		q := measure(t, req, c)
		want := -float64(q.Fill)
		for _, m := range q.Materials {
			if m.Compacted != nil {
				want += float64(*m.Compacted)
			}
		}
		hand := 0.0
		for _, x := range req.Extras {
			switch x.Item {
			case section.Excavation:
				want += 0.9 * x.Quantity // till, which the typical section names
				hand += x.Quantity
			case section.Embankment:
				want -= x.Quantity
				hand += x.Quantity
			}
		}
		assert.InDelta(t, want, q.Mass.End(), 1e-5)
		assert.InDelta(t, want, q.Mass.Total.Net(), 1e-5)
		assert.InDelta(t, hand, float64(q.ExtraCut)+float64(q.ExtraFill), rounding)
		assert.Len(t, q.Mass.Steps, len(q.Mass.Stations)-1)
	})
}

// Law: with one shrinkage for all cut, bank ordinates are compacted ones
// divided by (1 − s).
func TestBankState(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var slices []*section.Slice
		for i := range rapid.IntRange(2, 8).Draw(t, "n") {
			slices = append(slices, slice(station.Station(20*i), rapid.Float64Range(0, 50).Draw(t, "fill"), till(rapid.Float64Range(0, 50).Draw(t, "cut"))))
		}
		c := cutsOf(slices...)
		req := earthwork.Request{Extras: []earthwork.Extra{{Item: section.Excavation, Quantity: 7, Point: true, Over: station.At(20)}}}
		compacted := measure(t, req, c)
		req.MassState = earthwork.InBank
		bank := measure(t, req, c)
		assert.Equal(t, earthwork.InBank, bank.Mass.State)
		assert.Equal(t, 0.10, bank.Mass.Shrinkage)
		for i, v := range compacted.Mass.Values {
			assert.InDelta(t, v/0.9, bank.Mass.Values[i], rounding)
		}
		assert.InDelta(t, float64(bank.Cut), bank.Mass.Total.Cut, rounding)
	})
}

// Bank volumes need one shrinkage for all cut that is used (F08).
func TestBankStateIsRefused(t *testing.T) {
	for _, c := range []struct {
		name string
		cut  map[section.MaterialID]float64
		site everywhere
		want []finding.Code
	}{
		{"one", map[section.MaterialID]float64{"till": 1}, "till", nil},
		{"unsuitable beside it", map[section.MaterialID]float64{"till": 1, "peat": 1}, "till", nil},
		{"two", map[section.MaterialID]float64{"till": 1, "rock": 1}, "till", []finding.Code{"F08"}},
		{"none stated is Q01's", map[section.MaterialID]float64{"": 1}, "", []finding.Code{"Q01"}},
		{"no cut, the section's material", nil, "rock", nil},
		{"no cut, no material", nil, "", []finding.Code{"F08"}},
		{"only unsuitable, none else", map[section.MaterialID]float64{"peat": 1}, "peat", []finding.Code{"F08"}},
	} {
		q, found := earthwork.Measure(earthwork.Request{MassState: earthwork.InBank}, cutsOf(slice(0, 1, c.cut), slice(9, 1, c.cut)), soils(), c.site)
		var codes []finding.Code
		for _, f := range found {
			codes = append(codes, f.Code)
		}
		assert.Equal(t, c.want, codes, c.name)
		assert.Equal(t, c.want == nil, q.Mass != nil, c.name)
	}
}

// A single hand quantity raises the ordinate at its own station, at the road's
// start that of the next; one that is spread does so by length.
func TestWhereHandQuantitiesLie(t *testing.T) {
	c := cutsOf(slice(0, 0, nil), slice(20, 0, nil), slice(40, 0, nil), slice(60, 0, nil))
	values := func(x earthwork.Extra) []float64 {
		x.Quantity = 120
		return measure(t, earthwork.Request{Extras: []earthwork.Extra{x}}, c).Mass.Values
	}
	single := func(item section.ItemID, at station.Station) earthwork.Extra {
		return earthwork.Extra{Item: item, Point: true, Over: station.At(at)}
	}
	assert.Equal(t, []float64{0, -120, -120, -120}, values(single(section.Embankment, 20)))
	assert.Equal(t, []float64{0, 0, -120, -120}, values(single(section.Embankment, 20.5)))
	assert.Equal(t, []float64{0, 108, 108, 108}, values(single(section.Excavation, 0)))
	assert.Equal(t, []float64{0, 108, 108, 108}, values(single(section.Excavation, -0.009)))
	assert.Equal(t, []float64{0, 0, 0, -120}, values(single(section.Embankment, 60.009)))
	assert.Equal(t, []float64{0, 0, 0, 0}, values(single("guard rail", 20)), "into the cost only")
	spread := earthwork.Extra{Item: section.Embankment, Over: station.Interval{From: 10, To: 50}}
	assert.InDeltaSlice(t, []float64{0, -30, -90, -120}, values(spread), 1e-12)
}

// Excavation by hand is made of what the typical section names there; without a
// shrinkage it is Q01 like any cut.
func TestHandExcavationNeedsAShrinkage(t *testing.T) {
	c := cutsOf(slice(0, 1, till(2)), slice(10, 1, till(2)))
	req := earthwork.Request{Extras: []earthwork.Extra{{Item: section.Excavation, Quantity: 5, Unit: "m3", Point: true, Over: station.At(3)}}}
	q, found := earthwork.Measure(req, c, soils(), everywhere("clay"))
	require.Len(t, found, 2)
	assert.Equal(t, finding.Code("Q24"), found[0].Code)
	assert.Equal(t, finding.Code("Q01"), found[1].Code)
	assert.Equal(t, 5.0, found[1].Measured.Value)
	assert.Equal(t, []string{"earthwork.mass.ordinates", "earthwork.mass.balance_points", "cost.total"}, found[1].Stops)
	assert.Nil(t, q.Mass)
	assert.Len(t, q.Materials, 1, "areas and totals know nothing of it")
	assert.Equal(t, []earthwork.PartVolume{{Material: "till", Cut: 20}, {Material: "clay", Cut: 5}}, q.ByMaterial())
}

// Q24 for items that are measured too, none for others; A03 off the road.
func TestHandQuantitiesAreChecked(t *testing.T) {
	c := cutsOf(slice(0, 1, till(2)), slice(10, 1, till(2)))
	extra := func(item section.ItemID) earthwork.Extra {
		return earthwork.Extra{Item: item, Quantity: 3, Unit: "m3", Point: true, Over: station.At(5)}
	}
	_, found := earthwork.Measure(earthwork.Request{Extras: []earthwork.Extra{extra("guard rail"), extra(section.Embankment), extra(section.Strip)}}, c, soils(), everywhere("till"))
	require.Len(t, found, 2)
	assert.Equal(t, "extra_quantity[1].item", found[0].At.Key)
	assert.Equal(t, finding.Of(3, "m3"), found[0].Measured)
	assert.Equal(t, finding.Of(10, "m3"), found[0].Limit)

	over := station.Interval{From: 0, To: 10}
	x := extra(section.Embankment)
	assert.Empty(t, earthwork.CheckExtras([]earthwork.Extra{x}, over))
	x.Over = station.At(10.02)
	off := earthwork.CheckExtras([]earthwork.Extra{x, {Item: "guard rail", Over: station.Interval{From: -1, To: 5}}, {Over: station.Interval{From: 4, To: 11}}}, over)
	require.Len(t, off, 3)
	for i, key := range []string{"extra_quantity[0].at", "extra_quantity[1].from", "extra_quantity[2].to"} {
		assert.Equal(t, finding.Code("A03"), off[i].Code)
		assert.Equal(t, key, off[i].At.Key)
	}
	assert.Contains(t, off[0].Stops, "earthwork.mass.ordinates")
	assert.NotContains(t, off[1].Stops, "earthwork.mass.ordinates", "a guard rail moves no earth")
}

// Balance points: road ends, touches, crossings, both corners of a level.
func TestBalancePoints(t *testing.T) {
	for _, c := range []struct {
		values []float64
		want   []station.Station
	}{
		{[]float64{0, 30, -10, 5}, []station.Station{0, 17.5, 20 + 20.0/3}},
		{[]float64{0, 30, 0, 5}, []station.Station{0, 20}},
		{[]float64{0, 30, 0, -5}, []station.Station{0, 20}},
		{[]float64{0, 30, 0, 0, 4}, []station.Station{0, 20, 30}},
		{[]float64{0, 30, 10, 0}, []station.Station{0, 30}},
		{[]float64{0, 3e6, 1e-7, -5}, []station.Station{0, 20}}, // the middle is rounding
		{[]float64{0, -1}, []station.Station{0}},
	} {
		m := earthwork.Mass{Values: c.values}
		for i := range c.values {
			m.Stations = append(m.Stations, station.Station(10*i))
		}
		got := m.BalancePoints()
		require.Len(t, got, len(c.want), "%v", c.values)
		for i := range got {
			assert.InDelta(t, float64(c.want[i]), float64(got[i]), 1e-9, "%v", c.values)
		}
	}
}

// Law: the straight-line curve is zero at every balance point, and between two
// neighbours it has one sign.
func TestBetweenBalancePointsOneSign(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		m := measure(t, req, c).Mass
		largest := 1.0
		for _, v := range m.Values {
			largest = max(largest, math.Abs(v))
		}
		curve := func(s station.Station) float64 {
			for i := 1; i < len(m.Stations); i++ {
				if s <= m.Stations[i] {
					x := float64((s - m.Stations[i-1]) / (m.Stations[i] - m.Stations[i-1]))
					return m.Values[i-1] + x*(m.Values[i]-m.Values[i-1])
				}
			}
			return m.End()
		}
		points := m.BalancePoints()
		assert.Equal(t, m.Stations[0], points[0])
		for i, s := range points {
			// A station of 1,000 m carries 1e-13 m, and intervals may be a
			// centimetre long: the curve is steep there.
			assert.InDelta(t, 0, curve(s), 1e-9*largest)
			if i+1 == len(points) {
				break
			}
			signs := map[bool]bool{}
			for k := 1; k < 20; k++ {
				if v := curve(s + (points[i+1]-s)*station.Station(k)/20); math.Abs(v) > 1e-9*largest {
					signs[v > 0] = true
				}
			}
			assert.LessOrEqual(t, len(signs), 1, "between %v and %v", s, points[i+1])
		}
	})
}
