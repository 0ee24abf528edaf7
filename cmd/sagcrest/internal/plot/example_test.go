package plot_test

import (
	"fmt"
	"strings"

	"sagcrest/cmd/sagcrest/internal/plot"
)

// Two grade lines over one ground; every line carries its name.
func ExampleAlternatives_Draw() {
	label := func(v float64) string { return fmt.Sprintf("%.0f", v) }
	svg, err := plot.Alternatives{ID: "a", Title: "two roads", LevelUnit: "m", Label: label, Level: label,
		Ground: []plot.Pt{{X: 0, Y: 100}, {X: 100, Y: 96}},
		Lines:  []plot.Named{{Name: "high road", Line: []plot.Pt{{X: 0, Y: 103}, {X: 100, Y: 101}}}, {Name: "low road", Line: []plot.Pt{{X: 0, Y: 99}, {X: 100, Y: 98}}}},
	}.Draw()
	fmt.Println(strings.Contains(svg, "high road"), strings.Contains(svg, "low road"), strings.Contains(svg, "ground"), err)
	// Output: true true true <nil>
}
