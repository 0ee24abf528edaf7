package points

import (
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

// Read reads a points file: columns northing, easting, elevation and, if
// declared, id, code, kind, line, seq; "-" skips one. It returns points in
// metres, in the order of the file; there is ground only where there is no
// problem. A row whose kind is not "point", or that belongs to a line and
// states no kind, is F09: lines are not read yet, and are never read as if they
// were not there.
func Read(name string, data []byte, o Options) ([]terrain.Point, []diag.Problem) {
	f := &file{name: name, key: "survey.points", order: o.Order}
	known := []string{id, northing, easting, elevation, code, kind, line, seq, skip}
	if !f.checkOrder(known, []string{northing, easting, elevation}) || !f.open(data) {
		return nil, f.list.Problems()
	}
	c := &cloud{file: f, unit: o.unit(), ids: map[string]int{}}
	c.id, c.northing, c.easting, c.elevation = f.column(id), f.column(northing), f.column(easting), f.column(elevation)
	f.body(c.add)
	c.checkLevels()
	return c.points, f.list.Problems()
}

// cloud gathers points, and where the row of each begins in the file.
type cloud struct {
	*file
	unit                             float64
	id, northing, easting, elevation int // columns
	points                           []terrain.Point
	starts                           []int
	ids                              map[string]int // index of the first point of an id
}

func (c *cloud) add(r row) {
	if !c.isPoint(r) {
		return
	}
	n, okN := c.number(r, c.northing, c.unit)
	e, okE := c.number(r, c.easting, c.unit)
	z, okZ := c.number(r, c.elevation, c.unit)
	if okZ && isSign(r.cells[c.elevation]) {
		c.tellSign(r, c.elevation)
		okZ = false
	}
	p := terrain.Point{E: e, N: n, Z: z, Row: r.number}
	if c.id >= 0 {
		c.checkID(r, p, okN && okE && okZ)
	}
	if okN && okE && okZ {
		c.points, c.starts = append(c.points, p), append(c.starts, r.start)
	}
}

// isPoint refuses rows that are part of a line.
func (f *file) isPoint(r row) bool {
	if k := f.column(kind); k >= 0 {
		if strings.EqualFold(r.cells[k], "point") {
			return true
		}
		f.tell("F09", r, k, "give the ground by points alone; a kind of \"point\" keeps the row", "a row of kind %q: only points are read so far", r.cells[k])
		return false
	}
	if k := f.column(line); k >= 0 && r.cells[k] != "" {
		f.tell("F09", r, k, "declare and fill the column kind: \"point\" keeps the row", "a row of the line %q: only points are read so far", r.cells[k])
		return false
	}
	return true
}

// checkID finds ids that a spreadsheet made of others, and ids at two places
// (U07). A row that repeats another's place and level contradicts nothing.
func (c *cloud) checkID(r row, p terrain.Point, sound bool) {
	text := r.cells[c.id]
	if madeDate(text) {
		c.tell("U14", r, c.id, "export the ids as text", "the id %q is a date or a number cut short, as spreadsheets make them", text)
		return
	}
	if text == "" || !sound {
		return
	}
	k, seen := c.ids[text]
	if !seen {
		c.ids[text] = len(c.points)
		return
	}
	if q := c.points[k]; q.E != p.E || q.N != p.N || q.Z != p.Z {
		c.tell("U07", r, c.id, "correct or rename one of them",
			"id %q stands at N %.3f E %.3f level %.3f m here and at N %.3f E %.3f level %.3f m on line %d",
			text, p.N, p.E, p.Z, q.N, q.E, q.Z, q.Row)
	}
}
