package section

import (
	"math"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
	"sagcrest/section/terrain"
)

// Ground is the surveyed ground as the road sees it: a surface looked at
// through the alignment, or lines surveyed square to the road.
type Ground interface {
	// Across appends the corners of the ground at a station between two
	// offsets, in order of offset, and the gaps in it (From, To are offsets).
	Across(w *Scratch, dst []Point, gaps []terrain.Gap, at station.Station, from, to float64) ([]Point, []terrain.Gap)
	// Level returns the ground at a station and offset; ok is false in a gap.
	Level(w *Scratch, at station.Station, o float64) (z float64, ok bool)
	// Corners appends the distances x along the plan line a + x·d (d of length
	// 1) where the ground may bend, from x0 to x1.
	Corners(w *Scratch, dst []float64, a Ray, x0, x1 float64) []float64
	// Reach returns an offset beyond which no ground is known at any station.
	Reach() float64
}

// Ray is a straight line in plan: from a point, along a unit direction
// (easting, northing).
type Ray struct {
	From terrain.XY
	Dir  [2]float64
}

// Point returns the place x metres along the ray.
func (r Ray) Point(x float64) terrain.XY {
	return terrain.XY{r.From[0] + x*r.Dir[0], r.From[1] + x*r.Dir[1]}
}

// Scratch holds what a walk along the road remembers: the last triangle and
// buffers. The zero value is ready; one per goroutine.
type Scratch struct {
	cursor   terrain.Cursor
	vertices []terrain.Vertex
	gaps     []terrain.Gap
}

// surfaceGround looks at a surface through the alignment.
type surfaceGround struct {
	surface terrain.Surface
	line    *alignment.Alignment
	reach   float64
}

// OnSurface returns the ground of a triangulation or a grid.
func OnSurface(s terrain.Surface, a *alignment.Alignment) Ground {
	lo, hi := s.Extent()
	reach := 0.0
	// The farthest corner of the extent from any end of an element bounds every
	// offset at which ground can be met, up to the bulge of an arc, which is
	// shorter than its element.
	for _, e := range a.Elements() {
		for _, c := range []terrain.XY{lo, hi, {lo[0], hi[1]}, {hi[0], lo[1]}} {
			d := math.Hypot(c[0]-e.Start[0], c[1]-e.Start[1]) + e.Over.Length()
			reach = math.Max(reach, d)
		}
	}
	return &surfaceGround{s, a, reach}
}

func (g *surfaceGround) Across(w *Scratch, dst []Point, gaps []terrain.Gap, at station.Station, from, to float64) ([]Point, []terrain.Gap) {
	a := g.line.Point(at, station.Offset(from))
	b := g.line.Point(at, station.Offset(to))
	first := len(gaps)
	w.vertices, gaps = g.surface.Cut(&w.cursor, w.vertices[:0], gaps, a, b)
	for _, v := range w.vertices {
		dst = append(dst, Point{from + v.D, v.Z})
	}
	for i := first; i < len(gaps); i++ {
		gaps[i].From += from
		gaps[i].To += from
	}
	return dst, gaps
}

func (g *surfaceGround) Level(w *Scratch, at station.Station, o float64) (float64, bool) {
	return g.surface.Level(&w.cursor, g.line.Point(at, station.Offset(o)))
}

func (g *surfaceGround) Corners(w *Scratch, dst []float64, r Ray, x0, x1 float64) []float64 {
	w.vertices, w.gaps = g.surface.Cut(&w.cursor, w.vertices[:0], w.gaps[:0], r.Point(x0), r.Point(x1))
	for _, v := range w.vertices {
		dst = append(dst, x0+v.D)
	}
	return dst
}

func (g *surfaceGround) Reach() float64 { return g.reach }
