package raster

import (
	"fmt"
	"math"
)

// Compressions that are read.
const (
	plain      = 1
	lzwPacked  = 5
	deflate    = 8
	oldDeflate = 32946
)

// Ways in which levels are stored as differences.
const (
	noPredictor    = 1
	horizontal     = 2
	floatingByByte = 3
)

// Sample formats.
const (
	unsigned = 1
	signed   = 2
	floating = 3
)

// layout tells how the levels of a picture are stored: in chunks, which are
// strips of whole rows or tiles.
type layout struct {
	cols, rows             int
	tiled                  bool
	width, height          int // of a chunk
	across, down           int // chunks side by side, and below each other
	offsets, counts        []uint64
	format, size           int // sample format and bytes of a sample
	compression, predictor int
}

// mostExpansion is the largest ratio of levels to stored bytes that a
// compression reaches: 1032 for deflate (its longest match of 258 bytes takes
// two bits), 1365 for LZW (a code of 12 bits stands for at most 2048 bytes on
// average).
const mostExpansion = 1500

// largestChunk bounds the cells of a strip or tile; tiles have 128 to 1024
// rows and columns.
const largestChunk = 1 << 24

// layout reads how levels are stored, and refuses what is not read.
func (d *directory) layout() (*layout, error) {
	l := &layout{}
	if err := d.samples(l); err != nil {
		return nil, err
	}
	if err := d.packing(l); err != nil {
		return nil, err
	}
	cols, err := d.number(tagWidth, 0)
	if err != nil {
		return nil, err
	}
	rows, err := d.number(tagLength, 0)
	if err != nil {
		return nil, err
	}
	possible := uint64(len(d.data)) * mostExpansion / uint64(l.size)
	if err := checkSize(cols, rows, possible); err != nil {
		return nil, err
	}
	l.cols, l.rows = int(cols), int(rows)
	return l, d.division(l)
}

// samples reads the type of the levels.
func (d *directory) samples(l *layout) error {
	bands, err := d.number(tagSamples, 1)
	if err != nil {
		return err
	}
	if bands != 1 {
		return unread("write the levels alone into a file", "the file holds %d bands", bands)
	}
	bits, err := d.number(tagBits, 1)
	if err != nil {
		return err
	}
	format, err := d.number(tagSampleFormat, unsigned)
	if err != nil {
		return err
	}
	switch {
	case format == floating && (bits == 32 || bits == 64),
		(format == signed || format == unsigned) && (bits == 16 || bits == 32):
		l.format, l.size = int(format), int(bits/8)
		return nil
	}
	return unread("store the levels as 32-bit floating point", "levels of %d bits in sample format %d", bits, format)
}

// values names the type of the levels.
func (l *layout) values() string {
	kind := map[int]string{unsigned: "unsigned whole numbers", signed: "whole numbers", floating: "floating point"}[l.format]
	return fmt.Sprintf("%d-bit %s", 8*l.size, kind)
}

// packing reads compression and predictor.
func (d *directory) packing(l *layout) error {
	packed, err := d.number(tagCompression, plain)
	if err != nil {
		return err
	}
	switch packed {
	case plain, lzwPacked, deflate, oldDeflate:
		l.compression = int(packed)
	default:
		return unread("store the file with deflate or LZW, or without compression", "compression %s", compressionName(packed))
	}
	order, err := d.number(tagFillOrder, 1)
	if err != nil {
		return err
	}
	if order != 1 {
		return unread("store the file with the usual order of bits", "bytes whose bits run backwards")
	}
	difference, err := d.number(tagPredictor, noPredictor)
	if err != nil {
		return err
	}
	// The predictor belongs to the two compressions (TIFF 6.0, section 14).
	if l.compression == plain {
		difference = noPredictor
	}
	switch difference {
	case noPredictor, horizontal, floatingByByte:
		l.predictor = int(difference)
	default:
		return unread("store the file without predictor", "predictor %d", difference)
	}
	if l.predictor == floatingByByte && l.format != floating {
		return broken("levels that are whole numbers are stored with the predictor of floating-point ones")
	}
	return nil
}

// compressionName names the registered compressions by their number.
func compressionName(n uint64) string {
	names := map[uint64]string{
		2: "CCITT", 3: "CCITT group 3", 4: "CCITT group 4", 6: "old JPEG", 7: "JPEG", 32773: "run lengths",
		34712: "JPEG 2000", 34887: "limited error", 34925: "LZMA", 50000: "Zstandard", 50001: "WebP", 50002: "JPEG XL",
	}
	if name, ok := names[n]; ok {
		return fmt.Sprintf("%d (%s)", n, name)
	}
	return fmt.Sprint(n)
}

// division reads the strips or tiles and where they stand.
func (d *directory) division(l *layout) error {
	_, l.tiled = d.fields[tagTileOffsets]
	offsetsTag, countsTag := uint16(tagStripOffsets), uint16(tagStripCounts)
	width, height := uint64(l.cols), uint64(0)
	var err error
	if l.tiled {
		offsetsTag, countsTag = tagTileOffsets, tagTileCounts
		if width, err = d.number(tagTileWidth, 0); err != nil {
			return err
		}
		height, err = d.number(tagTileLength, 0)
	} else {
		height, err = d.number(tagRowsPerStrip, math.MaxUint32)
		height = min(height, uint64(l.rows))
	}
	if err != nil {
		return err
	}
	if width == 0 || height == 0 || width > mostCells || height > mostCells {
		return broken("strips or tiles of %d columns and %d rows", width, height)
	}
	l.width, l.height = int(width), int(height)
	l.across, l.down = (l.cols+l.width-1)/l.width, (l.rows+l.height-1)/l.height
	if err := l.checkPadding(); err != nil {
		return err
	}
	n := l.across * l.down
	if l.offsets, err = d.uints(offsetsTag, uint64(n)); err != nil {
		return err
	}
	if l.counts, err = d.uints(countsTag, uint64(n)); err != nil {
		return err
	}
	if len(l.offsets) != n || len(l.counts) != n {
		return broken("%d places and %d lengths of strips or tiles where %d columns and %d rows need %d", len(l.offsets), len(l.counts), l.cols, l.rows, n)
	}
	return nil
}

// checkPadding bounds what tiles hold beyond the raster's edge: one large tile
// for a small raster is fair, many are hostile.
func (l *layout) checkPadding() error {
	padded := float64(l.across) * float64(l.down) * float64(l.width) * float64(l.height)
	if l.tiled && (l.width*l.height > largestChunk || padded > 4*float64(l.cols)*float64(l.rows)+largestChunk) {
		return broken("tiles of %d columns and %d rows for a raster of %d and %d", l.width, l.height, l.cols, l.rows)
	}
	return nil
}
