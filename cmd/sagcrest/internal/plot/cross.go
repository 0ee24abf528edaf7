package plot

import (
	"fmt"
	"math"

	"gonum.org/v1/plot/vg"
)

// Cross is one cross section, looking up-station.
type Cross struct {
	Title, Below string
	// Ground, Stripped, Finished and Earthwork run from left to right.
	Ground, Stripped, Finished, Earthwork []Pt
	Catches                               []Catch
}

// Catch is a catch point; Below sets its figures under the ground.
type Catch struct {
	Mark
	Below bool
}

// CrossSheet lays sections out in rows, all at one scale.
type CrossSheet struct {
	ID, Title string
	Across    int
	Sections  []Cross
	Unit      string
	Scale     Scale // of offsets
	Offset    func(m float64) string
}

// Draw draws the sheet. Lengths and heights have one scale, the same for every
// section of the sheet.
func (c CrossSheet) Draw() (string, error) {
	const cellW, margin, head = 360.0, 10.0, 26.0
	const foot = 34.0 // below the lowest ground: axis, its figures, and a line of words
	half, tall := 5.0, 2.0
	for _, x := range c.Sections {
		for _, p := range x.Finished {
			half = math.Max(half, math.Abs(p.X)+2)
		}
	}
	for _, x := range c.Sections {
		lo, hi := bounds(x.Finished, x.Earthwork, clip(x.Ground, -half, half))
		tall = math.Max(tall, hi-lo)
	}
	scale := (cellW - 2*margin) / (2 * half) // points per metre
	cellH := tall*scale + 2*margin + head + foot
	rows := (len(c.Sections) + c.Across - 1) / c.Across
	s := newSheet(cellW*float64(c.Across), cellH*float64(rows)+16)
	for i, x := range c.Sections {
		col, row := i%c.Across, i/c.Across
		lo, _ := bounds(x.Finished, x.Earthwork, clip(x.Ground, -half, half))
		f := frame{-half, half, lo, lo + tall, float64(col)*cellW + margin, s.h - 16 - float64(row+1)*cellH + margin + foot, cellW - 2*margin, tall * scale}
		x.draw(s, f, axis{c.Scale, c.Offset})
	}
	s.text(8, left, margin, s.h-10, fmt.Sprintf("looking up-station; one scale for lengths and heights, offsets in %s, catch points as offset / level; ground dashed, stripped ground dotted, finished surface heavy, earthwork line dash-dotted; cut dotted, fill with level lines", c.Unit))
	return s.svg(c.ID, c.Title, "Cross sections with ground, finished surface and earthwork line. The table of sections holds areas and catch points.")
}

// clip keeps the part of a line between two abscissae.
func clip(line []Pt, a, b float64) (out []Pt) {
	if y, ok := on(line, a); ok {
		out = append(out, Pt{a, y})
	}
	for _, p := range line {
		if a < p.X && p.X < b {
			out = append(out, p)
		}
	}
	if y, ok := on(line, b); ok {
		out = append(out, Pt{b, y})
	}
	return out
}

func (x Cross) draw(s *sheet, f frame, offsets axis) {
	const axis = 10 // points below the lowest ground, clear of the figures there
	f0 := f.bottom - axis
	s.line(hairPen, pt(f.left, f0), pt(f.left+f.w, f0))
	var ticks vg.Path
	marks := offsets.Marks(f.x0, f.x1, 6)
	for _, o := range marks {
		ticks.Move(pt(f.px(o), f0))
		ticks.Line(pt(f.px(o), f0-3))
		s.text(6, middle, f.px(o), f0-9, offsets.label(o))
	}
	s.strokes(hairPen, ticks)
	s.line(pen{0.35, nil, grey}, pt(f.px(0), f.bottom), pt(f.px(0), f.bottom+f.h))
	if n := len(x.Earthwork); n > 0 {
		s.earth(f, x.Stripped, x.Earthwork, x.Earthwork[0].X, x.Earthwork[n-1].X)
	}
	s.line(groundPen, f.path(clip(x.Ground, f.x0, f.x1))...)
	s.line(strippedPen, f.path(clip(x.Stripped, f.x0, f.x1))...)
	s.line(earthPen, f.path(x.Earthwork)...)
	s.line(pen{1.4, nil, black}, f.path(x.Finished)...)
	for _, c := range x.Catches {
		q := f.at(c.X, c.Y)
		s.dot(black, q, 1.8)
		// Above the ground beside a cut, below it beside a fill: both stay clear
		// of the slope.
		a, dy := right, 5.0
		if c.X < 0 {
			a = left
		}
		if c.Below {
			dy = -10
		}
		s.text(6.5, a, float64(q.X), float64(q.Y)+dy, c.Name)
	}
	s.text(9, left, f.left, f.bottom+f.h+8, x.Title)
	s.text(7, left, f.left, f0-19, x.Below)
}
