package alignment_test

import (
	"fmt"

	"sagcrest/profile/alignment"
)

// A right turn of 90 degrees with radius 200 m.
func ExampleNew() {
	a, found := alignment.New([]alignment.PI{
		{N: 0, E: 0},
		{N: 500, E: 0, Radius: 200},
		{N: 500, E: 500},
	})
	fmt.Println(len(found), len(a.Elements()))
	fmt.Printf("length %.3f m\n", float64(a.Length()))
	s, o, _ := a.Locate(a.Point(450, -5))
	fmt.Printf("station %.3f, offset %.3f\n", float64(s), float64(o))
	// Output:
	// 0 3
	// length 914.159 m
	// station 450.000, offset -5.000
}
