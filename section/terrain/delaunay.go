package terrain

import "math"

// builder inserts points one by one. The plane outside the hull is covered by
// ghost triangles, each a hull edge and the vertex ghost at infinity, so that a
// point outside the hull is inserted just as one inside.
type builder struct {
	mesh
	last   int32   // a real triangle near the last point
	stack  []int32 // half-edges still to look across
	cavity []int32 // triangles whose circle holds the new point
	border []int32 // half-edges around the cavity, seen from outside, anticlockwise
}

// ghost is the vertex at infinity.
const ghost int32 = -1

// delaunay returns the Delaunay triangulation of distinct sites; ok is false
// when all lie on one line. Points on a common circle are joined by the rule of
// fans.go, so the result depends on the sites alone.
func delaunay(sites []site) (m mesh, ok bool) {
	b := &builder{}
	b.pts = make([]point, len(sites))
	for i, s := range sites {
		b.pts[i] = point{s.x, s.y}
	}
	third := int32(2)
	for n := int32(len(sites)); third < n; third++ {
		if orient(b.pts[0], b.pts[1], b.pts[third]) != 0 {
			break
		}
	}
	if int(third) == len(sites) {
		return mesh{}, false
	}
	b.start(third)
	for p := range int32(len(sites)) {
		if p > 1 && p != third {
			b.insert(p)
		}
	}
	b.settle()
	return b.real(), true
}

// start makes the first triangle with its three ghosts.
func (b *builder) start(third int32) {
	u, v, w := int32(0), int32(1), third
	if orient(b.pts[u], b.pts[v], b.pts[w]) < 0 {
		u, v = v, u
	}
	n := 6 * len(b.pts) // 2n triangles, ghosts included
	b.org = append(make([]int32, 0, n), u, v, w, v, u, ghost, w, v, ghost, u, w, ghost)
	b.twin = append(make([]int32, 0, n), 3, 6, 9, 0, 11, 7, 1, 5, 10, 2, 8, 4)
}

// insert adds a point: the triangles whose circle holds it give way to a fan of
// triangles about it.
func (b *builder) insert(p int32) {
	b.dig(b.locate(b.pts[p]), b.pts[p])
	n := int32(len(b.org) / 3)
	b.cavity = append(b.cavity, n, n+1)
	b.org = append(b.org, 0, 0, 0, 0, 0, 0)
	b.twin = append(b.twin, 0, 0, 0, 0, 0, 0)
	for i, outer := range b.border {
		h := 3 * b.cavity[i]
		b.org[h], b.org[h+1], b.org[h+2] = b.org[next(outer)], b.org[outer], p
		b.link(h, outer)
		if b.org[h] != ghost && b.org[h+1] != ghost {
			b.last = h / 3
		}
	}
	before := b.cavity[len(b.border)-1]
	for i := range b.border {
		b.link(3*before+1, 3*b.cavity[i]+2)
		before = b.cavity[i]
	}
}

// locate walks from the last triangle to one that holds p, its edges included,
// or to the ghost of a hull edge beyond which p lies. The walk ends because
// each step lessens the power of p in the triangle's circle.
func (b *builder) locate(p point) int32 {
	h := 3 * b.last
	for step := 0; step < 3; step++ {
		u, v := b.ends(h)
		if orient(u, v, p) >= 0 {
			h = next(h)
			continue
		}
		h = b.twin[h]
		if b.isGhost(h / 3) {
			return h / 3
		}
		// The edge just crossed need not be looked at again.
		h, step = next(h), 0
	}
	return h / 3
}

func (b *builder) isGhost(t int32) bool {
	return b.org[3*t] == ghost || b.org[3*t+1] == ghost || b.org[3*t+2] == ghost
}

// dig collects the cavity of p, starting at a triangle in it. The cavity has
// no vertex inside, so looking across each edge once meets every triangle once,
// and in an order that yields the border as one anticlockwise ring.
func (b *builder) dig(t int32, p point) {
	b.cavity = append(b.cavity[:0], t)
	b.border = b.border[:0]
	b.stack = append(b.stack[:0], 3*t+2, 3*t+1, 3*t)
	for len(b.stack) > 0 {
		outer := b.twin[b.stack[len(b.stack)-1]]
		b.stack = b.stack[:len(b.stack)-1]
		if !b.conflicts(outer/3, p) {
			b.border = append(b.border, outer)
			continue
		}
		b.cavity = append(b.cavity, outer/3)
		b.stack = append(b.stack, prev(outer), next(outer))
	}
}

// conflicts reports whether the circle of a triangle strictly holds p. The
// circle of a ghost is the open half-plane beyond its hull edge, together with
// the inside of that edge.
func (b *builder) conflicts(t int32, p point) bool {
	u, v, w := b.org[3*t], b.org[3*t+1], b.org[3*t+2]
	switch ghost {
	case w:
		return b.beyond(u, v, p)
	case u:
		return b.beyond(v, w, p)
	case v:
		return b.beyond(w, u, p)
	}
	return incircle(b.pts[u], b.pts[v], b.pts[w], p) > 0
}

// beyond reports whether p lies left of the line u→v, or on it between them.
func (b *builder) beyond(u, v int32, p point) bool {
	a, c := b.pts[u], b.pts[v]
	switch o := orient(a, c, p); {
	case o != 0:
		return o > 0
	case a.x != c.x:
		return math.Min(a.x, c.x) < p.x && p.x < math.Max(a.x, c.x)
	}
	return math.Min(a.y, c.y) < p.y && p.y < math.Max(a.y, c.y)
}

// real returns the mesh without ghosts, triangles in their order.
func (b *builder) real() mesh {
	place := make([]int32, len(b.org)/3)
	n := int32(0)
	for t := range place {
		place[t] = none
		if !b.isGhost(int32(t)) {
			place[t] = n
			n++
		}
	}
	m := mesh{pts: b.pts, org: make([]int32, 0, 3*n), twin: make([]int32, 0, 3*n)}
	for h, v := range b.org {
		if place[h/3] == none {
			continue
		}
		m.org = append(m.org, v)
		if g := b.twin[h]; place[g/3] == none {
			m.twin = append(m.twin, none)
		} else {
			m.twin = append(m.twin, 3*place[g/3]+g%3)
		}
	}
	return m
}
