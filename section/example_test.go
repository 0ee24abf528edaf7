package section_test

import (
	"fmt"

	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/section"
)

// A level road 2 m below level ground, cut square at its middle.
func ExampleRoad_Slice() {
	line, _ := alignment.New([]alignment.PI{{N: 0}, {N: 100}})
	grade, _ := profile.New([]profile.PVI{{At: 0, Elev: 98}, {At: 100, Elev: 98}})
	road, found := section.NewRoad(section.Parts{
		Line: line, Grade: grade, Ground: shaped{corners: []section.Point{{O: -1, Z: 100}, {O: 1, Z: 100}}},
		Typicals: []section.Typical{twoLanes()}, Strip: section.Stripping{Depth: 0.25},
	})
	var w section.Scratch
	var s section.Slice
	road.Slice(&w, &s, 50, false)
	fmt.Println(len(found), s.OK, s.Left.Cut)
	fmt.Printf("cut %.3f m², fill %.3f m²\n", s.Cut.Area, s.Fill.Area)
	fmt.Printf("catch points %.3f and %.3f m\n", s.Left.Catch.O, s.Right.Catch.O)
	// Output:
	// 0 true true
	// cut 43.771 m², fill 0.000 m²
	// catch points -11.271 and 11.271 m
}
