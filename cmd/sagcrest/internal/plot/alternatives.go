package plot

import (
	"fmt"
	"math"

	"gonum.org/v1/plot/vg"
)

// Named is a line with its name.
type Named struct {
	Name string
	Line []Pt
}

// Alternatives draws several grade lines over each other on one ground.
type Alternatives struct {
	ID, Title, LevelUnit string
	Label, Level         func(float64) string
	Ground               []Pt
	Lines                []Named
}

// dashes tell lines apart without colour.
func dashes() []pen {
	return []pen{
		{2.2, nil, black}, {1.6, []vg.Length{10, 4}, blue}, {1.6, []vg.Length{2, 2}, green},
		{1.6, []vg.Length{10, 3, 2, 3}, amber}, {1.6, []vg.Length{5, 2, 1, 2, 1, 2}, rose},
	}
}

// Draw draws the comparison.
func (a Alternatives) Draw() (string, error) {
	s := newSheet(1100, 380)
	lines := [][]Pt{a.Ground}
	x0, x1 := math.Inf(1), math.Inf(-1)
	for _, l := range a.Lines {
		lines = append(lines, l.Line)
		x0, x1 = math.Min(x0, l.Line[0].X), math.Max(x1, l.Line[len(l.Line)-1].X)
	}
	lo, hi := bounds(lines...)
	pad := (hi - lo) * 0.1
	f := frame{x0, x1, lo - pad, hi + pad, 50, 30, 1035, 320}
	s.grid(f, a.Label, a.Level)
	s.line(pen{0.8, []vg.Length{3, 3}, grey}, f.path(a.Ground)...)
	if y, ok := on(a.Ground, x0+(x1-x0)*0.97); ok {
		s.text(9, right, f.px(x0+(x1-x0)*0.97), f.py(y)-12, "ground")
	}
	pens := dashes()
	for i, l := range a.Lines {
		s.line(pens[i%len(pens)], f.path(l.Line)...)
		a.name(s, f, i)
	}
	s.text(9, left, f.left, s.h-12, fmt.Sprintf("levels in %s, heights %.0f times exaggerated", a.LevelUnit, f.exaggeration()))
	return s.svg(a.ID, a.Title, "Grade lines of the alternatives over each other and the ground.")
}

// name writes the name of a line where it lies farthest from the others, with a
// sample of its dash.
func (a Alternatives) name(s *sheet, f frame, i int) {
	best, at := -1.0, f.x0
	for k := 1; k < 24; k++ {
		x := f.x0 + (f.x1-f.x0)*float64(k)/24
		y, ok := on(a.Lines[i].Line, x)
		if !ok {
			continue
		}
		near := math.Inf(1)
		for j, o := range a.Lines {
			if z, ok := on(o.Line, x); ok && j != i {
				near = math.Min(near, math.Abs(z-y))
			}
		}
		if near > best && !math.IsInf(near, 1) {
			best, at = near, x
		}
	}
	y, _ := on(a.Lines[i].Line, at)
	dy := 7.0
	if i%2 == 1 {
		dy = -14
	}
	s.text(9, middle, f.px(at), f.py(y)+dy, a.Lines[i].Name)
}
