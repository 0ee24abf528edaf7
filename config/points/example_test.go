package points_test

import (
	"fmt"

	"sagcrest/config/points"
)

func Example() {
	o := points.Options{Order: []string{"id", "northing", "easting", "elevation"}, Unit: 1}
	survey := "id,northing,easting,elevation\n101,2000.0,500.0,112.05\n102,2010.0,500.0,0.00\n103,2020.0,500.0,\"112,61\"\n"
	pts, problems := points.Read("survey/points.csv", []byte(survey), o)
	fmt.Println(len(pts), "points,", pts[0].Z, "m")
	for _, p := range problems {
		fmt.Println(p)
	}
	// Output:
	// 2 points, 112.05 m
	// survey/points.csv:4:18: E U14 a decimal comma in the elevation "112,61"
	//     103,2020.0,500.0,"112,61"
	//                      ^
	//   help: write a decimal point
	// survey/points.csv:3:18: E U09 the elevation 0.00 differs by 112.05 m from the nearest level, which stands on line 2; limit 5 m
	//     102,2010.0,500.0,0.00
	//                      ^
	//   help: take the row out, or correct the level
}
