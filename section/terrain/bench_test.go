package terrain

import (
	"math"
	"testing"
)

// BenchmarkTriangulate times 50,000 points; the bar is two seconds.
func BenchmarkTriangulate(b *testing.B) {
	for _, s := range surveys {
		pts := s.make(50000)
		b.Run(s.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Triangulate(pts, Accuracy{})
			}
		})
	}
}

// wave is a grid of side × side centres, 1 m apart.
func wave(side int) *Grid {
	r := Raster{Cols: side, Rows: side, West: 483000, North: 5456000, Cell: 1}
	for k := range side * side {
		r.Z = append(r.Z, hills(float64(k%side), float64(k/side)))
	}
	g, _ := NewGrid(r, Accuracy{})
	return g
}

// benchmarkCut cuts sections of a road that runs skew over a surface.
func benchmarkCut(b *testing.B, s Surface, half float64) {
	lo, hi := s.Extent()
	vs, gaps, c := make([]Vertex, 0, 8000), make([]Gap, 0, 10), &Cursor{}
	edges, cuts := 0, 0
	b.ReportAllocs()
	for b.Loop() {
		f := 0.2 + 0.6*float64(cuts%1000)/1000
		e, n := lo[0]+f*(hi[0]-lo[0]), lo[1]+f*(hi[1]-lo[1])
		vs, gaps = s.Cut(c, vs[:0], gaps[:0], XY{e - 0.8*half, n + 0.6*half}, XY{e + 0.8*half, n - 0.6*half})
		edges += len(vs)
		cuts++
	}
	b.ReportMetric(float64(edges)/float64(cuts), "edges/op")
}

// A grid of 10⁶ cells; the bar is 20 µs for a line.
func BenchmarkCutGrid(b *testing.B) {
	g := wave(1000)
	b.Run("100 edges", func(b *testing.B) { benchmarkCut(b, g, 20.6) })
	b.Run("1000 edges", func(b *testing.B) { benchmarkCut(b, g, 206) })
	r := Raster{Cols: 1000, Rows: 1000, West: 483000, North: 5456000, Cell: 1, Z: append([]float64(nil), g.z...)}
	r.Z[0] = math.NaN()
	holes, _ := NewGrid(r, Accuracy{})
	b.Run("1000 edges, with a void", func(b *testing.B) { benchmarkCut(b, holes, 206) })
}

func BenchmarkCutTriangulation(b *testing.B) {
	pts := scatter(50000, 250, func(v float64) float64 { return math.Round(v*100) / 100 })
	t, _ := Triangulate(moved(pts, 483000, 5456000), Accuracy{})
	b.Run("100 edges", func(b *testing.B) { benchmarkCut(b, t, 18) })
	b.Run("from outside", func(b *testing.B) { benchmarkCut(b, t, 400) })
}

func BenchmarkLevel(b *testing.B) {
	pts := scatter(50000, 250, func(v float64) float64 { return v })
	t, _ := Triangulate(moved(pts, 483000, 5456000), Accuracy{})
	c, k := &Cursor{}, 0
	b.ReportAllocs()
	for b.Loop() {
		k++
		t.Level(c, XY{483020 + 0.2*float64(k%1000), 5456020 + 0.2*float64(k/1000%1000)})
	}
}
