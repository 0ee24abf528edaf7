package drainage_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/drainage"
	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// tilted is a plane of ground: level at the origin of the road, rise per metre
// along it and across it to the right. It ends at reach metres of offset.
type tilted struct{ z, along, across, reach float64 }

func (g tilted) at(s station.Station, o float64) float64 {
	return g.z + g.along*float64(s) + g.across*o
}

func (g tilted) Across(_ *section.Scratch, dst []section.Point, gaps []terrain.Gap, at station.Station, from, to float64) ([]section.Point, []terrain.Gap) {
	return append(dst, section.Point{O: from, Z: g.at(at, from)}, section.Point{O: to, Z: g.at(at, to)}), gaps
}

func (g tilted) Level(_ *section.Scratch, at station.Station, o float64) (float64, bool) {
	return g.at(at, o), math.Abs(o) <= g.reach
}

func (g tilted) Corners(_ *section.Scratch, dst []float64, _ section.Ray, x0, x1 float64) []float64 {
	return append(dst, x0, x1)
}

func (g tilted) Reach() float64 { return g.reach }

// typical is two lanes and shoulders falling to the right by 6 % all over.
func typical() section.Typical {
	side := section.Side{Lane: section.Band{Width: 3.5, Crossfall: -0.06}, Shoulder: section.Band{Width: 1.5, Crossfall: -0.06}}
	return section.Typical{Name: "all", Over: station.Everywhere(), Left: side, Right: side,
		CutSlope: 1.5, FillSlope: 2, Pavement: 0.5, Bound: 0.5, Dressing: 0.2}
}

// road lays 300 m of road, due north unless turned, on tilted ground.
func road(t require.TestingT, g section.Ground, typ section.Typical, backwards bool, pvi ...profile.PVI) *section.Road {
	pis := []alignment.PI{{E: 500, N: 0}, {E: 500, N: 300}}
	if backwards {
		pis[0], pis[1] = pis[1], pis[0]
	}
	line, found := alignment.New(pis)
	require.Empty(t, found)
	grade, found := profile.New(pvi)
	require.Empty(t, found)
	r, found := section.NewRoad(section.Parts{Line: line, Grade: grade, Ground: g, Typicals: []section.Typical{typ}, Strip: section.Stripping{Depth: 0.2}})
	require.Empty(t, found)
	return r
}

func pipe(at station.Station, skewDeg float64, rightAhead bool) drainage.Culvert {
	cover := 0.3
	return drainage.Culvert{ID: "C", Station: &at, Skew: skewDeg * math.Pi / 180, RightAhead: rightAhead,
		Shape: drainage.Circular, Diameter: 0.9, Wall: 0.1, Barrels: 1, Cover: &cover, CoverDatum: drainage.ToSubgrade}
}

var fall = tilted{z: 97, along: 0.004, across: -0.03, reach: 100}

func rising() []profile.PVI { return []profile.PVI{{At: 0, Elev: 100}, {At: 300, Elev: 103}} }

// Where slope plane and ground plane meet along the barrel can be solved by
// hand: offset x·cosθ, station s + x·sinθ, both linear in x.
func TestEndsAgainstTheClosedForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		skew := rapid.Float64Range(0, 45).Draw(t, "skew")
		ahead := rapid.Bool().Draw(t, "right ahead")
		l, found := drainage.Lay(road(t, fall, typical(), false, rising()...), new(section.Scratch), pipe(150, skew, ahead), 0)
		require.Empty(t, found)
		sin, cos := math.Sincos(skew * math.Pi / 180)
		if !ahead {
			sin = -sin
		}
		for i, side := range []float64{-1, 1} {
			// finished: 100 + 0.01 s − 0.06·5·side − (side·o − 5)/2 = ground
			z0 := 100 + 0.01*150 - 0.06*5*side + 2.5
			slope := 0.01*sin - side*cos/2
			g0 := 97 + 0.004*150.0
			gs := 0.004*sin - 0.03*cos
			x := (g0 - z0) / (slope - gs)
			assert.InDelta(t, x, l.Ends[i].X, 1e-9)
			assert.InDelta(t, g0+gs*x, l.Ends[i].Invert, 1e-9)
		}
		assert.Equal(t, -1, l.InletSide, "the ground falls to the right")
		assert.InDelta(t, math.Hypot(l.LengthPlan, l.Drop), l.Length, 1e-12)
		assert.InDelta(t, l.Drop/l.LengthPlan, l.Slope, 1e-15)
	})
}

