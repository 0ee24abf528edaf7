package section_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// shaped is ground whose level is a polyline of the offset, the same at every
// station, lifted by a rise along the road. It stands in for a survey where a
// law must hold for any ground.
type shaped struct {
	corners []section.Point
	rise    float64
}

func (g shaped) Across(_ *section.Scratch, dst []section.Point, gaps []terrain.Gap, at station.Station, from, to float64) ([]section.Point, []terrain.Gap) {
	add := func(o float64) { z, _ := g.Level(nil, at, o); dst = append(dst, section.Point{O: o, Z: z}) }
	add(from)
	for _, c := range g.corners {
		if from < c.O && c.O < to {
			add(c.O)
		}
	}
	add(to)
	return dst, gaps
}

func (g shaped) Level(_ *section.Scratch, at station.Station, o float64) (float64, bool) {
	lift, last := g.rise*float64(at), len(g.corners)-1
	if o <= g.corners[0].O {
		return g.corners[0].Z + lift, true
	}
	for i := 1; i <= last; i++ {
		if a, b := g.corners[i-1], g.corners[i]; o <= b.O {
			return a.Z + (b.Z-a.Z)*(o-a.O)/(b.O-a.O) + lift, true
		}
	}
	return g.corners[last].Z + lift, true
}

func (g shaped) Corners(_ *section.Scratch, dst []float64, _ section.Ray, x0, x1 float64) []float64 {
	return append(dst, x0, x1)
}

func (g shaped) Reach() float64 { return 500 }

// twoLanes is a section with a crown, shoulders and a flat-bottomed ditch.
func twoLanes() section.Typical {
	return section.Typical{
		Name: "two lanes", Over: station.Everywhere(),
		Left:  section.Side{Lane: section.Band{Width: 3.5, Crossfall: 0.025}, Shoulder: section.Band{Width: 1.5, Crossfall: 0.04}},
		Right: section.Side{Lane: section.Band{Width: 3.5, Crossfall: -0.025}, Shoulder: section.Band{Width: 1.5, Crossfall: -0.04}},
		Ditch: &section.Ditch{Depth: 0.6, ForeSlope: 3, Bottom: 0.5}, CutSlope: 1.5, FillSlope: 2,
		Pavement: 0.4, Bound: 0.4, Dressing: 0.15, Material: "till",
	}
}

// straight lays a road of the given length due north.
func straight(t require.TestingT, length float64, ground section.Ground, pvi []profile.PVI, parts section.Parts) *section.Road {
	line, found := alignment.New([]alignment.PI{{E: 1000, N: 0}, {E: 1000, N: length}})
	require.Empty(t, found)
	grade, found := profile.New(pvi)
	require.Empty(t, found)
	parts.Line, parts.Grade, parts.Ground = line, grade, ground
	road, found := section.NewRoad(parts)
	require.Empty(t, found)
	return road
}

func level(length, z float64) []profile.PVI {
	return []profile.PVI{{At: 0, Elev: z}, {At: station.Station(length), Elev: z}}
}

// drawGround draws a random broken ground line.
func drawGround(t *rapid.T) shaped {
	g := shaped{}
	o := -60.0
	for range rapid.IntRange(4, 12).Draw(t, "corners") {
		g.corners = append(g.corners, section.Point{O: o, Z: 100 + rapid.Float64Range(-4, 4).Draw(t, "z")})
		o += rapid.Float64Range(2, 20).Draw(t, "step")
	}
	return g
}

// Law: turning ground and design upside down swaps cut and fill, for a platform
// without ditch, strip and dressing and with equal slopes.
func TestSwappingGroundAndDesignSwapsCutAndFill(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		typ := section.Typical{Over: station.Everywhere(), CutSlope: 2, FillSlope: 2,
			Left: section.Side{Lane: section.Band{Width: 4}}, Right: section.Side{Lane: section.Band{Width: 5}}}
		ground := drawGround(t)
		mirror := shaped{}
		for _, c := range ground.corners {
			mirror.corners = append(mirror.corners, section.Point{O: c.O, Z: 200 - c.Z})
		}
		z := 100 + rapid.Float64Range(-3, 3).Draw(t, "grade line")
		var w section.Scratch
		var a, b section.Slice
		parts := section.Parts{Typicals: []section.Typical{typ}}
		straight(t, 100, ground, level(100, z), parts).Slice(&w, &a, 50, false)
		straight(t, 100, mirror, level(100, 200-z), parts).Slice(&w, &b, 50, false)
		require.Equal(t, a.OK, b.OK)
		assert.InDelta(t, a.Cut.Area, b.Fill.Area, 1e-9)
		assert.InDelta(t, a.Fill.Area, b.Cut.Area, 1e-9)
		assert.InDelta(t, a.Cut.Moment, b.Fill.Moment, 1e-8)
		// Equal levels at the hinge count as fill in both worlds, give or take the
		// tie of 1e-9 m, which a slope of 1 in 2 doubles on either side.
		assert.InDelta(t, a.StripWidth, b.StripWidth, 1e-8)
	})
}

