package raster

import (
	"encoding/binary"
	"math"
	"strings"

	"sagcrest/section/terrain"
)

// Tags of TIFF 6.0 and GeoTIFF 1.1 that are looked at.
const (
	tagSubfile         = 254
	tagWidth           = 256
	tagLength          = 257
	tagBits            = 258
	tagCompression     = 259
	tagFillOrder       = 266
	tagStripOffsets    = 273
	tagSamples         = 277
	tagRowsPerStrip    = 278
	tagStripCounts     = 279
	tagPredictor       = 317
	tagTileWidth       = 322
	tagTileLength      = 323
	tagTileOffsets     = 324
	tagTileCounts      = 325
	tagSampleFormat    = 339
	tagPixelScale      = 33550
	tagTiepoint        = 33922
	tagTransformation  = 34264
	tagGeoKeys         = 34735
	tagDescribedValues = 42112
	tagNoData          = 42113
)

// mostFields and mostPictures bound what is looked at of a directory and of
// the chain of directories: real files have some 20 fields and 10 overviews.
const (
	mostFields   = 4096
	mostPictures = 256
)

// tiff is a TIFF file; every access to its bytes is checked.
type tiff struct {
	data  []byte
	order binary.ByteOrder
	big   bool // BigTIFF: offsets of 8 bytes
}

// field is one entry of a directory: a tag with count values of a kind, which
// begin at byte at.
type field struct {
	kind      uint16
	count, at uint64
}

// directory is the list of fields of one picture; next is the byte where the
// directory of the next one begins, 0 at the end.
type directory struct {
	*tiff
	fields   map[uint16]field
	at, next uint64
}

// bytes returns n bytes of the file from a place that the file names.
func (t *tiff) bytes(at, n uint64) ([]byte, error) {
	if size := uint64(len(t.data)); at > size || n > size-at {
		return nil, broken("%d bytes at byte %d lie beyond the end of the file, which has %d", n, at, size)
	}
	return t.data[at : at+n], nil
}

// uint returns an unsigned number of 2, 4 or 8 bytes.
func (t *tiff) uint(at, size uint64) (uint64, error) {
	b, err := t.bytes(at, size)
	if err != nil {
		return 0, err
	}
	switch size {
	case 2:
		return uint64(t.order.Uint16(b)), nil
	case 4:
		return uint64(t.order.Uint32(b)), nil
	}
	return t.order.Uint64(b), nil
}

// open reads the head of the file and returns the byte of its first directory.
func open(data []byte) (*tiff, uint64, error) {
	t := &tiff{data: data, order: binary.LittleEndian}
	if data[0] == 'M' {
		t.order = binary.BigEndian
	}
	version, err := t.uint(2, 2)
	if err != nil {
		return nil, 0, err
	}
	if version != 43 {
		first, err := t.uint(4, 4)
		return t, first, err
	}
	t.big = true
	if size, err := t.uint(4, 2); err != nil || size != 8 {
		return nil, 0, broken("the head of the BigTIFF is malformed at byte 4")
	}
	first, err := t.uint(8, 8)
	return t, first, err
}

// sizes returns the bytes of a directory's count, of an entry, and of an
// offset.
func (t *tiff) sizes() (count, entry, offset uint64) {
	if t.big {
		return 8, 20, 8
	}
	return 2, 12, 4
}

// kindSize returns the bytes of one value of a kind of field, 0 for an unknown
// one.
func kindSize(kind uint16) uint64 {
	switch kind {
	case 1, 2, 6, 7: // byte, text, signed byte, undefined
		return 1
	case 3, 8: // short, signed short
		return 2
	case 4, 9, 11, 13: // long, signed long, float, directory
		return 4
	case 5, 10, 12, 16, 17, 18: // rationals, double, long8, signed long8, directory8
		return 8
	}
	return 0
}

// directory reads the directory at a byte.
func (t *tiff) directory(at uint64) (*directory, error) {
	countSize, entrySize, offsetSize := t.sizes()
	n, err := t.uint(at, countSize)
	if err != nil {
		return nil, err
	}
	if n > mostFields {
		return nil, broken("the directory at byte %d claims %d fields", at, n)
	}
	d := &directory{tiff: t, fields: map[uint16]field{}, at: at}
	// One check for all: no offset below can overflow.
	if _, err := t.bytes(at+countSize, n*entrySize+offsetSize); err != nil {
		return nil, err
	}
	for i := range n {
		entry := at + countSize + i*entrySize
		tag, _ := t.uint(entry, 2)
		kind, _ := t.uint(entry+2, 2)
		count, _ := t.uint(entry+4, offsetSize)
		f := field{uint16(kind), count, entry + 4 + offsetSize}
		size := kindSize(f.kind)
		if size == 0 {
			continue // TIFF 6.0: readers skip fields of unknown kinds
		}
		if count > offsetSize/size { // else the values stand in the entry itself
			f.at, _ = t.uint(f.at, offsetSize)
		}
		if count > uint64(len(t.data)) {
			return nil, broken("field %d at byte %d claims %d values", tag, entry, count)
		}
		if _, err := t.bytes(f.at, count*size); err != nil {
			return nil, err
		}
		if _, twice := d.fields[uint16(tag)]; !twice {
			d.fields[uint16(tag)] = f
		}
	}
	d.next, err = t.uint(at+countSize+n*entrySize, offsetSize)
	return d, err
}

