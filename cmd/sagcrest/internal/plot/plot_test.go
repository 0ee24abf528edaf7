package plot

import (
	"encoding/xml"
	"flag"
	"fmt"
	"image/color"
	"io"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/plot/vg"
	"pgregory.net/rapid"
)

var update = flag.Bool("update", false, "write the golden files anew")

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
		Spans: []Span{{0, 30, []string{"-3.00 %"}, "", ""}, {30, 70, []string{"PVI 1", "L 40.000"}, "PVC 0+030", "PVT 0+070"}, {70, 100, []string{"3.00 %"}, "", ""}},
		Mass:  []Pt{{0, 0}, {50, 300}, {100, -20}}, MassTitle: "mass", Volume: label, Balance: []Mark{{97, 0, "0+097"}}}.Draw()
	keep("grade", svg, err)
	x := Cross{Title: "0+020", Below: "cut 1.00 m²", Ground: ground, Stripped: ground, Finished: design, Earthwork: design,
		Catches: []Catch{{Mark{0, 100, "a"}, false}, {Mark{100, 102, "b"}, true}}}
	svg, err = CrossSheet{ID: "x", Title: "sections", Across: 3, Sections: []Cross{x, x, x, x}, Unit: "m", Offset: label}.Draw()
	keep("cross", svg, err)
	svg, err = Barrel{ID: "b", Title: "culvert", Unit: "m", Level: label, Length: label, Ground: ground, Surface: []Pt{{0, 99}, {50, 104}, {100, 99}},
		Datum: []Pt{{30, 102}, {70, 102}}, Invert: []Pt{{0, 99}, {100, 98}}, Soffit: []Pt{{0, 99.9}, {100, 98.9}}, Crown: []Pt{{0, 100}, {100, 99}},
		Hinges: [2]float64{30, 70}, Least: Pt{30, 99.7}, Cover: 2.3, CoverWords: "cover 2.300 m", LeftWords: "left", RightWords: "right"}.Draw()
	keep("barrel", svg, err)
	svg, err = Plan{ID: "p", Title: "plan", Line: ground, Left: ground, Right: design, Limits: [][]Pt{design}, Stations: []Mark{{0, 100, "0+000"}},
		Ends: []Mark{{40, 97, "arc"}}, Barrels: [][2]Pt{{{40, 90}, {40, 105}}}, BarrelNames: []string{"C"}, Unit: "m", Length: label}.Draw()
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

// Drawings change only on purpose: look at the new files, then write them with
// -update.
func TestGoldenDrawings(t *testing.T) {
	for name, svg := range drawings(t) {
		path := filepath.Join("testdata", name+".svg")
		if *update {
			require.NoError(t, os.MkdirAll("testdata", 0o755))
			require.NoError(t, os.WriteFile(path, []byte(svg+"\n"), 0o644))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.Equal(t, string(want), svg+"\n", name)
	}
}

// Law: marks stand at round numbers of the unit, inside the axis, in order and
// one step apart, and never more than asked for.
func TestMarks(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		unit := rapid.SampledFrom([]float64{0, 1, 0.3048, 1200.0 / 3937, 0.764554857984}).Draw(t, "unit")
		s := Scale{Unit: unit, Start: rapid.Float64Range(-5000, 5000).Draw(t, "start")}
		a := rapid.Float64Range(-3000, 3000).Draw(t, "a")
		b := a + rapid.Float64Range(0.5, 5000).Draw(t, "long")
		n := rapid.IntRange(2, 20).Draw(t, "n")
		at := s.Marks(a, b, n)
		assert.LessOrEqual(t, len(at), n+1)
		if unit == 0 {
			unit = 1
		}
		every := step((b-a)/unit, n)
		assert.GreaterOrEqual(t, float64(len(at)+1)*every*unit, (b-a)*(1-1e-6), "no mark is left out")
		for i, x := range at {
			assert.True(t, x >= a-1e-6*every*unit && x <= b+1e-6*every*unit)
			k := (s.Start + x/unit) / every
			assert.InDelta(t, math.Round(k), k, 1e-6)
			if i > 0 {
				assert.InDelta(t, every*unit, x-at[i-1], 1e-6*every*unit)
			}
		}
	})
}

// Law: names that are called out never stand on each other or off the sheet,
// however close their places are.
func TestCalledNamesKeepClear(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := newSheet(400, 300)
		for i := range rapid.IntRange(1, 12).Draw(t, "names") {
			x, up := rapid.Float64Range(0, 400).Draw(t, "x"), rapid.Bool().Draw(t, "up")
			ty := 180.0
			if !up {
				ty = 120
			}
			s.call(x, 150, x, ty, 8, strings.Repeat("name ", i%3+1))
		}
		for i, a := range s.called {
			assert.True(t, a.left >= 0 && a.right <= s.w)
			assert.False(t, a.bottom < 150 && 150 < a.top, "clear of the road")
			for _, b := range s.called[:i] {
				assert.False(t, a.meets(b))
			}
		}
	})
}

// A cell of the band that is too narrow for its words turns them, and one that
// is narrower still holds none rather than letting them run over its neighbours.
func TestBandFits(t *testing.T) {
	for _, c := range []struct {
		wide    float64
		turned  int
		written bool
	}{{200, 2, true}, {60, 4, true}, {20, 2, false}, {5, 0, false}} {
		s := newSheet(300, 300)
		s.span(10, 10+c.wide, 200, 140, Span{0, 1, []string{"PVI 1  0+420.000", "L 260.000"}, "PVC", "PVT"})
		svg, err := s.svg("b", "band", "")
		require.NoError(t, err)
		assert.Equal(t, c.turned, strings.Count(svg, "rotate("), "%v", c.wide)
		assert.Equal(t, c.written, strings.Contains(svg, "L 260.000"), "%v", c.wide)
	}
}

// Every ink stands out from white paper by 3:1 (WCAG 2.2, 1.4.11).
func TestInksStandOut(t *testing.T) {
	linear := func(c uint8) float64 {
		v := float64(c) / 255
		if v <= 0.04045 {
			return v / 12.92
		}
		return math.Pow((v+0.055)/1.055, 2.4)
	}
	for _, ink := range []color.RGBA{black, grey, blue, green, cutInk, fillInk} {
		light := 0.2126*linear(ink.R) + 0.7152*linear(ink.G) + 0.0722*linear(ink.B)
		assert.GreaterOrEqual(t, 1.05/(light+0.05), 3.0, "%v", ink)
	}
}
