package quantity_test

import (
	"fmt"

	"sagcrest/config/quantity"
)

func Example() {
	width, err := quantity.Parse("12 ft", quantity.Length)
	fmt.Println(width, err)

	_, err = quantity.Parse("3,5 m", quantity.Length)
	fmt.Println(err)

	paper, _ := quantity.NewProfile("ft-0.01", quantity.InternationalFeet)
	fmt.Println(paper.Length(width), paper.LengthUnit())
	fmt.Println(paper.Volume(1000), paper.VolumeUnit())
	// Output:
	// 3.6576000000000004 <nil>
	// "3,5 m": decimal comma
	// 12.00 ft
	// 1,308 yd³
}
