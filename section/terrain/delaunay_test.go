package terrain

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// checkMesh asserts by rational arithmetic that a triangulation is one: all
// triangles anticlockwise, neighbours agree, no corner inside a neighbour's
// circle (which makes every circle empty), a convex hull, the area of the
// triangles that of the hull, and every site used.
func checkMesh(t require.TestingT, tri *Triangulation) {
	m := &tri.mesh
	used := make([]bool, len(m.pts))
	area := 0.0
	for h := int32(0); int(h) < len(m.org); h++ {
		used[m.org[h]] = true
		a, b := m.ends(h)
		c := m.at(m.org[prev(h)])
		if h%3 == 0 {
			require.Equal(t, 1, bigOrient(a, b, c), "triangle %d", h/3)
			area += product(point{b.x - a.x, b.y - a.y}, point{c.x - a.x, c.y - a.y})
		}
		g := m.twin[h]
		if g < 0 {
			require.Equal(t, h, tri.rim[^g])
			continue
		}
		require.Equal(t, h, m.twin[g])
		require.Equal(t, m.org[next(h)], m.org[g])
		require.LessOrEqual(t, bigIncircle(a, b, c, m.at(m.org[prev(g)])), 0, "edge %d", h)
	}
	require.NotContains(t, used, false)
	checkHull(t, tri, area)
	// Euler: with n sites of which k are on the hull there are 2n − 2 − k triangles.
	require.Equal(t, 2*len(m.pts)-2-len(tri.rim), tri.Len())
}

func checkHull(t require.TestingT, tri *Triangulation, area float64) {
	hull := 0.0
	n := len(tri.rim)
	for i := range n {
		a, b := tri.mesh.ends(tri.rim[i])
		b2, c := tri.mesh.ends(tri.rim[(i+1)%n])
		require.Equal(t, b, b2)
		require.GreaterOrEqual(t, bigOrient(a, b, c), 0, "hull corner %d", i)
		o, _ := tri.mesh.ends(tri.rim[0])
		hull += product(point{a.x - o.x, a.y - o.y}, point{b.x - o.x, b.y - o.y})
	}
	require.InEpsilon(t, hull, area, 1e-12)
}

func TestDelaunay(t *testing.T) {
	for _, s := range surveys {
		t.Run(s.name, func(t *testing.T) {
			tri, doubts := Triangulate(s.make(3000), Accuracy{})
			require.NotNil(t, tri)
			assert.Empty(t, doubts)
			checkMesh(t, tri)
		})
	}
}

// Oracle for the local test above: no site at all inside any circle.
func TestEmptyCircles(t *testing.T) {
	for _, s := range surveys {
		tri, _ := Triangulate(s.make(90), Accuracy{})
		m := &tri.mesh
		for h := int32(0); int(h) < len(m.org); h += 3 {
			for _, p := range m.pts {
				in := bigIncircle(m.at(m.org[h]), m.at(m.org[h+1]), m.at(m.org[h+2]), p)
				require.LessOrEqual(t, in, 0, "%s: %v in the circle of triangle %d", s.name, p, h/3)
			}
		}
	}
}

// Law: small sets of whole points, full of ties, lines and duplicates, give a
// triangulation or a finding, never both or neither.
func TestSmallSets(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		side := rapid.IntRange(0, 6).Draw(t, "side")
		pts := rapid.SliceOfN(rapid.Custom(func(t *rapid.T) Point {
			return Point{E: float64(rapid.IntRange(0, side).Draw(t, "e")), N: float64(rapid.IntRange(0, side).Draw(t, "n"))}
		}), 0, 40).Draw(t, "points")
		tri, doubts := Triangulate(pts, Accuracy{})
		if tri == nil {
			require.Equal(t, "F02", string(doubts[0].Code))
			return
		}
		require.Empty(t, doubts)
		checkMesh(t, tri)
		checkFans(t, tri)
	})
}

// checkFans asserts fine print 2: where two triangles share a circle, their
// common edge ends in the westernmost, of several the southernmost, of all the
// points on that circle.
func checkFans(t require.TestingT, tri *Triangulation) {
	m := &tri.mesh
	for h, g := range m.twin {
		h := int32(h)
		if g < h {
			continue
		}
		a, b := m.ends(h)
		c, d := m.at(m.org[prev(h)]), m.at(m.org[prev(g)])
		if bigIncircle(a, b, c, d) != 0 {
			continue
		}
		first := a
		for _, p := range m.pts {
			if bigIncircle(a, b, c, p) == 0 && (p.x < first.x || p.x == first.x && p.y < first.y) {
				first = p
			}
		}
		require.True(t, a == first || b == first, "edge %v %v, westernmost %v", a, b, first)
	}
}

func TestTiesOnCircles(t *testing.T) {
	for _, s := range surveys {
		if tri, _ := Triangulate(s.make(200), Accuracy{}); tri != nil {
			checkFans(t, tri)
		}
	}
	// A square of 0.1 m, off the origin: its diagonal is the one through the
	// south-west corner, though 0.1 and 0.2 are no binary fractions.
	tri, _ := Triangulate([]Point{{0.1, 0.1, 0, 1}, {0.2, 0.1, 1, 2}, {0.2, 0.2, 0, 3}, {0.1, 0.2, 1, 4}}, Accuracy{})
	z, ok := tri.Level(&Cursor{}, XY{0.15, 0.15})
	assert.True(t, ok)
	assert.InDelta(t, 0, z, 1e-12)
}

// text writes every triangle with all its bits.
func text(tri *Triangulation) string {
	var out strings.Builder
	lo, hi := tri.Extent()
	tri.Triangles(lo, hi, func(a, b, c [3]float64) bool {
		fmt.Fprintf(&out, "%x %x %x\n", a, b, c)
		return true
	})
	return out.String()
}

