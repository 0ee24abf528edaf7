package main

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config/raster"
	"sagcrest/section/terrain"
)

// A level platform across real ground, held against direct summation over the
// grid: an independent reading of the same surface, sampled every centimetre
// across, and summed by end areas.

// platform is a level strip along a straight line.
type platform struct {
	grid            terrain.Raster
	e, n            float64 // where the road starts
	de, dn          float64 // unit direction of the road
	length, half, z float64
	pay             float64
}

// level reads the grid at a place: the cell between four centres is split from
// north-west to south-east.
func (p platform) level(e, n float64) float64 {
	cellE, cellN := p.grid.CellE, p.grid.CellN
	if cellE == 0 {
		cellE, cellN = p.grid.Cell, p.grid.Cell
	}
	x, y := (e-p.grid.West)/cellE, (p.grid.North-n)/cellN
	i, j := math.Floor(x), math.Floor(y)
	i, j = math.Min(i, float64(p.grid.Cols-2)), math.Min(j, float64(p.grid.Rows-2))
	u, v := x-i, y-j
	at := func(di, dj int) float64 { return p.grid.Z[(int(j)+dj)*p.grid.Cols+int(i)+di] }
	nw, ne, sw, se := at(0, 0), at(1, 0), at(0, 1), at(1, 1)
	if u >= v {
		return nw + u*(ne-nw) + v*(se-ne)
	}
	return nw + v*(sw-nw) + u*(se-sw)
}

// areas sums cut and fill across the platform at a station.
func (p platform) areas(s float64) (cut, fill float64) {
	const dx = 0.01
	for o := -p.half + dx/2; o < p.half; o += dx {
		// right of the direction (de, dn) lies (dn, −de)
		h := p.level(p.e+s*p.de+o*p.dn, p.n+s*p.dn-o*p.de) - p.z
		if h > 0 {
			cut += h * dx
		} else {
			fill -= h * dx
		}
	}
	return cut, fill
}

// volumes sums end areas.
func (p platform) volumes() (cut, fill float64) {
	c0, f0 := p.areas(0)
	for s := p.pay; s <= p.length+1e-9; s += p.pay {
		c1, f1 := p.areas(s)
		cut += (c0 + c1) / 2 * p.pay
		fill += (f0 + f1) / 2 * p.pay
		c0, f0 = c1, f1
	}
	return cut, fill
}

// project writes the platform as a project file.
func (p platform) project(grid string) string {
	return fmt.Sprintf(`units = "metric"
[survey]
grid = %q
vertical_datum = "as published"
[alignment]
pi = [ { n = %v, e = %v }, { n = %v, e = %v } ]
[profile]
pvi = [ { station = 0, elev = %v }, { station = %v, elev = %v } ]
[[typical_section]]
name = "platform"
material = "earth"
lanes = { left = { width = "%v m", crossfall = 0 }, right = { width = "%v m", crossfall = 0 } }
cut_slope = 0.000001
fill_slope = 0.000001
pavement = "0 m"
[[material]]
name = "earth"
shrinkage = 0
[earthwork]
pay_stations = "%v m"
key_points = false
`, grid, p.n, p.e, p.n+p.length*p.dn, p.e+p.length*p.de, p.z, p.length, p.z, p.half, p.half, p.pay)
}

// platformResults is what the tests look at.
type platformResults struct {
	Result struct {
		Sections []struct {
			Place      struct{ Distance float64 }
			GroundElev float64 `json:"ground_elev"`
			CutArea    float64 `json:"cut_area"`
			FillArea   float64 `json:"fill_area"`
		}
		Earthwork struct {
			Totals struct {
				Cut  float64 `json:"cut_bank"`
				Fill float64 `json:"fill_compacted"`
			}
		}
	}
}

func runPlatform(t *testing.T, project string) (r platformResults) {
	done := call(t, "run", project, "--json", "--out", filepath.Join(t.TempDir(), "out"))
	require.Equal(t, 0, done.code, done.errw)
	require.NoError(t, json.Unmarshal([]byte(done.out), &r))
	return r
}

// hold compares results with the summation. Slices are exact and the sum takes
// the middle of 10 mm slabs, so an area may differ where the ground crosses the
// platform or bends: by less than 0.01 m² of up to 700.
func (p platform) hold(t *testing.T, r platformResults) {
	for _, s := range r.Result.Sections {
		cut, fill := p.areas(s.Place.Distance)
		assert.InDelta(t, cut, s.CutArea, 0.03, "%v", s.Place.Distance)
		assert.InDelta(t, fill, s.FillArea, 0.03, "%v", s.Place.Distance)
	}
	cut, fill := p.volumes()
	assert.InEpsilon(t, cut, r.Result.Earthwork.Totals.Cut, 1e-4)
	assert.InEpsilon(t, fill, r.Result.Earthwork.Totals.Fill, 1e-4)
}

func readGrid(t *testing.T, path string) terrain.Raster {
	data, err := os.ReadFile(path)
	require.NoError(t, err)
	d, problems := raster.Read(path, data, raster.Options{})
	require.Empty(t, problems)
	return d.Levels
}

// The shipped grid; its README names the source.
func TestPlatformOnVolcano(t *testing.T) {
	dir := filepath.Join("..", "..", "testdata", "roads", "volcano")
	p := platform{grid: readGrid(t, filepath.Join(dir, "volcano.asc")), e: 25, n: 305, de: 1, length: 800, half: 15, z: 130, pay: 10}
	r := runPlatform(t, dir)
	require.Len(t, r.Result.Sections, 81)
	p.hold(t, r)
}

// onRealGround runs a platform over a raster beside the project, holds it against the
// summation, and its centre line, which runs over cell centres, against values
// that GDAL 3.6.2 (gdallocationinfo) reads, by distance.
func onRealGround(t *testing.T, file string, p platform, col, row float64, gdal map[float64]float64) {
	path, err := filepath.Abs(filepath.Join(shared(t, "terrain"), file))
	require.NoError(t, err)
	p.grid = readGrid(t, path)
	cell := math.Max(p.grid.Cell, p.grid.CellE)
	p.e, p.n = p.grid.West+col*cell, p.grid.North-row*cell
	project := filepath.Join(t.TempDir(), "road.toml")
	require.NoError(t, os.WriteFile(project, []byte(p.project(path)), 0o644))
	r := runPlatform(t, project)
	p.hold(t, r)
	for _, s := range r.Result.Sections {
		if want, ok := gdal[s.Place.Distance]; ok {
			assert.InDelta(t, want, s.GroundElev, 1e-6)
			delete(gdal, s.Place.Distance)
		}
	}
	assert.Empty(t, gdal, "every one was met")
}

// Drumlins in New York state, 2 km from north to south.
func TestPlatformOnDrumlins(t *testing.T) {
	onRealGround(t, "ny_drumlins_dem_2m.tif", platform{dn: -1, length: 2000, half: 12, z: 140, pay: 20}, 250, 20,
		map[float64]float64{0: 130.693161010742, 200: 130.707489013672, 600: 133.001159667969,
			1000: 142.147766113281, 1500: 159.541900634766, 2000: 135.210266113281})
}

// West Vancouver, a short road from west to east.
func TestPlatformOnVancouver(t *testing.T) {
	onRealGround(t, "vancouver_dtm_1m.tif", platform{de: 1, length: 400, half: 8, z: 67, pay: 20}, 100, 222,
		map[float64]float64{0: 68.6719970703125, 80: 68.984001159668, 160: 67.0149993896484,
			240: 65.5619964599609, 320: 65.4140014648438, 400: 69.177001953125})
}
