package earthwork_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// Volumes of roads that package section has cut: published sections laid on
// ground made for them.

// sheet is ground given by its level along the road; it rises by across a metre
// to the right.
type sheet struct {
	along  func(station.Station) float64
	across float64
}

func (g sheet) Level(_ *section.Scratch, s station.Station, o float64) (float64, bool) {
	return g.along(s) + g.across*o, true
}

func (g sheet) Across(_ *section.Scratch, dst []section.Point, gaps []terrain.Gap, s station.Station, from, to float64) ([]section.Point, []terrain.Gap) {
	z := g.along(s)
	return append(dst, section.Point{O: from, Z: z + g.across*from}, section.Point{O: to, Z: z + g.across*to}), gaps
}

func (g sheet) Corners(_ *section.Scratch, dst []float64, _ section.Ray, x0, x1 float64) []float64 {
	return append(dst, x0, x1)
}

func (g sheet) Reach() float64 { return 1000 }

// platform is a level formation of a width, nothing taken off or laid on.
func platform(width, slope float64) section.Typical {
	half := section.Side{Lane: section.Band{Width: width / 2}}
	return section.Typical{Name: "platform", Over: station.Everywhere(), Left: half, Right: half, CutSlope: slope, FillSlope: slope, Material: "till"}
}

func lay(t require.TestingT, g section.Ground, pvi []profile.PVI, typicals ...section.Typical) *section.Road {
	length := float64(pvi[len(pvi)-1].At)
	line, found := alignment.New([]alignment.PI{{E: 1000, N: 0}, {E: 1000, N: length}})
	require.Empty(t, found)
	grade, found := profile.New(pvi)
	require.Empty(t, found)
	road, found := section.NewRoad(section.Parts{Line: line, Grade: grade, Ground: g, Typicals: typicals})
	require.Empty(t, found)
	return road
}

// cutRoad slices a road at its pay stations.
func cutRoad(road *section.Road, req earthwork.Request) (c earthwork.Cuts) {
	key := earthwork.KeyPlaces{Over: road.Over(), Curves: road.Grade().Breaks()}
	for _, typ := range road.Typicals() {
		key.Sections = append(key.Sections, typ.Over.From, typ.Over.To)
	}
	c.Stations = earthwork.PayStations(req, key)
	var w section.Scratch
	cut := func(s station.Station, before bool) *section.Slice {
		var out section.Slice
		road.Slice(&w, &out, s, before)
		return &out
	}
	for _, p := range c.Stations {
		after := cut(p.At, false)
		before := after
		if p.Changes {
			before = cut(p.At, true)
		}
		c.Before, c.After = append(c.Before, before), append(c.After, after)
	}
	return c
}

// Cubic yards of level cuttings 100 ft long, 18 ft wide, slopes 1/4 to 1, for
// every foot of depth. Source: G. L. Vose, Handbook of Railroad Construction,
// art. 106, rock column (verified; printed in whole yards).
func TestLevelCuttings(t *testing.T) {
	const ft, yd3 = 0.3048, 0.764554857984
	for i, want := range []float64{68, 137, 208, 282, 356, 433, 512, 593, 675, 759} {
		ground := sheet{along: func(station.Station) float64 { return 100 + float64(i+1)*ft }}
		road := lay(t, ground, []profile.PVI{{At: 0, Elev: 100}, {At: 100 * ft, Elev: 100}}, platform(18*ft, 0.25))
		q := measure(t, earthwork.Request{}, cutRoad(road, earthwork.Request{}))
		assert.InDelta(t, want, float64(q.Cut)/yd3, 0.6, "%d ft", i+1)
		assert.Zero(t, q.Fill)
	}
}

// Level sections on ground that rises unevenly, paid by end areas. Source:
// G-C08 of the published cases.
func TestLevelSections(t *testing.T) {
	c := readCase(t, "G-C08")
	number := func(key string) float64 { return c.Inputs[key].(float64) }
	ground, step := numbers(c.Inputs["ground"]), number("interval")
	along := func(s station.Station) float64 {
		i := min(int(float64(s)/step), len(ground)-2)
		x := float64(s)/step - float64(i)
		return ground[i] + x*(ground[i+1]-ground[i])
	}
	n := float64(len(ground) - 1)
	first, rise := number("formation_first"), number("formation_step")
	pvi := []profile.PVI{{At: 0, Elev: first}, {At: station.Station(n * step), Elev: first + n*rise}}
	req := earthwork.Request{PayStep: step}
	cuts := cutRoad(lay(t, sheet{along: along}, pvi, platform(number("base"), number("side_slope"))), req)
	require.Len(t, cuts.Stations, len(ground))
	for i, want := range numbers(c.Expected["depths"]) {
		assert.InDelta(t, want, cuts.After[i].Ground-cuts.After[i].Finished, 1e-9)
	}
	q := measure(t, req, cuts)
	assert.InDelta(t, c.Expected["trapezoidal"].(float64), float64(q.Cut), c.Tolerance["V"])
}

