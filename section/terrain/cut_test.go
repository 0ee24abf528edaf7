package terrain

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func mustTriangulate(pts []Point) *Triangulation {
	t, _ := Triangulate(pts, Accuracy{})
	return t
}

// checkCut asserts the laws of every cut: distances increase within the line,
// levels are those of the surface, the ends are there where known, gaps and
// ground alternate, and between two break points the surface is straight.
func checkCut(t require.TestingT, s Surface, from, to XY) {
	vs, gaps := s.Cut(&Cursor{}, nil, nil, from, to)
	length := math.Hypot(to[0]-from[0], to[1]-from[1])
	at := func(d float64) XY {
		f := d / math.Max(length, sameBreak)
		return XY{from[0] + f*(to[0]-from[0]), from[1] + f*(to[1]-from[1])}
	}
	c := &Cursor{}
	for i, v := range vs {
		require.True(t, v.D >= 0 && v.D <= length && (i == 0 || v.D > vs[i-1].D), "vertex %d of %v", i, vs)
		z, ok := s.Level(c, at(v.D))
		require.True(t, ok, "vertex %d at %v of %v is not on the surface, gaps %v", i, v, length, gaps)
		require.InDelta(t, z, v.Z, 1e-6, "vertex %d at %v", i, v)
	}
	checkEnds(t, s, vs, gaps, from, to, length)
	for i := 1; i < len(vs); i++ {
		a, b := vs[i-1], vs[i]
		for _, f := range []float64{0.25, 0.5, 0.75} {
			d := a.D + f*(b.D-a.D)
			if b.D-a.D < 1e-6 || inGap(gaps, d) {
				continue
			}
			z, ok := s.Level(c, at(d))
			require.True(t, ok, "no ground at %v between %v and %v, gaps %v", d, a, b, gaps)
			require.InDelta(t, z, a.Z+f*(b.Z-a.Z), 1e-6, "between %v and %v", a, b)
		}
	}
}

func checkEnds(t require.TestingT, s Surface, vs []Vertex, gaps []Gap, from, to XY, length float64) {
	c := &Cursor{}
	if z, ok := s.Level(c, from); ok {
		require.NotEmpty(t, vs)
		require.Zero(t, vs[0].D)
		require.InDelta(t, z, vs[0].Z, 1e-6)
	}
	if z, ok := s.Level(c, to); ok && length > 1e-8 {
		require.NotEmpty(t, vs)
		require.Equal(t, length, vs[len(vs)-1].D)
		require.InDelta(t, z, vs[len(vs)-1].Z, 1e-6)
	}
	last := -1.0
	for _, g := range gaps {
		require.True(t, (g.From < g.To || length <= sameBreak) && g.From >= last && g.To <= length, "gaps %v", gaps)
		last = g.To
		for _, end := range []float64{g.From, g.To} {
			if end > 0 && end < length {
				require.True(t, hasVertex(vs, end), "no vertex at %v: %v, gaps %v", end, vs, gaps)
			}
		}
		// Uneven fractions: a gap may touch the ground in single corners.
		for _, f := range []float64{0.1371, 0.4937, 0.8837} {
			d := (g.From + f*(g.To-g.From)) / math.Max(length, sameBreak)
			_, ok := s.Level(c, XY{from[0] + d*(to[0]-from[0]), from[1] + d*(to[1]-from[1])})
			require.False(t, ok && g.To-g.From > 1e-6, "ground in gap %v", g)
		}
	}
}

func inGap(gaps []Gap, d float64) bool {
	for _, g := range gaps {
		if g.From < d && d < g.To {
			return true
		}
	}
	return false
}

func hasVertex(vs []Vertex, d float64) bool {
	for _, v := range vs {
		if math.Abs(v.D-d) <= sameBreak {
			return true
		}
	}
	return false
}

// Law: any line over any survey, through corners, along edges, from outside.
func TestCutLaws(t *testing.T) {
	for _, s := range surveys {
		if s.name == "clusters" || s.name == "rows" {
			continue // slivers of 1 mm with hills on them: see TestThinTriangles
		}
		t.Run(s.name, func(t *testing.T) {
			tri := mustTriangulate(s.make(400))
			rapid.Check(t, func(t *rapid.T) { checkCut(t, tri, place(t, tri, "from"), place(t, tri, "to")) })
		})
	}
}

