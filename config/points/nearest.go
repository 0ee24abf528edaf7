package points

import (
	"cmp"
	"math"
	"slices"

	"sagcrest/section/terrain"
)

// nearest finds the point nearest in plan. Points are kept as a tree in one
// slice: the middle of a stretch parts it by easting or northing in turn, lower
// ones before it and higher ones behind (Bentley 1975). Building sorts each
// stretch, so that no order of points can make it slow.
type nearest struct{ points []terrain.Point }

// leaf is the length of a stretch below which it is searched one by one.
const leaf = 8

// newNearest takes points over. Of those at one place the one with the least
// level, either side of zero, is kept.
func newNearest(points []terrain.Point) nearest {
	slices.SortFunc(points, func(a, b terrain.Point) int {
		return cmp.Or(cmp.Compare(a.E, b.E), cmp.Compare(a.N, b.N), compareLevels(a, b))
	})
	points = slices.CompactFunc(points, func(a, b terrain.Point) bool { return a.E == b.E && a.N == b.N })
	part(points, 1) // they are in order of easting already
	return nearest{points}
}

// compareLevels orders by distance of the level from zero, then by row.
func compareLevels(a, b terrain.Point) int {
	return cmp.Or(cmp.Compare(math.Abs(a.Z), math.Abs(b.Z)), cmp.Compare(a.Row, b.Row))
}

// axis returns a coordinate: easting at even depths of the tree.
func axis(p terrain.Point, depth int) float64 {
	if depth%2 == 0 {
		return p.E
	}
	return p.N
}

// part orders the two halves of a stretch whose middle is in place; depth is
// that of the halves.
func part(points []terrain.Point, depth int) {
	if len(points) <= leaf {
		return
	}
	mid := len(points) / 2
	for _, half := range [][]terrain.Point{points[:mid], points[mid+1:]} {
		slices.SortFunc(half, func(a, b terrain.Point) int {
			return cmp.Or(cmp.Compare(axis(a, depth), axis(b, depth)), cmp.Compare(axis(a, depth+1), axis(b, depth+1)))
		})
		part(half, depth+1)
	}
}

// to returns the point nearest to p. Of those equally near the one whose level
// is nearest to zero is taken, so that 0.00 is ground where it may be.
func (t nearest) to(p terrain.Point) (terrain.Point, bool) {
	s := search{from: p, square: math.Inf(1)}
	s.stretch(t.points, 0)
	return s.best, !math.IsInf(s.square, 1)
}

// search is one search: the best point so far and the square of its distance.
type search struct {
	from, best terrain.Point
	square     float64
}

func (s *search) stretch(points []terrain.Point, depth int) {
	if len(points) <= leaf {
		for _, q := range points {
			s.offer(q)
		}
		return
	}
	mid := len(points) / 2
	s.offer(points[mid])
	near, far := points[:mid], points[mid+1:]
	d := axis(s.from, depth) - axis(points[mid], depth)
	if d > 0 {
		near, far = far, near
	}
	s.stretch(near, depth+1)
	if d*d <= s.square {
		s.stretch(far, depth+1)
	}
}

func (s *search) offer(q terrain.Point) {
	e, n := q.E-s.from.E, q.N-s.from.N
	d := e*e + n*n
	if d < s.square || d == s.square && compareLevels(q, s.best) < 0 {
		s.best, s.square = q, d
	}
}
