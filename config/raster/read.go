package raster

import (
	"bytes"
	"errors"
	"fmt"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
	"sagcrest/section/terrain"
)

// Options say what the numbers of a file mean.
type Options struct {
	// Unit is the length in metres of the unit of coordinates and levels; 0
	// means 1.
	Unit float64
}

func (o Options) unit() float64 {
	if o.Unit == 0 {
		return 1
	}
	return o.Unit
}

// Raster is a grid of levels and what its file says about it.
type Raster struct {
	// Levels are in metres.
	Levels terrain.Raster
	// Format is "ASCII grid", "GeoTIFF" or "BigTIFF".
	Format string
	// Values is how levels are stored, such as "32-bit floating point";
	// "text" for an ASCII grid.
	Values string
	// CRS and VerticalCRS are what the file names, such as "EPSG:26918",
	// "user-defined" where it describes its own; empty when it names none.
	CRS, VerticalCRS string
	// Point says that the file gives the centres of cells and not their
	// corners; Stated that it says so itself, and area is not only assumed.
	Point, Stated bool
	// NoData is the value that the file marks as unknown, nil when there is
	// none.
	NoData *float64
	// Voids is the number of cells without a level.
	Voids int
}

// mostCells is the largest raster that is read: 10 km × 10 km at 1 m, 0.8 GB
// of levels.
const mostCells = 100_000_000

// farthest is the largest coordinate or level in metres that is read: no map
// grid on earth reaches it.
const farthest = 1e8

// Read reads a grid of levels from the bytes of a file. The raster is nil when
// there is any problem, for all of them are errors: F02 for a file that does
// not hold what it promises, F06 for a level that is none, F08 for units that
// contradict the project's, F09 for what is not read, U09 for levels that stand
// for nothing known, U14 for decimal commas and byte order marks.
func Read(name string, data []byte, o Options) (*Raster, []diag.Problem) {
	f := &file{name: name, data: data, unit: o.unit()}
	var r *Raster
	var err error
	if isTIFF(data) {
		r, err = f.readTIFF()
	} else {
		r, err = f.readASCII()
	}
	if err == nil && !f.list.Any() {
		f.checkVoids(r)
	}
	f.addError(err)
	if f.list.Any() {
		return nil, f.list.Problems()
	}
	f.scale(&r.Levels)
	return r, nil
}

func isTIFF(data []byte) bool {
	for _, magic := range []string{"II*\x00", "MM\x00*", "II+\x00", "MM\x00+"} {
		if bytes.HasPrefix(data, []byte(magic)) {
			return true
		}
	}
	return false
}

// file is a raster file while it is read.
type file struct {
	name string
	data []byte
	unit float64
	list diag.List
	// where finds the place of a level in a text file, nil for others.
	where func(cell int) place
}

// place is a line and column of a text file and the raw line.
type place struct {
	line, column int
	raw          string
}

// fault is a problem on its way out of a file's structure; the first one ends
// the reading.
type fault struct {
	code          finding.Code
	at            place
	message, help string
}

func (f *fault) Error() string { return f.message }

// broken returns the fault of a file that does not hold what it promises.
func broken(format string, args ...any) error {
	return &fault{code: "F02", message: fmt.Sprintf(format, args...), help: "get the file again from its source"}
}

// unread returns the fault of a variant that is not read.
func unread(help, format string, args ...any) error {
	return &fault{code: "F09", message: fmt.Sprintf(format, args...), help: help}
}

func (f *file) addError(err error) {
	var ft *fault
	if errors.As(err, &ft) {
		f.add(ft.code, ft.at, ft.help, "%s", ft.message)
	}
}

func (f *file) add(code finding.Code, at place, help, format string, args ...any) {
	f.list.Add(diag.Problem{
		Code: code, Severity: finding.Error, File: f.name, Key: "survey.grid",
		Line: at.line, Column: at.column, Excerpt: at.raw,
		Message: fmt.Sprintf(format, args...), Help: help,
	})
}

// checkSize holds the promised size against what can be read; possible is the
// number of cells that a file of this length can hold at most.
func checkSize(cols, rows, possible uint64) error {
	switch {
	case cols < 2 || rows < 2:
		return broken("%d columns and %d rows: a surface needs two of each", cols, rows)
	case cols > mostCells || rows > mostCells || cols*rows > mostCells:
		return broken("%d columns and %d rows: more than the %d cells that are read", cols, rows, mostCells)
	case cols*rows > possible:
		return broken("%d columns and %d rows: more cells than a file of this size can hold", cols, rows)
	}
	return nil
}

// scale brings a raster to metres.
func (f *file) scale(r *terrain.Raster) {
	if f.unit == 1 {
		return
	}
	for _, v := range []*float64{&r.West, &r.North, &r.Cell, &r.CellE, &r.CellN} {
		*v *= f.unit
	}
	for i := range r.Z {
		r.Z[i] *= f.unit
	}
}
