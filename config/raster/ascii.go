package raster

import (
	"bytes"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
	"sagcrest/section/terrain"
)

// Keys of the header of an ASCII grid, in small letters.
const (
	ncols, nrows         = "ncols", "nrows"
	xCorner, xCenter     = "xllcorner", "xllcenter"
	yCorner, yCenter     = "yllcorner", "yllcenter"
	cellSize, dx, dy     = "cellsize", "dx", "dy"
	noDataKey            = "nodata_value"
	plainSpace, allSpace = " \t\r", " \t\r\n"
)

var headerKeys = []string{ncols, nrows, xCorner, xCenter, yCorner, yCenter, cellSize, dx, dy, noDataKey}

// word is a piece of text between blanks, and where it begins.
type word struct {
	text         []byte
	line, column int
	lineStart    int
}

// words cuts a text at its blanks.
type words struct {
	data                 []byte
	pos, line, lineStart int
}

func (w *words) next() (word, bool) {
	for w.pos < len(w.data) && strings.IndexByte(allSpace, w.data[w.pos]) >= 0 {
		if w.data[w.pos] == '\n' {
			w.line++
			w.lineStart = w.pos + 1
		}
		w.pos++
	}
	from := w.pos
	for w.pos < len(w.data) && strings.IndexByte(allSpace, w.data[w.pos]) < 0 {
		w.pos++
	}
	return word{w.data[from:w.pos], w.line + 1, from - w.lineStart + 1, w.lineStart}, w.pos > from
}

// longestRaw is the length of a raw line beyond which a message leaves it out:
// a row of a raster may have megabytes.
const longestRaw = 4096

// place returns where a word stands, with its raw line if that is short.
func (f *file) place(w word) place {
	p := place{line: w.line, column: w.column}
	if raw, _, ok := bytes.Cut(f.data[w.lineStart:min(len(f.data), w.lineStart+longestRaw)], []byte{'\n'}); ok || len(raw) < longestRaw {
		p.raw = strings.TrimRight(string(raw), "\r")
	}
	return p
}

// shown bounds how much of a word a message repeats.
func shown(w word) string {
	if len(w.text) > 40 {
		return strconv.Quote(string(w.text[:40])) + "…"
	}
	return strconv.Quote(string(w.text))
}

// wrong returns the fault of a word in the file's structure.
func (f *file) wrong(w word, help, format string, args ...any) error {
	err := broken(format, args...).(*fault)
	err.at, err.help = f.place(w), help
	return err
}

// header holds the keys of an ASCII grid as they are found.
type header map[string]float64

func (h header) has(keys ...string) bool {
	for _, k := range keys {
		if _, ok := h[k]; ok {
			return true
		}
	}
	return false
}

// readASCII reads a plain ASCII grid.
func (f *file) readASCII() (*Raster, error) {
	if bytes.HasPrefix(f.data, []byte("\xef\xbb\xbf")) {
		return nil, &fault{"U14", place{line: 1, column: 1}, "the file begins with a byte order mark", "save it as plain text without the mark"}
	}
	if i := bytes.IndexByte(f.data, 0); i >= 0 {
		return nil, broken("neither a GeoTIFF nor plain text: byte %d is zero", i)
	}
	in := &words{data: f.data}
	h, first, err := f.header(in)
	if err != nil {
		return nil, err
	}
	r, err := f.shape(h)
	if err != nil {
		return nil, err
	}
	start := words{data: f.data, pos: first.lineStart + first.column - 1, line: first.line - 1, lineStart: first.lineStart}
	f.where = func(cell int) place { return f.nth(start, cell) }
	body := start
	if err := f.levels(&body, r); err != nil {
		return nil, err
	}
	return r, nil
}

// header reads keys and their numbers until a number stands where a key would,
// and returns that one.
func (f *file) header(in *words) (header, word, error) {
	h := header{}
	for {
		w, ok := in.next()
		if !ok {
			return nil, w, broken("the file ends within its header, on line %d: no levels follow", w.line)
		}
		key := strings.ToLower(string(w.text[:min(len(w.text), 40)]))
		if !slices.Contains(headerKeys, key) {
			if _, err := strconv.ParseFloat(key, 64); err == nil && len(h) > 0 {
				return h, w, nil
			}
			return nil, w, f.unknownKey(w, key)
		}
		if h.has(key) {
			return nil, w, f.wrong(w, "take one of them out", "the header has %s twice", key)
		}
		value, _ := in.next()
		v, err := strconv.ParseFloat(string(value.text), 64)
		switch {
		case isDecimalComma(value.text):
			return nil, w, &fault{"U14", f.place(value), "a decimal comma in the header: " + shown(value), "write decimal points"}
		case err != nil || key != noDataKey && (math.IsNaN(v) || math.IsInf(v, 0)):
			return nil, w, f.wrong(value, "mend the header", "%s of the header is no number: %s", key, shown(value))
		}
		h[key] = v
	}
}

func (f *file) unknownKey(w word, key string) error {
	help := "an ASCII grid begins with ncols, nrows, xllcorner, yllcorner, cellsize; a GeoTIFF with II or MM"
	if near := diag.Nearest(key, headerKeys); near != "" {
		help = "perhaps " + near
	}
	return f.wrong(w, help, "not a key of a grid's header: %s", shown(w))
}

