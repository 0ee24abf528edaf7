package profile_test

import (
	"testing"

	"sagcrest/profile"
	"sagcrest/profile/station"
)

// BenchmarkAt reads levels on a grade line of 100 curves.
func BenchmarkAt(b *testing.B) {
	pvi := []profile.PVI{{At: 0, Elev: 100}}
	for i := 1; i <= 100; i++ {
		pvi = append(pvi, profile.PVI{At: station.Station(200 * i), Elev: 100 + float64(i%2), Length: 150})
	}
	pvi = append(pvi, profile.PVI{At: 20200, Elev: 100})
	p := build(b, pvi...)
	b.ReportAllocs()
	s := station.Station(0)
	for b.Loop() {
		if s += 137.3; s > 20200 {
			s -= 20200
		}
		if _, _, ok := p.At(s); !ok {
			b.Fatal(s)
		}
	}
}
