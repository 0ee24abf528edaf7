package plot

import (
	"math"
	"slices"

	"gonum.org/v1/plot/vg"
)

// Plan is the alignment seen from above; X is easting, Y northing.
type Plan struct {
	ID, Title   string
	Line        []Pt
	Left, Right []Pt // catch points
	Limits      [][]Pt
	Stations    []Mark // named places on the line
	Ends        []Mark // ends of horizontal elements
	Barrels     [][2]Pt
	BarrelNames []string
	Scale       Scale // of the bar that shows how long things are
	Unit        string
	Length      func(m float64) string
}

// Draw draws the plan at one scale, turned so that the road runs from left to
// right; an arrow points north.
func (p Plan) Draw() (string, error) {
	a, b := p.Line[0], p.Line[len(p.Line)-1]
	turn := -math.Atan2(b.Y-a.Y, b.X-a.X)
	sin, cos := math.Sincos(turn)
	rot := func(q Pt) Pt { return Pt{cos*q.X - sin*q.Y, sin*q.X + cos*q.Y} }
	all := [][]Pt{rotated(rot, p.Line), rotated(rot, p.Left), rotated(rot, p.Right)}
	for _, l := range p.Limits {
		all = append(all, rotated(rot, l))
	}
	x0, x1 := math.Inf(1), math.Inf(-1)
	for _, l := range all {
		for _, q := range l {
			x0, x1 = math.Min(x0, q.X), math.Max(x1, q.X)
		}
	}
	lo, hi := bounds(all...)
	const w = 1060.0
	h := math.Max((hi-lo)/(x1-x0)*w, 60)
	s := newSheet(w+40, h+150)
	// One scale both ways, the road in the middle of the sheet.
	tall := h / w * (x1 - x0)
	mid := (lo + hi) / 2
	f := frame{x0, x1, mid - tall/2, mid + tall/2, 20, 60, w, h}
	pens := []pen{designPen, thinPen, thinPen}
	for i, l := range all {
		q := limitPen
		if i < len(pens) {
			q = pens[i]
		}
		s.line(q, f.path(l)...)
	}
	for i, c := range p.Barrels {
		u, v := rot(c[0]), rot(c[1])
		s.line(pen{3, nil, green}, f.at(u.X, u.Y), f.at(v.X, v.Y))
		top := f.py(math.Max(u.Y, v.Y))
		s.call(f.px((u.X+v.X)/2), top, f.px((u.X+v.X)/2), top+34, 9, p.BarrelNames[i])
	}
	p.marks(s, f, rot)
	p.north(s, turn)
	p.bar(s, f)
	return s.svg(p.ID, p.Title, "Plan of the alignment with catch lines, right of way and culverts, one scale both ways.")
}

func rotated(rot func(Pt) Pt, in []Pt) (out []Pt) {
	for _, q := range in {
		out = append(out, rot(q))
	}
	return out
}

func (p Plan) marks(s *sheet, f frame, rot func(Pt) Pt) {
	for _, m := range p.Stations {
		q := rot(Pt{m.X, m.Y})
		s.dot(black, f.at(q.X, q.Y), 2)
		s.call(f.px(q.X), f.py(q.Y), f.px(q.X), f.py(q.Y)-28, 8, m.Name)
	}
	for _, m := range p.Ends {
		q := rot(Pt{m.X, m.Y})
		s.line(thinPen, pt(f.px(q.X), f.py(q.Y)-8), pt(f.px(q.X), f.py(q.Y)+8))
		s.call(f.px(q.X), f.py(q.Y)+8, f.px(q.X), f.py(q.Y)+24, 8, m.Name)
	}
}

// call writes a name away from its place, with a hair line to it, so that it
// stays clear of the lines along the road; where another called name stands, it
// goes farther out. Names stay on the sheet.
func (s *sheet) call(x, y, tx, ty, size float64, name string) {
	half := s.width(size, name)/2 + 1
	at := math.Min(math.Max(tx, half), s.w-half)
	box, out := room{at - half, ty + 2, at + half, ty + 2 + size}, size+2
	if ty < y {
		box.bottom, box.top, out = ty-size, ty, -out
	}
	for slices.ContainsFunc(s.called, box.meets) {
		box.bottom, box.top, ty = box.bottom+out, box.top+out, ty+out
	}
	s.called = append(s.called, box)
	s.line(hairPen, pt(x, y), pt(tx, ty))
	s.text(size, middle, at, box.bottom, name)
}

// room is what a called name takes, in points.
type room struct{ left, bottom, right, top float64 }

func (l room) meets(o room) bool {
	return l.left < o.right && o.left < l.right && l.bottom < o.top && o.bottom < l.top
}

// bar draws the scale of the plan in its lower right corner: about a tenth of
// the sheet long, a round number of units.
func (p Plan) bar(s *sheet, f frame) {
	unit := p.Scale.Unit
	if unit == 0 {
		unit = 1
	}
	long := step((f.x1-f.x0)/unit, 10) * unit
	b := s.w - 40
	a, y := b-long/(f.x1-f.x0)*f.w, 14.0
	s.line(pen{1.4, nil, black}, pt(a, y), pt(b, y))
	for _, x := range []float64{a, (a + b) / 2, b} {
		s.line(thinPen, pt(x, y-3), pt(x, y+3))
	}
	s.text(8, middle, a, y+5, "0")
	s.text(8, middle, b, y+5, p.Length(long)+" "+p.Unit)
}

// north draws an arrow in the upper right corner, and says what the lines are.
func (p Plan) north(s *sheet, turn float64) {
	sin, cos := math.Sincos(turn)
	x, y := s.w-40, s.h-30
	tip := func(l, side float64) vg.Point {
		// north is (0, 1) before turning
		return pt(x+l*-sin+side*cos, y+l*cos+side*sin)
	}
	s.line(pen{1.4, nil, black}, tip(-16, 0), tip(16, 0))
	s.line(pen{1.4, nil, black}, tip(8, -5), tip(16, 0), tip(8, 5))
	t := tip(24, 0)
	s.text(9, middle, float64(t.X), float64(t.Y)-3, "N")
	s.text(8, left, 20, 8, "heavy: reference line; thin: catch lines; dash-dotted: right of way; short heavy bars: culverts")
}