// shape turns a header into an empty raster.
func (f *file) shape(h header) (*Raster, error) {
	for _, either := range [][]string{{ncols}, {nrows}, {xCorner, xCenter}, {yCorner, yCenter}, {cellSize, dx}, {cellSize, dy}} {
		if !h.has(either...) {
			return nil, broken("the header lacks %s", strings.Join(either, " or "))
		}
	}
	for _, both := range [][2]string{{xCorner, xCenter}, {yCorner, yCenter}, {cellSize, dx}, {cellSize, dy}} {
		if h.has(both[0]) && h.has(both[1]) {
			return nil, broken("the header has both %s and %s", both[0], both[1])
		}
	}
	for _, k := range []string{ncols, nrows} {
		if h[k] != math.Trunc(h[k]) || h[k] < 0 || h[k] > mostCells {
			return nil, broken("%s is %v: no whole number from 2 to %d", k, h[k], mostCells)
		}
	}
	// A level takes two bytes at least: a digit and a blank.
	if err := checkSize(uint64(h[ncols]), uint64(h[nrows]), uint64(len(f.data))/2+1); err != nil {
		return nil, err
	}
	ce, cn := h[cellSize]+h[dx], h[cellSize]+h[dy] // one of each two is absent
	r := &Raster{Format: "ASCII grid", Values: "text", Point: h.has(xCenter), Stated: true}
	r.Levels = terrain.Raster{Cols: int(h[ncols]), Rows: int(h[nrows])}
	west, south := h[xCenter], h[yCenter]
	if h.has(xCorner) {
		west = h[xCorner] + ce/2
	}
	if h.has(yCorner) {
		south = h[yCorner] + cn/2
	}
	if v, ok := h[noDataKey]; ok {
		r.NoData = &v
	}
	return r, f.lay(&r.Levels, west, south+(h[nrows]-1)*cn, ce, cn)
}

// lay puts a raster in its place, given in the file's unit: the centre of its
// north-west cell and its spacings.
func (f *file) lay(r *terrain.Raster, west, north, ce, cn float64) error {
	if !(ce > 0 && cn > 0) {
		return broken("the cell size %v × %v is not positive", ce, cn)
	}
	east, south := west+float64(r.Cols-1)*ce, north-float64(r.Rows-1)*cn
	for _, v := range []float64{west, east, south, north} {
		if !(math.Abs(v*f.unit) <= farthest) {
			return broken("the corner coordinate %v lies outside ±%.0f m", v, farthest)
		}
	}
	// A spacing that is lost in the last digits of the coordinates cannot
	// order the cells.
	if west+ce == west || east-ce == east || north-cn == north || south+cn == south {
		return broken("the cell size %v × %v is lost beside the coordinates", ce, cn)
	}
	r.West, r.North = west, north
	if ce == cn {
		r.Cell = ce
	} else {
		r.CellE, r.CellN = ce, cn
	}
	return nil
}

// levels reads exactly as many levels as the header promises.
func (f *file) levels(in *words, r *Raster) error {
	n := r.Levels.Cols * r.Levels.Rows
	z := make([]float64, n)
	marked := marker(r.NoData, false)
	for i := range z {
		w, ok := in.next()
		if !ok {
			return f.wrong(w, "get the file again from its source",
				"the file ends after %d of %d levels (%d columns × %d rows)", i, n, r.Levels.Cols, r.Levels.Rows)
		}
		v, err := strconv.ParseFloat(string(w.text), 64)
		switch {
		case isDecimalComma(w.text):
			f.complain(w, "U14", "write decimal points", "a decimal comma in the level %s")
		case err != nil && !math.IsInf(v, 0):
			f.complain(w, "F06", "write a plain decimal number; levels are parted by blanks", "the level %s is not a number")
		case marked(v):
			v = math.NaN()
			r.Voids++
		case !(math.Abs(v*f.unit) <= farthest):
			f.complain(w, "F06", "mark the value as NODATA_value, or correct it", fmt.Sprintf("the level %%s lies outside ±%.0f m", farthest))
		}
		z[i] = v
	}
	if w, ok := in.next(); ok {
		return f.wrong(w, "get the file again from its source",
			"the file goes on after its %d levels (%d columns × %d rows)", n, r.Levels.Cols, r.Levels.Rows)
	}
	r.Levels.Z = z
	return nil
}

// complain notes a fault of a level; format has one %s for it.
func (f *file) complain(w word, code finding.Code, help, format string) {
	if f.list.Full(code) { // neither words nor the raw line are made for nothing
		f.list.Count(code)
		return
	}
	f.add(code, f.place(w), help, format, shown(w))
}

// nth returns the place of a level of a body that was read before.
func (f *file) nth(body words, cell int) place {
	for range cell {
		body.next()
	}
	w, _ := body.next()
	return f.place(w)
}

// isDecimalComma reports whether a word is a number but for one comma.
func isDecimalComma(text []byte) bool {
	if len(text) > 40 || bytes.Count(text, []byte{','}) != 1 {
		return false
	}
	_, err := strconv.ParseFloat(strings.Replace(string(text), ",", ".", 1), 64)
	return err == nil
}
