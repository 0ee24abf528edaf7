package terrain

import (
	"math"
	"math/rand/v2"
)

// The surveys that a triangulation must bear. Each gives about n points,
// always the same.
var surveys = []struct {
	name string
	make func(n int) []Point
}{
	{"random", func(n int) []Point { return scatter(n, 1000, func(v float64) float64 { return v }) }},
	{"centimetres on a map", func(n int) []Point {
		return moved(scatter(n, 20, func(v float64) float64 { return math.Round(v*100) / 100 }), 483700, 5455500)
	}},
	{"grid", func(n int) []Point { return lattice(n, 1) }},
	{"grid of 0.1 m on a map", func(n int) []Point { return moved(lattice(n, 0.1), 2600000, 5000000) }},
	{"circles", circles},
	{"rows", rows},
	{"clusters", clusters},
	{"corridor", corridor},
	{"curve", curve},
}

func hills(e, n float64) float64 { return 100 + 3*math.Sin(e/17) + 2*math.Cos(n/11) + 0.02*e }

func source() *rand.Rand { return rand.New(rand.NewPCG(3, 14)) }

func scatter(n int, side float64, round func(float64) float64) []Point {
	r := source()
	pts := make([]Point, n)
	for i := range pts {
		e, u := round(r.Float64()*side), round(r.Float64()*side)
		pts[i] = Point{e, u, hills(e, u), i + 1}
	}
	return pts
}

func moved(pts []Point, e, n float64) []Point {
	for i := range pts {
		pts[i].E += e
		pts[i].N += n
	}
	return pts
}

func lattice(n int, cell float64) []Point {
	side := int(math.Sqrt(float64(n)))
	var pts []Point
	for i := range side {
		for j := range side {
			e, u := float64(i)*cell, float64(j)*cell
			pts = append(pts, Point{e, u, hills(e, u), len(pts) + 1})
		}
	}
	return pts
}

// circles are whole-number points of concentric circles: many on each, exactly.
func circles(n int) []Point {
	var pts []Point
	for k := 1; len(pts) < n; k++ {
		for _, c := range [][2]float64{{3, 4}, {5, 0}, {4, 3}, {0, 5}} {
			for _, s := range [][2]float64{{1, 1}, {1, -1}, {-1, 1}, {-1, -1}} {
				e, u := float64(k)*c[0]*s[0], float64(k)*c[1]*s[1]
				pts = append(pts, Point{e, u, hills(e, u), len(pts) + 1})
			}
		}
	}
	return pts
}

// rows are points on a few long lines, the last one far off.
func rows(n int) []Point {
	var pts []Point
	for i := range n {
		e, u := float64(i/4), []float64{0, 1, 2, 500}[i%4]
		pts = append(pts, Point{e, u, hills(e, u), i + 1})
	}
	return pts
}

func clusters(n int) []Point {
	r := source()
	var pts []Point
	for i := range n {
		c := float64(i % 5)
		e, u := c*c*900+r.NormFloat64(), c*300+r.NormFloat64()*0.01
		pts = append(pts, Point{e, u, hills(e, u), i + 1})
	}
	return pts
}

// corridor are lines surveyed square to a skew road, in binary fractions.
func corridor(n int) []Point {
	var pts []Point
	for i := range n / 9 {
		for j := -4; j <= 4; j++ {
			e := 20*float64(i)*0.8 + 5*float64(j)*0.6
			u := 20*float64(i)*0.6 - 5*float64(j)*0.8
			pts = append(pts, Point{e, u, hills(e, u), len(pts) + 1})
		}
	}
	return pts
}

// curve are points on a parabola: all on the hull.
func curve(n int) []Point {
	var pts []Point
	for i := range min(n, 2000) {
		e := float64(i)
		pts = append(pts, Point{e, e * e / 4, hills(e, 0), i + 1})
	}
	return pts
}

func shuffled(pts []Point, seed uint64) []Point {
	out := append([]Point(nil), pts...)
	rand.New(rand.NewPCG(seed, 1)).Shuffle(len(out), func(i, j int) { out[i], out[j] = out[j], out[i] })
	return out
}
