package main

import (
	"math"
	"math/rand/v2"

	"github.com/paulmach/orb"

	"sagcrest/profile/station"
)

// point is a surveyed place; its level comes from the ground.
type point struct {
	xy   orb.Point
	code string
}

// How the place was surveyed, in metres.
const (
	between = 12.0 // rows across the road
	apart   = 7.5  // points in a row
	reach   = 60.0 // to either side: twice what the widest fill needs
	beyond  = 24.0 // rows before the start and after the end
	step    = 3.0  // along a bed
	// clear is kept free of scattered points beyond the banks. It is more than
	// half a step, as are the banks from the bed, so that the circle over two
	// neighbours along a bed is empty: they are neighbours of the triangulation
	// too, and the bed is a true edge of it.
	clear = 2.0
)

// survey sets out the points: first the scatter over the land, then the beds.
func (g *ground) survey() []point {
	scatter := rand.New(rand.NewPCG(1900, 430))
	// Nobody walks in exact rows: a third of a step either way.
	loose := func(step float64) float64 { return (scatter.Float64()*2 - 1) * step / 3 }
	var out []point
	rows := math.Ceil((float64(g.road.Length()) + 2*beyond) / between)
	for i := 0.0; i <= rows; i++ {
		for o := -reach; o <= reach; o += apart {
			s := station.Station(i*between - beyond + loose(between))
			p := g.road.Point(s, station.Offset(o+loose(apart)))
			if !g.nearBed(p) {
				out = append(out, point{p, "ground"})
			}
		}
	}
	for i := range g.valleys {
		out = append(out, g.valleys[i].rows()...)
	}
	return out
}

// nearBed reports whether a place is left to the rows along a bed.
func (g *ground) nearBed(p orb.Point) bool {
	for i := range g.valleys {
		v := &g.valleys[i]
		if t, d := v.place(p); math.Abs(t) <= reach+step && math.Abs(d) < v.width+clear {
			return true
		}
	}
	return false
}

// rows sets out the bed and the tops of its banks, upstream and downstream of
// the road; the crossing itself is one of the points.
func (v *valley) rows() (out []point) {
	for t := -reach; t <= reach; t += step {
		out = append(out,
			point{v.plan(t, 0), "bed"},
			point{v.plan(t, -v.width), "bank"},
			point{v.plan(t, v.width), "bank"})
	}
	return out
}
