package plot

import (
	"encoding/xml"
	"fmt"
	"io"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/plot/vg"
)

func label(x float64) string { return fmt.Sprintf("0+%03.0f", x) }

// drawings returns one of each, from invented figures.
func drawings(t *testing.T) map[string]string {
	ground := []Pt{{0, 100}, {40, 97}, {100, 102}}
	design := []Pt{{0, 99}, {100, 101}}
	out := map[string]string{}
	keep := func(name, svg string, err error) {
		require.NoError(t, err, name)
		out[name] = svg
	}
	svg, err := Grade{ID: "g", Title: `a "b" <c>`, LevelUnit: "m", Label: label, Level: label, Ground: ground, Line: design,
		PVIs: []Mark{{50, 99, "PVI 1"}}, Ends: []Mark{{30, 99.6, ""}}, Turns: []Turn{{Mark{40, 99.5, "low"}, true}},
		Culverts: []Mark{{42, 97, "C"}}, Windows: []Window{{70, 80, 105, 106, "bridge"}},
		Mass: []Pt{{0, 0}, {50, 300}, {100, -20}}, MassTitle: "mass", Balance: []Mark{{97, 0, "0+097"}}}.Draw()
	keep("grade", svg, err)
	x := Cross{Title: "0+020", Below: "cut 1.00 m²", Ground: ground, Stripped: ground, Finished: design, Earthwork: design,
		Catches: []Catch{{Mark{0, 100, "a"}, false}, {Mark{100, 102, "b"}, true}}}
	svg, err = CrossSheet{ID: "x", Title: "sections", Across: 3, Sections: []Cross{x, x, x, x}, Unit: "m"}.Draw()
	keep("cross", svg, err)
	svg, err = Barrel{ID: "b", Title: "culvert", Unit: "m", Level: label, Ground: ground, Surface: []Pt{{0, 99}, {50, 104}, {100, 99}},
		Datum: []Pt{{30, 102}, {70, 102}}, Invert: []Pt{{0, 99}, {100, 98}}, Soffit: []Pt{{0, 99.9}, {100, 98.9}}, Crown: []Pt{{0, 100}, {100, 99}},
		Hinges: [2]float64{30, 70}, Least: Pt{30, 99.7}, Cover: 2.3, CoverWords: "cover 2.300 m", LeftWords: "left", RightWords: "right"}.Draw()
	keep("barrel", svg, err)
	svg, err = Plan{ID: "p", Title: "plan", Line: ground, Left: ground, Right: design, Limits: [][]Pt{design}, Stations: []Mark{{0, 100, "0+000"}},
		Ends: []Mark{{40, 97, "arc"}}, Barrels: [][2]Pt{{{40, 90}, {40, 105}}}, BarrelNames: []string{"C"}}.Draw()
	keep("plan", svg, err)
	svg, err = Alternatives{ID: "a", Title: "alternatives", LevelUnit: "m", Label: label, Level: label, Ground: ground,
		Lines: []Named{{"base", design}, {"first draft", []Pt{{0, 99}, {100, 104}}}}}.Draw()
	keep("alternatives", svg, err)
	return out
}

// Every drawing is well-formed, has a role, a title and a description, keeps its
// text as text, names its series beside them and asks for nothing from outside;
// drawn twice it is the same.
func TestDrawings(t *testing.T) {
	first, second := drawings(t), drawings(t)
	for name, svg := range first {
		assert.Equal(t, svg, second[name], name)
		d := xml.NewDecoder(strings.NewReader(svg))
		for {
			_, err := d.Token()
			if err == io.EOF {
				break
			}
			require.NoError(t, err, name)
		}
		assert.True(t, strings.HasPrefix(svg, "<svg "), name)
		for _, want := range []string{`role="img"`, "<title", "<desc", "<text"} {
			assert.Contains(t, svg, want, name)
		}
		assert.NotContains(t, svg, "http", name)
		assert.NotContains(t, svg, "NaN", name)
	}
	assert.Contains(t, first["grade"], "&lt;c&gt;")
	for _, want := range []string{"grade line", "ground", "PVI 1", "culvert C", "bridge", "times exaggerated", "mass"} {
		assert.Contains(t, first["grade"], want)
	}
	for _, want := range []string{"base", "first draft"} {
		assert.Contains(t, first["alternatives"], want)
	}
	assert.Contains(t, first["barrel"], "cover 2.300 m")
}

// Cut is dotted and fill has level lines: two dash patterns of one drawing, not
// only two colours.
func TestCutAndFillDifferWithoutColour(t *testing.T) {
	s := newSheet(200, 100)
	f := frame{0, 100, 0, 10, 0, 0, 200, 100}
	s.earth(f, []Pt{{0, 8}, {100, 8}}, []Pt{{0, 2}, {100, 2}}, 0, 100)
	cut, err := s.svg("c", "cut", "")
	require.NoError(t, err)
	s = newSheet(200, 100)
	s.earth(f, []Pt{{0, 2}, {100, 2}}, []Pt{{0, 8}, {100, 8}}, 0, 100)
	fill, err := s.svg("f", "fill", "")
	require.NoError(t, err)
	assert.Greater(t, strings.Count(cut, "M"), 5*strings.Count(fill, "M"), "many dots against few long lines")
}

// An arc of SVG that ends where it begins draws nothing.
func TestDotsAreSeen(t *testing.T) {
	s := newSheet(200, 100)
	s.dot(black, vg.Point{X: 50, Y: 50}, 2)
	svg, err := s.svg("d", "dot", "")
	require.NoError(t, err)
	found := regexp.MustCompile(`d="M([-\d.,]+)A[-\d.]+,[-\d.]+ \d \d \d ([-\d.,]+)A`).FindStringSubmatch(svg)
	require.Len(t, found, 3, svg)
	assert.NotEqual(t, found[1], found[2])
}

// Axis steps are 1, 2 or 5 times a power of ten and never too many.
func TestStep(t *testing.T) {
	for _, c := range []struct {
		length float64
		n      int
		want   float64
	}{{1900, 12, 200}, {24, 8, 5}, {0.9, 8, 0.2}, {10, 10, 1}, {0, 5, 1}} {
		assert.InDelta(t, c.want, step(c.length, c.n), 1e-12)
	}
}
