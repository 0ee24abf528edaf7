package terrain

import "math"

// enter is called when the line starts outside the hull. It finds the hull
// edge through which the line comes in, appends the gap before it and the break
// point on it, and returns the half-edge through which the line leaves that
// triangle. It returns a negative number when the cut is complete: the line
// stays outside, or it was moved and cut anew.
func (w *tinWalk) enter() int32 {
	i, ok := w.entry()
	if !ok {
		return w.miss(i)
	}
	w.cursor.rim = int32(i)
	h := w.rim[i]
	a, b := w.mesh.ends(h)
	if w.probe().side(a, b) > 0 || orient(a, b, w.to) < 0 {
		w.outside() // the hull lies behind the start, or beyond the end
		return none
	}
	left, _ := w.side(a)
	right, _ := w.side(b)
	v := w.crossing(h, left, right)
	if v.D > onEdge {
		if w.grazes(h, w.from) && w.again(h) {
			return none
		}
		w.gaps = append(w.gaps, Gap{0, v.D, true})
	} else {
		v.D = 0
	}
	w.dst = append(w.dst, v)
	if _, isLeft := w.side(w.mesh.at(w.mesh.org[prev(h)])); isLeft {
		return next(h)
	}
	return prev(h)
}

// entry looks for the hull edge that starts left of the line and ends right of
// it, from the last one on in both directions: the next section of a road
// enters near the one before. Without one, it returns the hull edge that starts
// nearest to the line.
func (w *tinWalk) entry() (i int, ok bool) {
	n := len(w.rim)
	base := int(w.cursor.rim) % n
	nearest, least := base, math.Inf(1)
	for k := range n {
		// 0, +1, −1, +2, −2 …: every edge once.
		j := base + (k+1)/2
		if k%2 == 0 {
			j = base - k/2
		}
		j = w.onRim(j % n)
		a, b := w.mesh.ends(w.rim[j])
		s, left := w.side(a)
		if left {
			if _, also := w.side(b); !also {
				return j, true
			}
		}
		if s = math.Abs(s); s < least || s == least && j < nearest {
			nearest, least = j, s
		}
	}
	return nearest, false
}

// miss handles a line that, moved, meets no inner point of the hull; i is the
// hull edge that starts nearest to it.
func (w *tinWalk) miss(i int) int32 {
	a, _ := w.mesh.ends(w.rim[i])
	switch s, _ := w.side(a); {
	case s == 0 && !w.leftward:
		w.leftward = true
		w.run()
	case math.Abs(s) <= onEdge/2*1e6*w.length && !w.settled:
		w.offset(s)
		w.run()
	default:
		w.outside()
	}
	return none
}

// outside ends a cut that lies outside all along, but for an end that may touch
// the hull.
func (w *tinWalk) outside() {
	if z, ok := w.levelAt(w.cursor, w.from); ok {
		w.dst = append(w.dst, Vertex{0, z})
	}
	if z, ok := w.levelAt(w.cursor, w.to); ok {
		w.dst = append(w.dst, Vertex{w.length, z})
	}
	w.gaps = append(w.gaps, Gap{0, w.length, true})
}

// leave is called when the line goes out through hull edge h at v.
func (w *tinWalk) leave(h int32, v Vertex) {
	w.cursor.triangle = h / 3
	switch {
	case w.length-v.D <= onEdge:
		w.dst = appendEnd(w.dst, w.first, Vertex{w.length, v.Z})
	case w.grazes(h, w.to) && w.again(h):
	default:
		w.gaps = append(w.gaps, Gap{v.D, w.length, true})
	}
}

// grazes reports whether a place is within rounding of the line of a hull edge:
// then the cut may run along that edge, in and out by the last bits of its ends.
func (w *tinWalk) grazes(h int32, p point) bool {
	a, b := w.mesh.ends(h)
	return math.Abs(orient(a, b, p)) <= onEdge/2*1000*math.Hypot(b.x-a.x, b.y-a.y)
}

// again drops what was cut, moves the line inward from a hull edge, and cuts once
// more; false if that was done already.
func (w *tinWalk) again(h int32) bool {
	if w.settled {
		return false
	}
	a, b := w.mesh.ends(h)
	w.dst, w.gaps = w.dst[:w.first], w.gaps[:w.firstGap]
	w.move(point{a.y - b.y, b.x - a.x})
	w.run()
	return true
}

// offset moves the line sideways towards a corner at side s.
func (w *tinWalk) offset(s float64) {
	left := turned(point{w.to.x - w.from.x, w.to.y - w.from.y})
	if s < 0 {
		left = point{-left.x, -left.y}
	}
	w.move(left)
}

// move shifts the line in a direction, far enough to lie inside if it lay within
// half of onEdge outside, and not so far that it leaves the width of the edge.
func (w *tinWalk) move(d point) {
	f := 0.75 * onEdge * 1000 / math.Hypot(d.x, d.y)
	w.from = point{w.from.x + f*d.x, w.from.y + f*d.y}
	w.to = point{w.to.x + f*d.x, w.to.y + f*d.y}
	w.settled = true
}
