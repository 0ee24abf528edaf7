package earthwork

import (
	"fmt"

	"sagcrest/profile/station"
)

// zeroArea is the area in m² below which a section counts as run out: half of
// the last digit that areas are printed with, so that no rule hangs on the
// rounding of sums.
const zeroArea = 0.5e-6

// Methods lists the rules that are built, in the order results list them.
func Methods() [2]Method { return [2]Method{EndArea, Pyramid} }

// Volume returns the volume between two areas of one kind, cut or fill, a
// length apart, in the product of their units:
//
//	average end areas   V = (A1 + A2)/2 · L
//	pyramid             V = A · L/3 where exactly one area has run out, else as above
//
// Both areas and the length are 0 or more; a negative one is a caller's
// mistake. The pyramid rule jumps by a third of the end-area volume at the area
// that counts as zero, 0.5e-6 (m²). Sources: W. L. Webb, Railroad Construction:
// Theory and Practice, art. on the prismoidal correction (the extreme of the
// end-area error); Fundamentals of Transportation (Wikibooks), sec. 7.3.
func (m Method) Volume(a1, a2, length float64) float64 {
	return m.factor(a1, a2) * (a1 + a2) * length
}

// factor multiplies the sum of two areas. It depends on the whole of a kind,
// never on one material of it, so that the materials of a cut sum to the cut.
func (m Method) factor(a1, a2 float64) float64 {
	if m == Pyramid && ranOut(a1, a2) {
		return 1.0 / 3
	}
	return 1.0 / 2
}

// ranOut reports whether exactly one of two areas is zero.
func ranOut(a1, a2 float64) bool { return (a1 < zeroArea) != (a2 < zeroArea) }

// AreaVolume is what lies between two stations. Both volumes are in place: cut
// as it lies in the ground, fill as it lies in the embankment.
type AreaVolume struct {
	From, To station.Station
	Cut      Bank
	Fill     Compacted
}

// FromAreas returns the volumes between areas measured at stations, one row an
// interval, and their sum. Stations (m) must not decrease; cut and fill hold one
// area (m², 0 or more) a station, nil where there is none of a kind. It fails
// when lengths differ, when there are fewer than two stations, and on negative
// areas.
func FromAreas(m Method, at []station.Station, cut, fill []float64) (each []AreaVolume, sum AreaVolume, err error) {
	if len(at) < 2 {
		return nil, sum, fmt.Errorf("volumes need two stations or more, not %d", len(at))
	}
	if cut, err = oneEach("cut", cut, len(at)); err != nil {
		return nil, sum, err
	}
	if fill, err = oneEach("fill", fill, len(at)); err != nil {
		return nil, sum, err
	}
	sum = AreaVolume{From: at[0], To: at[len(at)-1]}
	for i := 1; i < len(at); i++ {
		l := float64(at[i] - at[i-1])
		if !(l >= 0) {
			return nil, AreaVolume{}, fmt.Errorf("station %g follows %g: stations must not decrease", at[i], at[i-1])
		}
		v := AreaVolume{at[i-1], at[i], Bank(m.Volume(cut[i-1], cut[i], l)), Compacted(m.Volume(fill[i-1], fill[i], l))}
		each = append(each, v)
		sum.Cut += v.Cut
		sum.Fill += v.Fill
	}
	return each, sum, nil
}

// oneEach returns the areas of a kind, zeros where there are none, or says what
// is wrong with them.
func oneEach(kind string, areas []float64, n int) ([]float64, error) {
	if areas == nil {
		return make([]float64, n), nil
	}
	if len(areas) != n {
		return nil, fmt.Errorf("%d areas of %s for %d stations", len(areas), kind, n)
	}
	for _, a := range areas {
		if !(a >= 0) {
			return nil, fmt.Errorf("area of %s %g: areas are 0 or more", kind, a)
		}
	}
	return areas, nil
}
