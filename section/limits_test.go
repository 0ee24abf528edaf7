package section_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// Law: the clearance found is the least of a fine sampling over stations and
// offsets, for soffits that slope and grade lines that curve.
func TestClearanceAgainstSampling(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		road := straight(t, 400, flat, []profile.PVI{{At: 0, Elev: 104}, {At: 200, Elev: 100, Length: rapid.Float64Range(20, 300).Draw(t, "L")}, {At: 400, Elev: 106}},
			section.Parts{Typicals: []section.Typical{twoLanes()}})
		from := station.Station(rapid.Float64Range(50, 300).Draw(t, "from"))
		o := section.Obstacle{Name: "bridge", Under: rapid.Bool().Draw(t, "under"),
			Over:     station.Interval{From: from, To: from + station.Station(rapid.Float64Range(1, 60).Draw(t, "width"))},
			ElevFrom: rapid.Float64Range(106, 109).Draw(t, "a"), ElevTo: rapid.Float64Range(106, 109).Draw(t, "b"), Gap: 5}
		c := road.Clear(o)
		require.True(t, c.Known)
		best := math.Inf(1)
		const n = 400
		for i := 0; i <= n; i++ {
			s := o.Over.From + (o.Over.To-o.Over.From)*station.Station(i)/n
			soffit := o.ElevFrom + (o.ElevTo-o.ElevFrom)*float64(i)/n
			for k := -20; k <= 20; k++ {
				z, _, ok := road.Finished(s, float64(k)/4)
				require.True(t, ok)
				gap := soffit - z
				if !o.Under {
					gap = -gap
				}
				best = math.Min(best, gap)
			}
		}
		assert.LessOrEqual(t, c.Gap, best+1e-9, "never above a sampling")
		assert.GreaterOrEqual(t, c.Gap, best-0.15*0.1, "below it by at most step × steepest relative slope")
		assert.Equal(t, c.Gap >= 5-1e-9, c.OK)
	})
}

// Touching the limit exactly is allowed; off the road it is A03; of equal
// minima the lower station, then the lower offset is named.
func TestClearanceEdges(t *testing.T) {
	road := straight(t, 100, flat, level(100, 100), section.Parts{Typicals: []section.Typical{twoLanes()}})
	o := section.Obstacle{Name: "beam", Under: true, Over: station.Interval{From: 40, To: 52}, ElevFrom: 105, ElevTo: 105, Gap: 5}
	c := road.Clear(o)
	assert.True(t, c.OK)
	assert.InDelta(t, 5, c.Gap, 1e-12)
	assert.Equal(t, station.Station(40), c.At)
	assert.Equal(t, station.Offset(0), c.Offset, "the crown is highest")
	_, fine := c.Finding("clearance[0]", "profile.clearances[0]")
	assert.True(t, fine)

	o.Gap = 5.001
	f, fine := road.Clear(o).Finding("clearance[0]", "profile.clearances[0]")
	assert.False(t, fine)
	assert.Equal(t, finding.Code("P14"), f.Code)

	left := station.Offset(2)
	o.Left = &left
	assert.InDelta(t, 5.05, road.Clear(o).Gap, 1e-12, "2 m to the right the lane is 50 mm lower")

	o.Over.To = 130
	f, fine = road.Clear(o).Finding("clearance[0]", "profile.clearances[0]")
	assert.False(t, fine)
	assert.Equal(t, finding.Code("A03"), f.Code)
}

// Between two surveyed lines the level at an offset is linear in the station;
// outside the offsets of either, and beyond the last line, nothing is known.
func TestSurveyedGround(t *testing.T) {
	line, _ := alignment.New([]alignment.PI{{E: 0, N: 0}, {E: 0, N: 100}})
	g := section.Surveyed([]section.SurveyLine{
		{At: 0, Points: []section.LinePoint{{Offset: -20, Z: 10}, {Offset: 0, Z: 12}, {Offset: 20, Z: 10}}},
		{At: 50, Points: []section.LinePoint{{Offset: -10, Z: 20}, {Offset: 15, Z: 20}}},
	}, line)
	z, ok := g.Level(nil, 25, 0)
	assert.True(t, ok)
	assert.InDelta(t, 16, z, 1e-12)
	z, ok = g.Level(nil, 50, 12)
	assert.True(t, ok)
	assert.InDelta(t, 20, z, 1e-12)
	_, ok = g.Level(nil, 25, 16)
	assert.False(t, ok, "outside the second line")
	_, ok = g.Level(nil, 51, 0)
	assert.False(t, ok, "beyond the last line")

	pts, gaps := g.Across(nil, nil, nil, 25, -30, 30)
	require.Len(t, gaps, 2)
	assert.Equal(t, -10.0, gaps[0].To)
	assert.Equal(t, 15.0, gaps[1].From)
	require.Len(t, pts, 3)
	assert.Equal(t, section.Point{O: 0, Z: 16}, pts[1])
}

// A right of way is linear between its corners and nothing beyond them; the
// ditch counts as well as the catch point; slices inside exceptions count.
func TestRightOfWay(t *testing.T) {
	w := section.RightOfWay{Right: []section.Limit{{At: 0, Offset: 10}, {At: 100, Offset: 12}}}
	o, ok := w.LimitAt(50, 1)
	assert.True(t, ok)
	assert.InDelta(t, 11, o, 1e-12)
	_, ok = w.LimitAt(101, 1)
	assert.False(t, ok)
	_, ok = w.LimitAt(50, -1)
	assert.False(t, ok)

	slice := func(at station.Station, catch float64) section.Slice {
		return section.Slice{At: at, OK: true, Right: section.Flank{Catch: section.Point{O: catch}}, Left: section.Flank{Catch: section.Point{O: -5}}}
	}
	bs, found := w.Outside([]section.Slice{slice(0, 9), slice(20, 10.5), slice(40, 11.3), slice(60, 11)})
	require.Len(t, bs, 1)
	require.Len(t, found, 1)
	assert.Equal(t, station.Station(20), bs[0].From)
	assert.Equal(t, station.Station(40), bs[0].To)
	assert.InDelta(t, 0.5, bs[0].Most, 1e-12)
	assert.Equal(t, station.Station(40), bs[0].MostAt)
}
