package table

import (
	"strconv"

	"sagcrest/cmd/sagcrest/internal/wire"
)

// Kind tells how a column is set.
type Kind byte

// Text is set left, numbers right, stations are labels with a distance.
const (
	Text Kind = iota
	Number
	Station
)

// Column of a table. Key is the CSV's name, SI its unit there; Title and Unit
// are those of paper. Unit "" prints none.
type Column struct {
	Key, SI     string
	Title, Unit string
	Kind        Kind
}

// Cell of a row: Paper is what a reader sees, Data what the CSV holds. Distance
// belongs to station columns. ID names the cell for links of the page, Link is
// the ID of what the cell points at; the CSV knows neither.
type Cell struct {
	Paper, Data string
	Distance    string
	Strong      bool
	ID, Link    string
}

// Table with a file-safe name and a title.
type Table struct {
	Name, Title string
	Note        string
	Columns     []Column
	Rows        [][]Cell
	// Tick adds an empty column for the checker's mark on paper.
	Tick bool
}

// Add appends a row, which must have a cell for every column.
func (t *Table) Add(cells ...Cell) {
	if len(cells) != len(t.Columns) {
		panic("table " + t.Name + ": a row has " + strconv.Itoa(len(cells)) + " cells, not " + strconv.Itoa(len(t.Columns)))
	}
	t.Rows = append(t.Rows, cells)
}

// Words makes a cell of text.
func Words(s string) Cell { return Cell{Paper: s, Data: s} }

// At makes a cell of a place.
func At(p wire.Place) Cell {
	return Cell{Paper: p.Station, Data: p.Station, Distance: number(float64(p.Distance))}
}

// Figure makes a cell of a number with its printed form.
func Figure(v float64, paper string) Cell { return Cell{Paper: paper, Data: number(v)} }

// None makes an empty cell: paper says why.
func None(why string) Cell { return Cell{Paper: why} }

// number writes a figure for the CSV as the wire does: up to nine decimals, no
// exponent, no negative zero.
func number(v float64) string {
	text, err := wire.Fine(v).MarshalJSON()
	if err != nil {
		return ""
	}
	return string(text)
}