// place draws a place on or around a triangulation: a corner, the middle of an
// edge, on the line through an edge, or anywhere.
func place(t *rapid.T, tri *Triangulation, name string) XY {
	h := int32(rapid.IntRange(0, len(tri.mesh.org)-1).Draw(t, name+" edge"))
	a, b := tri.corner(int(h)), tri.corner(int(next(h)))
	f := rapid.SampledFrom([]float64{0, 0.5, 1, -0.5, 2, 0.3}).Draw(t, name+" fraction")
	lo, hi := tri.Extent()
	if rapid.IntRange(0, 2).Draw(t, name+" kind") == 0 {
		x := float64(rapid.IntRange(-500, 1500).Draw(t, name+" x")) / 1000
		y := float64(rapid.IntRange(-500, 1500).Draw(t, name+" y")) / 1000
		return XY{lo[0] + x*(hi[0]-lo[0]), lo[1] + y*(hi[1]-lo[1])}
	}
	return XY{a[0] + f*(b[0]-a[0]), a[1] + f*(b[1]-a[1])}
}

// In slivers a level is steep across; along a plane they must not show at all.
func TestThinTriangles(t *testing.T) {
	for _, s := range surveys {
		pts := s.make(300)
		plane := func(e, n float64) float64 { return 50 + 0.06*(e-pts[0].E) - 0.04*(n-pts[0].N) }
		for i, p := range pts {
			pts[i].Z = plane(p.E, p.N)
		}
		tri := mustTriangulate(pts)
		lo, hi := tri.Extent()
		c := &Cursor{}
		for k := range 40 {
			f := float64(k) / 39
			from := XY{lo[0] + f*(hi[0]-lo[0]), lo[1]}
			to := XY{hi[0] - f*f*(hi[0]-lo[0]), hi[1]}
			length := math.Hypot(to[0]-from[0], to[1]-from[1])
			vs, _ := tri.Cut(c, nil, nil, from, to)
			for _, v := range vs {
				d := v.D / length
				want := plane(from[0]+d*(to[0]-from[0]), from[1]+d*(to[1]-from[1]))
				// Coordinates near 5e6 are themselves rounded to 1e-9 m.
				require.InDelta(t, want, v.Z, 1e-9, "%s at %v", s.name, v)
			}
		}
	}
}

// Law: a cut is what dense sampling sees.
func TestCutAgainstSampling(t *testing.T) {
	tri := mustTriangulate(surveys[1].make(2000))
	lo, _ := tri.Extent()
	from, to := XY{lo[0] - 2, lo[1] + 3.3}, XY{lo[0] + 25, lo[1] + 17.7}
	vs, gaps := tri.Cut(&Cursor{}, nil, nil, from, to)
	require.Len(t, gaps, 2)
	require.True(t, gaps[0].Outside && gaps[1].Outside)
	length := math.Hypot(to[0]-from[0], to[1]-from[1])
	c, k := &Cursor{}, 0
	const n = 20000
	for i := 1; i < n; i++ {
		f := float64(i) / n
		d := f * length
		z, ok := tri.Level(c, XY{from[0] + f*(to[0]-from[0]), from[1] + f*(to[1]-from[1])})
		require.Equal(t, !inGap(gaps, d), ok, "at %v", d)
		if !ok {
			continue
		}
		for vs[k+1].D < d {
			k++
		}
		a, b := vs[k], vs[k+1]
		require.InDelta(t, a.Z+(b.Z-a.Z)*(d-a.D)/(b.D-a.D), z, 1e-7)
	}
}

// Law: the cursor changes no bit of a cut or level.
func TestCursorChangesNothing(t *testing.T) {
	for _, s := range surveys {
		tri := mustTriangulate(s.make(300))
		lo, hi := tri.Extent()
		c := &Cursor{triangle: 1 << 30, rim: 1 << 30} // left by a larger surface
		for k := range 60 {
			a, b := float64(k%7)/6, float64(k%11)/10
			from := XY{lo[0] + a*(hi[0]-lo[0]), lo[1] - 1}
			to := XY{lo[0] + b*(hi[0]-lo[0]), lo[1] + a*(hi[1]-lo[1])}
			v1, g1 := tri.Cut(c, nil, nil, from, to)
			v2, g2 := tri.Cut(&Cursor{}, nil, nil, from, to)
			require.Equal(t, v2, v1, s.name)
			require.Equal(t, g2, g1, s.name)
			z1, ok1 := tri.Level(c, to)
			z2, ok2 := tri.Level(&Cursor{}, to)
			require.Equal(t, [2]any{z2, ok2}, [2]any{z1, ok1}, s.name)
		}
	}
}

