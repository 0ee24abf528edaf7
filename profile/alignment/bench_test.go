package alignment_test

import (
	"math"
	"testing"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
)

// winding is an alignment of 50 bends with clothoids: 201 elements.
func winding(b *testing.B) *alignment.Alignment {
	pi := []alignment.PI{{}}
	az := 0.0
	for i := range 50 {
		last := pi[len(pi)-1]
		pi = append(pi, alignment.PI{E: last.E + 400*math.Sin(az), N: last.N + 400*math.Cos(az), Radius: 300, SpiralIn: 40, SpiralOut: 40})
		az += 0.5 * float64(1-2*(i%2))
	}
	last := pi[len(pi)-1]
	pi = append(pi, alignment.PI{E: last.E + 400*math.Sin(az), N: last.N + 400*math.Cos(az)})
	return lay(b, pi...)
}

func BenchmarkLocateNear(b *testing.B) {
	a := winding(b)
	b.ReportAllocs()
	s := station.Station(0)
	for b.Loop() {
		if s += 137.3; s > a.Length() {
			s -= a.Length()
		}
		p := a.Point(s, 8)
		if _, _, ok := a.LocateNear(p, s+5); !ok {
			b.Fatal(s)
		}
	}
}

func BenchmarkPointOnClothoid(b *testing.B) {
	a := winding(b)
	e := a.Elements()[1]
	b.ReportAllocs()
	l := station.Station(0)
	for b.Loop() {
		if l += 0.037; l > 40 {
			l -= 40
		}
		a.At(e.Over.From + l)
	}
}

func BenchmarkLocate(b *testing.B) {
	a := winding(b)
	b.ReportAllocs()
	s := station.Station(0)
	for b.Loop() {
		if s += 137.3; s > a.Length() {
			s -= a.Length()
		}
		if _, _, ok := a.Locate(a.Point(s, 8)); !ok {
			b.Fatal(s)
		}
	}
}
