package section_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile"
	"sagcrest/profile/station"
	"sagcrest/section"
)

var flat = shaped{corners: []section.Point{{O: -1, Z: 90}, {O: 1, Z: 90}}}

// A sag of 200 m from −2 % to +1.5 % is lowest 2/3.5 of its length beyond its
// start (x = −g1·L/A): 400 + 114.2857 m, at 100 + 2 − 0.02·114.2857/2.
func TestLowPointOfASag(t *testing.T) {
	road := straight(t, 1000, flat, []profile.PVI{{At: 0, Elev: 110}, {At: 500, Elev: 100, Length: 200}, {At: 1000, Elev: 107.5}},
		section.Parts{Typicals: []section.Typical{twoLanes()}})
	turns := road.Turnings()
	require.Len(t, turns, len(section.LineIDs()), "one low point on each line")
	for _, p := range turns {
		assert.True(t, p.Low)
		assert.Equal(t, section.OnCurve, p.Kind)
		assert.InDelta(t, 514.2857142857142, float64(p.At), 1e-9)
	}
	assert.InDelta(t, 100.85714285714286, turns[0].Elev, 1e-9)
	// 3.5 m · 2.5 % and 1.5 m · 4 % lower at the hinge.
	assert.InDelta(t, 100.85714285714286-0.1475, turns[4].Elev, 1e-9)
}

// A break turns at an angle; a level stretch is one point with from and to; a
// ledge on the way down is none; road ends are none.
func TestAnglesAndLevelStretches(t *testing.T) {
	road := straight(t, 400, flat, []profile.PVI{{At: 0, Elev: 100}, {At: 100, Elev: 99}, {At: 200, Elev: 101}, {At: 250, Elev: 101}, {At: 300, Elev: 100}, {At: 350, Elev: 100}, {At: 400, Elev: 99}},
		section.Parts{Typicals: []section.Typical{twoLanes()}})
	var centre []section.Turning
	for _, p := range road.Turnings() {
		if p.Line == section.Centre {
			centre = append(centre, p)
		}
	}
	require.Len(t, centre, 2)
	assert.Equal(t, section.Turning{Line: section.Centre, Low: true, Kind: section.AtAngle, At: 100, To: 100, Elev: 99}, centre[0])
	assert.Equal(t, section.Turning{Line: section.Centre, Kind: section.Level, At: 200, To: 250, Elev: 101}, centre[1])
	ends := road.Ends()
	require.Len(t, ends, 2*len(section.LineIDs()))
	assert.InDelta(t, -0.01, ends[0].Grade, 1e-12)
	assert.InDelta(t, -0.02, ends[1].Grade, 1e-12)
}

// Law: a low point has grade − before and + after, and nothing on its line lies
// lower between the neighbouring high points.
func TestNothingLowerBetweenHighPoints(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pvi := []profile.PVI{{At: 0, Elev: 100}}
		for s := station.Station(100); s <= 900; s += 100 {
			pvi = append(pvi, profile.PVI{At: s, Elev: 100 + rapid.Float64Range(-4, 4).Draw(t, "z"), Length: rapid.Float64Range(0, 99).Draw(t, "l")})
		}
		pvi = append(pvi, profile.PVI{At: 1000, Elev: 100})
		road := straight(t, 1000, flat, pvi, section.Parts{Typicals: []section.Typical{twoLanes()}})
		var centre []section.Turning
		for _, p := range road.Turnings() {
			if p.Line == section.Centre {
				centre = append(centre, p)
			}
		}
		for i, p := range centre {
			before, after := road.Elev(p.At-0.01), road.Elev(p.To+0.01)
			if p.Low {
				assert.Greater(t, before, p.Elev-1e-9)
				assert.Greater(t, after, p.Elev-1e-9)
			}
			from, to := station.Station(0), station.Station(1000)
			if i > 0 {
				from = centre[i-1].At
				assert.NotEqual(t, centre[i-1].Low, p.Low, "low and high points alternate")
			}
			if i+1 < len(centre) {
				to = centre[i+1].At
			}
			for s := from; s <= to; s += 0.5 {
				if p.Low {
					assert.GreaterOrEqual(t, road.Elev(s), p.Elev-1e-9)
				} else {
					assert.LessOrEqual(t, road.Elev(s), p.Elev+1e-9)
				}
			}
		}
	})
}
