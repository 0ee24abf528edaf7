package raster_test

import (
	"fmt"

	"sagcrest/config/raster"
)

func Example() {
	grid := []byte("ncols 3\nnrows 2\nxllcorner 100\nyllcorner 200\ncellsize 10\nNODATA_value -1\n" +
		"31.5 31.7 32.0\n31.2 -1 31.6\n")
	r, problems := raster.Read("survey/meadow.asc", grid, raster.Options{Unit: 1})
	fmt.Println(len(problems), "problems,", r.Voids, "void")
	fmt.Println("centre of the north-west cell:", r.Levels.West, r.Levels.North, "level", r.Levels.Z[0])

	_, problems = raster.Read("survey/meadow.asc", grid[:len(grid)-6], raster.Options{Unit: 1})
	fmt.Println(problems[0])
	// Output:
	// 0 problems, 1 void
	// centre of the north-west cell: 105 215 level 31.5
	// survey/meadow.asc:8:8: E F02 the file ends after 5 of 6 levels (3 columns × 2 rows)
	//     31.2 -1
	//            ^
	//   help: get the file again from its source
}
