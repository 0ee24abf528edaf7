package profile

import (
	"math"

	"sagcrest/profile/station"
)

// Fix tells which point of a vertical curve is given.
type Fix byte

// The three points a curve can be hung on.
const (
	AtPVI Fix = iota
	AtPVC
	AtPVT
)

// Vertical is one vertical curve by itself: a parabola, two parabolas with a
// common tangent under the PVI (lengths L1 and L2 before and after it), or a
// circle. It knows no unit: lengths and levels share one. Grades are ratios.
type Vertical struct {
	PVC, PVI, PVT Point
	G1, G2        float64
	L1, L2        float64
	Circular      bool
}

// NewVertical hangs a curve of lengths l1 and l2 (horizontal, PVC to PVI to PVT)
// on one of its points. References: AASHTO, A Policy on Geometric Design,
// ch. 3 (parabolas); J. Uren, W. F. Price, Surveying for Engineers, on vertical
// curves (two parabolas).
func NewVertical(fix Fix, at Point, g1, g2, l1, l2 float64) Vertical {
	v := Vertical{G1: g1, G2: g2, L1: l1, L2: l2}
	v.hang(fix, at)
	return v
}

// NewCircular hangs a circular curve of horizontal length l on one of its
// points. Its two tangents have one length along the slope, so that the PVI
// stands nearer to the steeper side.
func NewCircular(fix Fix, at Point, g1, g2, l float64) Vertical {
	a1, a2 := math.Atan(g1), math.Atan(g2)
	v := Vertical{G1: g1, G2: g2, L1: l / 2, L2: l / 2, Circular: g1 != g2}
	if v.Circular {
		// T = R·tan(δ/2) with L = R(sin a2 − sin a1), freed of differences.
		t := l / (2 * math.Cos((a1+a2)/2) * math.Cos((a2-a1)/2))
		v.L1, v.L2 = t*math.Cos(a1), t*math.Cos(a2)
	}
	v.hang(fix, at)
	return v
}

// shift moves a point along a grade.
func shift(p Point, d, g float64) Point {
	return Point{p.At + station.Station(d), p.Elev + g*d}
}

func (v *Vertical) hang(fix Fix, at Point) {
	switch fix {
	case AtPVC:
		v.PVI = shift(at, v.L1, v.G1)
	case AtPVT:
		v.PVI = shift(at, -v.L2, v.G2)
	default:
		v.PVI = at
	}
	v.PVC, v.PVT = shift(v.PVI, -v.L1, v.G1), shift(v.PVI, v.L2, v.G2)
}

// Length returns the horizontal length.
func (v Vertical) Length() float64 { return v.L1 + v.L2 }

// A returns the change of grade, a ratio.
func (v Vertical) A() float64 { return v.G2 - v.G1 }

// K returns the length per percent of |A|; ok is false where the grade does not
// change.
func (v Vertical) K() (k float64, ok bool) {
	if v.A() == 0 {
		return 0, false
	}
	return v.Length() / (100 * math.Abs(v.A())), true
}

// Kind tells how the grade changes.
func (v Vertical) Kind() Kind {
	switch {
	case v.A() > 0:
		return Sag
	case v.A() < 0:
		return Crest
	}
	return None
}

// bends returns how the grade changes per length in the two halves of a
// parabola: they meet under the PVI with one grade.
func (v Vertical) bends() (r1, r2 float64) {
	l := v.Length()
	if l == 0 {
		return 0, 0
	}
	return v.A() * v.L2 / (v.L1 * l), v.A() * v.L1 / (v.L2 * l)
}

// radius returns the signed radius of a circular curve, positive in a sag.
func (v Vertical) radius() float64 {
	return v.Length() / (math.Sin(math.Atan(v.G2)) - math.Sin(math.Atan(v.G1)))
}

// At returns level and grade at distance s along the axis of its points; on the
// tangents outside the curve.
func (v Vertical) At(s float64) (z, g float64) {
	x := s - float64(v.PVC.At)
	switch {
	case x < 0 || v.Length() == 0 && s < float64(v.PVI.At):
		return v.PVC.Elev + v.G1*x, v.G1
	case x > v.Length() || v.Length() == 0:
		return v.PVT.Elev + v.G2*(s-float64(v.PVT.At)), v.G2
	case v.Circular:
		return v.onCircle(x)
	}
	r1, r2 := v.bends()
	if x <= v.L1 {
		return v.PVC.Elev + v.G1*x + r1/2*x*x, v.G1 + r1*x
	}
	y := v.Length() - x
	return v.PVT.Elev - v.G2*y + r2/2*y*y, v.G2 - r2*y
}

// onCircle uses that a chord lies at the mean of the two slopes at its ends,
// which loses nothing however large the radius.
func (v Vertical) onCircle(x float64) (z, g float64) {
	sin1, sin2 := math.Sin(math.Atan(v.G1)), math.Sin(math.Atan(v.G2))
	a := math.Asin(sin1 + x/v.Length()*(sin2-sin1))
	return v.PVC.Elev + x*math.Tan((math.Atan(v.G1)+a)/2), math.Tan(a)
}

// Turning returns where the grade is zero, nil outside the curve and for equal
// grades. The ends belong to the curve.
func (v Vertical) Turning() *Point {
	if v.A() == 0 || v.G1*v.G2 > 0 {
		return nil
	}
	if v.Length() == 0 {
		if v.G1 == 0 || v.G2 == 0 {
			return nil
		}
		p := v.PVI
		return &p
	}
	x := v.turningAt()
	z, _ := v.At(float64(v.PVC.At) + x)
	p := shift(v.PVC, x, 0)
	p.Elev = z
	return &p
}

// turningAt returns the distance of the turning point from the PVC.
func (v Vertical) turningAt() float64 {
	if v.Circular {
		return -v.radius() * math.Sin(math.Atan(v.G1))
	}
	r1, r2 := v.bends()
	if x := -v.G1 / r1; x <= v.L1 {
		return x
	}
	return v.Length() - v.G2/r2
}

// Extremes returns the highest and the lowest point of the curve, ends
// included; on a tie the first.
func (v Vertical) Extremes() (high, low Point) {
	all := []Point{v.PVC}
	if t := v.Turning(); t != nil {
		all = append(all, *t)
	}
	all = append(all, v.PVT)
	high, low = all[0], all[0]
	for _, p := range all[1:] {
		if p.Elev > high.Elev {
			high = p
		}
		if p.Elev < low.Elev {
			low = p
		}
	}
	return high, low
}

// Flat returns the stretch inside the curve where |grade| is below a limit; ok
// is false where there is none. The grade is monotone, so there is one at most.
func (v Vertical) Flat(limit float64) (from, to float64, ok bool) {
	if v.A() == 0 || v.Length() == 0 {
		return 0, 0, false
	}
	lo, hi := -limit, limit
	if v.A() < 0 {
		lo, hi = hi, lo
	}
	from, to = v.gradeAt(lo), v.gradeAt(hi)
	return from, to, to > from
}

// gradeAt returns the place of a grade, kept inside the curve.
func (v Vertical) gradeAt(g float64) float64 {
	x := 0.0
	r1, r2 := v.bends()
	switch {
	case v.Circular:
		x = v.radius() * (math.Sin(math.Atan(g)) - math.Sin(math.Atan(v.G1)))
	case (g-v.G1)/r1 <= v.L1:
		x = (g - v.G1) / r1
	default:
		x = v.Length() + (g-v.G2)/r2
	}
	return float64(v.PVC.At) + math.Min(math.Max(x, 0), v.Length())
}
