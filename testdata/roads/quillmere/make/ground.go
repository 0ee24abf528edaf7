package main

import (
	"math"

	"github.com/paulmach/orb"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
)

// ground is the shape of the place.
type ground struct {
	road    *alignment.Alignment
	upland  []lie
	valleys []valley
}

// lie says how the upland lies at a station: its level on the reference line
// and its rise per metre to the right.
type lie struct{ at, level, rise float64 }

// valley is a bed that runs straight through the plan with banks and sides.
type valley struct {
	at   float64 // station where the bed crosses the reference line
	skew float64 // degrees; positive: the right end lies ahead
	// bed gives levels along the bed; t is the distance from the crossing,
	// positive to the right of the road.
	bed []height
	// bank is how far the banks rise above the bed, width how far from it.
	bank, width float64
	side        float64 // rise per metre of the valley's sides, at the banks

	from, along orb.Point // set by newGround: crossing, and the way of t
}

type height struct{ t, level float64 }

// newGround describes the place along a road. The levels were chosen with the
// grade line of road.toml in mind: what is cut on the crest and at the underpass
// goes into the two brook valleys.
func newGround(road *alignment.Alignment) *ground {
	g := &ground{road: road, upland: uplandLevels(), valleys: []valley{
		// The Quill brook, the larger: 5.5 m of fill where the road leaves its sag.
		{at: 430, skew: 20, bed: []height{{-100, 97.2}, {0, 96}, {100, 94.8}}, bank: 0.5, width: 2, side: 0.07},
		// The Sedge brook, on the downgrade, far from any low point of the road.
		{at: 1250, bed: []height{{-100, 107.5}, {0, 105.5}, {100, 103.5}}, bank: 0.4, width: 1.8, side: 0.06},
		// The dry valley. Shallow under the road, then it drops towards
		// the mere: from 40 m to the right on it lies below 101, which is where the
		// pipe of an inlet in the underpass can come out.
		{at: 1760, bed: []height{{-100, 105.1}, {0, 103.6}, {16, 103.36}, {100, 94.12}}, bank: 0.1, width: 2.5, side: 0.03},
	}}
	for i := range g.valleys {
		v := &g.valleys[i]
		pose := road.At(station.Station(v.at))
		// The right end lies ahead by the skew: less than a quarter turn.
		azimuth := pose.Azimuth + math.Pi/2 - v.skew*math.Pi/180
		v.from, v.along = pose.XY, orb.Point{math.Sin(azimuth), math.Cos(azimuth)}
	}
	return g
}

// uplandLevels is the country without its valleys.
func uplandLevels() []lie {
	return []lie{
		{-60, 113.4, 0.02},
		{0, 112.0, 0.02}, // the old road
		{100, 109.2, 0.04},
		{200, 106.7, 0.05},
		{300, 104.1, 0.04},
		{400, 102.2, 0.02},
		{500, 100.8, -0.01},
		{620, 102.9, -0.03},
		{720, 106.0, -0.04},
		{820, 111.2, -0.03},
		{900, 114.7, -0.02},
		{980, 116.9, 0.01}, // the crest, with rock under it
		{1060, 115.1, 0.03},
		{1150, 111.2, 0.03},
		{1250, 108.8, 0.02},
		{1350, 106.6, 0.01},
		{1440, 105.4, -0.02},
		{1520, 108.4, -0.03}, // the lane that the road passes under
		{1600, 105.6, -0.03},
		{1680, 104.2, -0.02},
		{1760, 105.0, -0.02},
		{1840, 106.3, -0.01},
		{1900, 107.7, 0},
		{1960, 109.0, 0},
	}
}

// level returns the ground at a place of the plan. A valley takes the ground
// where it is lower; the edge between both is rounded, the bed is not touched.
func (g *ground) level(p orb.Point) float64 {
	z := g.uplandAt(p)
	for i := range g.valleys {
		z = lower(z, g.valleys[i].level(p))
	}
	return z
}

