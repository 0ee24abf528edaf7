package earthwork_test

import (
	"fmt"

	"sagcrest/earthwork"
	"sagcrest/profile/station"
)

// The areas of a road that runs from fill into cut, by both rules: where an area
// runs out the pyramid has a third of it, end areas a half.
func ExampleFromAreas() {
	stations := []station.Station{0, 20, 40}
	cut, fill := []float64{0, 0, 12}, []float64{30, 6, 0}
	for _, m := range earthwork.Methods() {
		_, sum, err := earthwork.FromAreas(m, stations, cut, fill)
		fmt.Printf("%s: cut %.0f m³ bank, fill %.0f m³ compacted, %v\n", m, float64(sum.Cut), float64(sum.Fill), err)
	}
	// Output:
	// end_area: cut 120 m³ bank, fill 420 m³ compacted, <nil>
	// pyramid: cut 80 m³ bank, fill 400 m³ compacted, <nil>
}
