package terrain

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func TestGridCarriesAccuracy(t *testing.T) {
	acc := Accuracy{0.1, 0.05, 50, 0.03}
	g, err := NewGrid(Raster{Cols: 2, Rows: 2, Cell: 1, Z: make([]float64, 4)}, acc)
	require.NoError(t, err)
	assert.Equal(t, acc, g.Accuracy())
}

func mustGrid(t require.TestingT, r Raster) *Grid {
	g, err := NewGrid(r, Accuracy{})
	require.NoError(t, err)
	return g
}

// Two squares of 10 by 5 m beside each other; the diagonals run from the
// north-west to the south-east.
//
//	10 14 20
//	12 10 12
func twoSquares(t require.TestingT) *Grid {
	return mustGrid(t, Raster{Cols: 3, Rows: 2, West: 100, North: 50, CellE: 10, CellN: 5, Z: []float64{10, 14, 20, 12, 10, 12}})
}

func TestGridLevel(t *testing.T) {
	g := twoSquares(t)
	for _, c := range []struct{ e, n, z float64 }{
		{100, 50, 10}, {120, 45, 12}, {110, 50, 14}, {115, 50, 17},
		{105, 47.5, 10},      // on the diagonal of the first square
		{107.5, 48.75, 12},   // north-east of it: 10 + 4·0.75 − 4·0.25
		{102.5, 46.25, 11},   // south-west of it: 10 + 2·0.75 − 2·0.25
		{117.5, 48.75, 16.5}, // 14 + 6·0.75 − 8·0.25
	} {
		z, ok := g.Level(nil, XY{c.e, c.n})
		require.True(t, ok)
		assert.InDelta(t, c.z, z, 1e-12, "%v", c)
	}
	for _, at := range []XY{{99, 48}, {121, 48}, {110, 51}, {110, 44}, {math.NaN(), 48}, {math.Inf(1), 48}} {
		_, ok := g.Level(nil, at)
		assert.False(t, ok, "%v", at)
	}
}

func TestGridCutByHand(t *testing.T) {
	g := twoSquares(t)
	vs, gaps := g.Cut(nil, nil, nil, XY{95, 47.5}, XY{130, 47.5})
	assert.Equal(t, []Gap{{0, 5, true}, {25, 35, true}}, gaps)
	want := []Vertex{{5, 11}, {10, 10}, {15, 12}, {20, 13}, {25, 16}}
	require.Len(t, vs, len(want))
	for i, v := range want {
		assert.InDelta(t, v.D, vs[i].D, 1e-12)
		assert.InDelta(t, v.Z, vs[i].Z, 1e-12)
	}
	// Along the edge shared by the two squares, and along a diagonal.
	vs, gaps = g.Cut(nil, nil, nil, XY{110, 50}, XY{110, 45})
	assert.Equal(t, []Vertex{{0, 14}, {5, 10}}, vs)
	assert.Empty(t, gaps)
	vs, _ = g.Cut(nil, nil, nil, XY{100, 50}, XY{110, 45})
	assert.Equal(t, []Vertex{{0, 10}, {math.Hypot(10, 5), 10}}, vs)
	vs, gaps = g.Cut(nil, nil, nil, XY{90, 60}, XY{130, 60})
	assert.Empty(t, vs)
	assert.Equal(t, []Gap{{0, 40, true}}, gaps)
}

// Seven by three squares, of which five are void: the one at the north-west
// corner, whose corner is void, and the four around a void centre.
func holed(t require.TestingT) *Grid {
	r := Raster{Cols: 8, Rows: 4, West: 0, North: 3, Cell: 1}
	for j := range 4 {
		for i := range 8 {
			r.Z = append(r.Z, float64(i)+10*float64(j))
		}
	}
	r.Z[0], r.Z[8+4] = math.NaN(), math.NaN()
	return mustGrid(t, r)
}

