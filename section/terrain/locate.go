package terrain

import "math"

// probe is a place that never lies on an edge: in thought it is moved from at
// by an infinitely small step to the right of a direction (to the left if
// leftward), and by an infinitely smaller one along it. So exactly one triangle
// holds it, and no result depends on where a walk began.
type probe struct {
	at         point
	head, tail point // the direction is head − tail
	leftward   bool
}

// side returns a number with the sign of the side of the line a→b on which the
// moved place lies: positive left. It is 0 only if head equals tail.
func (p *probe) side(a, b point) float64 {
	if s := orient(a, b, p.at); s != 0 {
		return s
	}
	// A step δ changes the side by (b − a) × δ. With δ right of the direction d
	// that is −(b − a)·d; a scalar product is a cross product with d turned.
	s := -cross(b, a, turned(p.head), turned(p.tail))
	if p.leftward {
		s = -s
	}
	if s == 0 {
		s = cross(b, a, p.head, p.tail)
	}
	return s
}

// turned returns p turned left by a right angle.
func turned(p point) point { return point{-p.y, p.x} }

// locate walks from a triangle to the one that holds the probe. If the probe
// lies outside the hull it returns ok false and a half-edge on the hull beyond
// which it lies, else the first half-edge of the triangle. The walk ends since
// each step lessens the power of the place in the circle of the triangle, or
// stays within a fan, whose triangles it meets once.
func (t *Triangulation) locate(start int32, p *probe) (h int32, ok bool) {
	m := &t.mesh
	if int(start) >= len(m.org)/3 {
		start = 0 // a cursor that comes from another surface
	}
	h = 3 * start
	for looked := 0; looked < 3; looked++ {
		if a, b := m.ends(h); p.side(a, b) >= 0 {
			h = next(h)
			continue
		}
		if m.twin[h] < 0 {
			return h, false
		}
		h, looked = next(m.twin[h]), 0
	}
	return h, true
}

// Level returns the level at a place. On an edge or a corner it is the same
// from every side, to the last bit.
func (t *Triangulation) Level(c *Cursor, at XY) (z float64, ok bool) {
	if !onMap(at) {
		return 0, false
	}
	x, y := t.frame.local(at)
	return t.levelAt(c, point{x, y})
}

// levelAt is Level in local coordinates.
func (t *Triangulation) levelAt(c *Cursor, p point) (z float64, ok bool) {
	h, inside := t.locate(c.triangle, &probe{at: p, head: point{0, 1}})
	c.triangle = h / 3
	if inside {
		return t.levelIn(h/3, p), true
	}
	return t.levelOnRim(h, p)
}

// onMap reports whether a place is a pair of numbers that exact arithmetic can
// take.
func onMap(at XY) bool { return math.Abs(at[0]) <= 10*farthest && math.Abs(at[1]) <= 10*farthest }

// levelIn returns the level of the plane through a triangle at a place in it.
func (t *Triangulation) levelIn(k int32, p point) float64 {
	u, v, w := t.mesh.org[3*k], t.mesh.org[3*k+1], t.mesh.org[3*k+2]
	a, b, c := t.mesh.at(u), t.mesh.at(v), t.mesh.at(w)
	switch p {
	case a:
		return t.z[u]
	case b:
		return t.z[v]
	case c:
		return t.z[w]
	}
	ab, ac, ap := point{b.x - a.x, b.y - a.y}, point{c.x - a.x, c.y - a.y}, point{p.x - a.x, p.y - a.y}
	area := product(ab, ac)
	return t.z[u] + (t.z[v]-t.z[u])*(product(ap, ac)/area) + (t.z[w]-t.z[u])*(product(ab, ap)/area)
}

// product returns u × v to the last bit or two, however nearly parallel they
// are: triangles along the hull may be very thin. The error of the second
// product is added back (from memory: Kahan's difference of products).
func product(u, v point) float64 {
	w := float64(u.y * v.x)
	err := math.FMA(-u.y, v.x, w)
	return math.FMA(u.x, v.y, -w) + err
}

// levelOnRim returns the level at a place outside the hull if it lies within
// onEdge of it. It starts from a hull edge that faces the place and goes along
// the hull while the place lies beyond that end: distance to a convex hull
// falls to its least and then rises.
func (t *Triangulation) levelOnRim(h int32, p point) (z float64, ok bool) {
	i, step := int(^t.mesh.twin[h]), 0
	for range t.rim {
		f, away := t.alongEdge(t.rim[i], p)
		switch {
		case f < 0 && step <= 0:
			step = -1
		case f > 1 && step >= 0:
			step = 1
		default:
			return t.levelOnEdge(t.rim[i], min(max(f, 0), 1)), away <= onEdge*1000
		}
		i = t.onRim(i + step)
	}
	return 0, false
}

// onRim wraps a place in the list of hull edges.
func (t *Triangulation) onRim(i int) int { return (i + len(t.rim)) % len(t.rim) }

// alongEdge returns how far along a half-edge the foot of p lies, 0 at its
// start and 1 at its end, and the distance in mm from p to the edge.
func (t *Triangulation) alongEdge(h int32, p point) (f, away float64) {
	a, b := t.mesh.ends(h)
	dx, dy := b.x-a.x, b.y-a.y
	f = ((p.x-a.x)*dx + (p.y-a.y)*dy) / (dx*dx + dy*dy)
	g := min(max(f, 0), 1)
	return f, math.Hypot(p.x-a.x-g*dx, p.y-a.y-g*dy)
}

// levelOnEdge returns the level at a fraction of a half-edge.
func (t *Triangulation) levelOnEdge(h int32, f float64) float64 {
	za, zb := t.z[t.mesh.org[h]], t.z[t.mesh.org[next(h)]]
	return between(za, zb, f)
}

// between returns the value at fraction f of the way from a to b, exact at both
// ends.
func between(a, b, f float64) float64 {
	if f > 0.5 {
		return b - (b-a)*(1-f)
	}
	return a + (b-a)*f
}