// Law: cut less fill is the area between the two lines, whatever the ground;
// materials sum to the cut, with a rock line crossed any number of times.
func TestAreasClose(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ground := drawGround(t)
		parts := section.Parts{Typicals: []section.Typical{twoLanes()}, Strip: section.Stripping{Depth: 0.25},
			Strata: []section.Stratum{{Material: "rock", Over: station.Everywhere(), Top: rapid.Float64Range(0.1, 2).Draw(t, "rock")},
				{Material: "hard rock", Over: station.Everywhere(), Top: 2.5}}}
		road := straight(t, 100, ground, level(100, 100), parts)
		var w section.Scratch
		var s section.Slice
		road.Slice(&w, &s, 50, false)
		if !s.OK {
			return
		}
		var sum section.Area
		for _, p := range s.Parts {
			sum.Area += p.Cut.Area
			sum.Moment += p.Cut.Moment
		}
		assert.InDelta(t, s.Cut.Area, sum.Area, 1e-9)
		assert.InDelta(t, s.Cut.Moment, sum.Moment, 1e-9)
		assert.InDelta(t, netBySummation(road, ground, &s), s.Cut.Area-s.Fill.Area, 2e-3)
		assert.InDelta(t, s.Right.Catch.O-s.Left.Catch.O, s.StripWidth, 1e-9)
	})
}

// netBySummation integrates stripped ground − earthwork line by slabs of 0.5 mm
// from the definitions alone.
func netBySummation(r *section.Road, g shaped, s *section.Slice) (net float64) {
	typ := r.Typicals()[s.Typical]
	const dx = 0.0005
	for o := s.Left.Catch.O + dx/2; o < s.Right.Catch.O; o += dx {
		ground, _ := g.Level(nil, s.At, o)
		f, half := s.Left, typ.Left
		if o > 0 {
			f, half = s.Right, typ.Right
		}
		design := s.Finished + typ.Rise(o) - typ.Pavement
		if u := math.Abs(o) - half.Hinge(); u > 0 {
			design = s.Finished + typ.Rise(o) - typ.Dressing + beyondHinge(&typ, f.Cut, u)
		}
		net += (ground - 0.25 - design) * dx
	}
	return net
}

// beyondHinge is the finished surface u metres outside the hinge, above it.
func beyondHinge(t *section.Typical, cut bool, u float64) float64 {
	if !cut {
		return -u / t.FillSlope
	}
	d := t.Ditch
	fore := d.Depth * d.ForeSlope
	switch {
	case u < fore:
		return -u / d.ForeSlope
	case u < fore+d.Bottom:
		return -d.Depth
	}
	return -d.Depth + (u-fore-d.Bottom)/t.CutSlope
}

// Law: raising the grade line never increases cut and never decreases fill on a
// platform whose slopes catch.
func TestRaisingTheGradeLine(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		typ := twoLanes()
		typ.Ditch = nil
		ground := shaped{corners: []section.Point{{O: -60, Z: 100 + rapid.Float64Range(-5, 5).Draw(t, "l")}, {O: 60, Z: 100 + rapid.Float64Range(-5, 5).Draw(t, "r")}}}
		parts := section.Parts{Typicals: []section.Typical{typ}}
		z := 100 + rapid.Float64Range(-3, 3).Draw(t, "z")
		var w section.Scratch
		var low, high section.Slice
		straight(t, 50, ground, level(50, z), parts).Slice(&w, &low, 25, false)
		straight(t, 50, ground, level(50, z+0.1), parts).Slice(&w, &high, 25, false)
		assert.LessOrEqual(t, high.Cut.Area, low.Cut.Area+1e-12)
		assert.GreaterOrEqual(t, high.Fill.Area, low.Fill.Area-1e-12)
	})
}

// The road's end belongs to the last typical section; where sections change the
// slice before ends with the old one. Ends within a centimetre are one.
func TestTypicalSectionsChange(t *testing.T) {
	a, b := twoLanes(), twoLanes()
	a.Over = station.Interval{From: 0, To: 50.004}
	b.Over = station.Interval{From: 50, To: 99.995}
	ground := shaped{corners: []section.Point{{O: -1, Z: 99}, {O: 1, Z: 99}}}
	road := straight(t, 100, ground, level(100, 100), section.Parts{Typicals: []section.Typical{a, b}})
	assert.Equal(t, 0, road.TypicalAt(0, false))
	change := road.Typicals()[0].Over.To
	assert.Equal(t, change, road.Typicals()[1].Over.From)
	assert.Equal(t, 0, road.TypicalAt(change, true))
	assert.Equal(t, 1, road.TypicalAt(change, false))
	assert.Equal(t, 1, road.TypicalAt(100, false))
}
