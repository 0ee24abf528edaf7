package raster

import (
	"fmt"
	"math"
	"slices"
	"strconv"

	"sagcrest/section/terrain"
)

// marker returns the test for a marked no-data value. single says that levels
// were stored as 32-bit floats: the value is written in more or fewer digits
// than these hold.
func marker(noData *float64, single bool) func(float64) bool {
	if noData == nil {
		return func(float64) bool { return false }
	}
	v := *noData
	return func(z float64) bool {
		switch {
		case z == v || math.IsNaN(v) && math.IsNaN(z):
			return true
		case single && float32(z) == float32(v):
			return true
		}
		// Values near the end of the number range are often written with few
		// digits, such as -3.4e+38; no level is near them.
		return math.Abs(v) > 1e30 && math.Abs(z-v) <= 1e-2*math.Abs(v)
	}
}

// signs are the levels that stand for nothing known wherever they occur: -9999,
// and the two lowest values of 16-bit numbers, both far below any ground
// (common practice).
var signs = []float64{-9999, -32768, -32767}

// pit is the difference in metres to the nearest level that makes 0.00 a sign
// for nothing known: 0.00 is legal ground on coasts.
const pit = 5.0

// checkVoids finds levels that stand for nothing known although the file does
// not mark them (U09), and a raster without any level (F02). Levels are still
// in the file's unit.
func (f *file) checkVoids(r *Raster) {
	if r.Voids == len(r.Levels.Z) {
		f.add("F02", place{}, "get the file again from its source", "every cell is marked as no-data")
		return
	}
	marked := "the file marks no value as no-data"
	if r.NoData != nil {
		marked = fmt.Sprintf("the file marks %s as no-data", short(*r.NoData))
	}
	for _, sign := range signs {
		first := slices.Index(r.Levels.Z, sign)
		if first < 0 {
			continue
		}
		n := 0
		for _, z := range r.Levels.Z[first:] {
			if z == sign {
				n++
			}
		}
		f.add("U09", f.at(first), fmt.Sprintf("mark %v as the no-data value of the file", sign),
			"%d cells hold %v, which stands for nothing known, the first at %s; %s", n, sign, r.cell(first), marked)
	}
	if first, n, near := zeros(&r.Levels, pit/f.unit); n > 0 {
		f.add("U09", f.at(first), "mark 0 as the no-data value of the file, or correct the levels",
			"%d cells hold 0.00 although the nearest level differs by more than %.0f m, the first at %s, where it is %s m; %s",
			n, pit, r.cell(first), strconv.FormatFloat(near*f.unit, 'f', 2, 64), marked)
	}
}

// short writes a number with as few digits as it needs.
func short(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }

// at returns the place of a level in a text file.
func (f *file) at(cell int) place {
	if f.where == nil {
		return place{}
	}
	return f.where(cell)
}

// cell names a cell for a message: row and column from the north-west, and its
// centre as the file has it.
func (r *Raster) cell(k int) string {
	l := &r.Levels
	i, j := k%l.Cols, k/l.Cols
	ce, cn := l.Cell+l.CellE, l.Cell+l.CellN // one of each two is 0
	return fmt.Sprintf("row %d, column %d (E %.2f N %.2f)", j+1, i+1, l.West+float64(i)*ce, l.North-float64(j)*cn)
}

// zeros returns the first cell of level 0, the number of them, and the level
// nearest to the first, of those whose nearest level that is not 0 differs by
// more than limit. Of a stretch of zeros only the rim is looked at: the level
// nearest to a cell further in lies beside the rim as well. Of levels equally
// near the least counts, so that 0 is ground where it may be.
func zeros(r *terrain.Raster, limit float64) (first, n int, near float64) {
	for k, z := range r.Z {
		if z != 0 {
			continue
		}
		if least, ok := beside(r, k); ok && math.Abs(least) > limit {
			if n == 0 {
				first, near = k, least
			}
			n++
		}
	}
	return first, n, near
}

// beside returns the level other than 0 nearest to a cell, among its eight
// neighbours.
func beside(r *terrain.Raster, k int) (level float64, ok bool) {
	ce, cn := r.Cell+r.CellE, r.Cell+r.CellN
	i, j := k%r.Cols, k/r.Cols
	nearest := math.Inf(1)
	for dj := -1; dj <= 1; dj++ {
		for di := -1; di <= 1; di++ {
			if i+di < 0 || i+di >= r.Cols || j+dj < 0 || j+dj >= r.Rows {
				continue
			}
			z := r.Z[k+dj*r.Cols+di]
			if z == 0 || math.IsNaN(z) {
				continue
			}
			d := math.Hypot(float64(di)*ce, float64(dj)*cn)
			if d < nearest || d == nearest && math.Abs(z) < math.Abs(level) {
				nearest, level, ok = d, z, true
			}
		}
	}
	return level, ok
}
