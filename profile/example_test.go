package profile_test

import (
	"fmt"

	"sagcrest/profile"
)

// A sag of 200 m: where is it lowest?
func ExampleNew() {
	p, found := profile.New([]profile.PVI{
		{At: 0, Elev: 110},
		{At: 500, Elev: 100, Length: 200},
		{At: 1000, Elev: 107.5},
	})
	c := p.Curves()[0]
	fmt.Println(len(found), c.Kind, c.Shape)
	fmt.Printf("K %.2f m per percent\n", c.K)
	fmt.Printf("lowest at %.3f m, level %.3f m\n", float64(c.Turning.At), c.Turning.Elev)
	// Output:
	// 0 sag parabola
	// K 57.14 m per percent
	// lowest at 514.286 m, level 100.857 m
}
