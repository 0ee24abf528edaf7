package raster_test

import (
	"bytes"
	"compress/zlib"
	"encoding/binary"
	"math"
)

// picture is what the tests' own writer of TIFF stores. It is as plain as it
// can be: every value of the reader's layout is given, right or wrong.
type picture struct {
	order         binary.ByteOrder
	big, tiled    bool
	cols, rows    int
	width, height int // of a chunk
	format, bits  int
	compression   int
	predictor     int
	z             []float64
	fields        []entry // further fields, which win over the writer's own
	corrupt       func(offsets, counts []uint64)
	subfile       uint64
	second        *picture // the next picture of the chain
	sparse        map[int]bool
}

// entry is a field: kinds 2 (text), 3, 4, 12, 16.
type entry struct {
	tag, kind uint16
	values    []float64
	text      string
}

// area is the place of most test pictures: corner 1000 / 2000, cells of 2 × 3.
func area() []entry {
	return []entry{
		{tag: 33550, kind: 12, values: []float64{2, 3, 0}},
		{tag: 33922, kind: 12, values: []float64{0, 0, 0, 1000, 2000, 0}},
	}
}

// sample stores one level.
func (p *picture) sample(z float64) []byte {
	b := make([]byte, p.bits/8)
	switch {
	case p.format == 3 && p.bits == 64:
		p.order.PutUint64(b, math.Float64bits(z))
	case p.format == 3:
		p.order.PutUint32(b, math.Float32bits(float32(z)))
	case p.bits == 16:
		p.order.PutUint16(b, uint16(int64(z)))
	default:
		p.order.PutUint32(b, uint32(int64(z)))
	}
	return b
}

// difference applies the predictor to one row of samples.
func (p *picture) difference(row []byte) []byte {
	size := p.bits / 8
	out := bytes.Clone(row)
	switch p.predictor {
	case 2:
		for at := len(row) - size; at >= size; at -= size {
			switch size {
			case 2:
				p.order.PutUint16(out[at:], p.order.Uint16(row[at:])-p.order.Uint16(row[at-2:]))
			case 4:
				p.order.PutUint32(out[at:], p.order.Uint32(row[at:])-p.order.Uint32(row[at-4:]))
			default:
				p.order.PutUint64(out[at:], p.order.Uint64(row[at:])-p.order.Uint64(row[at-8:]))
			}
		}
	case 3:
		n := len(row) / size
		for i := range n {
			for k := range size {
				from := k // highest byte first
				if p.order == binary.ByteOrder(binary.LittleEndian) {
					from = size - 1 - k
				}
				out[k*n+i] = row[i*size+from]
			}
		}
		for at := len(out) - 1; at > 0; at-- {
			out[at] -= out[at-1]
		}
	}
	return out
}

func (p *picture) pack(b []byte) []byte {
	var out bytes.Buffer
	switch p.compression {
	case 8, 32946:
		w := zlib.NewWriter(&out)
		w.Write(b)
		w.Close()
	case 5:
		packLZW(&out, b)
	default:
		return b
	}
	return out.Bytes()
}

// packLZW stores bytes as codes of nine bits, clearing the table before these
// grow: valid, if not short.
func packLZW(out *bytes.Buffer, b []byte) {
	bits, n := uint32(0), 0
	put := func(code uint32) {
		bits, n = bits<<9|code, n+9
		for n >= 8 {
			out.WriteByte(byte(bits >> (n - 8)))
			n -= 8
		}
	}
	for i, c := range b {
		if i%200 == 0 {
			put(256)
		}
		put(uint32(c))
	}
	put(257)
	out.WriteByte(byte(bits << (8 - n)))
}

// chunk returns the stored bytes of chunk k.
func (p *picture) chunk(k int) []byte {
	across := (p.cols + p.width - 1) / p.width
	i0, j0 := k%across*p.width, k/across*p.height
	height := p.height
	if !p.tiled {
		height = min(height, p.rows-j0)
	}
	var b []byte
	for j := range height {
		var row []byte
		for i := range p.width {
			z := 0.0
			if i0+i < p.cols && j0+j < p.rows {
				z = p.z[(j0+j)*p.cols+i0+i]
			}
			row = append(row, p.sample(z)...)
		}
		b = append(b, p.difference(row)...)
	}
	return p.pack(b)
}

