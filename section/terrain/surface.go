package terrain

import "github.com/paulmach/orb"

// XY is a place in plan: [0] easting, [1] northing, in metres.
type XY = orb.Point

// Vertex is a break point of a cut: its distance from the start of the cut
// line in plan and its level, both in metres.
type Vertex struct{ D, Z float64 }

// Gap is a stretch of a cut line, as distances from its start in metres, where
// no ground is known. Outside tells that nothing known lies further out on the
// line on that side; false is a hole inside the surface.
type Gap struct {
	From, To float64
	Outside  bool
}

// Accuracy holds the standard deviations, in metres, of a surface's levels:
// Independent from point to point, Correlated with its Range in plan, and Bias,
// an error common to all levels. Surfaces carry it unchanged.
type Accuracy struct{ Independent, Correlated, Range, Bias float64 }

// Surface is known ground. It does not change once made, so that goroutines
// share it, each with a Cursor of its own.
type Surface interface {
	// Cut appends to dst every break point of the surface along the straight
	// line from→to, both ends included where ground is known there, by
	// increasing D; a vertex stands at both ends of a gap inside the line. It
	// appends to gaps where nothing is known. It allocates nothing when both
	// have room. A line of no length gives one vertex, or one empty gap.
	Cut(c *Cursor, dst []Vertex, gaps []Gap, from, to XY) ([]Vertex, []Gap)
	// Level returns the level at a place; ok is false where none is known. A
	// place on the edge of the known ground is known.
	Level(c *Cursor, at XY) (z float64, ok bool)
	// Triangles yields the triangles whose bounding box meets the given one,
	// corners anticlockwise as easting, northing, level, until yield returns
	// false. The order is fixed by the surface.
	Triangles(min, max XY, yield func(a, b, c [3]float64) bool)
	// Extent returns the south-west and north-east corner of the known ground.
	Extent() (min, max XY)
	// Accuracy returns what was stated when the surface was made.
	Accuracy() Accuracy
}

// Cursor remembers the last triangle of a walk, so that the next one nearby is
// short. It never changes a result. The zero value is ready; one per goroutine.
// It may serve several surfaces in turn, at the price of longer walks.
type Cursor struct {
	triangle int32 // last triangle visited
	rim      int32 // last place in the list of hull edges
}

// onEdge is the distance in metres up to which a place counts as on the edge of
// the known ground. Places are computed with map coordinates near 5e6, whose
// last bit is 9e-10 m, through some ten operations; nothing is surveyed to it.
const onEdge = 2e-8

// sameBreak is the distance in metres along a cut below which two break points
// are one: the rounding of map coordinates. The level lost is slope times that.
const sameBreak = 1e-9

// appendVertex appends a break point unless it falls together with the last
// one appended since first.
func appendVertex(dst []Vertex, first int, v Vertex) []Vertex {
	if n := len(dst); n > first && v.D <= dst[n-1].D+sameBreak {
		return dst
	}
	return append(dst, v)
}

// appendEnd appends the last point of a cut; of two that fall together it is
// the one that stays, so that the cut ends exactly at the line's end; only a
// point at the very start stays too.
func appendEnd(dst []Vertex, first int, v Vertex) []Vertex {
	if n := len(dst); n > first && v.D <= dst[n-1].D+sameBreak {
		if dst[n-1].D > 0 {
			dst[n-1] = v
		}
		return dst
	}
	return append(dst, v)
}
