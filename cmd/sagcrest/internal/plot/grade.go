package plot

import (
	"fmt"
	"math"
	"slices"
)

// Mark is a thing at a place of the long profile.
type Mark struct {
	X, Y float64
	Name string
}

// Turn is a low or high point.
type Turn struct {
	Mark
	Low bool
}

// Window is an obstacle over or under the road.
type Window struct {
	X0, X1, Y0, Y1 float64
	Name           string
}

// Grade is the long profile and, below it on the same axis, the mass diagram.
type Grade struct {
	ID, Title, LevelUnit string
	Label                func(x float64) string // station label
	Level                func(y float64) string
	Stations, Levels     Scale
	Ground, Line         []Pt
	Spans                []Span // tangents and curves in order, from end to end
	PVIs, Ends           []Mark // points of intersection; ends of curves
	Turns                []Turn // low and high points of the centre line
	Culverts             []Mark
	Windows              []Window
	Mass                 []Pt
	MassTitle            string
	Volume               func(v float64) string
	Volumes              Scale
	Balance              []Mark
}

// Draw draws the grade line.
func (g Grade) Draw() (string, error) {
	h := 330 + bandHeight
	if len(g.Mass) > 0 {
		h += 170
	}
	s := newSheet(1100, h)
	f := g.frame(h)
	s.grid(f, axis{g.Stations, g.Label}, axis{g.Levels, g.Level})
	s.band(f, g.Spans)
	s.earth(f, g.Ground, g.Line, f.x0, f.x1)
	s.line(groundPen, f.path(g.Ground)...)
	s.line(designPen, f.path(g.Line)...)
	g.names(s, f)
	g.marks(s, f)
	s.text(9, left, f.left, h-12, fmt.Sprintf("levels in %s, heights %.0f times exaggerated; cut dotted, fill with level lines", g.LevelUnit, f.exaggeration()))
	if len(g.Mass) > 0 {
		g.mass(s, f)
	}
	return s.svg(g.ID, g.Title, "Long profile with ground, grade line, its curves, low and high points, culverts and clearances; below it the mass diagram. The tables of the same chapter hold the figures.")
}

func (g Grade) frame(h float64) frame {
	lo, hi := bounds(g.Ground, g.Line)
	for _, w := range g.Windows {
		hi = math.Max(hi, math.Max(w.Y0, w.Y1))
	}
	for _, p := range g.PVIs {
		lo, hi = math.Min(lo, p.Y), math.Max(hi, p.Y)
	}
	pad := (hi - lo) * 0.12
	x0, x1 := g.Line[0].X, g.Line[len(g.Line)-1].X
	return frame{x0, x1, lo - pad, hi + 2*pad, 50, h - 300, 1025, 270}
}

// names labels the two lines where they lie far apart and no mark stands near.
func (g Grade) names(s *sheet, f frame) {
	best, at := 0.0, g.Line[0].X
	for i := 1; i < 40; i++ {
		x := f.x0 + (f.x1-f.x0)*float64(i)/40
		y, okG := on(g.Ground, x)
		z, okD := on(g.Line, x)
		if okG && okD && math.Abs(y-z) > best && g.clearAt(f, x) {
			best, at = math.Abs(y-z), x
		}
	}
	y, _ := on(g.Ground, at)
	z, _ := on(g.Line, at)
	up, down := 6.0, -12.0
	if y > z {
		up, down = down, up
	}
	s.text(9, middle, f.px(at), f.py(z)+up, "grade line")
	s.text(9, middle, f.px(at), f.py(y)+down, "ground")
}

// clearAt reports whether no mark stands within the width of a word.
func (g Grade) clearAt(f frame, x float64) bool {
	const word = 60.0 // points
	near := func(m Mark) bool { return math.Abs(f.px(m.X)-f.px(x)) < word }
	return !slices.ContainsFunc(g.PVIs, near) && !slices.ContainsFunc(g.Culverts, near) &&
		!slices.ContainsFunc(g.Turns, func(t Turn) bool { return near(t.Mark) })
}

func (g Grade) marks(s *sheet, f frame) {
	for _, e := range g.Ends {
		p := f.at(e.X, e.Y)
		s.line(thinPen, pt(float64(p.X), float64(p.Y)-5), pt(float64(p.X), float64(p.Y)+5))
	}
	for _, p := range g.PVIs {
		q := f.at(p.X, p.Y)
		s.triangle(float64(q.X), float64(q.Y))
		dy := 8.0
		if z, ok := on(g.Line, p.X); ok && z > p.Y {
			dy = -12 // of a sag: away from the grade line
		}
		s.text(8, middle, float64(q.X), float64(q.Y)+dy, p.Name)
	}
	for _, t := range g.Turns {
		q := f.at(t.X, t.Y)
		s.dot(black, q, 2.4)
		// Low points are named above the grade line, high points below it, where
		// nothing else stands.
		end, text := f.bottom+4, f.bottom+6
		if t.Low {
			end = f.bottom + f.h - 4
			text = end - 2 - s.width(8, t.Name)
		}
		s.line(hairPen, q, pt(float64(q.X), end))
		s.upright(8, float64(q.X)-5, text, t.Name)
	}
	for _, c := range g.Culverts {
		q := f.at(c.X, c.Y)
		s.box(float64(q.X), float64(q.Y), 4)
		s.text(8, left, float64(q.X)+6, float64(q.Y)-8, "culvert "+c.Name)
	}
	for _, w := range g.Windows {
		a, b := f.at(w.X0, w.Y0), f.at(w.X1, w.Y1)
		s.line(pen{2.5, nil, green}, a, b)
		s.text(8, middle, float64(a.X+b.X)/2, math.Max(float64(a.Y), float64(b.Y))+6, w.Name)
	}
}

// triangle marks a point of intersection.
func (s *sheet) triangle(x, y float64) {
	s.line(thinPen, pt(x-4, y-3), pt(x+4, y-3), pt(x, y+4), pt(x-4, y-3))
}

// box marks a barrel that is passed square.
func (s *sheet) box(x, y, r float64) {
	s.line(barrelPen, pt(x-r, y-r), pt(x+r, y-r), pt(x+r, y+r), pt(x-r, y+r), pt(x-r, y-r))
}

// mass draws the mass diagram below the profile.
func (g Grade) mass(s *sheet, f frame) {
	lo, hi := bounds(g.Mass)
	lo, hi = math.Min(lo, 0), math.Max(hi, 0)
	pad := math.Max((hi-lo)*0.15, 1)
	m := frame{f.x0, f.x1, lo - pad, hi + pad, f.left, 26, f.w, 130}
	s.grid(m, axis{g.Stations, g.Label}, axis{g.Volumes, g.Volume})
	s.line(pen{1, nil, black}, m.at(m.x0, 0), m.at(m.x1, 0))
	s.line(designPen, m.path(g.Mass)...)
	s.text(9, left, m.left, m.bottom+m.h+5, g.MassTitle)
	for _, b := range g.Balance {
		q := m.at(b.X, 0)
		s.dot(black, q, 2.4)
		y := float64(q.Y) + 4
		if y+s.width(7, b.Name) > m.bottom+m.h {
			y = float64(q.Y) - 4 - s.width(7, b.Name)
		}
		s.upright(7, math.Min(float64(q.X)+8, m.left+m.w-2), y, b.Name)
	}
}