func TestHoles(t *testing.T) {
	g := holed(t)
	cut := func(from, to XY) ([]Vertex, []Gap) { return g.Cut(nil, nil, nil, from, to) }
	// Row of squares from north 2 to 3: void are square 0 (corner 0) and 3, 4.
	vs, gaps := cut(XY{-1, 2.5}, XY{8, 2.5})
	assert.Equal(t, []Gap{{0, 2, true}, {4, 6, false}, {8, 9, true}}, gaps)
	assert.Equal(t, Vertex{2, 6}, vs[0])
	assert.True(t, hasVertex(vs, 4) && hasVertex(vs, 6) && hasVertex(vs, 8))
	// Ending in the hole, beginning in it, inside it: ground lies further out.
	_, gaps = cut(XY{2, 2.5}, XY{4, 2.5})
	assert.Equal(t, []Gap{{1, 2, false}}, gaps)
	_, gaps = cut(XY{4, 2.5}, XY{6, 2.5})
	assert.Equal(t, []Gap{{0, 1, false}}, gaps)
	_, gaps = cut(XY{3.5, 2.5}, XY{4.5, 2.5})
	assert.Equal(t, []Gap{{0, 1, false}}, gaps)
	// In the void corner nothing lies further west.
	_, gaps = cut(XY{0.5, 2.5}, XY{2, 2.5})
	assert.Equal(t, []Gap{{0, 0.5, true}}, gaps)
	_, gaps = cut(XY{2, 2.5}, XY{0.5, 2.5})
	assert.Equal(t, []Gap{{1, 1.5, true}}, gaps)
	_, gaps = cut(XY{0.25, 2.5}, XY{0.75, 2.5})
	assert.Equal(t, []Gap{{0, 0.5, true}}, gaps)
	// The edge of a hole is known, from both sides of the line's direction.
	for _, e := range []float64{3, 5} {
		vs, gaps = cut(XY{e, 3}, XY{e, 0})
		assert.Empty(t, gaps)
		assert.Equal(t, 0.0, vs[0].D)
		_, ok := g.Level(nil, XY{e, 2.5})
		assert.True(t, ok)
	}
	lo, hi := g.Extent()
	assert.Equal(t, [2]XY{{0, 0}, {7, 3}}, [2]XY{lo, hi})
	n := 0
	g.Triangles(lo, hi, func(a, b, c [3]float64) bool { n++; return true })
	assert.Equal(t, 2*(21-5), n, "five of the 21 squares have a void corner")
}

func TestExtentOfKnownSquares(t *testing.T) {
	z := make([]float64, 25)
	for k := range z {
		if k/5 == 0 || k%5 == 4 { // the top row and the right column are void
			z[k] = math.NaN()
		}
	}
	g := mustGrid(t, Raster{Cols: 5, Rows: 5, North: 4, Cell: 1, Z: z})
	lo, hi := g.Extent()
	assert.Equal(t, [2]XY{{0, 0}, {3, 3}}, [2]XY{lo, hi})
}

func TestNoGrid(t *testing.T) {
	z := make([]float64, 4)
	nan := math.NaN()
	for name, r := range map[string]Raster{
		"one row":     {Cols: 4, Rows: 1, Cell: 1, Z: z},
		"count":       {Cols: 2, Rows: 3, Cell: 1, Z: z},
		"overflow":    {Cols: 1 << 32, Rows: 1 << 32, Cell: 1},
		"cell":        {Cols: 2, Rows: 2, Z: z},
		"nan cell":    {Cols: 2, Rows: 2, Cell: nan, Z: z},
		"place":       {Cols: 2, Rows: 2, Cell: 1, West: math.Inf(1), Z: z},
		"far":         {Cols: 2, Rows: 2, Cell: 1e12, Z: z},
		"level":       {Cols: 2, Rows: 2, Cell: 1, Z: []float64{0, 0, math.Inf(1), 0}},
		"no square":   {Cols: 2, Rows: 2, Cell: 1, Z: []float64{0, 0, nan, 0}},
		"void at all": {Cols: 2, Rows: 2, Cell: 1, Z: []float64{nan, nan, nan, nan}},
	} {
		_, err := NewGrid(r, Accuracy{})
		assert.ErrorIs(t, err, ErrRaster, name)
	}
}

// Law: any line over any grid, with and without holes, along its lines too.
func TestGridCutLaws(t *testing.T) {
	for _, holes := range []bool{false, true} {
		r := Raster{Cols: 14, Rows: 11, West: 2600000, North: 5000000, CellE: 2, CellN: 1.5}
		rnd := source()
		for range r.Cols * r.Rows {
			z := 100 + rnd.Float64()
			if holes && rnd.IntN(12) == 0 {
				z = math.NaN()
			}
			r.Z = append(r.Z, z)
		}
		g := mustGrid(t, r)
		rapid.Check(t, func(t *rapid.T) {
			at := func(name string) XY {
				if rapid.Bool().Draw(t, name+" half") {
					return XY{r.West + float64(rapid.IntRange(-4, 28).Draw(t, name+" e")), r.North - 0.75*float64(rapid.IntRange(-4, 24).Draw(t, name+" n"))}
				}
				return XY{r.West + float64(rapid.IntRange(-5000, 30000).Draw(t, name+" e mm"))/1000, r.North - float64(rapid.IntRange(-5000, 20000).Draw(t, name+" n mm"))/1000}
			}
			checkCut(t, g, at("from"), at("to"))
		})
	}
}

// Law: a grid without holes is the triangulation of its centres
// along its columns and rows, whatever the diagonals.
func TestGridAgainstTriangulation(t *testing.T) {
	g := latticeGrid(t, 11)
	tri := mustTriangulate(moved(lattice(121, 1), 2600000, 5000000))
	for k := range 11 {
		e, n := 2600000+float64(k), 5000000+float64(k)
		for _, l := range [][2]XY{{{e, 4999999}, {e, 5000011}}, {{2599999, n}, {2600011, n}}} {
			a, ga := g.Cut(&Cursor{}, nil, nil, l[0], l[1])
			b, gb := tri.Cut(&Cursor{}, nil, nil, l[0], l[1])
			require.Equal(t, ga, gb)
			require.Len(t, b, len(a))
			for i := range a {
				require.InDelta(t, a[i].D, b[i].D, 1e-9)
				require.InDelta(t, a[i].Z, b[i].Z, 1e-9)
			}
		}
	}
}