// uints returns the whole numbers of a field, nil when it is absent; most
// bounds their number.
func (d *directory) uints(tag uint16, most uint64) ([]uint64, error) {
	f, ok := d.fields[tag]
	if !ok {
		return nil, nil
	}
	size := kindSize(f.kind)
	if f.kind != 1 && f.kind != 3 && f.kind != 4 && f.kind != 16 || f.count > most {
		return nil, broken("field %d at byte %d holds %d values of kind %d, not up to %d whole numbers", tag, f.at, f.count, f.kind, most)
	}
	out := make([]uint64, f.count)
	for i := range out {
		if f.kind == 1 {
			out[i] = uint64(d.data[f.at+uint64(i)])
			continue
		}
		out[i], _ = d.uint(f.at+uint64(i)*size, size)
	}
	return out, nil
}

// number returns the first whole number of a field, or absent.
func (d *directory) number(tag uint16, absent uint64) (uint64, error) {
	v, err := d.uints(tag, 16)
	if err != nil || len(v) == 0 {
		return absent, err
	}
	return v[0], nil
}

// doubles returns the numbers of a field of doubles, nil when it is absent.
func (d *directory) doubles(tag uint16, most uint64) ([]float64, error) {
	f, ok := d.fields[tag]
	if !ok {
		return nil, nil
	}
	if f.kind != 12 || f.count > most {
		return nil, broken("field %d at byte %d holds %d values of kind %d, not up to %d doubles", tag, f.at, f.count, f.kind, most)
	}
	out := make([]float64, f.count)
	for i := range out {
		bits, _ := d.uint(f.at+uint64(i)*8, 8)
		out[i] = math.Float64frombits(bits)
		if math.IsNaN(out[i]) || math.IsInf(out[i], 0) {
			return nil, broken("field %d at byte %d holds a number that is not finite", tag, f.at)
		}
	}
	return out, nil
}

// text returns a text field without its closing zeros; longest bounds what is
// returned.
func (d *directory) text(tag uint16, longest uint64) string {
	f, ok := d.fields[tag]
	if !ok || f.kind != 2 {
		return ""
	}
	return strings.TrimRight(string(d.data[f.at:f.at+min(f.count, longest)]), "\x00")
}

// Bits of tagSubfile.
const (
	reducedPicture = 1
	maskPicture    = 4
)

// readTIFF reads the full picture of a GeoTIFF.
func (f *file) readTIFF() (*Raster, error) {
	t, first, err := open(f.data)
	if err != nil {
		return nil, err
	}
	d, err := t.picture(first)
	if err != nil {
		return nil, err
	}
	l, err := d.layout()
	if err != nil {
		return nil, err
	}
	r := &Raster{Format: "GeoTIFF", Values: l.values(), Levels: terrain.Raster{Cols: l.cols, Rows: l.rows}}
	if t.big {
		r.Format = "BigTIFF"
	}
	if err := f.locate(d, r); err != nil {
		return nil, err
	}
	if err := d.noData(r); err != nil {
		return nil, err
	}
	return r, f.chunks(t, l, r)
}

// picture walks the chain of directories and returns the one full picture.
func (t *tiff) picture(at uint64) (full *directory, err error) {
	seen := map[uint64]bool{}
	for at != 0 {
		if seen[at] || len(seen) == mostPictures {
			return nil, broken("the chain of directories runs in a circle or beyond %d, at byte %d", mostPictures, at)
		}
		seen[at] = true
		d, err := t.directory(at)
		if err != nil {
			return nil, err
		}
		kind, err := d.number(tagSubfile, 0)
		switch {
		case err != nil:
			return nil, err
		case kind&maskPicture != 0 && kind&reducedPicture == 0:
			return nil, unread("mark voids by a no-data value instead", "the file marks its voids by a mask")
		case kind&(reducedPicture|maskPicture) != 0:
		case full != nil:
			return nil, unread("keep one picture in the file", "the file holds several full pictures")
		default:
			full = d
		}
		at = d.next
	}
	if full == nil {
		return nil, broken("the file holds no full picture")
	}
	return full, nil
}
