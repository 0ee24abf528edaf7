package raster_test

import (
	"encoding/binary"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/config/diag"
	"sagcrest/config/raster"
	"sagcrest/profile/finding"
)

// small is a sound picture of 5 × 4 levels from 100 to 119.
func small(change func(p *picture)) *picture {
	p := &picture{
		order: binary.LittleEndian, cols: 5, rows: 4, width: 5, height: 2, format: 3, bits: 32,
		compression: 8, predictor: 1, fields: area(),
	}
	for k := range 20 {
		p.z = append(p.z, 100+float64(k))
	}
	if change != nil {
		change(p)
	}
	return p
}

func read(data []byte) (*raster.Raster, []diag.Problem) {
	return raster.Read("grid.tif", data, raster.Options{})
}

// Law: however levels are stored, they are read as they were.
func TestStoredLevelsAreReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := small(nil)
		p.order = rapid.SampledFrom([]binary.ByteOrder{binary.LittleEndian, binary.BigEndian}).Draw(t, "order")
		p.big = rapid.Bool().Draw(t, "big")
		p.tiled = rapid.Bool().Draw(t, "tiled")
		p.cols, p.rows = rapid.IntRange(2, 40).Draw(t, "cols"), rapid.IntRange(2, 40).Draw(t, "rows")
		p.width, p.height = p.cols, rapid.IntRange(1, 45).Draw(t, "height")
		if p.tiled {
			p.width = rapid.IntRange(1, 45).Draw(t, "width")
		}
		kind := rapid.SampledFrom([][2]int{{3, 32}, {3, 64}, {2, 16}, {1, 16}, {2, 32}, {1, 32}}).Draw(t, "kind")
		p.format, p.bits = kind[0], kind[1]
		p.compression = rapid.SampledFrom([]int{1, 5, 8, 32946}).Draw(t, "compression")
		if p.compression != 1 {
			p.predictor = rapid.IntRange(1, 3).Draw(t, "predictor")
		}
		if p.predictor == 3 && p.format != 3 {
			p.predictor = 2
		}
		low := -300.0
		if p.format == 1 {
			low = 1
		}
		p.z = nil
		for range p.cols * p.rows {
			z := rapid.Float64Range(low, 3000).Draw(t, "z")
			if p.format != 3 {
				z = math.Trunc(z)
			}
			if math.Abs(z) < 1 { // near zero it may stand for nothing known
				z = 1
			}
			if p.bits == 32 && p.format == 3 {
				z = float64(float32(z))
			}
			p.z = append(p.z, z)
		}
		r, problems := read(p.bytes())
		require.Empty(t, problems)
		require.Equal(t, p.z, r.Levels.Z)
		require.Equal(t, 1001.0, r.Levels.West)
		require.Equal(t, 1998.5, r.Levels.North)
		require.Equal(t, [2]float64{2, 3}, [2]float64{r.Levels.CellE, r.Levels.CellN})
	})
}

// keys returns the field of GeoTIFF keys, given as key and value.
func keys(kv ...float64) entry {
	e := entry{tag: 34735, kind: 3, values: []float64{1, 1, 0, float64(len(kv) / 2)}}
	for i := 0; i < len(kv); i += 2 {
		e.values = append(e.values, kv[i], 0, 1, kv[i+1])
	}
	return e
}

func TestPlace(t *testing.T) {
	matrix := func(v ...float64) []entry {
		m := make([]float64, 16)
		copy(m, v)
		m[15] = 1
		return []entry{{tag: 34264, kind: 12, values: m}}
	}
	for _, c := range []struct {
		name        string
		fields      []entry
		west, north float64
		point       bool
		stated      bool
		crs, levels string
	}{
		{"area is assumed", area(), 1001, 1998.5, false, false, "", ""},
		{"area", append(area(), keys(1025, 1)), 1001, 1998.5, false, true, "", ""},
		{"point", append(area(), keys(1025, 2)), 1000, 2000, true, true, "", ""},
		{"tie elsewhere", []entry{area()[0], {tag: 33922, kind: 12, values: []float64{5, 4, 0, 1010, 1988, 0}}}, 1001, 1998.5, false, false, "", ""},
		{"matrix", matrix(2, 0, 0, 1000, 0, -3, 0, 2000), 1001, 1998.5, false, false, "", ""},
		{"matrix and point", append(matrix(2, 0, 0, 1000, 0, -3, 0, 2000), keys(1025, 2)), 1000, 2000, true, true, "", ""},
		{"numbered systems", append(area(), keys(1024, 1, 3072, 32633, 4096, 5621)), 1001, 1998.5, false, false, "EPSG:32633", "EPSG:5621"},
		{"own system", append(area(), keys(1024, 32767, 3072, 32767)), 1001, 1998.5, false, false, "user-defined", ""},
		{"private system", append(area(), keys(1024, 1, 3072, 40001)), 1001, 1998.5, false, false, "private code 40001", ""},
		{"metres stated", append(area(), keys(3076, 9001, 4099, 9001)), 1001, 1998.5, false, false, "", ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, problems := read(small(func(p *picture) { p.fields = c.fields }).bytes())
			require.Empty(t, problems)
			assert.Equal(t, c.west, r.Levels.West)
			assert.Equal(t, c.north, r.Levels.North)
			assert.Equal(t, c.point, r.Point)
			assert.Equal(t, c.stated, r.Stated)
			assert.Equal(t, c.crs, r.CRS)
			assert.Equal(t, c.levels, r.VerticalCRS)
		})
	}
}

