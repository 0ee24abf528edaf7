package wire_test

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/wire"
)

// Numbers keep nine decimals and no binary tail; null is not zero.
func ExampleEncode() {
	text, err := wire.Encode(struct {
		Elev wire.Fine  `json:"elev"`
		K    *wire.Fine `json:"k"`
	}{Elev: 0.1 + 0.2})
	fmt.Print(string(text), err)
	// Output:
	// {
	//   "elev": 0.3,
	//   "k": null
	// }
	// <nil>
}
