package calc_test

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/calc"
)

// An arc from its radius and deflection, with the first line of its working.
func ExampleTopic_Run() {
	arc, _ := calc.Find("arc")
	_, steps, fault := arc.Run(map[string]any{"radius": 300.0, "delta": "50-00-00"}, "metric")
	fmt.Println(fault == nil)
	fmt.Printf("%s = %s = %s = %.3f %s\n", steps[0].Symbol, steps[0].Formula, steps[0].Substituted, steps[0].Value, steps[0].Unit)
	_, _, fault = arc.Run(map[string]any{"radius": 300.0, "detla": 50.0}, "metric")
	fmt.Println(fault)
	// Output:
	// true
	// T = R·tan(Δ/2) = 300 * tan(50 / 2) = 139.892 m
	// detla: there is no input "detla"
}