func TestFeetBecomeMetres(t *testing.T) {
	foot := 1200.0 / 3937
	p := small(func(p *picture) { p.fields = append(area(), keys(3076, 9003, 4099, 9003)) })
	r, problems := raster.Read("grid.tif", p.bytes(), raster.Options{Unit: foot})
	require.Empty(t, problems)
	assert.Equal(t, 1001*foot, r.Levels.West)
	assert.Equal(t, 2*foot, r.Levels.CellE)
	assert.Equal(t, 100*foot, r.Levels.Z[0])
}

// noData returns the field of the no-data value.
func noData(text string) entry { return entry{tag: 42113, kind: 2, text: text} }

func TestVoids(t *testing.T) {
	for _, c := range []struct {
		name, marked string
		format, bits int
		z            float64
		void         bool
	}{
		{"whole", "-9999", 2, 16, -9999, true},
		{"single", "-9999.9", 3, 32, -9999.9, true},
		{"few digits of the least single", "-3.4e+38", 3, 32, -math.MaxFloat32, true},
		{"more digits than a single", "-3.40282346638529e+38 ", 3, 32, -math.MaxFloat32, true},
		{"infinite in single", "-1.7976931348623157e+308", 3, 32, math.Inf(-1), true},
		{"least double", "-1.797693134862315e+308", 3, 64, -math.MaxFloat64, true},
		{"not a number, marked", "nan", 3, 32, math.NaN(), true},
		{"not a number, unmarked", "-1", 3, 64, math.NaN(), true},
		{"zero marked", "0", 3, 32, 0, true},
		{"another value", "-32768", 2, 16, -32700, false},
		{"beside the value", "-9999", 3, 64, -9999.5, false},
	} {
		t.Run(c.name, func(t *testing.T) {
			p := small(func(p *picture) {
				p.format, p.bits, p.z[7] = c.format, c.bits, c.z
				p.fields = append(area(), noData(c.marked))
			})
			r, problems := read(p.bytes())
			require.Empty(t, problems)
			require.NotNil(t, r.NoData)
			assert.Equal(t, c.void, math.IsNaN(r.Levels.Z[7]))
			assert.Equal(t, map[bool]int{true: 1, false: 0}[c.void], r.Voids)
			assert.Equal(t, 106.0, r.Levels.Z[6])
		})
	}
}

// A chunk that the file leaves out holds nothing known.
func TestChunkLeftOut(t *testing.T) {
	r, problems := read(small(func(p *picture) { p.sparse = map[int]bool{1: true} }).bytes())
	require.Empty(t, problems)
	assert.Equal(t, 10, r.Voids)
	assert.Equal(t, 109.0, r.Levels.Z[9])
	assert.True(t, math.IsNaN(r.Levels.Z[10]))
}

// Overviews and their masks are passed over.
func TestOverviewsAreIgnored(t *testing.T) {
	overview := small(func(p *picture) { p.cols, p.rows, p.width, p.subfile, p.z = 3, 2, 3, 1, p.z[:6] })
	r, problems := read(small(func(p *picture) { p.second = overview }).bytes())
	require.Empty(t, problems)
	assert.Equal(t, 5, r.Levels.Cols)
}

// badTIFF is a picture that must be refused.
type badTIFF struct {
	name   string
	change func(p *picture)
	code   finding.Code
	says   string
}

