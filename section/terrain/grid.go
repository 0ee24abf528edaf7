package terrain

import (
	"errors"
	"fmt"
	"math"
)

// Raster is a rectangle of levels given at cell centres, in metres.
type Raster struct {
	Cols, Rows  int
	West, North float64 // centre of the north-west cell
	Cell        float64 // spacing of the centres, both ways
	// CellE and CellN are the spacings by easting and northing where they
	// differ; 0 means Cell.
	CellE, CellN float64
	Z            []float64 // row by row from the north, west to east; NaN = void
}

// Grid is the surface of a Raster. Each square between four centres is split
// by its north-west to south-east diagonal; a square with a void corner is a
// gap. The surface ends at the outermost centres.
type Grid struct {
	cols, rows   int
	west, north  float64
	cellE, cellN float64
	z            []float64
	void         []bool // per square, row by row; nil when every level is known
	min, max     XY
	accuracy     Accuracy
}

// ErrRaster is wrapped by every error of NewGrid.
var ErrRaster = errors.New("the raster makes no surface")

// NewGrid returns the surface of a raster. It keeps r.Z, which must not change
// afterwards. It fails when there are fewer than two rows or columns, when Z
// does not hold Cols × Rows values, when a spacing is not positive, when a
// place or a level is beyond what is on earth, and when every square is void.
func NewGrid(r Raster, acc Accuracy) (*Grid, error) {
	ce, cn := r.spacing()
	switch {
	case r.Cols < 2 || r.Rows < 2:
		return nil, fmt.Errorf("%w: %d columns and %d rows, at least 2 of each are needed", ErrRaster, r.Cols, r.Rows)
	case r.Cols > math.MaxInt32 || r.Rows > math.MaxInt32 || len(r.Z) != r.Cols*r.Rows:
		return nil, fmt.Errorf("%w: %d levels for %d columns and %d rows", ErrRaster, len(r.Z), r.Cols, r.Rows)
	case !(ce > 0 && cn > 0):
		return nil, fmt.Errorf("%w: the cell size %v × %v is not positive", ErrRaster, ce, cn)
	}
	g := &Grid{cols: r.Cols, rows: r.Rows, west: r.West, north: r.North, cellE: ce, cellN: cn, z: r.Z, accuracy: acc}
	for _, v := range []float64{r.West, r.North, g.east(r.Cols - 1), g.northing(r.Rows - 1)} {
		if !(math.Abs(v) <= farthest) {
			return nil, fmt.Errorf("%w: the coordinate %v lies outside ±%v m", ErrRaster, v, farthest)
		}
	}
	if err := g.mark(); err != nil {
		return nil, err
	}
	return g, nil
}

func (r Raster) spacing() (ce, cn float64) {
	ce, cn = r.CellE, r.CellN
	if ce == 0 {
		ce = r.Cell
	}
	if cn == 0 {
		cn = r.Cell
	}
	return ce, cn
}

// mark notes the void squares and the extent of the known ones.
func (g *Grid) mark() error {
	voids := 0
	for k, z := range g.z {
		switch {
		case math.IsNaN(z):
			voids++
		case !(math.Abs(z) <= farthest):
			return fmt.Errorf("%w: the level %v in row %d, column %d lies outside ±%v m", ErrRaster, z, k/g.cols, k%g.cols, farthest)
		}
	}
	if voids == 0 {
		g.min, g.max = XY{g.west, g.northing(g.rows - 1)}, XY{g.east(g.cols - 1), g.north}
		return nil
	}
	g.void = make([]bool, (g.cols-1)*(g.rows-1))
	i0, i1, j0, j1 := g.cols, -1, g.rows, -1
	for j := range g.rows - 1 {
		for i := range g.cols - 1 {
			if g.hasVoidCorner(i, j) {
				g.void[j*(g.cols-1)+i] = true
				continue
			}
			i0, i1, j0, j1 = min(i0, i), max(i1, i+1), min(j0, j), max(j1, j+1)
		}
	}
	if i1 < 0 {
		return fmt.Errorf("%w: no square of four known levels", ErrRaster)
	}
	g.min, g.max = XY{g.east(i0), g.northing(j1)}, XY{g.east(i1), g.northing(j0)}
	return nil
}

func (g *Grid) hasVoidCorner(i, j int) bool {
	k := j*g.cols + i
	return math.IsNaN(g.z[k] + g.z[k+1] + g.z[k+g.cols] + g.z[k+g.cols+1])
}

func (g *Grid) east(i int) float64     { return g.west + float64(i)*g.cellE }
func (g *Grid) northing(j int) float64 { return g.north - float64(j)*g.cellN }

// Extent returns the corners of the box around the known squares.
func (g *Grid) Extent() (min, max XY) { return g.min, g.max }

// Accuracy returns what was stated when the grid was made.
func (g *Grid) Accuracy() Accuracy { return g.accuracy }

// Triangles yields the two triangles of every known square that meets the box,
// row by row from the north.
func (g *Grid) Triangles(min, max XY, yield func(a, b, c [3]float64) bool) {
	i0, i1 := span(min[0]-g.west, max[0]-g.west, g.cellE, g.cols)
	j0, j1 := span(g.north-max[1], g.north-min[1], g.cellN, g.rows)
	for j := j0; j < j1; j++ {
		for i := i0; i < i1; i++ {
			if !g.known(i, j) {
				continue
			}
			nw, ne := g.corner(i, j), g.corner(i+1, j)
			sw, se := g.corner(i, j+1), g.corner(i+1, j+1)
			if !yield(nw, sw, se) || !yield(nw, se, ne) {
				return
			}
		}
	}
}

// span returns the half-open range of squares that meet [lo, hi], distances
// from the first centre, out of n centres.
func span(lo, hi, cell float64, n int) (from, to int) {
	last := float64(n - 1)
	if !(lo <= hi) || hi < 0 || lo/cell > last {
		return 0, 0
	}
	// A box that ends on a line of centres meets the squares on both sides.
	from = int(math.Max(math.Ceil(lo/cell)-1, 0))
	to = int(math.Min(math.Floor(hi/cell)+1, last))
	return from, to
}

func (g *Grid) corner(i, j int) [3]float64 {
	return [3]float64{g.east(i), g.northing(j), g.z[j*g.cols+i]}
}

// known reports whether the square whose north-west corner is column i, row j
// exists and has four known levels.
func (g *Grid) known(i, j int) bool {
	if i < 0 || j < 0 || i >= g.cols-1 || j >= g.rows-1 {
		return false
	}
	return g.void == nil || !g.void[j*(g.cols-1)+i]
}