// Law: the least cover is never above a fine sampling between the hinges, and
// below it by at most step × steepest relative slope; in a sag as well.
func TestLeastCoverAgainstSampling(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pvi := []profile.PVI{{At: 0, Elev: 103}, {At: 150, Elev: 101, Length: rapid.Float64Range(40, 280).Draw(t, "L")}, {At: 300, Elev: 104}}
		r := road(t, fall, typical(), false, pvi...)
		c := pipe(station.Station(rapid.Float64Range(100, 200).Draw(t, "station")), rapid.Float64Range(0, 50).Draw(t, "skew"), rapid.Bool().Draw(t, "ahead"))
		l, _ := drainage.Lay(r, new(section.Scratch), c, 0)
		require.True(t, l.Judged)
		sin, cos := math.Sincos(c.Skew)
		if !c.RightAhead {
			sin = -sin
		}
		best, step := math.Inf(1), 0.01
		for x := -5 / cos; x <= 5/cos; x += step {
			z, typ, ok := r.Finished(l.At+station.Station(x*sin), x*cos)
			require.True(t, ok)
			invert := l.Ends[0].Invert + (x-l.Ends[0].X)*(l.Ends[1].Invert-l.Ends[0].Invert)/l.LengthPlan
			best = math.Min(best, z-typ.Pavement-invert-1.0)
		}
		assert.LessOrEqual(t, l.Least.Cover(), best+1e-9)
		assert.GreaterOrEqual(t, l.Least.Cover(), best-step*0.2)
	})
}

// Law: the same road laid backwards carries the same barrel: mirrored offsets,
// same inverts, length, slope and cover.
func TestBackwardsRoadSameBarrel(t *testing.T) {
	forth := road(t, fall, typical(), false, rising()...)
	mirrored := typical()
	mirrored.Left.Lane.Crossfall, mirrored.Left.Shoulder.Crossfall = 0.06, 0.06
	mirrored.Right = mirrored.Left
	back := road(t, tilted{fall.z + 300*fall.along, -fall.along, -fall.across, 100}, mirrored, true,
		profile.PVI{At: 0, Elev: 103}, profile.PVI{At: 300, Elev: 100})
	a, found := drainage.Lay(forth, new(section.Scratch), pipe(120, 25, true), 0)
	require.Empty(t, found)
	// Seen from the other end of the road, the end that lay ahead on the right
	// lies behind on the left; so again the right one lies ahead.
	b, found := drainage.Lay(back, new(section.Scratch), pipe(180, 25, true), 0)
	require.Empty(t, found)
	assert.InDelta(t, a.Length, b.Length, 1e-9)
	assert.InDelta(t, a.Slope, b.Slope, 1e-12)
	assert.InDelta(t, a.Least.Cover(), b.Least.Cover(), 1e-9)
	assert.InDelta(t, float64(a.Least.Offset), -float64(b.Least.Offset), 1e-9)
	assert.InDelta(t, float64(a.Ends[0].At), 300-float64(b.Ends[1].At), 1e-9)
	assert.InDelta(t, a.Ends[0].Invert, b.Ends[1].Invert, 1e-9)
}

// Several barrels: ends are the middle axis's, cover the least over every axis.
func TestTwinBarrels(t *testing.T) {
	r := road(t, fall, typical(), false, rising()...)
	one, _ := drainage.Lay(r, new(section.Scratch), pipe(150, 0, false), 0)
	c := pipe(150, 0, false)
	c.Barrels = 2
	two, _ := drainage.Lay(r, new(section.Scratch), c, 0)
	assert.Equal(t, one.Ends, two.Ends)
	// Outside diameter 1.1, clear distance the same: axes 1.1 m to either side;
	// the road is 11 mm lower at the nearer one.
	assert.InDelta(t, one.Least.Cover()-0.011, two.Least.Cover(), 1e-9)
	assert.InDelta(t, 148.9, float64(two.Least.At), 1e-9)
}

