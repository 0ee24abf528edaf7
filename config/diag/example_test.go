package diag_test

import (
	"fmt"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

func Example() {
	var found diag.List
	found.Add(diag.Problem{
		Code: "F06", Severity: finding.Error, File: "survey/points.csv", Line: 7, Column: 14,
		Excerpt: "6,2010.0,510,l12.3", Message: `the elevation "l12.3" is not a number`, Help: "write a plain decimal number",
	})
	for _, p := range found.Problems() {
		fmt.Println(p)
	}
	fmt.Println("nearest to eastin:", diag.Nearest("eastin", []string{"northing", "easting", "elevation"}))
	// Output:
	// survey/points.csv:7:14: E F06 the elevation "l12.3" is not a number
	//     6,2010.0,510,l12.3
	//                  ^
	//   help: write a plain decimal number
	// nearest to eastin: easting
}