// uplandAt returns the upland with a gentle roll of 12 cm, which keeps sections
// from being all alike.
func (g *ground) uplandAt(p orb.Point) float64 {
	s, o := g.place(p)
	i := 1
	for i < len(g.upland)-2 && s > g.upland[i].at {
		i++
	}
	a, b := g.upland[i-1], g.upland[i]
	t := (s - a.at) / (b.at - a.at)
	z := hermite(t, b.at-a.at, a.level, b.level, g.slope(i-1), g.slope(i))
	roll := 0.12 * math.Sin(p[0]/37) * math.Sin(p[1]/29)
	return z + (a.rise+(b.rise-a.rise)*smooth(t))*o + roll
}

// place returns station and offset, beyond the ends along the straight
// continuation of the road.
func (g *ground) place(p orb.Point) (s, o float64) {
	at, off, ok := g.road.Locate(p)
	if !ok {
		at, off, _ = g.road.LocateNear(p, g.nearerEnd(p))
	}
	return float64(at), float64(off)
}

// nearerEnd returns the station of the road's end that lies nearer.
func (g *ground) nearerEnd(p orb.Point) station.Station {
	from := func(s station.Station) float64 {
		end := g.road.At(s).XY
		return math.Hypot(p[0]-end[0], p[1]-end[1])
	}
	if end := g.road.Length(); from(end) < from(0) {
		return end
	}
	return 0
}

// slope is the upland's grade at a row of its table: that of the line through
// the neighbouring rows.
func (g *ground) slope(i int) float64 {
	a, b := g.upland[max(i-1, 0)], g.upland[min(i+1, len(g.upland)-1)]
	return (b.level - a.level) / (b.at - a.at)
}

// hermite is the cubic between two levels with a slope at each, t from 0 to 1
// over the given length.
func hermite(t, length, z0, z1, g0, g1 float64) float64 {
	t2, t3 := t*t, t*t*t
	return (2*t3-3*t2+1)*z0 + (t3-2*t2+t)*length*g0 + (3*t2-2*t3)*z1 + (t3-t2)*length*g1
}

// smooth leads from 0 to 1 without a kink at either end.
func smooth(t float64) float64 { return t * t * (3 - 2*t) }

// steeper makes a valley's sides steeper away from its bed, per metre, so that
// they come to an end in the upland.
const steeper = 0.0005

// level returns the valley's own surface: bed, banks, then sides without end.
func (v *valley) level(p orb.Point) float64 {
	t, d := v.place(p)
	d = math.Abs(d)
	z := v.bedAt(t)
	if d < v.width {
		return z + v.bank*d/v.width
	}
	d -= v.width
	return z + v.bank + v.side*d + steeper*d*d
}

// place returns the distance along the bed and from it.
func (v *valley) place(p orb.Point) (t, d float64) {
	e, n := p[0]-v.from[0], p[1]-v.from[1]
	return e*v.along[0] + n*v.along[1], e*v.along[1] - n*v.along[0]
}

// plan returns the place of the plan at a distance along the bed and from it.
func (v *valley) plan(t, d float64) orb.Point {
	return orb.Point{v.from[0] + t*v.along[0] + d*v.along[1], v.from[1] + t*v.along[1] - d*v.along[0]}
}

// bedAt returns the bed, straight between its levels and beyond them.
func (v *valley) bedAt(t float64) float64 {
	i := 1
	for i < len(v.bed)-1 && t > v.bed[i].t {
		i++
	}
	a, b := v.bed[i-1], v.bed[i]
	return a.level + (b.level-a.level)*(t-a.t)/(b.t-a.t)
}

// rounding is how far apart in metres two surfaces must lie for the lower one
// to hold alone.
const rounding = 1.2

// lower returns the lower of two levels, with the edge between them rounded:
// at most a quarter of `rounding` is taken off where they are equal.
func lower(a, b float64) float64 {
	h := max(rounding-math.Abs(a-b), 0) / rounding
	return min(a, b) - h*h*rounding/4
}