func badTIFFs() []badTIFF {
	set := func(tag uint16, kind uint16, v ...float64) func(p *picture) {
		return func(p *picture) { p.fields = append([]entry{{tag: tag, kind: kind, values: v}}, p.fields...) }
	}
	place := func(fields ...entry) func(p *picture) { return func(p *picture) { p.fields = fields } }
	level := func(z float64) func(p *picture) { return func(p *picture) { p.z[7] = z } }
	turned := entry{tag: 34264, kind: 12, values: []float64{2, 1, 0, 1000, 1, -2, 0, 2000, 0, 0, 0, 0, 0, 0, 0, 1}}
	return []badTIFF{
		{"bands", set(277, 3, 3), "F09", "3 bands"},
		{"bytes", func(p *picture) { p.fields = append([]entry{{tag: 258, kind: 3, values: []float64{8}}}, area()...) }, "F09", "8 bits"},
		{"half floats", set(258, 3, 16), "F09", "levels of 16 bits in sample format 3"},
		{"compression", set(259, 3, 50000), "F09", "50000 (Zstandard)"},
		{"unknown compression", set(259, 3, 1234), "F09", "compression 1234"},
		{"bits backwards", set(266, 3, 2), "F09", "backwards"},
		{"predictor", set(317, 3, 9), "F09", "predictor 9"},
		{"predictor of other numbers", func(p *picture) { p.format, p.bits, p.predictor = 2, 16, 3 }, "F02", "whole numbers"},
		{"mask", func(p *picture) { p.second = small(func(p *picture) { p.subfile = 4 }) }, "F09", "mask"},
		{"several pictures", func(p *picture) { p.second = small(nil) }, "F09", "several full pictures"},
		{"overview alone", func(p *picture) { p.subfile = 1 }, "F02", "no full picture"},
		{"turned", place(turned), "F09", "turned"},
		{"no place", place(), "F09", "does not say where it lies"},
		{"control points", place(entry{tag: 33922, kind: 12, values: make([]float64, 24)}), "F09", "4 control points"},
		{"south to north", place(entry{tag: 33550, kind: 12, values: []float64{2, -3, 0}}, area()[1]), "F09", "south to north"},
		{"no cell size", place(entry{tag: 33550, kind: 12, values: []float64{0, 3, 0}}, area()[1]), "F02", "not positive"},
		{"place not finite", place(area()[0], entry{tag: 33922, kind: 12, values: []float64{0, 0, 0, math.NaN(), 0, 0}}), "F02", "not finite"},
		{"place far away", place(area()[0], entry{tag: 33922, kind: 12, values: []float64{0, 0, 0, 1e12, 0, 0}}), "F02", "outside"},
		{"cell size lost", place(entry{tag: 33550, kind: 12, values: []float64{1e-9, 1e-9, 0}}, entry{tag: 33922, kind: 12, values: []float64{0, 0, 0, 5e7, 5e7, 0}}), "F02", "lost"},
		{"degrees", place(append(area(), keys(1024, 2))...), "F09", "model type 2"},
		{"feet against metres", place(append(area(), keys(4099, 9002))...), "F08", "levels are in international feet"},
		{"unit unknown", place(append(area(), keys(3076, 9036))...), "F09", "EPSG:9036"},
		{"raster type", place(append(area(), keys(1025, 3))...), "F02", "raster type 3"},
		{"keys beyond their field", place(append(area(), entry{tag: 34735, kind: 3, values: []float64{1, 1, 0, 9}})...), "F02", "9 keys"},
		{"scaled", place(append(area(), entry{tag: 42112, kind: 2, text: `<Item name="SCALE" sample="0" role="scale">0.1</Item>`})...), "F09", "scaled"},
		{"no-data no number", place(append(area(), noData("none"))...), "F02", `"none"`},
		{"size", set(256, 4, 1e9), "F02", "more than the 100000000"},
		{"size beyond the file", set(257, 4, 1e6), "F02", "a file of this size"},
		{"one row", func(p *picture) { p.rows = 1 }, "F02", "needs two"},
		{"strips missing", set(278, 4, 1), "F02", "need 4"},
		{"no rows in a strip", set(278, 4, 0), "F02", "strips or tiles"},
		{"giant tiles", func(p *picture) { p.tiled = true; set(322, 4, 1e6)(p); set(323, 4, 1e6)(p) }, "F02", "tiles of"},
		{"strip beyond the end", func(p *picture) { p.corrupt = func(o, _ []uint64) { o[1] = 1e6 } }, "F02", "beyond the end"},
		{"length beyond the end", func(p *picture) { p.corrupt = func(_, n []uint64) { n[0] = 1e9 } }, "F02", "1000000000 bytes at byte 8"},
		{"strip cut off", func(p *picture) { p.corrupt = func(_, n []uint64) { n[0] /= 2 } }, "F02", "damaged"},
		{"strip cut off, LZW", func(p *picture) { p.compression = 5; p.corrupt = func(_, n []uint64) { n[0] /= 2 } }, "F02", "damaged"},
		{"strip cut off, plain", func(p *picture) { p.compression = 1; p.corrupt = func(_, n []uint64) { n[0] /= 2 } }, "F02", "20 bytes, its levels need 40"},
		{"no zlib", func(p *picture) { p.corrupt = func(o, _ []uint64) { o[0] = 0 } }, "F02", "damaged"},
		{"level too far", level(1e9), "F06", "1 levels lie outside"},
		{"infinite level", level(math.Inf(1)), "F06", "+Inf at row 2, column 3"},
		{"unmarked", level(-9999), "U09", "1 cells hold -9999"},
		{"unmarked, least of 16 bits", func(p *picture) { p.format, p.bits, p.z[7] = 2, 16, -32768 }, "U09", "-32768"},
		{"zero", level(0), "U09", "1 cells hold 0.00"},
		{"nothing known", func(p *picture) { p.sparse = map[int]bool{0: true, 1: true} }, "F02", "every cell"},
	}
}