func TestGridTriangles(t *testing.T) {
	g := twoSquares(t)
	area, volume := 0.0, 0.0
	lo, hi := g.Extent()
	g.Triangles(lo, hi, func(a, b, c [3]float64) bool {
		twice := (b[0]-a[0])*(c[1]-a[1]) - (b[1]-a[1])*(c[0]-a[0])
		require.Positive(t, twice, "anticlockwise")
		area += twice / 2
		volume += twice / 6 * (a[2] + b[2] + c[2])
		return true
	})
	assert.InDelta(t, 100, area, 1e-9)
	// Mean levels of the four triangles: (10+12+10)/3, (10+10+14)/3,
	// (14+10+12)/3, (14+12+20)/3, each over 25 m².
	assert.InDelta(t, 25.0/3*(32+34+36+46), volume, 1e-9)
	count := func(min, max XY) (n int) {
		g.Triangles(min, max, func(_, _, _ [3]float64) bool { n++; return true })
		return n
	}
	assert.Equal(t, 2, count(XY{101, 46}, XY{102, 47}))
	assert.Equal(t, 4, count(XY{110, 46}, XY{110, 47}), "on the shared edge both squares are met")
	assert.Zero(t, count(XY{121, 46}, XY{130, 47}))
	assert.Zero(t, count(XY{90, 46}, XY{99, 47}))
	assert.Zero(t, count(XY{105, 51}, XY{110, 60}))
	n := 0
	g.Triangles(lo, hi, func(_, _, _ [3]float64) bool { n++; return n < 2 })
	assert.Equal(t, 2, n)
}

// shared returns a file of the checks that lie beside the project.
func shared(t testing.TB, name string) []byte {
	data, err := os.ReadFile(filepath.Join("..", "..", "..", "shared", name))
	if err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatalf("the shared checks are missing: %v", err)
		}
		t.Skipf("the shared checks are missing: %v", err)
	}
	return data
}

// Maunga Whau, Auckland: 87 × 61 levels, 10 m apart, in whole metres, from
// 94 to 195 (the grid of R's datasets::volcano; source in the README beside
// it, the extremes from memory).
func volcano(t testing.TB) Raster {
	var file struct {
		Width, Height int
		Values        []float64
	}
	require.NoError(t, json.Unmarshal(shared(t, "terrain/volcano.json"), &file))
	return Raster{Cols: file.Width, Rows: file.Height, West: 2667405, North: 6479005, Cell: 10, Z: file.Values}
}

func TestVolcano(t *testing.T) {
	r := volcano(t)
	require.Equal(t, [2]int{87, 61}, [2]int{r.Cols, r.Rows})
	g := mustGrid(t, r)
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, z := range r.Z {
		lo, hi = math.Min(lo, z), math.Max(hi, z)
	}
	assert.Equal(t, [2]float64{94, 195}, [2]float64{lo, hi})
	// Along a row of centres the cut is the row of the file.
	row := 30
	n := r.North - 10*float64(row)
	vs, gaps := g.Cut(nil, nil, nil, XY{r.West, n}, XY{r.West + 860, n})
	require.Empty(t, gaps)
	require.Len(t, vs, 87)
	for i, v := range vs {
		require.InDelta(t, 10*float64(i), v.D, 1e-9)
		require.InDelta(t, r.Z[row*87+i], v.Z, 1e-9)
	}
	// The volume above 90 m by the triangles is that by direct summation: an
	// inner centre belongs to six triangles of 50 m², a third of each.
	sum := 0.0
	for k, z := range r.Z {
		i, j := k%87, k/87
		sum += (z - 90) * 50 / 3 * float64(trianglesAt(i, j, 87, 61))
	}
	min, max := g.Extent()
	total := 0.0
	g.Triangles(min, max, func(a, b, c [3]float64) bool {
		total += 50 * ((a[2]+b[2]+c[2])/3 - 90)
		return true
	})
	assert.InDelta(t, sum, total, 1e-6)
	for k := range 40 {
		a := float64(k) / 40 * 2 * math.Pi
		from := XY{r.West + 430, r.North - 300}
		checkCut(t, g, from, XY{from[0] + 700*math.Cos(a), from[1] + 700*math.Sin(a)})
	}
}

// trianglesAt counts the triangles at a centre: two in the squares to its
// north-west and south-east, one in the others.
func trianglesAt(i, j, cols, rows int) (n int) {
	for _, s := range [][3]int{{-1, -1, 2}, {0, 0, 2}, {-1, 0, 1}, {0, -1, 1}} {
		if a, b := i+s[0], j+s[1]; a >= 0 && b >= 0 && a < cols-1 && b < rows-1 {
			n += s[2]
		}
	}
	return n
}
