package points

import (
	"math"
	"regexp"
	"slices"
	"strconv"

	"sagcrest/section/terrain"
)

// looksLikeDate reports whether a text is what a spreadsheet makes of ids and
// stations: 3-4 that became 04-Mar or 3/4/2026, 950E2862 that became 9.5E+2864.
func looksLikeDate(s string) bool { return rewritten.MatchString(s) }

var rewritten = regexp.MustCompile(`(?i)^(\d{1,2}-(jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)|(jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)-\d{1,4}|\d{1,4}[/.]\d{1,2}[/.]\d{2,4}|\d{4}-\d{2}-\d{2}|\d+(\.\d+)?e[+-]\d+)$`)

// spoiled reports whether a cell that must be a number or a station looks like
// something a spreadsheet made or could make of it: 3-4, 950E2862.
func spoiled(s string) bool { return looksLikeDate(s) || bent.MatchString(s) }

var bent = regexp.MustCompile(`(?i)^(\d+-\d+|\d+e\d+)$`)

// void is the level that many programs write where nothing is known.
const void = -9999

// pit is the difference in metres to the nearest level that makes 0.00 a sign
// for nothing known: 0.00 is legal ground on coasts.
const pit = 5.0

// checkLevels finds levels that stand for nothing known (U09): −9999 always,
// 0.00 where the nearest other level differs by more than 5 m.
func (c *cloud) checkLevels() {
	var others []terrain.Point
	for _, p := range c.points {
		if p.Z != 0 && p.Z > void {
			others = append(others, p)
		}
	}
	slices.SortFunc(others, func(a, b terrain.Point) int {
		switch {
		case a.E < b.E:
			return -1
		case a.E > b.E:
			return 1
		}
		return 0
	})
	at := slices.Index(c.order, elevation)
	for i, p := range c.points {
		r := c.rows[i]
		switch {
		case r.cells[at] != "" && isVoid(r.cells[at]):
			c.problem("U09", r, at, "take the row out", "the elevation %s stands for nothing known", r.cells[at])
		case p.Z == 0:
			if near, ok := nearest(others, p); ok && math.Abs(near.Z) > pit {
				c.problem("U09", r, at, "take the row out, or correct the level",
					"the elevation 0.00 lies %.2f m from the nearest level, %.2f m on line %d; limit %.0f m", math.Abs(near.Z), near.Z, near.Row, pit)
			}
		}
	}
}

// isVoid reports whether a cell is −9999 in whatever unit the file has.
func isVoid(text string) bool {
	v, err := strconv.ParseFloat(text, 64)
	return err == nil && v == void
}

// nearest returns the point nearest in plan, of points sorted by easting.
func nearest(sorted []terrain.Point, p terrain.Point) (best terrain.Point, ok bool) {
	i, _ := slices.BinarySearchFunc(sorted, p.E, func(q terrain.Point, e float64) int {
		switch {
		case q.E < e:
			return -1
		case q.E > e:
			return 1
		}
		return 0
	})
	least := math.Inf(1)
	look := func(q terrain.Point) bool {
		if math.Abs(q.E-p.E) > least {
			return false
		}
		if d := math.Hypot(q.E-p.E, q.N-p.N); d < least {
			best, least, ok = q, d, true
		}
		return true
	}
	for k := i; k < len(sorted) && look(sorted[k]); k++ {
	}
	for k := i - 1; k >= 0 && look(sorted[k]); k-- {
	}
	return best, ok
}
