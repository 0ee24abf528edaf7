package config_test

import (
	"fmt"

	"sagcrest/config"
)

func Example() {
	files := func(string) ([]byte, error) {
		return []byte(`
units = "metric"
survey = { grid = "ground.asc", vertical_datum = "local" }
alignment = { pi = [{ n = 0, e = 0 }, { n = 100, e = 0 }] }
profile = { pvi = [{ station = "0+000", elev = 10 }, { station = "0+100", elev = 12 }] }
[[typical_section]]
lanes = { left = { width = "3 m", crossfall = 0.025 }, right = { width = "3 m", crossfall = -0.025 } }
cut_slop = 1.5
fill_slope = 2
pavement = "0,40 m"
`), nil
	}
	document, problems := config.Read(files, "road.toml")
	_, more := document.Project("base")
	for _, p := range append(problems, more...) {
		fmt.Printf("%s:%d:%d: %s: %s (%s)\n", p.File, p.Line, p.Column, p.Code, p.Message, p.Help)
	}
	// Output:
	// road.toml:8:1: F03: "cut_slop" is no key of typical_section[0] (did you mean "cut_slope"?)
	// road.toml:10:12: U14: typical_section[0].pavement is "0,40 m": decimal comma (write a decimal point: 0.40)
}
