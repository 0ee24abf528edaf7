package bill_test

import (
	"fmt"

	"sagcrest/earthwork/bill"
)

// Embankment has no rate, so its amount and the total stay unknown.
func ExamplePrice() {
	b := bill.Price(
		bill.Work{Cut: bill.Some(120), Fill: bill.Some(80), Strip: bill.Some(30), Respread: bill.Some(0), Balance: bill.Some(28), Land: bill.Some(0)},
		bill.Prices{
			Excavation: &bill.Rate{Amount: 6, Per: "m3"},
			Strip:      &bill.Rate{Amount: 3, Per: "m3"},
			Waste:      &bill.Rate{Amount: 5, Per: "m3"},
		})
	for _, l := range b.Lines {
		if l.Amount == nil {
			fmt.Println(l.Item, "no rate")
			continue
		}
		fmt.Println(l.Item, *l.Amount)
	}
	fmt.Println("total known:", b.Total != nil)
	// Output:
	// excavation 720
	// embankment no rate
	// strip 90
	// waste 140
	// total known: false
}