// Given inverts place the ends where the slope reaches them and never turn the
// inlet round.
func TestGivenInverts(t *testing.T) {
	r := road(t, fall, typical(), false, rising()...)
	high, low := 97.9, 97.5
	c := pipe(150, 0, false)
	c.InletInvert, c.OutletInvert = &high, &low
	l, found := drainage.Lay(r, new(section.Scratch), c, 0)
	require.Empty(t, found)
	// Left hinge 101.8, down to 97.9 at 1 in 2: 7.8 m.
	assert.InDelta(t, -12.8, float64(l.Ends[0].Offset), 1e-9)
	assert.InDelta(t, 0.4/l.LengthPlan, l.Slope, 1e-12)

	c.InletInvert, c.OutletInvert = &low, &high
	l, found = drainage.Lay(r, new(section.Scratch), c, 0)
	require.Len(t, found, 1)
	assert.Equal(t, finding.Code("D03"), found[0].Code)
	assert.Equal(t, finding.Error, found[0].Severity)
	assert.Equal(t, -1, l.InletSide)
	assert.Equal(t, drainage.Withheld, l.Verdict)

	level := 97.7
	c.InletInvert, c.OutletInvert = &level, &level
	_, found = drainage.Lay(r, new(section.Scratch), c, 0)
	require.Len(t, found, 1)
	assert.Equal(t, finding.Warning, found[0].Severity, "a level barrel is an equaliser")
}

// What leaves a barrel without an end or a direction.
func TestWhatCannotBePlaced(t *testing.T) {
	lay := func(g tilted, change func(*drainage.Culvert)) (drainage.Laid, []finding.Finding) {
		c := pipe(150, 0, false)
		change(&c)
		return drainage.Lay(road(t, g, typical(), false, rising()...), new(section.Scratch), c, 0)
	}
	keep := func(*drainage.Culvert) {}
	cases := []struct {
		name   string
		ground tilted
		change func(*drainage.Culvert)
		code   finding.Code
	}{
		{"in cut", tilted{z: 104, along: 0.004, across: -0.03, reach: 100}, keep, "D25"},
		{"survey too narrow", tilted{z: 97, along: 0.004, across: -0.03, reach: 7}, keep, "D26"},
		{"level across", tilted{z: 97, along: 0.004, reach: 100}, keep, "D30"},
		{"off the road", fall, func(c *drainage.Culvert) { at := station.Station(301); c.Station = &at }, "A03"},
		{"another datum", fall, func(c *drainage.Culvert) {
			c.Cover, c.Rule, c.CoverDatum = nil, "reinforced concrete", drainage.ToSurface
		}, "D05"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			l, found := lay(c.ground, c.change)
			require.NotEmpty(t, found)
			assert.Equal(t, c.code, found[0].Code)
			assert.Equal(t, drainage.Withheld, l.Verdict)
			assert.NotEmpty(t, found[0].Stops)
		})
	}
}

// A crossing at the lowest ground between two stations: ties take the lower.
func TestLowestGround(t *testing.T) {
	c := pipe(0, 0, false)
	c.Station, c.Between = nil, &station.Interval{From: 100, To: 140}
	l, _ := drainage.Lay(road(t, fall, typical(), false, rising()...), new(section.Scratch), c, 0)
	assert.Equal(t, station.Station(100), l.At)
}

// Every way listed to mend a shortage does mend it.
func TestMendsMend(t *testing.T) {
	c := pipe(150, 10, true)
	c.Diameter = 1.8
	c.Wall = 0.15
	lay := func(lift float64, c drainage.Culvert) drainage.Laid {
		high := tilted{z: 98.5, along: 0.004, across: -0.03, reach: 100}
		l, _ := drainage.Lay(road(t, high, typical(), false, profile.PVI{At: 0, Elev: 100 + lift}, profile.PVI{At: 300, Elev: 103 + lift}), new(section.Scratch), c, 0)
		return l
	}
	short := lay(0, c)
	require.Equal(t, drainage.Short, short.Verdict)
	require.Len(t, short.Mends, 4)
	for _, m := range short.Mends {
		switch m.Kind {
		case drainage.RaiseGradeLine:
			// The barrel gets longer with the fill and its inverts move with it:
			// on this ground by less than a centimetre.
			assert.InDelta(t, short.Required, lay(m.Value, c).Least.Cover(), 0.01)
		case drainage.LowerInvert:
			low, high := short.Ends[1].Invert-m.Value, short.Ends[0].Invert-m.Value
			d := c
			d.InletInvert, d.OutletInvert, d.InletSide = &high, &low, -1
			assert.Greater(t, lay(0, d).Least.Cover(), short.Least.Cover())
		case drainage.SmallerBarrel:
			d := c
			d.Diameter = m.Value / 1000
			assert.Equal(t, drainage.OK, lay(0, d).Verdict)
		case drainage.MoreBarrels:
			assert.Greater(t, m.Value, 1.0)
		}
	}
}
