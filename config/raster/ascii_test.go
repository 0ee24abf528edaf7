package raster_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/config/raster"
	"sagcrest/profile/finding"
)

const soundGrid = "ncols 3\nnrows 2\nxllcorner 100\nyllcorner 200\ncellsize 10\nNODATA_value -1\n1 2 3\n4 -1 6\n"

func TestASCIIGrid(t *testing.T) {
	for _, c := range []struct {
		name, old, new string
		west, north    float64
	}{
		{"corner", "", "", 105, 215},
		{"centre", "xllcorner 100\nyllcorner 200", "xllcenter 100\nyllcenter 200", 100, 210},
		{"keys in any case and order", "ncols 3\nnrows 2\n", "NROWS 2\nNCols\t3\n", 105, 215},
		{"unequal cells", "cellsize 10", "dx 10\ndy 20", 105, 230},
		{"levels over any lines", "1 2 3\n4", "1\n2\n3 4", 105, 215},
		{"carriage returns", "1 2 3\n", "1 2 3\r\n", 105, 215},
		{"no last line feed", "6\n", "6", 105, 215},
		{"exponents", "1 2 3", "1.0e0 2e+00 3", 105, 215},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, problems := raster.Read("g.asc", []byte(strings.Replace(soundGrid, c.old, c.new, 1)), raster.Options{})
			require.Empty(t, problems)
			l := r.Levels
			assert.Equal(t, []float64{c.west, c.north, 3, 2}, []float64{l.West, l.North, float64(l.Cols), float64(l.Rows)})
			assert.Equal(t, 1, r.Voids)
			assert.True(t, math.IsNaN(l.Z[4]))
			l.Z[4] = 5
			assert.Equal(t, []float64{1, 2, 3, 4, 5, 6}, l.Z)
		})
	}
}

// Law: what is written as text is read as it was, in metres.
func TestASCIIGridRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		cols, rows := rapid.IntRange(2, 9).Draw(t, "cols"), rapid.IntRange(2, 9).Draw(t, "rows")
		unit := rapid.SampledFrom([]float64{1, 0.3048, 1200.0 / 3937}).Draw(t, "unit")
		z := rapid.SliceOfN(rapid.Float64Range(1, 4000), cols*rows, cols*rows).Draw(t, "z")
		var b strings.Builder
		fmt.Fprintf(&b, "ncols %d\nnrows %d\nxllcenter 50\nyllcenter 60\ncellsize 2\n", cols, rows)
		for _, v := range z {
			fmt.Fprintf(&b, "%v ", v)
		}
		r, problems := raster.Read("g.asc", []byte(b.String()), raster.Options{Unit: unit})
		require.Empty(t, problems)
		for k, v := range z {
			require.Equal(t, v*unit, r.Levels.Z[k])
		}
		require.Equal(t, 50*unit, r.Levels.West)
		require.Equal(t, float64(60+2*(rows-1))*unit, r.Levels.North)
	})
}

func TestRefusedASCIIGrids(t *testing.T) {
	for _, c := range []struct {
		name, old, new string
		code           finding.Code
		line, column   int
		says           string
	}{
		{"too few levels", "4 -1 6", "4 -1", "F02", 9, 1, "ends after 5 of 6 levels"},
		{"too many levels", "4 -1 6", "4 -1 6 7", "F02", 8, 8, "goes on after its 6 levels"},
		{"no number", "1 2 3", "1 x 3", "F06", 7, 3, `"x" is not a number`},
		{"not a number", "1 2 3", "1 2 nan", "F06", 7, 5, `"nan"`},
		{"infinite", "1 2 3", "1 2 -1e999", "F06", 7, 5, `"-1e999"`},
		{"beyond the earth", "1 2 3", "1 2 3e8", "F06", 7, 5, "outside"},
		{"decimal comma", "1 2 3", "1 2,5 3", "U14", 7, 3, `"2,5"`},
		{"decimal comma in the header", "cellsize 10", "cellsize 2,5", "U14", 5, 10, `"2,5"`},
		{"byte order mark", "ncols 3", "\ufeffncols 3", "U14", 1, 1, "byte order mark"},
		{"unknown key", "cellsize", "cellsise", "F02", 5, 1, `"cellsise"`},
		{"key twice", "nrows 2", "ncols 2", "F02", 2, 1, "ncols twice"},
		{"key missing", "cellsize 10\n", "", "F02", 0, 0, "lacks cellsize or dx"},
		{"both places", "yllcorner", "xllcenter 1\nyllcorner", "F02", 0, 0, "both xllcorner and xllcenter"},
		{"header no number", "xllcorner 100", "xllcorner left", "F02", 3, 11, "left"},
		{"header not finite", "xllcorner 100", "xllcorner nan", "F02", 3, 11, "nan"},
		{"half a column", "ncols 3", "ncols 3.5", "F02", 0, 0, "ncols is 3.5"},
		{"giant", "ncols 3", "ncols 99999999", "F02", 0, 0, "more than the"},
		{"lying", "ncols 3", "ncols 20000", "F02", 0, 0, "can hold"},
		{"one column", "ncols 3", "ncols 1", "F02", 0, 0, "needs two"},
		{"cell size", "cellsize 10", "cellsize 0", "F02", 0, 0, "not positive"},
		{"header alone", "1 2 3\n4 -1 6\n", "", "F02", 0, 0, "within its header"},
		{"zero byte", "1 2", "1\x002", "F02", 0, 0, "plain text"},
		{"unmarked", "1 2 3", "1 -9999 3", "U09", 7, 3, "-9999"},
		{"zero", "1 2 3\n4 -1 6", "10 10 10\n10 0 10", "U09", 8, 4, "0.00"},
		{"nothing known", "1 2 3\n4 -1 6", "-1 -1 -1\n-1 -1 -1", "F02", 0, 0, "every cell"},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, problems := raster.Read("g.asc", []byte(strings.Replace(soundGrid, c.old, c.new, 1)), raster.Options{})
			assert.Nil(t, r)
			require.Len(t, problems, 1)
			p := problems[0]
			assert.Equal(t, c.code, p.Code)
			assert.Equal(t, [2]int{c.line, c.column}, [2]int{p.Line, p.Column})
			assert.Contains(t, p.Message, c.says)
			assert.Equal(t, "g.asc", p.File)
			assert.NotEmpty(t, p.Help)
		})
	}
}

// Many bad levels are counted, the first ones shown.
func TestManyBadLevels(t *testing.T) {
	text := "ncols 50\nnrows 2\nxllcorner 0\nyllcorner 0\ncellsize 1\n" + "1 " + strings.Repeat("x ", 99)
	_, problems := raster.Read("g.asc", []byte(text), raster.Options{})
	require.Len(t, problems, 11)
	assert.Equal(t, "and 89 more of the same", problems[10].Message)
}

// 0.00 is ground where the nearest level is within 5 m, in metres whatever the
// unit of the file.
func TestZeroInFeet(t *testing.T) {
	text := "ncols 2\nnrows 2\nxllcorner 0\nyllcorner 0\ncellsize 1\n0 %v\n%v 40\n"
	for _, c := range []struct {
		feet float64
		ok   bool
	}{{16.4, true}, {16.5, false}} { // 5 m are 16.404 ft
		r, _ := raster.Read("g.asc", []byte(fmt.Sprintf(text, c.feet, c.feet)), raster.Options{Unit: 0.3048})
		assert.Equal(t, c.ok, r != nil, "%v ft", c.feet)
	}
}
