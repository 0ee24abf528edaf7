package profile

import (
	"math"

	"sagcrest/profile/station"
)

// Point is a place of the grade line.
type Point struct {
	At   station.Station
	Elev float64
}

// Kind tells how the grade changes at a PVI.
type Kind string

// The grade falls (crest), rises (sag) or stays.
const (
	Crest Kind = "crest"
	Sag   Kind = "sag"
	None  Kind = "none"
)

// Shape tells how a PVI is rounded.
type Shape string

// A symmetrical parabola, or an angle without a curve.
const (
	Parabola Shape = "parabola"
	Break    Shape = "break"
)

// Curve is what stands at an interior PVI. Grades are ratios; Length in metres,
// 0 for a break; K in metres per percent, 0 where the grade does not change.
type Curve struct {
	PVC, PVI, PVT Point
	G1, G2        float64
	Length, K     float64
	Kind          Kind
	Shape         Shape
	Turning       *Point // where the grade passes through zero, nil outside [PVC, PVT]
	Index         int    // of the PVI, from 0
}

// A returns the change of grade G2 − G1, a ratio.
func (c Curve) A() float64 { return c.G2 - c.G1 }

// newCurve solves the curve at pvi[i] (AASHTO, A Policy on Geometric Design of
// Highways and Streets, ch. 3, Vertical Alignment: L = K·A).
func newCurve(pvi []PVI, i int) Curve {
	a, b, c := pvi[i-1], pvi[i], pvi[i+1]
	v := Curve{PVI: Point{b.At, b.Elev}, Shape: Parabola, Index: i,
		G1: (b.Elev - a.Elev) / float64(b.At-a.At),
		G2: (c.Elev - b.Elev) / float64(c.At-b.At),
	}
	change := math.Abs(v.A())
	switch {
	case b.Length > 0:
		v.Length = b.Length
	case b.K > 0:
		v.Length = b.K * 100 * change
	case b.Radius > 0:
		v.Length = b.Radius * change
	}
	if v.Length == 0 {
		v.Shape = Break
	}
	solved := NewVertical(AtPVI, v.PVI, v.G1, v.G2, v.Length/2, v.Length/2)
	v.PVC, v.PVT, v.Turning, v.Kind = solved.PVC, solved.PVT, solved.Turning(), solved.Kind()
	v.K, _ = solved.K()
	return v
}

// Curves returns what stands at every interior PVI, in order.
func (p *Profile) Curves() []Curve { return append([]Curve(nil), p.curves...) }
