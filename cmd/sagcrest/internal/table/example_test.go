package table_test

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

// Paper shows 2.68, the CSV holds 2.675; a station has a label and a distance.
func ExampleTable_CSV() {
	t := table.Table{Name: "areas", Columns: []table.Column{
		{Key: "station", Title: "station", Kind: table.Station},
		{Key: "cut", SI: "m2", Title: "cut", Unit: "m²", Kind: table.Number}}}
	t.Add(table.At(wire.Place{Distance: 20, Station: "0+020.000"}), table.Figure(2.675, "2.68"))
	fmt.Print(string(t.CSV()))
	// Output:
	// station,station_distance [m],cut [m2]
	// 0+020.000,20,2.675
}
