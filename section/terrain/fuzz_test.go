package terrain

import (
	"encoding/binary"
	"math"
	"testing"
)

// pointsOf reads points from bytes. The first byte chooses the kind: any
// floats, or small whole steps of a millimetre to a metre, full of ties.
func pointsOf(data []byte) (pts []Point) {
	if len(data) == 0 {
		return nil
	}
	kind, data := data[0], data[1:]
	if kind%4 == 0 {
		for ; len(data) >= 24; data = data[24:] {
			f := func(i int) float64 { return math.Float64frombits(binary.LittleEndian.Uint64(data[8*i:])) }
			pts = append(pts, Point{f(0), f(1), f(2), len(pts) + 1})
		}
		return pts
	}
	step := []float64{0.001, 0.1, 1}[kind%4-1]
	for ; len(data) >= 2; data = data[2:] {
		e, n := step*float64(data[0]%32), step*float64(data[1]%32)
		pts = append(pts, Point{2600000 + e, 5000000 + n, float64(data[0] / 32), len(pts) + 1})
	}
	return pts
}

// FuzzTriangulate: whatever the points, there is a surface or a finding, the
// surface is a triangulation, and cuts of it are finite and in order.
func FuzzTriangulate(f *testing.F) {
	f.Add([]byte{1, 0, 0, 1, 0, 0, 1, 1, 1, 2, 2}, 0.0, 0.0, 1.0, 1.0)
	f.Add([]byte{2, 5, 5, 10, 5, 10, 10, 5, 10, 7, 7, 7, 7}, -3.0, 0.5, 40.0, 0.5)
	f.Add([]byte{3, 0, 0, 1, 1, 2, 2, 3, 3}, 0.0, 0.0, 1.0, 1.0)
	f.Add(append([]byte{0}, make([]byte, 96)...), 0.0, 0.0, math.Inf(1), 1.0)
	f.Fuzz(func(t *testing.T, data []byte, e0, n0, e1, n1 float64) {
		pts := pointsOf(data[:min(len(data), 1200)])
		s, doubts := Triangulate(pts, Accuracy{})
		if s == nil {
			if len(doubts) == 0 {
				t.Fatal("neither a surface nor a finding")
			}
			return
		}
		checkMesh(t, s)
		lo, _ := s.Extent()
		checkFinite(t, s, XY{lo[0] + e0, lo[1] + n0}, XY{lo[0] + e1, lo[1] + n1})
	})
}

// FuzzGrid: any small raster is a grid or an error; cuts of it are finite.
func FuzzGrid(f *testing.F) {
	f.Add(uint8(3), 0.0, 0.0, 1.0, []byte{1, 2, 3, 4, 255, 6, 7, 8, 9}, 0.0, 0.0, 2.0, -2.0)
	f.Add(uint8(2), 5e6, 5e6, 0.1, []byte{1, 2, 3, 4, 5, 6}, -1.0, -1.0, 3.0, 0.0)
	f.Add(uint8(2), 0.0, 0.0, 1e-300, []byte{1, 2, 3, 4}, -1.0, -1.0, math.NaN(), 0.0)
	f.Fuzz(func(t *testing.T, cols uint8, west, north, cell float64, levels []byte, e0, n0, e1, n1 float64) {
		r := Raster{Cols: int(cols), West: west, North: north, Cell: cell}
		for _, b := range levels {
			z := float64(b)
			if b == 255 {
				z = math.NaN()
			}
			r.Z = append(r.Z, z)
		}
		r.Rows = len(levels) / max(1, int(cols))
		g, err := NewGrid(r, Accuracy{})
		if err != nil {
			return
		}
		checkFinite(t, g, XY{west + e0, north + n0}, XY{west + e1, north + n1})
	})
}

func checkFinite(t *testing.T, s Surface, from, to XY) {
	vs, gaps := s.Cut(&Cursor{}, nil, nil, from, to)
	for i, v := range vs {
		if math.IsNaN(v.D+v.Z) || math.IsInf(v.D+v.Z, 0) || i > 0 && v.D <= vs[i-1].D {
			t.Fatalf("vertex %d of %v", i, vs)
		}
	}
	for i, g := range gaps {
		if onMap(from) && onMap(to) && !(g.From <= g.To) || i > 0 && g.From < gaps[i-1].To {
			t.Fatalf("gap %d of %v", i, gaps)
		}
	}
}
