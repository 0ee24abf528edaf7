package plot

import (
	"math"

	"gonum.org/v1/plot/vg"
)

// Pt is a place in metres: along a figure's horizontal axis, and a level.
type Pt struct{ X, Y float64 }

// frame maps metres to points of a sheet.
type frame struct {
	x0, x1, y0, y1     float64 // metres
	left, bottom, w, h float64 // points
}

func (f frame) at(x, y float64) vg.Point { return pt(f.px(x), f.py(y)) }

func (f frame) px(x float64) float64 { return f.left + (x-f.x0)/(f.x1-f.x0)*f.w }
func (f frame) py(y float64) float64 { return f.bottom + (y-f.y0)/(f.y1-f.y0)*f.h }

func (f frame) path(pts []Pt) []vg.Point {
	out := make([]vg.Point, len(pts))
	for i, p := range pts {
		out[i] = f.at(p.X, p.Y)
	}
	return out
}

// exaggeration is how many times heights are drawn larger than lengths.
func (f frame) exaggeration() float64 {
	return f.h / (f.y1 - f.y0) / (f.w / (f.x1 - f.x0))
}

// bounds returns the least and greatest level of lines.
func bounds(lines ...[]Pt) (lo, hi float64) {
	lo, hi = math.Inf(1), math.Inf(-1)
	for _, l := range lines {
		for _, p := range l {
			lo, hi = math.Min(lo, p.Y), math.Max(hi, p.Y)
		}
	}
	return lo, hi
}

// grid draws the box, level lines with their figures, and station lines with
// their labels.
func (s *sheet) grid(f frame, along, levels axis) {
	rows := levels.Marks(f.y0, f.y1, 8)
	for _, y := range rows {
		s.line(hairPen, f.at(f.x0, y), f.at(f.x1, y))
		s.text(8, right, f.left-4, f.py(y)-3, levels.label(y))
	}
	columns := along.Marks(f.x0, f.x1, 12)
	for _, x := range columns {
		s.line(hairPen, f.at(x, f.y0), f.at(x, f.y1))
		s.text(8, middle, f.px(x), f.bottom-11, along.label(x))
	}
	s.line(thinPen, f.at(f.x0, f.y0), f.at(f.x1, f.y0), f.at(f.x1, f.y1), f.at(f.x0, f.y1), f.at(f.x0, f.y0))
}

// on returns the level of a line at x by straight pieces; ok is false outside.
func on(line []Pt, x float64) (y float64, ok bool) {
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		if a.X <= x && x <= b.X {
			if b.X == a.X {
				return b.Y, true
			}
			return a.Y + (b.Y-a.Y)*(x-a.X)/(b.X-a.X), true
		}
	}
	return 0, false
}

// column is the gap between two lines over one step of a drawing, in points.
type column struct {
	lo, hi float64
	cut    bool
}

// earth marks the ground between two lines: dots where the ground stands above
// the design (cut), level lines where it lies below (fill). All dots are one
// path and all level lines another, so that a report of many sections stays
// small.
func (s *sheet) earth(f frame, ground, design []Pt, from, to float64) {
	const dx, dy = 5.0, 5.0 // points between marks
	cols := make([]column, int((f.px(to)-f.px(from))/dx)+1)
	least, most := math.Inf(1), math.Inf(-1)
	for i := range cols {
		x := from + (float64(i)+0.5)*dx/f.w*(f.x1-f.x0)
		g, okG := on(ground, x)
		d, okD := on(design, x)
		if !okG || !okD || x > to {
			continue
		}
		cols[i] = column{f.py(math.Min(g, d)), f.py(math.Max(g, d)), g > d}
		least, most = math.Min(least, cols[i].lo), math.Max(most, cols[i].hi)
	}
	var dots, levels vg.Path
	for py := math.Ceil(least/dy) * dy; py < most; py += dy {
		start := -1.0
		for i, c := range append(cols, column{}) {
			px := f.px(from) + float64(i)*dx
			inside := c.lo <= py && py < c.hi
			if inside && c.cut {
				dots.Move(pt(px+dx/2-dot, py))
				dots.Line(pt(px+dx/2+dot, py))
			}
			if inside && !c.cut && start < 0 {
				start = px
			}
			if (!inside || c.cut) && start >= 0 {
				levels.Move(pt(start, py))
				levels.Line(pt(px, py))
				start = -1
			}
		}
	}
	s.strokes(pen{2 * dot, nil, cutInk}, dots)
	s.strokes(pen{0.6, nil, fillInk}, levels)
}

// dot is half the side of a square dot, in points.
const dot = 0.75

// strokes draws a path of many pieces.
func (s *sheet) strokes(p pen, path vg.Path) {
	if len(path) == 0 {
		return
	}
	s.c.SetColor(p.ink)
	s.c.SetLineWidth(p.width)
	s.c.SetLineDash(p.dash, 0)
	s.c.Stroke(path)
}