// One square at map coordinates, its diagonal from south-west to north-east.
func square() *Triangulation {
	return mustTriangulate(moved([]Point{{0, 0, 10, 1}, {8, 0, 14, 2}, {8, 8, 18, 3}, {0, 8, 10, 4}}, 2600000, 5000000))
}

func TestCutByHand(t *testing.T) {
	s := square()
	e, n := 2600000.0, 5000000.0
	for name, c := range map[string]struct {
		from, to XY
		vs       []Vertex
		gaps     []Gap
	}{
		"across the diagonal": {XY{e, n + 4}, XY{e + 8, n + 4}, []Vertex{{0, 10}, {4, 14}, {8, 16}}, nil},
		"along the diagonal":  {XY{e, n}, XY{e + 8, n + 8}, []Vertex{{0, 10}, {8 * math.Sqrt2, 18}}, nil},
		"through two corners": {XY{e - 4, n + 12}, XY{e + 12, n - 4},
			[]Vertex{{4 * math.Sqrt2, 10}, {8 * math.Sqrt2, 14}, {12 * math.Sqrt2, 14}},
			[]Gap{{0, 4 * math.Sqrt2, true}, {12 * math.Sqrt2, 16 * math.Sqrt2, true}}},
		"along the edge, hull left":  {XY{e - 1, n}, XY{e + 9, n}, []Vertex{{1, 10}, {9, 14}}, []Gap{{0, 1, true}, {9, 10, true}}},
		"along the edge, hull right": {XY{e + 9, n}, XY{e - 1, n}, []Vertex{{1, 14}, {9, 10}}, []Gap{{0, 1, true}, {9, 10, true}}},
		"on the edge only":           {XY{e + 2, n}, XY{e + 6, n}, []Vertex{{0, 11}, {4, 13}}, nil},
		"beside":                     {XY{e - 1, n - 1}, XY{e + 9, n - 1}, nil, []Gap{{0, 10, true}}},
		"short of it":                {XY{e - 9, n + 4}, XY{e - 1, n + 4}, nil, []Gap{{0, 8, true}}},
		"away from it":               {XY{e - 1, n + 4}, XY{e - 9, n + 4}, nil, []Gap{{0, 8, true}}},
		"from the edge outward":      {XY{e, n + 4}, XY{e - 8, n + 4}, []Vertex{{0, 10}}, []Gap{{0, 8, true}}},
		"up to the edge":             {XY{e - 8, n + 4}, XY{e, n + 4}, []Vertex{{8, 10}}, []Gap{{0, 8, true}}},
		"past a corner":              {XY{e - 3, n + 4}, XY{e + 3, n - 4}, []Vertex{{5, 10}}, []Gap{{0, 5, true}, {5, 10, true}}},
		"no length":                  {XY{e + 4, n + 4}, XY{e + 4, n + 4}, []Vertex{{0, 14}}, nil},
		"no length outside":          {XY{e - 4, n + 4}, XY{e - 4, n + 4}, nil, []Gap{{0, 0, true}}},
	} {
		vs, gaps := s.Cut(&Cursor{}, nil, nil, c.from, c.to)
		require.Len(t, vs, len(c.vs), "%s: %v", name, vs)
		require.Len(t, gaps, len(c.gaps), "%s: %v", name, gaps)
		for i, v := range c.vs {
			assert.InDelta(t, v.D, vs[i].D, 1e-9, name)
			assert.InDelta(t, v.Z, vs[i].Z, 1e-9, name)
		}
		for i, g := range c.gaps {
			assert.InDelta(t, g.From, gaps[i].From, 1e-9, name)
			assert.InDelta(t, g.To, gaps[i].To, 1e-9, name)
			assert.True(t, gaps[i].Outside, name)
		}
	}
}

// A line along the edge of the ground, its ends out and in by the last bits of
// map coordinates, is on the ground all along.
func TestCutAlongTheEdge(t *testing.T) {
	pts := moved(lattice(121, 1), 2600000, 5000000)
	tri := mustTriangulate(pts)
	grid := latticeGrid(t, 11)
	const bit = 9.4e-10
	for _, s := range []Surface{tri, grid} {
		for _, d := range [][2]float64{{-bit, bit}, {bit, -bit}, {-bit, -bit}, {0, 0}, {-3 * bit, 0}} {
			from, to := XY{2600000, 5000000 + d[0]}, XY{2600010, 5000000 + d[1]}
			vs, gaps := s.Cut(&Cursor{}, nil, nil, from, to)
			require.Empty(t, gaps)
			require.GreaterOrEqual(t, len(vs), 11)
			for _, v := range vs {
				require.InDelta(t, hillsBetween(v.D), v.Z, 1e-6)
			}
			_, ok := s.Level(&Cursor{}, from)
			require.True(t, ok)
			// Beginning and ending beyond it, on both sides.
			vs, gaps = s.Cut(&Cursor{}, nil, nil, XY{2599995, 5000000 + d[0]}, XY{2600015, 5000000 + d[1]})
			require.Len(t, gaps, 2)
			require.InDelta(t, 5, gaps[0].To, 1e-6)
			require.InDelta(t, 15, gaps[1].From, 1e-6)
			require.GreaterOrEqual(t, len(vs), 11)
		}
		_, ok := s.Level(&Cursor{}, XY{2600000, 4999999.999999})
		require.False(t, ok, "a micrometre outside is outside")
	}
}

