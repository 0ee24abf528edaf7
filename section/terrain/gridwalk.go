package terrain

import "math"

// Cut appends the break points along from→to.
func (g *Grid) Cut(c *Cursor, dst []Vertex, gaps []Gap, from, to XY) ([]Vertex, []Gap) {
	length := math.Hypot(to[0]-from[0], to[1]-from[1])
	if !onMap(from) || !onMap(to) {
		return dst, append(gaps, Gap{0, length, true})
	}
	if length <= sameBreak {
		return cutPlace(g, c, dst, gaps, from, length)
	}
	w := gridWalk{Grid: g, gridLine: g.line(from, to), dst: dst, gaps: gaps, first: len(dst), blind: true}
	if z, ok := g.Level(c, from); ok {
		w.dst = append(w.dst, Vertex{0, z})
	}
	out := w.run()
	z, ok := g.Level(c, to)
	w.finish(out, z, ok)
	return w.dst, w.gaps
}

// gridWalk is one cut on its way. While blind, no ground is known since D =
// lost.
type gridWalk struct {
	*Grid
	gridLine
	dst   []Vertex
	gaps  []Gap
	first int
	blind bool
	lost  float64
}

// run cuts from the start of the line, or the place where it enters the grid,
// to its end or the place where it leaves, which is returned.
func (w *gridWalk) run() float64 {
	in, out := math.Max(w.in, 0), math.Min(w.out, w.length)
	if in < out {
		m := w.newMarch(w.gridLine, in, out)
		for m.at < m.end {
			d := m.next()
			// Shorter pieces are rounding where a line passes through a corner.
			if d-m.at > sameBreak || m.at == in {
				w.piece(&m, d)
			}
			m.advance(d)
		}
	}
	return out
}

// piece appends the piece of the line from m.at to d, which lies in one
// triangle of square m.i, m.j.
func (w *gridWalk) piece(m *march, d float64) {
	i, j := m.i, m.j
	if w.void != nil {
		mid := (m.at + d) / 2
		var ok bool
		if i, j, ok = w.square(m.u0+m.du*mid, m.v0+m.dv*mid, i, j); !ok {
			w.lose(m.at)
			return
		}
	}
	if w.blind {
		w.find(i, j, m.at)
	}
	w.dst = appendVertex(w.dst, w.first, w.vertex(i, j, d))
}

// vertex returns the break point at d, seen from a square.
func (w *gridWalk) vertex(i, j int, d float64) Vertex {
	return Vertex{d, w.level(i, j, w.u0+w.du*d, w.v0+w.dv*d)}
}

// find ends a gap at d, in a known square.
func (w *gridWalk) find(i, j int, d float64) {
	w.blind = false
	if d-w.lost <= onEdge {
		d = w.lost // no gap, but rounding
	} else {
		w.gaps = append(w.gaps, Gap{w.lost, d, w.lost == 0 && !w.knownOn(w.in, math.Min(w.out, 0))})
	}
	w.dst = appendVertex(w.dst, w.first, w.vertex(i, j, d))
}

// lose begins a gap at d, unless one is open.
func (w *gridWalk) lose(d float64) {
	if !w.blind {
		w.blind, w.lost = true, d
	}
}

// finish ends the cut, which left the grid at out or ends on it; z is the level
// at the end of the line if that is known.
func (w *gridWalk) finish(out, z float64, known bool) {
	if !w.blind && w.length-out > onEdge {
		w.lose(out)
	}
	if w.blind && w.length-w.lost > onEdge {
		outside := !w.knownOn(math.Max(w.in, w.length), w.out)
		if w.lost == 0 {
			outside = outside || !w.knownOn(w.in, math.Min(w.out, 0))
		}
		w.gaps = append(w.gaps, Gap{w.lost, w.length, outside})
	} else if n := len(w.dst); !known && n > w.first {
		z, known = w.dst[n-1].Z, true // the end lies off the ground by rounding
	}
	if known {
		w.dst = appendEnd(w.dst, w.first, Vertex{w.length, z})
	}
}

// knownOn reports whether ground is known anywhere on a stretch of the line.
func (w *gridWalk) knownOn(from, to float64) bool {
	if !(to-from > onEdge) {
		return false
	}
	if w.void == nil {
		return true
	}
	for m := w.newMarch(w.gridLine, from, to); m.at < m.end; {
		d := m.next()
		if d-m.at > sameBreak && w.known(m.i, m.j) {
			return true
		}
		m.advance(d)
	}
	return false
}
