package plot

import (
	"fmt"
	"math"

	"gonum.org/v1/plot/vg"
)

// Barrel is a culvert drawn along its axis, from left to right of the road.
type Barrel struct {
	ID, Title, Unit       string
	Ground, Surface       []Pt // original ground; finished surface
	Datum                 []Pt // between the hinges
	Invert, Soffit, Crown []Pt // inside bottom, inside top, outside of the crown
	Hinges                [2]float64
	Least                 Pt // on the crown, at the least cover
	Cover, Required       float64
	CoverWords            string
	LeftWords, RightWords string
	Level, Length         func(m float64) string
	Scale                 Scale // of both axes
}

// Draw draws the culvert.
func (b Barrel) Draw() (string, error) {
	s := newSheet(900, 330)
	x0, x1 := b.Invert[0].X, b.Invert[len(b.Invert)-1].X
	pad := (x1 - x0) * 0.08
	lo, hi := bounds(b.Surface, b.Invert, clip(b.Ground, x0-pad, x1+pad))
	v := (hi - lo) * 0.12
	f := frame{x0 - pad, x1 + pad, lo - v, hi + v, 50, 44, 835, 250}
	s.grid(f, axis{b.Scale, b.Length}, axis{b.Scale, b.Level})
	b.zone(s, f)
	b.need(s, f)
	s.line(groundPen, f.path(clip(b.Ground, f.x0, f.x1))...)
	s.line(designPen, f.path(b.Surface)...)
	s.line(earthPen, f.path(b.Datum)...)
	s.line(barrelPen, f.path(b.Invert)...)
	s.line(pen{0.8, nil, green}, f.path(b.Soffit)...)
	s.line(barrelPen, f.path(b.Crown)...)
	s.line(barrelPen, f.at(x0, b.Invert[0].Y), f.at(x0, b.Crown[0].Y))
	n := len(b.Crown) - 1
	s.line(barrelPen, f.at(x1, b.Invert[n].Y), f.at(x1, b.Crown[n].Y))
	for i, h := range b.Hinges {
		s.line(pen{0.8, limitPen.dash, black}, f.at(h, f.y0), f.at(h, f.y1))
		s.text(8, middle, f.px(h), f.bottom+f.h+4, [2]string{"hinge", "hinge"}[i])
	}
	b.words(s, f)
	s.text(9, left, f.left, 8, fmt.Sprintf("%s along the barrel from the reference line, right positive; levels in %s, heights %.1f times exaggerated", b.Unit, b.Unit, f.exaggeration()))
	return s.svg(b.ID, b.Title, "Section along the barrel: finished surface, datum of the cover rule, the highest place it leaves to the crown, barrel with wall, original ground, hinges, and the place of the least cover. The table of the culvert holds the figures.")
}

// zone shades where cover is judged: upright lines between datum and crown.
func (b Barrel) zone(s *sheet, f frame) {
	var lines vg.Path
	for px := f.px(b.Hinges[0]); px <= f.px(b.Hinges[1]); px += 6 {
		x := f.x0 + (px-f.left)/f.w*(f.x1-f.x0)
		top, ok := on(b.Datum, x)
		crown, okC := on(b.Crown, x)
		if ok && okC && top > crown {
			lines.Move(f.at(x, crown))
			lines.Line(f.at(x, top))
		}
	}
	s.strokes(hairPen, lines)
}

// need draws how high the crown may come: where the barrel lies above this line
// cover is short.
func (b Barrel) need(s *sheet, f frame) {
	if b.Required <= 0 {
		return
	}
	var line []Pt
	for _, p := range clip(b.Datum, b.Hinges[0], b.Hinges[1]) {
		line = append(line, Pt{p.X, p.Y - b.Required})
	}
	s.line(limitPen, f.path(line)...)
	if at := b.Hinges[0] * 0.6; len(line) > 1 {
		if y, ok := on(line, at); ok {
			s.text(8, middle, f.px(at), f.py(y)-9, "crown at most")
		}
	}
}

func (b Barrel) words(s *sheet, f frame) {
	q := f.at(b.Least.X, b.Least.Y)
	top := f.at(b.Least.X, b.Least.Y+b.Cover)
	s.line(pen{1.6, nil, black}, q, top)
	for _, y := range []float64{float64(q.Y), float64(top.Y)} {
		s.line(pen{1.6, nil, black}, pt(float64(q.X)-4, y), pt(float64(q.X)+4, y))
	}
	a, dx := left, 8.0
	if b.Least.X > 0 {
		a, dx = right, -8.0
	}
	s.text(9, a, float64(q.X)+dx, (float64(q.Y)+float64(top.Y))/2-3, b.CoverWords)
	n := len(b.Invert) - 1
	s.text(8, middle, f.px(0), (f.py(b.Invert[0].Y)+f.py(b.Invert[n].Y))/2+5, "barrel, with wall above")
	s.text(8, left, f.px(b.Invert[0].X)+3, f.py(b.Invert[0].Y)-11, b.LeftWords)
	s.text(8, right, f.px(b.Invert[n].X)-3, f.py(b.Invert[n].Y)-11, b.RightWords)
	mid := (f.x0 + f.x1) / 2
	if y, ok := on(b.Surface, mid); ok {
		s.text(8, middle, f.px(mid), f.py(y)+6, "finished surface")
	}
	edge := f.x0 + (f.x1-f.x0)*0.02
	if y, ok := on(b.Ground, edge); ok {
		s.text(8, left, f.px(edge), f.py(y)+6, "ground")
	}
	if y, ok := on(b.Datum, mid+math.Abs(b.Hinges[1])*0.4); ok {
		s.text(8, middle, f.px(mid+math.Abs(b.Hinges[1])*0.4), f.py(y)-9, "datum")
	}
}
