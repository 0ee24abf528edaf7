package plot

// Span is a stretch of the grade line between ends of curves: a tangent or a
// curve. Words stand in its middle, one under the other; From and To name its
// ends ("" names none).
type Span struct {
	X0, X1   float64
	Words    []string
	From, To string
}

// bandHeight is what the band of figures takes below the long profile: a row of
// station labels above it and the length of an upright station name.
const bandHeight = 78.0

// band writes, below the profile and on its axis, the grades of tangents,
// length and K of curves, and where these begin and end: beside the lines there
// is no room for them that stays free on every road.
func (s *sheet) band(f frame, spans []Span) {
	top, bottom := f.bottom-17, f.bottom-bandHeight+2
	s.line(thinPen, pt(f.left, top), pt(f.left+f.w, top), pt(f.left+f.w, bottom), pt(f.left, bottom), pt(f.left, top))
	for _, p := range spans {
		if p.X0 > f.x0 {
			s.line(thinPen, pt(f.px(p.X0), top), pt(f.px(p.X0), bottom))
		}
		s.span(f.px(p.X0), f.px(p.X1), top, bottom, p)
	}
}

// span fills one cell of the band. Names of ends stand upright inside it; words
// that do not fit between them are turned, and left to the table of curves where
// not even that fits.
func (s *sheet) span(a, b, top, bottom float64, p Span) {
	const size, row = 7.0, 9.0
	if p.From != "" && b-a >= 2*row {
		s.upright(size, a+row-2, bottom+3, p.From)
		a += row
	}
	if p.To != "" && b-a >= row {
		s.upright(size, b-2, bottom+3, p.To)
		b -= row
	}
	widest := 0.0
	for _, w := range p.Words {
		widest = max(widest, s.width(size, w))
	}
	n := float64(len(p.Words))
	switch {
	case b-a >= widest+4:
		y := (top+bottom)/2 + (n/2-1)*row + 2
		for i, w := range p.Words {
			s.text(size, middle, (a+b)/2, y-float64(i)*row, w)
		}
	case b-a >= n*row:
		x := (a+b)/2 - (n/2-1)*row - 2
		for i, w := range p.Words {
			s.upright(size, x+float64(i)*row, bottom+3, w)
		}
	}
}
