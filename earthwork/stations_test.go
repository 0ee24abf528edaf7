package earthwork_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

func at(p []earthwork.PayStation) (out []float64) {
	for _, s := range p {
		out = append(out, math.Round(float64(s.At)*1e6)/1e6)
	}
	return out
}

func why(p []earthwork.PayStation, s station.Station) earthwork.Reason {
	for _, q := range p {
		if math.Abs(float64(q.At-s)) < 1e-9 {
			return q.Why
		}
	}
	return ""
}

// Whole intervals of the printed label, wherever labels start and whatever
// their unit: a road from 0+013 is cut at 0+020; in feet the interval is feet.
func TestStepsFollowTheLabel(t *testing.T) {
	over := station.Interval{From: 0, To: 50}
	metric := earthwork.Request{PayStep: 20, Labels: station.Labels{Start: 13}}
	assert.Equal(t, []float64{0, 7, 27, 47, 50}, at(earthwork.PayStations(metric, earthwork.KeyPlaces{Over: over})))

	// 0+13 to 1+77 in feet: 0+50, 1+00, 1+50 lie 37, 87 and 137 ft on.
	feet := earthwork.Request{PayStep: 50, Labels: station.Labels{Start: 13, Foot: 0.3048}}
	assert.Equal(t, []float64{0, 11.2776, 26.5176, 41.7576, 50}, at(earthwork.PayStations(feet, earthwork.KeyPlaces{Over: over})))

	none := earthwork.Request{}
	assert.Equal(t, []float64{0, 50}, at(earthwork.PayStations(none, earthwork.KeyPlaces{Over: over})))
}

// Of two closer than a centimetre the one named first stays; exactly a
// centimetre apart both do.
func TestTheOneNamedFirstStays(t *testing.T) {
	req := earthwork.Request{PayStep: 20, KeyPoints: true,
		Exclusions: []earthwork.Exclusion{{Over: station.Interval{From: 39.995, To: 60}}}}
	key := earthwork.KeyPlaces{
		Over: station.Interval{From: 0, To: 100}, Sections: []station.Station{0.004, 80.003}, Strata: []station.Station{80},
		Curves: []station.Station{99.992, 10, 20.01}, Elements: []station.Station{10.009}, Turnings: []station.Station{10.02, 140},
		Culverts: []station.Station{55},
	}
	p := earthwork.PayStations(req, key)
	assert.Equal(t, []float64{0, 10, 10.02, 20, 20.01, 39.995, 55, 60, 80.003, 100}, at(p))
	assert.Equal(t, earthwork.RoadStart, why(p, 0))
	assert.Equal(t, earthwork.ByCurve, why(p, 10))
	assert.Equal(t, earthwork.ByTurning, why(p, 10.02))
	assert.Equal(t, earthwork.ByStep, why(p, 20))
	assert.Equal(t, earthwork.ByExcept, why(p, 60))
	assert.Equal(t, earthwork.BySection, why(p, 80.003))
	assert.Equal(t, earthwork.RoadEnd, why(p, 100))
	for _, s := range p {
		assert.Equal(t, float64(s.At) != 55, s.Paid, "only what lies inside the exception is not paid: %v", s.At)
		assert.Equal(t, math.Abs(float64(s.At)-80) < 0.01, s.Changes, "%v", s.At)
	}
	req.KeyPoints = false
	assert.Equal(t, []float64{0, 20, 39.995, 60, 80.003, 100}, at(earthwork.PayStations(req, key)))
}

// A change a few millimetres from the end of an exception happens at the one
// station that stays.
func TestChangeBesideAnException(t *testing.T) {
	req := earthwork.Request{Exclusions: []earthwork.Exclusion{{Over: station.Interval{From: 0, To: 40}}}}
	p := earthwork.PayStations(req, earthwork.KeyPlaces{Over: station.Interval{From: 0, To: 100}, Sections: []station.Station{40.006}})
	assert.Equal(t, []float64{0, 40, 100}, at(p))
	assert.True(t, p[1].Changes)
}

// Both ends of every exception are pay stations, where two touch as well.
func TestTouchingExceptions(t *testing.T) {
	req := earthwork.Request{Exclusions: []earthwork.Exclusion{
		{Over: station.Interval{From: 30, To: 50}}, {Over: station.Interval{From: 10, To: 30}}, {Over: station.Interval{From: 95, To: 130}}}}
	p := earthwork.PayStations(req, earthwork.KeyPlaces{Over: station.Interval{From: 0, To: 100}})
	assert.Equal(t, []float64{0, 10, 30, 50, 95, 100}, at(p))
	var paid []bool
	for _, s := range p {
		paid = append(paid, s.Paid)
	}
	assert.Equal(t, []bool{true, true, false, true, true, true}, paid)
}

// Laws: increasing, a centimetre apart, on the road, both ends among them, and
// every place asked for within a centimetre of one.
func TestPayStationLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		from := station.Station(rapid.Float64Range(0, 100).Draw(t, "from"))
		over := station.Interval{From: from, To: from + station.Station(rapid.Float64Range(1, 300).Draw(t, "length"))}
		place := rapid.Custom(func(t *rapid.T) station.Station {
			return station.Station(rapid.Float64Range(-50, 450).Draw(t, "s"))
		})
		req := earthwork.Request{KeyPoints: true, PayStep: rapid.Float64Range(0.5, 100).Draw(t, "step"),
			Labels: station.Labels{Start: rapid.Float64Range(0, 5000).Draw(t, "start")}}
		key := earthwork.KeyPlaces{Over: over,
			Sections: rapid.SliceOfN(place, 0, 4).Draw(t, "sections"), Curves: rapid.SliceOfN(place, 0, 6).Draw(t, "curves")}
		p := earthwork.PayStations(req, key)
		assert.Equal(t, over.From, p[0].At)
		assert.Equal(t, over.To, p[len(p)-1].At)
		for i := 1; i < len(p); i++ {
			assert.GreaterOrEqual(t, float64(p[i].At-p[i-1].At), station.Same-2e-9)
			assert.LessOrEqual(t, float64(p[i].At-p[i-1].At), req.PayStep+2*station.Same)
		}
		for _, s := range append(key.Sections, key.Curves...) {
			if s < over.From || s > over.To {
				continue
			}
			nearest := math.Inf(1)
			for _, q := range p {
				nearest = min(nearest, math.Abs(float64(q.At-s)))
			}
			assert.Less(t, nearest, station.Same)
		}
	})
}

// Exceptions that overlap or lie off the road are told of once each (A11).
func TestExclusionsAreChecked(t *testing.T) {
	over := station.Interval{From: 0, To: 100}
	e := func(from, to station.Station) earthwork.Exclusion {
		return earthwork.Exclusion{Over: station.Interval{From: from, To: to}, Reason: "bridge"}
	}
	assert.Empty(t, earthwork.CheckExclusions([]earthwork.Exclusion{e(0, 30), e(30, 60), e(90, 100.01)}, over))
	found := earthwork.CheckExclusions([]earthwork.Exclusion{e(0, 30), e(29.9, 60), e(90, 100.02)}, over)
	if assert.Len(t, found, 2) {
		assert.Equal(t, finding.Code("A11"), found[0].Code)
		assert.InDelta(t, 0.1, found[0].Measured.Value, 1e-9)
		assert.InDelta(t, 0.02, found[1].Measured.Value, 1e-9)
		assert.Equal(t, "exclude[2]", found[1].At.Key)
	}
}