// Side-hill sections, paid by end areas. Source: G-C09 of the published cases.
func TestSideHillSections(t *testing.T) {
	c := readCase(t, "G-C09")
	number := func(key string) float64 { return c.Inputs[key].(float64) }
	depths, step := numbers(c.Inputs["depths"]), number("interval")
	along := func(s station.Station) float64 {
		i := min(int(float64(s)/step), len(depths)-2)
		x := float64(s)/step - float64(i)
		return 50 + depths[i] + x*(depths[i+1]-depths[i])
	}
	pvi := []profile.PVI{{At: 0, Elev: 50}, {At: station.Station(step * float64(len(depths)-1)), Elev: 50}}
	req := earthwork.Request{PayStep: step}
	ground := sheet{along: along, across: 1 / number("ground_1in")}
	cuts := cutRoad(lay(t, ground, pvi, platform(number("base"), number("side_slope"))), req)
	areas := numbers(c.Expected["areas"])
	require.Len(t, cuts.Stations, len(areas))
	for i, want := range areas {
		assert.InDelta(t, want, cuts.After[i].Cut.Area, c.Tolerance["area"])
	}
	assert.InDelta(t, c.Expected["trapezoidal"].(float64), float64(measure(t, req, cuts).Cut), c.Tolerance["V"])
}

// Law: a road laid backwards, its length a whole number of intervals, has the
// same volumes; so has one whose typical section is cut in two.
func TestRoadLaidBackwards(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		step := rapid.Float64Range(5, 30).Draw(t, "step")
		length := station.Station(step * float64(rapid.IntRange(2, 12).Draw(t, "intervals")))
		g := sheet{across: rapid.Float64Range(-0.2, 0.2).Draw(t, "across")}
		z0, g0, bend := rapid.Float64Range(96, 104).Draw(t, "z"), rapid.Float64Range(-0.05, 0.05).Draw(t, "slope"), rapid.Float64Range(-3e-4, 3e-4).Draw(t, "bend")
		g.along = func(s station.Station) float64 { return z0 + g0*float64(s) + bend*float64(s)*float64(s) }
		back := sheet{along: func(s station.Station) float64 { return g.along(length - s) }, across: -g.across}
		end := rapid.Float64Range(97, 103).Draw(t, "end")
		typ := platform(10, 2)
		typ.Dressing, typ.Pavement, typ.Ditch = 0.1, 0.4, &section.Ditch{Depth: 0.5, ForeSlope: 3}
		req := earthwork.Request{PayStep: step, Method: drawMethod(t).Method}

		ahead := lay(t, g, []profile.PVI{{At: 0, Elev: 100}, {At: length, Elev: end}}, typ)
		a := measure(t, req, cutRoad(ahead, req))
		b := measure(t, req, cutRoad(lay(t, back, []profile.PVI{{At: 0, Elev: end}, {At: length, Elev: 100}}, typ), req))
		b.Land[0], b.Land[1] = b.Land[1], b.Land[0]
		assert.InDeltaSlice(t, figures(a), figures(b), 1e-6)

		one, two := typ, typ
		mid := station.Station(step) * station.Station(rapid.IntRange(1, int(float64(length)/step+0.5)-1).Draw(t, "cut at"))
		one.Over.To, two.Over.From = mid, mid
		halves := lay(t, g, []profile.PVI{{At: 0, Elev: 100}, {At: length, Elev: end}}, one, two)
		assert.InDeltaSlice(t, figures(a), figures(measure(t, req, cutRoad(halves, req))), 1e-6)
	})
}

// Where a section changes, the interval before ends with the old one and the
// next begins with the new: 10 m wide for 30 m, then 14 m, 2 m above level
// ground with slopes of 1 to 1.
func TestChangeOfSection(t *testing.T) {
	narrow, wide := platform(10, 1), platform(14, 1)
	narrow.Over.To, wide.Over.From = 30, 30
	ground := sheet{along: func(station.Station) float64 { return 98 }}
	road := lay(t, ground, []profile.PVI{{At: 0, Elev: 100}, {At: 60, Elev: 100}}, narrow, wide)
	req := earthwork.Request{PayStep: 20}
	q := measure(t, req, cutRoad(road, req))
	require.Len(t, q.Between, 4)
	for i, want := range []float64{24 * 20, 24 * 10, 32 * 10, 32 * 20} {
		assert.InDelta(t, want, float64(q.Between[i].Fill), 1e-9)
	}
	assert.InDelta(t, 7*30+9*30, q.Land[0], 1e-9)
}