func TestRefusedTIFFs(t *testing.T) {
	for _, c := range badTIFFs() {
		t.Run(c.name, func(t *testing.T) {
			r, problems := read(small(c.change).bytes())
			assert.Nil(t, r)
			require.Len(t, problems, 1)
			assert.Equal(t, c.code, problems[0].Code)
			assert.Contains(t, problems[0].Message, c.says)
			assert.NotEmpty(t, problems[0].Help)
		})
	}
}

// Near misses of what is refused above.
func TestSoundTIFFs(t *testing.T) {
	coast := func(p *picture) {
		for k := range p.z {
			p.z[k] = 4 - float64(k)/4 // 4 m down to -0.75 m, with one 0.00
		}
	}
	for name, change := range map[string]func(p *picture){
		"zero on a coast": coast,
		"below the sea":   func(p *picture) { p.z[7] = -300 },
		"a high level":    func(p *picture) { p.z[7] = 8848 },
		"predictor without sense": func(p *picture) {
			p.compression = 1
			p.fields = append([]entry{{tag: 317, kind: 3, values: []float64{2}}}, p.fields...)
		},
		"one large tile": func(p *picture) { p.tiled, p.width, p.height = true, 256, 256 },
	} {
		t.Run(name, func(t *testing.T) {
			p := small(change)
			r, problems := read(p.bytes())
			require.Empty(t, problems)
			assert.Equal(t, p.z, r.Levels.Z)
		})
	}
}

// A file cut anywhere is refused, and never by a panic. Behind its last level
// only the names of fields are lost.
func TestCutFiles(t *testing.T) {
	for _, p := range []*picture{
		small(nil), small(func(p *picture) { p.big = true }),
		small(func(p *picture) { p.order, p.tiled, p.width, p.height, p.compression = binary.BigEndian, true, 4, 3, 5 }),
	} {
		whole := p.bytes()
		for n := range whole {
			r, problems := read(whole[:n])
			require.Nil(t, r, "cut at %d of %d", n, len(whole))
			require.NotEmpty(t, problems)
			require.Equal(t, finding.Code("F02"), problems[0].Code, "cut at %d: %s", n, problems[0])
		}
	}
}

// A chunk whose bytes do not fit their checksum is not believed.
func TestChecksum(t *testing.T) {
	var end uint64
	p := small(func(p *picture) { p.corrupt = func(o, n []uint64) { end = o[0] + n[0] } })
	whole := p.bytes()
	whole[end-1] ^= 1
	r, problems := read(whole)
	assert.Nil(t, r)
	require.Len(t, problems, 1)
	assert.Contains(t, problems[0].Message, "strip or tile 0 at byte 8 is damaged")
}

func TestCircleOfDirectories(t *testing.T) {
	p := small(func(p *picture) { p.subfile = 1 })
	whole := p.bytes()
	first := whole[4:8]
	at := binary.LittleEndian.Uint32(first)
	n := binary.LittleEndian.Uint16(whole[at:])
	copy(whole[int(at)+2+12*int(n):], first)
	_, problems := read(whole)
	require.Len(t, problems, 1)
	assert.Contains(t, problems[0].Message, "circle")
}

// Software names in a file are never repeated.
func TestSoftwareIsNotEchoed(t *testing.T) {
	p := small(func(p *picture) {
		p.fields = append(p.fields, entry{tag: 305, kind: 2, text: "Somebody's program 7"}, entry{tag: 34737, kind: 2, text: "Somebody's program 7|"})
	})
	r, problems := read(p.bytes())
	require.Empty(t, problems)
	assert.False(t, strings.Contains(r.Format+r.Values+r.CRS+r.VerticalCRS, "Somebody"))
}
