package raster

import (
	"bytes"
	"compress/zlib"
	"encoding/binary"
	"errors"
	"io"
	"math"

	"golang.org/x/image/tiff/lzw"
)

// chunks reads the levels of all strips or tiles into the raster.
func (f *file) chunks(t *tiff, l *layout, r *Raster) error {
	z := make([]float64, l.cols*l.rows)
	in := &unpacker{tiff: t, layout: l}
	marked := marker(r.NoData, l.format == floating && l.size == 4)
	for k := range l.offsets {
		i0, j0 := k%l.across*l.width, k/l.across*l.height
		rows := min(l.height, l.rows-j0)
		cols := min(l.width, l.cols-i0)
		b, err := in.chunk(k, l.width*l.rowsStored(rows)*l.size)
		if err != nil {
			return err
		}
		for j := range rows {
			row := z[(j0+j)*l.cols+i0:][:cols]
			if b == nil { // a chunk that the file leaves out holds nothing known
				for i := range row {
					row[i] = math.NaN()
				}
				continue
			}
			l.decode(row, b[j*l.width*l.size:], t.order)
		}
	}
	r.Levels.Z = z
	f.sift(r, marked)
	return nil
}

// sift turns no-data values into voids and finds levels that are none.
func (f *file) sift(r *Raster, marked func(float64) bool) {
	first, n := -1, 0
	for k, v := range r.Levels.Z {
		switch {
		case math.IsNaN(v) || marked(v):
			r.Levels.Z[k] = math.NaN()
			r.Voids++
		case !(math.Abs(v*f.unit) <= farthest):
			if n == 0 {
				first = k
			}
			n++
		}
	}
	if n > 0 {
		f.add("F06", place{}, "mark the value as the no-data value of the file, or correct it",
			"%d levels lie outside ±%.0f m, the first is %s at %s", n, farthest, short(r.Levels.Z[first]), r.cell(first))
	}
}

// rowsStored returns how many rows a chunk stores of which rows are inside the
// raster: tiles are always full, the last strip is not.
func (l *layout) rowsStored(rows int) int {
	if l.tiled {
		return l.height
	}
	return rows
}

// unpacker turns stored chunks into bytes of levels; its scratch is used again.
type unpacker struct {
	*tiff
	*layout
	out, row []byte
	zlib     io.ReadCloser
}

// chunk returns the bytes of a chunk's levels, nil when the file leaves the
// chunk out. They are valid until the next call.
func (u *unpacker) chunk(k, need int) ([]byte, error) {
	at, n := u.offsets[k], u.counts[k]
	if n == 0 {
		return nil, nil
	}
	stored, err := u.bytes(at, n)
	if err != nil {
		return nil, err
	}
	if u.compression == plain {
		if len(stored) < need {
			return nil, broken("strip or tile %d at byte %d has %d bytes, its levels need %d", k, at, n, need)
		}
		return stored[:need], nil
	}
	if cap(u.out) < need {
		u.out = make([]byte, need)
	}
	u.out = u.out[:need]
	got, err := u.unpack(stored)
	if err != nil {
		return nil, broken("strip or tile %d at byte %d is damaged or cut off: %d of %d bytes could be unpacked", k, at, got, need)
	}
	u.undo(u.out)
	return u.out, nil
}

// unpack fills out. Whatever a chunk holds beyond that is not unpacked, but a
// checksum right behind it is looked at.
func (u *unpacker) unpack(stored []byte) (int, error) {
	if u.compression == lzwPacked {
		r := lzw.NewReader(bytes.NewReader(stored), lzw.MSB, 8)
		defer r.Close()
		return io.ReadFull(r, u.out)
	}
	if err := u.resetZlib(stored); err != nil {
		return 0, err
	}
	n, err := io.ReadFull(u.zlib, u.out)
	if err != nil {
		return n, err
	}
	if _, err := u.zlib.Read(make([]byte, 1)); errors.Is(err, zlib.ErrChecksum) {
		return n, err
	}
	return n, nil
}

func (u *unpacker) resetZlib(stored []byte) (err error) {
	if u.zlib == nil {
		u.zlib, err = zlib.NewReader(bytes.NewReader(stored))
		return err
	}
	return u.zlib.(zlib.Resetter).Reset(bytes.NewReader(stored), nil)
}

// decode turns stored samples into levels; the predictor of floating-point
// numbers has its own order of bytes, highest first.
func (l *layout) decode(dst []float64, b []byte, order binary.ByteOrder) {
	if l.predictor == floatingByByte {
		order = binary.BigEndian
	}
	for i := range dst {
		s := b[i*l.size:]
		switch {
		case l.format == floating && l.size == 4:
			dst[i] = float64(math.Float32frombits(order.Uint32(s)))
		case l.format == floating:
			dst[i] = math.Float64frombits(order.Uint64(s))
		case l.format == signed && l.size == 2:
			dst[i] = float64(int16(order.Uint16(s)))
		case l.format == signed:
			dst[i] = float64(int32(order.Uint32(s)))
		case l.size == 2:
			dst[i] = float64(order.Uint16(s))
		default:
			dst[i] = float64(order.Uint32(s))
		}
	}
}