// bytes writes the file.
func (p *picture) bytes() []byte {
	head := []byte("II*\x00\x00\x00\x00\x00")
	if p.big {
		head = []byte("II+\x00\x08\x00\x00\x00\x00\x00\x00\x00\x00\x00\x00\x00")
	}
	if p.order == binary.ByteOrder(binary.BigEndian) {
		head = []byte("MM\x00*\x00\x00\x00\x00")
		if p.big {
			head = []byte("MM\x00+\x00\x08\x00\x00\x00\x00\x00\x00\x00\x00\x00\x00")
		}
	}
	return p.append(head, len(head)-p.offsetSize())
}

func (p *picture) offsetSize() int {
	if p.big {
		return 8
	}
	return 4
}

func (p *picture) number(v uint64, size int) []byte {
	b := make([]byte, 8)
	switch size {
	case 2:
		p.order.PutUint16(b, uint16(v))
	case 4:
		p.order.PutUint32(b, uint32(v))
	default:
		p.order.PutUint64(b, v)
	}
	return b[:size]
}

// append writes chunks, directory and values behind out, and the place of the
// directory at byte link.
func (p *picture) append(out []byte, link int) []byte {
	across, down := (p.cols+p.width-1)/p.width, (p.rows+p.height-1)/p.height
	offsets, counts := make([]uint64, across*down), make([]uint64, across*down)
	for k := range offsets {
		if p.sparse[k] {
			continue
		}
		c := p.chunk(k)
		offsets[k], counts[k] = uint64(len(out)), uint64(len(c))
		out = append(out, c...)
	}
	if p.corrupt != nil {
		p.corrupt(offsets, counts)
	}
	all := p.entries(offsets, counts)
	copy(out[link:], p.number(uint64(len(out)), p.offsetSize()))
	countSize, entrySize := 2, 12
	if p.big {
		countSize, entrySize = 8, 20
	}
	out = append(out, p.number(uint64(len(all)), countSize)...)
	values := len(out) + len(all)*entrySize + p.offsetSize()
	var tail []byte
	for _, e := range all {
		v, n := p.encode(e)
		out = append(out, p.number(uint64(e.tag), 2)...)
		out = append(out, p.number(uint64(e.kind), 2)...)
		out = append(out, p.number(uint64(n), p.offsetSize())...)
		if len(v) <= p.offsetSize() {
			out = append(out, append(v, make([]byte, p.offsetSize()-len(v))...)...)
			continue
		}
		out = append(out, p.number(uint64(values+len(tail)), p.offsetSize())...)
		tail = append(tail, v...)
	}
	next := len(out)
	out = append(out, make([]byte, p.offsetSize())...)
	out = append(out, tail...)
	if p.second != nil {
		return p.second.append(out, next)
	}
	return out
}

// entries returns the fields of the directory.
func (p *picture) entries(offsets, counts []uint64) []entry {
	one := func(tag uint16, v int) entry { return entry{tag: tag, kind: 4, values: []float64{float64(v)}} }
	all := []entry{
		one(254, int(p.subfile)), one(256, p.cols), one(257, p.rows), {tag: 258, kind: 3, values: []float64{float64(p.bits)}},
		one(259, p.compression), one(277, 1), one(317, p.predictor), one(339, p.format),
	}
	kind := uint16(4)
	if p.big {
		kind = 16
	}
	places, lengths := entry{kind: kind}, entry{kind: kind}
	for k := range offsets {
		places.values = append(places.values, float64(offsets[k]))
		lengths.values = append(lengths.values, float64(counts[k]))
	}
	if p.tiled {
		places.tag, lengths.tag = 324, 325
		all = append(all, one(322, p.width), one(323, p.height))
	} else {
		places.tag, lengths.tag = 273, 279
		all = append(all, one(278, p.height))
	}
	all = append(all, places, lengths)
	// A reader takes the first of two fields with one tag.
	return append(append([]entry(nil), p.fields...), all...)
}

// encode returns the bytes and the count of a field.
func (p *picture) encode(e entry) (b []byte, n int) {
	if e.kind == 2 {
		return append([]byte(e.text), 0), len(e.text) + 1
	}
	for _, v := range e.values {
		switch e.kind {
		case 3:
			b = append(b, p.number(uint64(v), 2)...)
		case 4:
			b = append(b, p.number(uint64(v), 4)...)
		case 12:
			b = append(b, p.number(math.Float64bits(v), 8)...)
		default:
			b = append(b, p.number(uint64(v), 8)...)
		}
	}
	return b, len(e.values)
}
