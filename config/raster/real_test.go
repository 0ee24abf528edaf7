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

// shared is the folder of real ground beside the checkout.
const shared = "../../../shared/terrain"

// needShared returns the bytes of a file of the shared folder, or skips; in CI
// the folder must be there.
func needShared(t *testing.T, name string) []byte {
	t.Helper()
	if _, err := os.Stat(shared); err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatal("the folder of real ground is missing beside the checkout")
		}
		t.Skip("the folder of real ground is not beside the checkout")
	}
	data, err := os.ReadFile(filepath.Join(shared, name))
	require.NoError(t, err)
	return data
}

// sample is what GDAL 3.6.2 reads in one cell (gdallocationinfo -valonly).
type sample struct {
	col, row int
	z        float64
}

// Real files against GDAL 3.6.2: place and size by gdalinfo, cells by
// gdallocationinfo, and least, mean and greatest level by gdalinfo -stats.
func TestRealGround(t *testing.T) {
	void := math.NaN()
	for _, c := range []struct {
		name            string
		crs             string
		cols, rows      int
		west, north     float64 // corner of the north-west cell
		cell            float64
		least, greatest float64
		mean            float64 // NaN: the file states a wrong one that the other reader repeats
		voids           int
		samples         []sample
	}{
		{
			name: "alexandria_dtm_2m_cog.tif", crs: "EPSG:26918", cols: 283, rows: 259, west: 321498, north: 4298018, cell: 2, voids: 276,
			least: 6.9064145088196, mean: 12.003123909946, greatest: 22.11820602417,
			samples: []sample{
				{0, 0, 7.56073808670044}, {282, 258, 12.4662895202637}, {100, 100, 12.6391115188599},
				{255, 128, 13.5834646224976}, {256, 128, 13.6834650039673}, {37, 201, 12.3137092590332},
			},
		},
		{
			name: "minnesota_dem_1m_400m.tif", crs: "EPSG:26915", cols: 400, rows: 400, west: 429252.313370021991432, north: 5150885.424942633137107, cell: 1,
			least: 379.65933227539, mean: 395.03024656258, greatest: 410.75866699219,
			samples: []sample{
				{0, 0, 398.611236572266}, {399, 399, 405.597198486328}, {127, 128, 397.350036621094},
				{200, 200, 393.617279052734}, {311, 17, 401.4150390625},
			},
		},
		{
			name: "ny_drumlins_dem_2m.tif", crs: "EPSG:26918", cols: 499, rows: 1146, west: 358817.284974092268385, north: 4784190.116580313071609, cell: 2, voids: 499 + 1145,
			least: 124.5611038208, mean: 137.48183373234, greatest: 172.60125732422,
			samples: []sample{
				{0, 0, void}, {0, 1, 133.402740478516}, {498, 1145, void}, {497, 1145, 140.390289306641},
				{250, 600, 147.122711181641}, {127, 128, 127.957450866699}, {33, 900, 129.126815795898},
			},
		},
		{
			name: "nz_dtm_1m.tif", crs: "EPSG:2193", cols: 278, rows: 195, west: 1802139.110000000102445, north: 5467490.5, cell: 1,
			least: 454.845703125, mean: 569.44074467101, greatest: 666.09411621094,
			samples: []sample{
				{0, 0, 660.19091796875}, {277, 194, 454.845703125}, {100, 100, 588.463989257812},
				{50, 6, 628.191345214844}, {50, 7, 628.5341796875},
			},
		},
		{
			name: "vancouver_dtm_1m.tif", crs: "EPSG:3157", cols: 800, rows: 450, west: 483625, north: 5455723, cell: 1,
			least: 55.729999542236, mean: math.NaN(), greatest: 87.218002319336,
			samples: []sample{
				{0, 0, 76.8450012207031}, {799, 449, 64.197998046875}, {75, 222, 68.3170013427734},
				{400, 225, 65.4390029907227}, {10, 433, 64.7330017089844},
				{75, 223, 68.2900009155273}, // the cell of E 483700, N 5455500, also in the folder's own notes
			},
		},
		{
			name: "west_bijou_gully_3m.asc", cols: 43, rows: 89, west: 559705, north: 4380487, cell: 3, voids: 2739,
			least: 1680.7794189453, mean: 1708.4775151645, greatest: 1725.4326171875,
			samples: []sample{{0, 0, void}, {20, 40, 1704.82739257812}, {42, 88, void}, {15, 60, void}, {30, 30, void}},
		},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, problems := raster.Read(c.name, needShared(t, c.name), raster.Options{})
			require.Empty(t, problems)
			l := r.Levels
			assert.Equal(t, c.crs, r.CRS)
			assert.Equal(t, [2]int{c.cols, c.rows}, [2]int{l.Cols, l.Rows})
			assert.InDelta(t, c.west+c.cell/2, l.West, 1e-8)
			assert.InDelta(t, c.north-c.cell/2, l.North, 1e-8)
			assert.Equal(t, c.cell, l.Cell)
			assert.Equal(t, c.voids, r.Voids)
			assert.False(t, r.Point)
			// Single precision, printed with 15 digits; text is read to double
			// here and to single there, half a last bit of 1700 m.
			tolerance := 1e-9
			if r.Format == "ASCII grid" {
				tolerance = 1e-4
			}
			for _, s := range c.samples {
				got := l.Z[s.row*l.Cols+s.col]
				if math.IsNaN(s.z) {
					assert.True(t, math.IsNaN(got), "%d %d", s.col, s.row)
					continue
				}
				assert.InDelta(t, s.z, got, tolerance, "%d %d", s.col, s.row)
			}
			least, mean, greatest := statistics(l.Z)
			assert.InDelta(t, c.least, least, 1e-4)
			assert.InDelta(t, c.greatest, greatest, 1e-4)
			if !math.IsNaN(c.mean) {
				assert.InDelta(t, c.mean, mean, 1e-5)
			}
		})
	}
}

func statistics(zs []float64) (least, mean, greatest float64) {
	least, greatest = math.Inf(1), math.Inf(-1)
	n := 0
	for _, z := range zs {
		if math.IsNaN(z) {
			continue
		}
		n++
		mean += (z - mean) / float64(n)
		least, greatest = math.Min(least, z), math.Max(greatest, z)
	}
	return least, mean, greatest
}
