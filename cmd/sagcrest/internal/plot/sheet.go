package plot

import (
	"bytes"
	"fmt"
	"html"
	"image/color"
	"math"
	"regexp"
	"strings"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/font/liberation"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/vgsvg"
)

// pen is how a line is drawn.
type pen struct {
	width vg.Length
	dash  []vg.Length
	ink   color.RGBA
}

var (
	black = color.RGBA{A: 255}
	grey  = color.RGBA{R: 0x66, G: 0x66, B: 0x66, A: 255}
	blue  = color.RGBA{R: 0x00, G: 0x72, B: 0xB2, A: 255}
	green = color.RGBA{R: 0x00, G: 0x9E, B: 0x73, A: 255}
	// cutInk and fillInk are the rose of cut and the amber of fill, darkened so
	// that dots and thin lines print in black and white: both stand out from
	// white by more than 3:1 (WCAG 2.2, 1.4.11), which the light hues do not.
	cutInk  = color.RGBA{R: 0x8C, G: 0x3E, B: 0x6A, A: 255}
	fillInk = color.RGBA{R: 0x9C, G: 0x6A, B: 0x00, A: 255}

	groundPen   = pen{1, []vg.Length{5, 3}, black}
	strippedPen = pen{0.6, []vg.Length{1.5, 2}, black}
	designPen   = pen{2, nil, black}
	thinPen     = pen{0.6, nil, black}
	hairPen     = pen{0.35, nil, grey}
	earthPen    = pen{1.2, []vg.Length{9, 2, 2, 2}, black}
	barrelPen   = pen{1.6, nil, green}
	limitPen    = pen{1.2, []vg.Length{12, 3, 2, 3, 2, 3}, black}
)

// anchor says which point of a text stands at its place.
type anchor byte

const (
	left anchor = iota
	middle
	right
)

// sheet is a drawing in points, y upward.
type sheet struct {
	c     *vgsvg.Canvas
	w, h  float64
	faces *font.Cache
	// called holds the room of names that were called out so far.
	called []room
}

func newSheet(w, h float64) *sheet {
	return &sheet{c: vgsvg.New(vg.Length(w), vg.Length(h)), w: w, h: h, faces: font.NewCache(liberation.Collection())}
}

func (s *sheet) line(p pen, pts ...vg.Point) {
	if len(pts) < 2 {
		return
	}
	var path vg.Path
	path.Move(pts[0])
	for _, q := range pts[1:] {
		path.Line(q)
	}
	s.c.SetColor(p.ink)
	s.c.SetLineWidth(p.width)
	s.c.SetLineDash(p.dash, 0)
	s.c.Stroke(path)
}

// dot draws a small disc, as two half circles: an arc that ends where it begins
// is no arc to a reader of SVG.
func (s *sheet) dot(ink color.RGBA, at vg.Point, radius float64) {
	var path vg.Path
	path.Move(vg.Point{X: at.X + vg.Length(radius), Y: at.Y})
	path.Arc(at, vg.Length(radius), 0, math.Pi)
	path.Arc(at, vg.Length(radius), math.Pi, math.Pi)
	path.Close()
	s.c.SetColor(ink)
	s.c.Fill(path)
}

func (s *sheet) face(size float64) font.Face {
	return s.faces.Lookup(font.Font{Typeface: "Liberation", Variant: "Sans"}, vg.Length(size))
}

// width returns how wide a text is set.
func (s *sheet) width(size float64, text string) float64 {
	f := s.face(size)
	return float64(f.Width(text))
}

// text sets a line of text; y is its base line.
func (s *sheet) text(size float64, a anchor, x, y float64, text string) {
	switch a {
	case middle:
		x -= s.width(size, text) / 2
	case right:
		x -= s.width(size, text)
	}
	s.c.SetColor(black)
	s.c.FillString(s.face(size), vg.Point{X: vg.Length(x), Y: vg.Length(y)}, text)
}

// upright sets a text turned a quarter to the left, reading upward from (x, y).
func (s *sheet) upright(size float64, x, y float64, text string) {
	s.c.Push()
	s.c.Translate(vg.Point{X: vg.Length(x), Y: vg.Length(y)})
	s.c.Rotate(1.5707963267948966)
	s.c.SetColor(black)
	s.c.FillString(s.face(size), vg.Point{}, text)
	s.c.Pop()
}

func pt(x, y float64) vg.Point { return vg.Point{X: vg.Length(x), Y: vg.Length(y)} }

var (
	opening = regexp.MustCompile(`(?s)^.*?<svg[^>]*>`)
	// family is what every text repeats; the element says it once.
	family = regexp.MustCompile(`font-family:[^"]*font-size:`)
)

// halo keeps words legible where a line crosses them.
const halo = `<style>text{paint-order:stroke;stroke:#fff;stroke-width:2.5px;stroke-linejoin:round}</style>`

// svg finishes the drawing: an element with a role, title and description, and
// without any outside address.
func (s *sheet) svg(id, title, desc string) (string, error) {
	var b bytes.Buffer
	if _, err := s.c.WriteTo(&b); err != nil {
		return "", err
	}
	head := fmt.Sprintf(`<svg viewBox="0 0 %.0f %.0f" font-family="Liberation Sans, Arial, Helvetica, sans-serif" role="img" aria-labelledby="%s-t %s-d"><title id="%s-t">%s</title><desc id="%s-d">%s</desc>%s`,
		s.w, s.h, id, id, id, html.EscapeString(title), id, html.EscapeString(desc), halo)
	text := opening.ReplaceAllLiteralString(b.String(), head)
	text = family.ReplaceAllLiteralString(text, "font-size:")
	return strings.TrimSpace(text), nil
}
