package section_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// turned is a table that turns the crown into 5 % to the right between 40 m and
// 60 m of a road, and back.
func turned() []section.Crossfalls {
	own := section.Crossfalls{LeftLane: 0.025, RightLane: -0.025, LeftShoulder: 0.04, RightShoulder: -0.04}
	full := section.Crossfalls{LeftLane: -0.05, RightLane: -0.05, LeftShoulder: -0.05, RightShoulder: -0.05}
	rows := []section.Crossfalls{own, full, full, own}
	for i, at := range []station.Station{20, 40, 60, 80} {
		rows[i].At = at
	}
	return rows
}

// Linear between rows, both end rows included, the section's own outside.
func TestCrossfallsAlongTheRoad(t *testing.T) {
	road := straight(t, 100, flat, level(100, 100), section.Parts{Typicals: []section.Typical{twoLanes()}, Table: turned()})
	for s, want := range map[station.Station]float64{0: 0.025, 20: 0.025, 30: -0.0125, 40: -0.05, 50: -0.05, 70: -0.0125, 80: 0.025, 100: 0.025} {
		c, ok := road.CrossfallsAt(s)
		require.True(t, ok)
		assert.InDelta(t, want, c.LeftLane, 1e-12, "%v", s)
	}
	z, _, _ := road.Finished(50, -3.5)
	assert.InDelta(t, 100.175, z, 1e-12)
	var w section.Scratch
	var s section.Slice
	road.Slice(&w, &s, 50, false)
	assert.InDelta(t, 100.25, s.Left.Hinge.Z, 1e-12)
}

// Law: with any table, a line of the section is the finished surface at its
// offset, and nothing lies lower between neighbouring high points.
func TestLinesFollowTheTable(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		rows := turned()
		fall := func(n string) float64 { return rapid.Float64Range(-0.08, 0.08).Draw(t, n) }
		rows[1].LeftLane, rows[1].RightLane, rows[2].RightLane = fall("a"), fall("b"), fall("c")
		rows[1].LeftShoulder, rows[2].LeftShoulder = fall("d"), fall("e")
		road := straight(t, 100, flat, []profile.PVI{{At: 0, Elev: 101}, {At: 50, Elev: 100, Length: 60}, {At: 100, Elev: 101.2}},
			section.Parts{Typicals: []section.Typical{twoLanes()}, Table: rows})
		offset := map[section.LineID]float64{section.LeftHinge: -5, section.LeftEdge: -3.5, section.Centre: 0, section.RightEdge: 3.5, section.RightHinge: 5}
		last := map[section.LineID]section.Turning{}
		for _, p := range road.Turnings() {
			z, _, ok := road.Finished(p.At, offset[p.Line])
			require.True(t, ok)
			assert.InDelta(t, z, p.Elev, 1e-9)
			if q, ok := last[p.Line]; ok {
				assert.NotEqual(t, q.Low, p.Low)
				for s := q.To; s <= p.At; s += 0.25 {
					z, _, _ := road.Finished(s, offset[p.Line])
					assert.LessOrEqual(t, z, max(p.Elev, q.Elev)+1e-9)
					assert.GreaterOrEqual(t, z, min(p.Elev, q.Elev)-1e-9)
				}
			}
			last[p.Line] = p
		}
	})
}

// Rows out of order, and an end row inside the road that would make the surface
// jump; end rows beyond the road may say anything.
func TestTableMustFit(t *testing.T) {
	lay := func(rows []section.Crossfalls) []string {
		line, _ := alignment.New([]alignment.PI{{N: 0}, {N: 100}})
		grade, _ := profile.New(level(100, 100))
		_, found := section.NewRoad(section.Parts{Line: line, Grade: grade, Ground: flat, Typicals: []section.Typical{twoLanes()}, Table: rows})
		var codes []string
		for _, f := range found {
			codes = append(codes, string(f.Code)+" "+f.At.Key)
		}
		return codes
	}
	assert.Empty(t, lay(turned()))
	rows := turned()
	rows[3].RightShoulder = -0.041
	assert.Equal(t, []string{"F08 superelevation[3].right_shoulder"}, lay(rows))
	rows[3].At = 130
	assert.Empty(t, lay(rows))
	rows = turned()
	rows[2].At = 40
	assert.Equal(t, []string{"A01 superelevation[2].at"}, lay(rows))
}
