package terrain

import (
	"math"

	"sagcrest/profile/finding"
)

// Triangulation is the surface of surveyed points: their Delaunay
// triangulation, bounded by the convex hull. It depends on the points only,
// not on their order.
type Triangulation struct {
	frame    frame
	mesh     mesh
	z        []float64 // level per site, m
	rim      []int32   // half-edges on the hull, anticlockwise
	min, max XY
	accuracy Accuracy
}

// Triangulate returns the surface of points. Points that round to the same
// millimetre are one, at the mean of their levels; U08 (a warning) says where
// those levels lie more than 20 mm apart. The surface is nil, with finding F02,
// when a coordinate is not a number within ±1e8 m, when fewer than three places
// are left, and when all lie on one line. The input is not changed or kept.
func Triangulate(pts []Point, acc Accuracy) (*Triangulation, []finding.Finding) {
	if bad := checkPoints(pts); bad != nil {
		return nil, bad
	}
	if len(pts) < 3 {
		return nil, noSurface("fewer than three points")
	}
	f, sites, doubts := merge(pts)
	if len(sites) < 3 {
		return nil, append(noSurface("fewer than three different places"), doubts...)
	}
	hilbertOrder(sites)
	m, ok := delaunay(sites)
	if !ok {
		return nil, append(noSurface("all points lie on one line"), doubts...)
	}
	t := &Triangulation{frame: f, mesh: m, accuracy: acc, z: make([]float64, len(sites))}
	lo, hi := XY{math.Inf(1), math.Inf(1)}, XY{math.Inf(-1), math.Inf(-1)}
	for i, s := range sites {
		t.z[i] = s.z
		lo = XY{math.Min(lo[0], s.x), math.Min(lo[1], s.y)}
		hi = XY{math.Max(hi[0], s.x), math.Max(hi[1], s.y)}
	}
	t.min, t.max = f.global(lo[0], lo[1]), f.global(hi[0], hi[1])
	t.rim = t.mesh.numberRim()
	return t, doubts
}

// Len returns the number of triangles.
func (t *Triangulation) Len() int { return len(t.mesh.org) / 3 }

// Extent returns the corners of the box around the points.
func (t *Triangulation) Extent() (min, max XY) { return t.min, t.max }

// Accuracy returns what was stated when the surface was made.
func (t *Triangulation) Accuracy() Accuracy { return t.accuracy }

// Triangles yields the triangles whose bounding box meets the given one.
func (t *Triangulation) Triangles(min, max XY, yield func(a, b, c [3]float64) bool) {
	for k := 0; k < len(t.mesh.org); k += 3 {
		a, b, c := t.corner(k), t.corner(k+1), t.corner(k+2)
		if meets(a[0], b[0], c[0], min[0], max[0]) && meets(a[1], b[1], c[1], min[1], max[1]) && !yield(a, b, c) {
			return
		}
	}
}

func meets(a, b, c, lo, hi float64) bool {
	return math.Max(a, math.Max(b, c)) >= lo && math.Min(a, math.Min(b, c)) <= hi
}

// corner returns the map coordinates and level where half-edge k starts.
func (t *Triangulation) corner(k int) [3]float64 {
	v := t.mesh.org[k]
	p := t.mesh.at(v)
	e := t.frame.global(p.x, p.y)
	return [3]float64{e[0], e[1], t.z[v]}
}
