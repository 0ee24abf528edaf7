package terrain

import "math"

// A line crosses three families of equally spaced parallels on a grid: the
// columns and rows of centres and the diagonals between them. So its break
// points are three arithmetic sequences, merged.

// march is a line on a grid, split where it may break. In units of squares from
// the north-west centre, u counts east and v south.
type march struct {
	u0, v0, du, dv float64 // u = u0 + du·D, D in metres along the line
	at, end        float64 // where the march is, and where it ends
	col, row       family
	diag           family
	i, j           int // the square from at to the next break
	cols, rows     int // of squares
}

// family is a sequence of parallels that the line will cross: the next one has
// the given number and lies at D = next.
type family struct {
	number, step int
	w0, per      float64 // D = (number − w0)·per
	next         float64
}

// parallel is how little, in squares, a line may come nearer to a parallel from
// its start to its end and still count as parallel: less is rounding.
const parallel = 1e-11

// familyOf returns the parallels w = whole number that w = w0 + dw·D meets
// between at and end; below is the whole number below its first stretch.
func familyOf(w0, dw, at, end float64, below int) family {
	f := family{w0: w0, next: math.Inf(1)}
	switch {
	case math.Abs(dw)*(end-at) < parallel:
		return f
	case dw > 0:
		f.number, f.step = below, 1
	default:
		f.number, f.step = below+1, -1
	}
	f.per = 1 / dw
	f.pass()
	return f
}

// pass goes on to the next parallel.
func (f *family) pass() {
	f.number += f.step
	f.next = (float64(f.number) - f.w0) * f.per
}

// newMarch returns the march from D = from to D = to, both on the grid.
func (g *Grid) newMarch(l gridLine, from, to float64) march {
	m := march{
		u0: l.u0, v0: l.v0, du: l.du, dv: l.dv, at: from, end: to,
		cols: g.cols - 1, rows: g.rows - 1,
	}
	// A line that begins on the grid's edge may begin outside by rounding. Its
	// first square is on the grid, and its first parallel that square's.
	m.i = min(max(below(l.u0+l.du*from, l.du), 0), m.cols-1)
	m.j = min(max(below(l.v0+l.dv*from, l.dv), 0), m.rows-1)
	m.col = familyOf(l.u0, l.du, from, to, m.i)
	m.row = familyOf(l.v0, l.dv, from, to, m.j)
	w0, dw := l.u0-l.v0, l.du-l.dv
	m.diag = familyOf(w0, dw, from, to, below(w0+dw*from, dw))
	return m
}

// below returns the whole number below the stretch that begins at w.
func below(w, dw float64) int {
	if dw < 0 {
		return int(math.Ceil(w)) - 1
	}
	return int(math.Floor(w))
}

// next returns the end of the piece that begins at m.at in the square m.i, m.j.
func (m *march) next() float64 {
	// Plain comparisons: math.Min, which minds NaN, takes twice as long.
	d := m.end
	if m.col.next < d {
		d = m.col.next
	}
	if m.row.next < d {
		d = m.row.next
	}
	if m.diag.next < d {
		d = m.diag.next
	}
	return d
}

// advance goes on to d, the end of the piece. Rounding may leave the square by
// one at the edge of the grid; it is held there.
func (m *march) advance(d float64) {
	m.at = d
	if m.col.next <= d {
		m.i = min(max(m.i+m.col.step, 0), m.cols-1)
		m.col.pass()
	}
	if m.row.next <= d {
		m.j = min(max(m.j+m.row.step, 0), m.rows-1)
		m.row.pass()
	}
	if m.diag.next <= d {
		m.diag.pass()
	}
}

// gridLine is a cut line in units of squares, and the stretch of it on the grid.
type gridLine struct {
	u0, v0, du, dv float64
	length         float64
	in, out        float64 // D where it enters and leaves; in > out: never
}

// line returns the cut line from→to.
func (g *Grid) line(from, to XY) gridLine {
	u0, v0 := g.squares(from)
	u1, v1 := g.squares(to)
	l := gridLine{u0: u0, v0: v0, length: math.Hypot(to[0]-from[0], to[1]-from[1])}
	l.du, l.dv = (u1-u0)/l.length, (v1-v0)/l.length
	l.in, l.out = math.Inf(-1), math.Inf(1)
	l.clip(u0, l.du, float64(g.cols-1))
	l.clip(v0, l.dv, float64(g.rows-1))
	return l
}

// squares returns a place in units of squares. One within onEdge of the grid's
// edge is put on it.
func (g *Grid) squares(at XY) (u, v float64) {
	u = onto((at[0]-g.west)/g.cellE, float64(g.cols-1), onEdge/g.cellE)
	v = onto((g.north-at[1])/g.cellN, float64(g.rows-1), onEdge/g.cellN)
	return u, v
}

func onto(w, last, slack float64) float64 {
	switch {
	case w < 0 && w >= -slack:
		return 0
	case w > last && w <= last+slack:
		return last
	}
	return w
}

// clip narrows the line to 0 ≤ w ≤ last, w = w0 + dw·D.
func (l *gridLine) clip(w0, dw, last float64) {
	if dw == 0 {
		if w0 < 0 || w0 > last {
			l.in, l.out = math.Inf(1), math.Inf(-1)
		}
		return
	}
	a, b := (0-w0)/dw, (last-w0)/dw
	l.in = math.Max(l.in, math.Min(a, b))
	l.out = math.Min(l.out, math.Max(a, b))
}

// Level returns the level at a place.
func (g *Grid) Level(_ *Cursor, at XY) (z float64, ok bool) {
	if !onMap(at) {
		return 0, false
	}
	u, v := g.squares(at)
	if u < 0 || v < 0 || u > float64(g.cols-1) || v > float64(g.rows-1) {
		return 0, false
	}
	i, j, ok := g.square(u, v, min(int(u), g.cols-2), min(int(v), g.rows-2))
	if !ok {
		return 0, false
	}
	return g.level(i, j, u, v), true
}

// square returns the square i, j of a place if it is known, else a known
// neighbour on whose edge the place lies.
func (g *Grid) square(u, v float64, i, j int) (si, sj int, ok bool) {
	if g.known(i, j) {
		return i, j, true
	}
	for _, b := range touching(v, j, onEdge/g.cellN) {
		for _, a := range touching(u, i, onEdge/g.cellE) {
			if g.known(a, b) {
				return a, b, true
			}
		}
	}
	return 0, 0, false
}

// touching returns square k and the neighbour across the edge that w lies on;
// without one, k again.
func touching(w float64, k int, slack float64) [2]int {
	switch f := w - float64(k); {
	case f <= slack:
		return [2]int{k, k - 1}
	case f >= 1-slack:
		return [2]int{k, k + 1}
	}
	return [2]int{k, k}
}

// level returns the level at u, v in the plane of the square's triangle.
func (g *Grid) level(i, j int, u, v float64) float64 {
	x, y := fraction(u-float64(i)), fraction(v-float64(j))
	k := j*g.cols + i
	nw, se := g.z[k], g.z[k+g.cols+1]
	if x >= y { // north-east of the diagonal
		ne := g.z[k+1]
		return nw + (ne-nw)*x + (se-ne)*y
	}
	sw := g.z[k+g.cols]
	return nw + (sw-nw)*y + (se-sw)*x
}

// fraction keeps a fraction within 0 and 1.
func fraction(f float64) float64 {
	if f < 0 {
		return 0
	}
	if f > 1 {
		return 1
	}
	return f
}
