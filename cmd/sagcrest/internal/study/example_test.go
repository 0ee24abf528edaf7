package study_test

import (
	"context"
	"fmt"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/config"
)

// The demo's first draft from end to end.
func ExampleRun() {
	opened, problems := study.Open(config.Disk(), "../../../../testdata/roads/quillmere/road.toml", "first draft")
	o, fatal := study.Run(context.Background(), opened, nil)
	fmt.Println(len(problems), len(fatal), o.Errors(), o.Warnings())
	for _, f := range o.Findings {
		fmt.Println(f.Code, o.Message(f))
	}
	// Output:
	// 0 0 1 1
	// D04 culvert Dry valley: cover 0.097 m over the hinge at 1+760.000, offset -5.000 m; required 0.300 m, short by 0.203 m (reinforced concrete)
	// A09 the catch point on the left at 0+620.000, offset -11.243 m, lies 0.243 m beyond the right of way at -11.000 m
}