// Law: the order of the survey changes no byte.
func TestShuffling(t *testing.T) {
	for _, s := range surveys {
		pts := s.make(600)
		// Every tenth place twice, at another level.
		for i := 0; i < len(pts); i += 10 {
			p := pts[i]
			p.Z += 0.013 * float64(1+i%3)
			p.E += 0.0001
			pts = append(pts, p)
		}
		want, doubts := Triangulate(pts, Accuracy{})
		for seed := range uint64(3) {
			got, again := Triangulate(shuffled(pts, seed), Accuracy{})
			require.Equal(t, text(want), text(got), s.name)
			require.Equal(t, doubts, again, s.name)
		}
	}
}

func TestDuplicates(t *testing.T) {
	pts := []Point{
		{0, 0, 1, 1}, {10, 0, 1, 2}, {10, 10, 1, 3}, {0, 10, 1, 4},
		{5.0002, 5, 3.000, 5}, {5.0004, 5, 3.020, 6}, // 20 mm apart: no finding
		{7, 5, 2.000, 7}, {7.0001, 5.0001, 2.021, 8}, {6.9999, 5, 2.010, 9},
	}
	tri, doubts := Triangulate(pts, Accuracy{})
	require.Len(t, doubts, 1)
	assert.Equal(t, "U08", string(doubts[0].Code))
	assert.Equal(t, []any{7, 8}, doubts[0].Args[2:4])
	assert.InDelta(t, 0.021, doubts[0].Measured.Value, 1e-12)
	z, ok := tri.Level(&Cursor{}, XY{5.0003, 5})
	assert.True(t, ok)
	assert.InDelta(t, 3.010, z, 1e-9)
	z, _ = tri.Level(&Cursor{}, XY{7, 5 + 0.0001/3})
	assert.InDelta(t, (2.000+2.010+2.021)/3, z, 1e-9)
	checkMesh(t, tri)
}

// Two points on both sides of a rounding limit, nearer than the grain of the
// local coordinates, are one place to the mesh.
func TestNearTheRoundingLimit(t *testing.T) {
	half := 0.0005
	for range 3 {
		below := math.Nextafter(half, 0)
		tri, _ := Triangulate([]Point{{0, 0, 0, 1}, {1, 0, 0, 2}, {0, 1, 0, 3}, {half, 0.25, 0, 4}, {below, 0.25, 0, 5}}, Accuracy{})
		require.NotNil(t, tri)
		checkMesh(t, tri)
		half += 0.001
	}
}

func TestNoSurface(t *testing.T) {
	line := func(n int) (pts []Point) {
		for i := range n {
			// Whole multiples of 0.1 lie on one line, though their binary
			// fractions do not.
			pts = append(pts, Point{E: 0.1 * float64(i), N: 0.3 * float64(i)})
		}
		return pts
	}
	for name, c := range map[string]struct {
		pts []Point
		why string
	}{
		"none":       {nil, "fewer than three points"},
		"two":        {line(2), "fewer than three points"},
		"one place":  {make([]Point, 5), "fewer than three different places"},
		"one line":   {line(50), "all points lie on one line"},
		"no number":  {append(line(3), Point{E: math.NaN(), Row: 4}), "row 4 holds NaN, which is no coordinate or level within ±1e+08 m"},
		"infinite":   {append(line(3), Point{N: math.Inf(-1), Row: 5}), "row 5 holds -Inf, which is no coordinate or level within ±1e+08 m"},
		"far level":  {append(line(3), Point{Z: 1e300, Row: 6}), "row 6 holds 1e+300, which is no coordinate or level within ±1e+08 m"},
		"far beyond": {append(line(3), Point{E: 1e9, Row: 7}), "row 7 holds 1e+09, which is no coordinate or level within ±1e+08 m"},
	} {
		tri, doubts := Triangulate(c.pts, Accuracy{})
		assert.Nil(t, tri, name)
		require.Len(t, doubts, 1, name)
		assert.Equal(t, "F02", string(doubts[0].Code), name)
		assert.Equal(t, []any{"the survey makes no surface: " + c.why}, doubts[0].Args, name)
	}
}

// Every finding has a rule, with one verb for each of its arguments.
func TestRules(t *testing.T) {
	_, doubts := Triangulate([]Point{{0, 0, 0, 1}, {0, 0, 1, 2}, {1, 0, 0, 3}, {0, 1, 0, 4}}, Accuracy{})
	rules := map[string]string{}
	for _, r := range Rules() {
		rules[string(r.Code)] = r.Message
	}
	require.Len(t, rules, 1)
	for _, f := range doubts {
		assert.NotContains(t, fmt.Sprintf(rules[string(f.Code)], f.Args...), "%!")
	}
}

func TestCarried(t *testing.T) {
	acc := Accuracy{0.02, 0.05, 50, 0.01}
	tri, _ := Triangulate(lattice(9, 1), acc)
	assert.Equal(t, acc, tri.Accuracy())
	lo, hi := tri.Extent()
	assert.Equal(t, [2]XY{{0, 0}, {2, 2}}, [2]XY{lo, hi})
	assert.Equal(t, 8, tri.Len())
	n := 0
	tri.Triangles(XY{0.2, 0.2}, XY{0.3, 0.4}, func(_, _, _ [3]float64) bool { n++; return true })
	assert.Equal(t, 2, n, "the triangles of one square meet a box inside it")
	n = 0
	tri.Triangles(lo, hi, func(_, _, _ [3]float64) bool { n++; return false })
	assert.Equal(t, 1, n)
}
