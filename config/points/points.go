package points

import (
	"slices"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/section/terrain"
)

// Options say what the numbers of a file mean. Order lists the columns; Unit is
// the length in metres of the unit of coordinates and levels (1 when 0).
type Options struct {
	Order []string
	Unit  float64
}

func (o Options) unit() float64 {
	if o.Unit == 0 {
		return 1
	}
	return o.Unit
}

// Read reads a points file: columns id, northing, easting, elevation and, if
// declared, code, kind, line, seq; "-" skips one. It returns points in metres,
// in the order of the file. A row whose kind is not "point" is F09: lines are
// not read yet, and are never read as if they were not there.
func Read(name string, data []byte, o Options) ([]terrain.Point, []diag.Problem) {
	f := &file{name: name, order: o.Order}
	if !f.checkOrder([]string{id, northing, easting, elevation, code, kind, line, seq, skip}, []string{northing, easting, elevation}) {
		return nil, f.list.Problems()
	}
	c := cloud{file: f, ids: map[string]place{}}
	for _, r := range f.body(f.rows(data)) {
		if f.fits(r) {
			c.add(r, o.unit())
		}
	}
	c.checkLevels()
	return c.points, f.list.Problems()
}

// place is where an id was first seen.
type place struct {
	at     terrain.Point
	number int
}

// cloud gathers points and what is needed to compare them.
type cloud struct {
	*file
	points []terrain.Point
	rows   []row
	ids    map[string]place
}

func (c *cloud) add(r row, unit float64) {
	cell := func(column string) int { return slices.Index(c.order, column) }
	if k := cell(kind); k >= 0 && !strings.EqualFold(r.cells[k], "point") {
		c.problem("F09", r, k, "take the row out, or wait for breaklines to be read",
			"a row of kind %q: only points are read so far", r.cells[k])
		return
	}
	n, okN := c.number(r, cell(northing), unit)
	e, okE := c.number(r, cell(easting), unit)
	z, okZ := c.number(r, cell(elevation), unit)
	if !okN || !okE || !okZ {
		return
	}
	p := terrain.Point{E: e, N: n, Z: z, Row: r.number}
	if k := cell(id); k >= 0 {
		c.checkID(r, k, p)
	}
	c.points = append(c.points, p)
	c.rows = append(c.rows, r)
}

// checkID finds ids that a spreadsheet rewrote, and ids at two places. A row
// that repeats another to the letter is no contradiction.
func (c *cloud) checkID(r row, cell int, p terrain.Point) {
	text := r.cells[cell]
	if text == "" {
		return
	}
	if looksLikeDate(text) {
		c.problem("U14", r, cell, "export the ids as text", "the id %q looks like a date or a number that a spreadsheet made of it", text)
		return
	}
	first, seen := c.ids[text]
	if !seen {
		c.ids[text] = place{p, r.number}
		return
	}
	if first.at.E != p.E || first.at.N != p.N || first.at.Z != p.Z {
		c.problem("U07", r, cell, "correct or rename one of them",
			"id %q stands at N %.3f E %.3f level %.3f m here and at N %.3f E %.3f level %.3f m on line %d",
			text, p.N, p.E, p.Z, first.at.N, first.at.E, first.at.Z, first.number)
	}
}
