package terrain

import "math"

// A cut follows its line from triangle to triangle by the sides on which the
// corners lie. A corner exactly on the line counts as left of it, as if the
// line were moved to the right by an infinitely small step: then it meets edges
// only, never corners, and nothing special happens where it runs along an edge.
// Break points are computed with the true line, so those that come together in
// a corner are one point. Where the moved line misses the hull although the
// true one touches it, the line is moved to the left instead.

// cutLine is the line of a cut in local millimetres.
type cutLine struct {
	from, to point
	length   float64 // m
	leftward bool    // moved to the left: corners on it count as right
}

// side returns the signed distance of a corner, times the length of the line:
// positive left. exact is the value, left the answer with the line moved.
func (l *cutLine) side(p point) (exact float64, left bool) {
	s := orient(l.from, l.to, p)
	return s, s > 0 || s == 0 && !l.leftward
}

// along returns the distance in m of the foot of p, kept within the line.
func (l *cutLine) along(p point) float64 {
	dx, dy := l.to.x-l.from.x, l.to.y-l.from.y
	f := ((p.x-l.from.x)*dx + (p.y-l.from.y)*dy) / (dx*dx + dy*dy)
	return min(max(f, 0), 1) * l.length
}

// probe returns the start of the line moved as the line is.
func (l *cutLine) probe() *probe {
	return &probe{at: l.from, head: l.to, tail: l.from, leftward: l.leftward}
}

// Cut appends the break points along from→to. Beyond the hull every gap is
// outside.
func (t *Triangulation) Cut(c *Cursor, dst []Vertex, gaps []Gap, from, to XY) ([]Vertex, []Gap) {
	length := math.Hypot(to[0]-from[0], to[1]-from[1])
	if !onMap(from) || !onMap(to) {
		return dst, append(gaps, Gap{0, length, true})
	}
	l := cutLine{length: length}
	l.from.x, l.from.y = t.frame.local(from)
	l.to.x, l.to.y = t.frame.local(to)
	if length <= sameBreak || l.from == l.to {
		return cutPlace(t, c, dst, gaps, from, length)
	}
	w := tinWalk{Triangulation: t, cutLine: l, cursor: c, dst: dst, gaps: gaps, first: len(dst), firstGap: len(gaps)}
	w.run()
	return w.dst, w.gaps
}

// cutPlace is a cut of no length.
func cutPlace(s Surface, c *Cursor, dst []Vertex, gaps []Gap, at XY, length float64) ([]Vertex, []Gap) {
	if z, ok := s.Level(c, at); ok {
		return append(dst, Vertex{0, z}), gaps
	}
	return dst, append(gaps, Gap{0, length, true})
}

// tinWalk is one cut on its way.
type tinWalk struct {
	*Triangulation
	cutLine
	cursor          *Cursor
	dst             []Vertex
	gaps            []Gap
	first, firstGap int
	settled         bool // the line was already moved off the hull edge it grazed
}

// run cuts from the start of the line to its end.
func (w *tinWalk) run() {
	h, inside := w.locate(w.cursor.triangle, w.probe())
	w.cursor.triangle = h / 3
	if inside {
		w.dst = append(w.dst, Vertex{0, w.levelIn(h/3, w.from)})
		h = w.exit(h)
	} else if h = w.enter(); h < 0 {
		return
	}
	w.follow(h)
}

// exit returns the half-edge of a triangle through which the line leaves it: it
// starts right of the line and ends left. The triangle holds the start of the
// moved line, so there is one.
func (w *tinWalk) exit(h int32) int32 {
	for range 2 {
		_, a := w.side(w.mesh.at(w.mesh.org[h]))
		_, b := w.side(w.mesh.at(w.mesh.org[next(h)]))
		if !a && b {
			break
		}
		h = next(h)
	}
	return h
}

// follow goes on from triangle to triangle; h is the half-edge through which
// the line leaves the present one.
func (w *tinWalk) follow(h int32) {
	m := &w.mesh
	right, _ := w.side(m.at(m.org[h]))
	left, _ := w.side(m.at(m.org[next(h)]))
	for {
		v := w.crossing(h, right, left)
		if v.D >= w.length-sameBreak {
			w.finish(h/3, v)
			return
		}
		w.dst = appendVertex(w.dst, w.first, v)
		h = m.twin[h]
		if h < 0 {
			w.leave(w.rim[^h], v)
			return
		}
		// The new triangle lies between the edge just crossed, whose start is
		// left of the line, and its corner opposite.
		if s, isLeft := w.side(m.at(m.org[prev(h)])); isLeft {
			h, left = next(h), s
		} else {
			h, right = prev(h), s
		}
	}
}

// crossing returns the break point on a half-edge whose ends have the sides a
// and b.
func (w *tinWalk) crossing(h int32, a, b float64) Vertex {
	a, b = math.Abs(a), math.Abs(b)
	f := a / (a + b)
	p, q := w.mesh.ends(h)
	return Vertex{w.along(point{between(p.x, q.x, f), between(p.y, q.y, f)}), w.levelOnEdge(h, f)}
}

// finish appends the end of the line, which lies in triangle k or, within
// rounding, on the edge through which the line would leave it at v.
func (w *tinWalk) finish(k int32, v Vertex) {
	w.cursor.triangle = k
	if v.D < w.length {
		w.dst = appendEnd(w.dst, w.first, Vertex{w.length, v.Z})
		return
	}
	w.dst = appendEnd(w.dst, w.first, Vertex{w.length, w.levelIn(k, w.to)})
}
