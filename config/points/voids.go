package points

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"sagcrest/profile/finding"
	"sagcrest/section/terrain"
)

// signs are the levels, in the file's unit, that stand for nothing known
// wherever they occur: -9999, and the two lowest values of 16-bit numbers, both
// far below any ground (common practice).
var signs = []float64{-9999, -32768, -32767}

// pit is the difference in metres to the nearest level that makes 0.00 a sign
// for nothing known: 0.00 is legal ground on coasts.
const pit = 5.0

func isSign(text string) bool {
	v, err := strconv.ParseFloat(text, 64)
	return err == nil && slices.Contains(signs, v)
}

// tellSign notes a level that stands for nothing known.
func (f *file) tellSign(r row, cell int) {
	f.tell("U09", r, cell, "take the row out", "the elevation %s stands for nothing known", r.cells[cell])
}

// checkLevels finds levels of 0.00 that stand for nothing known (U09): the
// nearest level in plan that is not 0.00 differs by more than 5 m.
func (c *cloud) checkLevels() {
	isZero := func(p terrain.Point) bool { return p.Z == 0 }
	if !slices.ContainsFunc(c.points, isZero) {
		return
	}
	others := newNearest(slices.DeleteFunc(slices.Clone(c.points), isZero))
	for i, p := range c.points {
		if p.Z != 0 {
			continue
		}
		near, ok := others.to(p)
		if !ok || math.Abs(near.Z) <= pit {
			continue
		}
		if c.list.Full("U09") {
			c.list.Count("U09")
			continue
		}
		problem := c.problem("U09", c.rowOf(i), c.elevation, "take the row out, or correct the level",
			"the elevation 0.00 differs by %.2f m from the nearest level, which stands on line %d; limit %.0f m", math.Abs(near.Z), near.Row, pit)
		problem.Measured, problem.Limit = finding.Of(math.Abs(near.Z), "m"), finding.Of(pit, "m")
		c.list.Add(problem)
	}
}

// rowOf cuts the row of a point again.
func (c *cloud) rowOf(i int) row {
	text, _, _ := strings.Cut(c.text[c.starts[i]:], "\n")
	r := row{number: c.points[i].Row, start: c.starts[i], text: strings.TrimSuffix(text, "\r")}
	c.split(&r) // it was sound before
	return r
}
