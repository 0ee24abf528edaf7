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
	Stations, Levels     Scale
	Ground               []Pt
	Lines                []Named
}

// dashes tell lines apart without colour.
func dashes() []pen {
	return []pen{
		{2.2, nil, black}, {1.6, []vg.Length{10, 4}, blue}, {1.6, []vg.Length{2, 2}, green},
		{1.6, []vg.Length{10, 3, 2, 3}, fillInk}, {1.6, []vg.Length{5, 2, 1, 2, 1, 2}, cutInk},
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
	f := frame{x0, x1, lo - pad, hi + pad, 50, 30, 1025, 320}
	s.grid(f, axis{a.Stations, a.Label}, axis{a.Levels, a.Level})
	s.line(pen{0.8, []vg.Length{3, 3}, grey}, f.path(a.Ground)...)
	pens := dashes()
	for i, l := range a.Lines {
		s.line(pens[i%len(pens)], f.path(l.Line)...)
	}
	for i := range len(a.Lines) + 1 {
		a.name(s, f, i)
	}
	s.text(9, left, f.left, s.h-12, fmt.Sprintf("levels in %s, heights %.0f times exaggerated", a.LevelUnit, f.exaggeration()))
	return s.svg(a.ID, a.Title, "Grade lines of the alternatives over each other and the ground.")
}

// name writes the name of a line where it lies farthest from the others, on the
// side away from the nearest of them. Every line has places of its own, so that
// no two names fall on each other.
func (a Alternatives) name(s *sheet, f frame, i int) {
	lines := append([]Named{{"ground", a.Ground}}, a.Lines...)
	const places = 60
	best, at, up := -1.0, f.x0, true
	for k := 2; k < places-1; k++ {
		x := f.x0 + (f.x1-f.x0)*float64(k)/places
		y, ok := on(lines[i].Line, x)
		if !ok || k/3%len(lines) != i {
			continue
		}
		near, above := math.Inf(1), true
		for j, o := range lines {
			if z, ok := on(o.Line, x); ok && j != i && math.Abs(z-y) < near {
				near, above = math.Abs(z-y), y >= z
			}
		}
		if near > best && !math.IsInf(near, 1) {
			best, at, up = near, x, above
		}
	}
	y, _ := on(lines[i].Line, at)
	dy := 6.0
	if !up {
		dy = -13
	}
	s.text(9, middle, f.px(at), f.py(y)+dy, lines[i].Name)
}
