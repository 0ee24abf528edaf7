package report_test

import (
	"context"
	"fmt"

	"sagcrest/cmd/sagcrest/internal/report"
	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config"
)

// The output folder of a run: the page, the document, and a CSV for every table.
func ExampleFiles() {
	opened, _ := study.Open(config.Disk(), "../../../../testdata/roads/volcano/road.toml", "base")
	o, _ := study.Run(context.Background(), opened, nil)
	files, err := report.Files(o, wire.Build(o))
	for _, f := range files[:4] {
		fmt.Println(f.Name)
	}
	fmt.Println(err)
	// Output:
	// report.html
	// results.json
	// alignment.csv
	// sections.csv
	// <nil>
}
