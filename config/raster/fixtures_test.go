package raster_test

import (
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config/raster"
)

// load reads a file of testdata that must be sound.
func load(t *testing.T, name string) *raster.Raster {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("testdata", name))
	require.NoError(t, err)
	r, problems := raster.Read(name, data, raster.Options{})
	require.Empty(t, problems)
	return r
}

// Every way to store the surface gives the surface of the ASCII grid, in the
// same place.
func TestStoredWays(t *testing.T) {
	exact := func(v float64) float64 { return v }
	single := func(v float64) float64 { return float64(float32(v)) }
	want := load(t, "hills.asc")
	for _, c := range []struct {
		name, format, values string
		round                func(float64) float64
	}{
		{"float32.tif", "GeoTIFF", "32-bit floating point", single},
		{"float64.tif", "GeoTIFF", "64-bit floating point", exact},
		{"predictor3.tif", "GeoTIFF", "32-bit floating point", single},
		{"predictor2_float.tif", "GeoTIFF", "32-bit floating point", single},
		{"tiled_lzw.tif", "GeoTIFF", "32-bit floating point", single},
		{"bigtiff.tif", "BigTIFF", "32-bit floating point", single},
		{"point.tif", "GeoTIFF", "32-bit floating point", single},
		{"int16_predictor2.tif", "GeoTIFF", "16-bit whole numbers", math.Round},
		{"int16_big_endian.tif", "GeoTIFF", "16-bit whole numbers", math.Round},
		{"uint16.tif", "GeoTIFF", "16-bit unsigned whole numbers", math.Round},
		{"int32.tif", "GeoTIFF", "32-bit whole numbers", math.Round},
	} {
		t.Run(c.name, func(t *testing.T) {
			got := load(t, c.name)
			assert.Equal(t, c.format, got.Format)
			assert.Equal(t, c.values, got.Values)
			assert.Equal(t, "EPSG:32633", got.CRS)
			assert.Equal(t, 6, got.Voids)
			assert.True(t, got.Stated)
			assert.Equal(t, c.name == "point.tif", got.Point)
			require.Len(t, got.Levels.Z, len(want.Levels.Z))
			for k, z := range want.Levels.Z {
				require.Equal(t, math.IsNaN(z), math.IsNaN(got.Levels.Z[k]), "cell %d", k)
				if !math.IsNaN(z) {
					require.Equal(t, c.round(z), got.Levels.Z[k], "cell %d", k)
				}
			}
			got.Levels.Z = nil
			place := want.Levels
			place.Z = nil
			assert.Equal(t, place, got.Levels)
		})
	}
}

// What GDAL 3.6.2 reads of the fixtures (gdallocationinfo -valonly column row).
func TestFixturesAgainstOtherReader(t *testing.T) {
	at := [][2]int{{0, 2}, {5, 5}, {23, 0}, {12, 19}, {19, 3}, {20, 3}, {16, 16}}
	singles := []float64{246.132995605469, 250.992004394531, 254.167007446289, 262.984985351562, 254.919006347656, -9999, 262.756988525391}
	doubles := []float64{246.133, 250.992, 254.167, 262.985, 254.919, -9999, 262.757}
	whole := []float64{246, 251, 254, 263, 255, -9999, 263}
	for name, want := range map[string][]float64{
		"float32.tif": singles, "predictor3.tif": singles, "predictor2_float.tif": singles, "tiled_lzw.tif": singles,
		"bigtiff.tif": singles, "point.tif": singles, "float64.tif": doubles, "hills.asc": doubles,
		"int16_predictor2.tif": whole, "int16_big_endian.tif": whole, "uint16.tif": whole, "int32.tif": whole,
	} {
		r := load(t, name)
		for k, p := range at {
			got := r.Levels.Z[p[1]*24+p[0]]
			if want[k] == -9999 {
				assert.True(t, math.IsNaN(got), "%s %v", name, p)
				continue
			}
			// The other reader prints 15 digits.
			assert.InDelta(t, want[k], got, 1e-11, "%s %v", name, p)
		}
	}
	// gdalinfo: the corner of the north-west cell is (500100, 4200150), cells
	// of 5 m, also of the file whose cells are points.
	for _, name := range []string{"float32.tif", "point.tif"} {
		l := load(t, name).Levels
		assert.Equal(t, 500102.5, l.West)
		assert.Equal(t, 4200147.5, l.North)
		assert.Equal(t, 5.0, l.Cell)
	}
}

func TestUnmarkedVoids(t *testing.T) {
	for name, want := range map[string]string{
		"unmarked.tif":      "unmarked.tif: E U09 6 cells hold -9999, which stands for nothing known, the first at row 1, column 1 (E 500102.50 N 4200147.50); the file marks no value as no-data\n  help: mark -9999 as the no-data value of the file",
		"unmarked_zero.tif": "unmarked_zero.tif: E U09 6 cells hold 0.00 although the nearest level differs by more than 5 m, the first at row 1, column 1 (E 500102.50 N 4200147.50), where it is 247.83 m; the file marks no value as no-data\n  help: mark 0 as the no-data value of the file, or correct the levels",
	} {
		data, err := os.ReadFile(filepath.Join("testdata", name))
		require.NoError(t, err)
		r, problems := raster.Read(name, data, raster.Options{})
		assert.Nil(t, r)
		require.Len(t, problems, 1)
		assert.Equal(t, want, problems[0].String())
	}
}
