package terrain_test

import (
	"fmt"

	"sagcrest/section/terrain"
)

// A bank 2 m high, surveyed at six points, is cut square to its edge from
// outside the survey.
func Example() {
	bank, doubts := terrain.Triangulate([]terrain.Point{
		{E: 500, N: 200, Z: 10}, {E: 506, N: 200, Z: 12}, {E: 520, N: 200, Z: 12},
		{E: 500, N: 230, Z: 10}, {E: 506, N: 230, Z: 12}, {E: 520, N: 230, Z: 12},
	}, terrain.Accuracy{Independent: 0.02})
	fmt.Println("doubts:", len(doubts))

	var c terrain.Cursor
	line, gaps := bank.Cut(&c, nil, nil, terrain.XY{495, 215}, terrain.XY{515, 215})
	for _, v := range line {
		fmt.Printf("%5.2f m along the line: level %.3f\n", v.D, v.Z)
	}
	for _, g := range gaps {
		fmt.Printf("nothing known from %.2f to %.2f m, outside: %v\n", g.From, g.To, g.Outside)
	}
	// Output:
	// doubts: 0
	//  5.00 m along the line: level 10.000
	//  8.00 m along the line: level 11.000
	// 11.00 m along the line: level 12.000
	// 18.00 m along the line: level 12.000
	// 20.00 m along the line: level 12.000
	// nothing known from 0.00 to 5.00 m, outside: true
}