// hillsBetween is the level of the lattice along its southern edge.
func hillsBetween(d float64) float64 {
	i := math.Min(math.Floor(d), 9)
	return between(hills(i, 0), hills(i+1, 0), d-i)
}

func latticeGrid(t *testing.T, side int) *Grid {
	r := Raster{Cols: side, Rows: side, West: 2600000, North: 5000000 + float64(side-1), Cell: 1}
	for j := range side {
		for i := range side {
			r.Z = append(r.Z, hills(float64(i), float64(side-1-j)))
		}
	}
	g, err := NewGrid(r, Accuracy{})
	require.NoError(t, err)
	return g
}

func TestCutAllocatesNothing(t *testing.T) {
	tri := mustTriangulate(surveys[0].make(2000))
	grid := latticeGrid(t, 40)
	for _, s := range []Surface{tri, grid} {
		lo, hi := s.Extent()
		vs, gaps, c := make([]Vertex, 0, 500), make([]Gap, 0, 10), &Cursor{}
		n := testing.AllocsPerRun(50, func() {
			s.Cut(c, vs, gaps, XY{lo[0] - 5, lo[1] - 4}, XY{hi[0], hi[1] + 3})
			s.Level(c, hi)
		})
		assert.Zero(t, n)
	}
}

// Law: the world may lie anywhere. Coordinates near 5e6 end at 9e-10 m, which
// is all that a cut may lose there.
func TestMovedWorld(t *testing.T) {
	cm := func(v float64) float64 { return math.Round(v*100) / 100 }
	here := mustTriangulate(scatter(800, 40, cm))
	there := mustTriangulate(moved(scatter(800, 40, cm), 2600000, 5000000))
	require.Equal(t, here.mesh, there.mesh)
	for k := range 200 {
		a := float64(k) / 100 * math.Pi
		from := XY{cm(20 - 15*math.Cos(a)), cm(20 - 25*math.Sin(a))}
		to := XY{cm(20 + 30*math.Cos(2*a)), cm(20 + 15*math.Sin(a))}
		v1, g1 := here.Cut(&Cursor{}, nil, nil, from, to)
		v2, g2 := there.Cut(&Cursor{}, nil, nil, XY{from[0] + 2600000, from[1] + 5000000}, XY{to[0] + 2600000, to[1] + 5000000})
		require.Len(t, v2, len(v1))
		require.Len(t, g2, len(g1))
		for i := range v1 {
			require.InDelta(t, v1[i].D, v2[i].D, 2e-9)
			require.InDelta(t, v1[i].Z, v2[i].Z, 1e-9)
		}
	}
}

// Law: a line cut backwards meets the same places.
func TestCutBackwards(t *testing.T) {
	for _, s := range []Surface{mustTriangulate(surveys[0].make(500)), holed(t)} {
		lo, hi := s.Extent()
		for k := range 50 {
			f := float64(k) / 49
			from, to := XY{lo[0] + f*(hi[0]-lo[0]), lo[1] - 0.3}, XY{hi[0] - 0.7*f*(hi[0]-lo[0]), hi[1] + 0.4}
			length := math.Hypot(to[0]-from[0], to[1]-from[1])
			v1, g1 := s.Cut(&Cursor{}, nil, nil, from, to)
			v2, g2 := s.Cut(&Cursor{}, nil, nil, to, from)
			require.Len(t, v2, len(v1))
			require.Len(t, g2, len(g1))
			for i, v := range v1 {
				w := v2[len(v2)-1-i]
				require.InDelta(t, v.D, length-w.D, 1e-8)
				require.InDelta(t, v.Z, w.Z, 1e-8)
			}
			for i, g := range g1 {
				require.Equal(t, g.Outside, g2[len(g2)-1-i].Outside)
			}
		}
	}
}
