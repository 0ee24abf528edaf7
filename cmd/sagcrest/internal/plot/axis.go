package plot

import "math"

// Scale says in which unit people count along an axis of metres. A mark stands
// at every round number of units; Start is the number that belongs to 0 m, such
// as the label of a road's first point. The zero value counts metres from zero.
type Scale struct {
	Unit  float64 // metres (cubic metres of the mass diagram) in one unit; 0 is 1
	Start float64 // units
}

// Marks returns the places in metres of at most n+1 round numbers from a to b.
func (s Scale) Marks(a, b float64, n int) (at []float64) {
	unit := s.Unit
	if unit == 0 {
		unit = 1
	}
	first, last := s.Start+a/unit, s.Start+b/unit
	every := step(last-first, n)
	// A part in 1e9 of a step is far below what a pen can show: it only keeps
	// the marks that rounding would push over an end.
	for k := math.Ceil(first/every - 1e-9); k <= math.Floor(last/every+1e-9); k++ {
		at = append(at, (k*every-s.Start)*unit)
	}
	return at
}

// axis is a scale with the words at its marks, which are given in metres.
type axis struct {
	Scale
	label func(float64) string
}

// step returns a round step that cuts a length into at most n parts.
func step(length float64, n int) float64 {
	if length <= 0 {
		return 1
	}
	raw := length / float64(n)
	unit := math.Pow(10, math.Floor(math.Log10(raw)))
	for _, m := range []float64{1, 2, 5, 10} {
		if m*unit >= raw*(1-1e-9) {
			return m * unit
		}
	}
	return 10 * unit
}
