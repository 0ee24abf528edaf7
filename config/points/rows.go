package points

import (
	"bytes"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// Column names that an order may use.
const (
	id, northing, easting, elevation = "id", "northing", "easting", "elevation"
	code, kind, line, seq, skip      = "code", "kind", "line", "seq", "-"
	stationColumn, offsetColumn      = "station", "offset"
)

// widestLine bounds one line of text; a survey row is far shorter.
const widestLine = 4096

// farthest is the largest coordinate or level in metres that is read: no map
// grid on earth reaches it.
const farthest = 1e8

// file is a text survey while it is read.
type file struct {
	name  string
	order []string
	list  diag.List
}

// row is one line of data: its number, its text, and its cells with the column
// of the text where each begins.
type row struct {
	number int
	text   string
	cells  []string
	at     []int
}

// problem notes a fault at a cell of a row; cell −1 is the whole line.
func (f *file) problem(c finding.Code, r row, cell int, help, format string, args ...any) {
	p := diag.Problem{Code: c, Severity: finding.Error, File: f.name, Line: r.number,
		Excerpt: r.text, Key: "survey", Message: fmt.Sprintf(format, args...), Help: help}
	if cell >= 0 && cell < len(r.at) {
		p.Column = r.at[cell]
	}
	f.list.Add(p)
}

// checkOrder holds the declared order against the columns a reader knows.
func (f *file) checkOrder(known, required []string) bool {
	ok := true
	complain := func(format string, args ...any) {
		ok = false
		f.list.Add(diag.Problem{Code: "F07", Severity: finding.Error, File: f.name, Key: "survey.order",
			Message: fmt.Sprintf(format, args...), Help: "name the columns in the order in which the file has them, such as " + strings.Join(required, ",")})
	}
	for i, c := range f.order {
		if !slices.Contains(known, c) {
			near := ""
			if n := diag.Nearest(c, known); n != "" {
				near = ", perhaps " + strconv.Quote(n)
			}
			complain("survey.order names an unknown column %q%s", c, near)
		}
		if c != skip && slices.Index(f.order, c) != i {
			complain("survey.order names %q twice", c)
		}
	}
	for _, c := range required {
		if !slices.Contains(f.order, c) {
			complain("survey.order lacks the column %q", c)
		}
	}
	return ok
}

// rows splits the file into rows of data. It returns nil when the file as a
// whole cannot be read.
func (f *file) rows(data []byte) []row {
	if bytes.HasPrefix(data, []byte{0xef, 0xbb, 0xbf}) {
		f.list.Add(diag.Problem{Code: "U14", Severity: finding.Error, File: f.name, Line: 1, Column: 1, Key: "survey",
			Message: "the file begins with a byte order mark, which would become part of its first cell",
			Help:    "save it as plain UTF-8 without the mark"})
		data = data[3:]
	}
	if i := bytes.IndexByte(data, 0); i >= 0 || !utf8.Valid(data) {
		f.list.Add(diag.Problem{Code: "F02", Severity: finding.Error, File: f.name, Line: 1 + bytes.Count(data[:max(i, 0)], []byte{'\n'}), Key: "survey",
			Message: "the file is no plain text in UTF-8", Help: "export the survey as plain text"})
		return nil
	}
	var out []row
	for n := 1; len(data) > 0; n++ {
		var raw []byte
		raw, data, _ = bytes.Cut(data, []byte{'\n'})
		text := strings.TrimRight(string(raw), "\r")
		if len(text) > widestLine {
			f.problem("F02", row{number: n}, -1, "export the survey as plain text, one point a line", "a line of %d signs; rows have up to %d", len(text), widestLine)
			return nil
		}
		if t := strings.TrimSpace(text); t == "" || t[0] == '#' {
			continue
		}
		out = append(out, split(n, text))
	}
	return out
}

// split cuts a line at its commas.
func split(number int, text string) row {
	r := row{number: number, text: text}
	start := 0
	for start <= len(text) {
		end := strings.IndexByte(text[start:], ',')
		if end < 0 {
			end = len(text)
		} else {
			end += start
		}
		cell := text[start:end]
		r.cells = append(r.cells, strings.TrimSpace(cell))
		r.at = append(r.at, start+1+len(cell)-len(strings.TrimLeft(cell, " \t")))
		start = end + 1
	}
	return r
}

// body returns the rows without a header, having held the header against the
// order. A first line is a header when its elevation is no number.
func (f *file) body(rows []row) []row {
	if len(rows) == 0 {
		f.list.Add(diag.Problem{Code: "F02", Severity: finding.Error, File: f.name, Key: "survey",
			Message: "the file holds no rows", Help: "export the survey again"})
		return nil
	}
	first := rows[0]
	if at := slices.Index(f.order, elevation); at >= len(first.cells) || isNumber(first.cells[at]) || f.commaNumbers(first) {
		return rows
	}
	// A line that has no numbers at all is a header; one that has some is a
	// broken row and is told about like every other.
	for _, c := range first.cells {
		if isNumber(c) {
			return rows
		}
	}
	for i, c := range first.cells {
		if i < len(f.order) && f.order[i] != skip && !strings.EqualFold(c, f.order[i]) {
			f.problem("F07", first, i, "declare survey.order as the file has its columns",
				"the header has %q where survey.order says %q", c, f.order[i])
		}
	}
	if len(first.cells) != len(f.order) {
		f.problem("F07", first, -1, "declare survey.order as the file has its columns",
			"the header has %d columns, survey.order names %d: %s", len(first.cells), len(f.order), strings.Join(f.order, ","))
	}
	return rows[1:]
}

// fits holds the number of cells against the order. A wrong number is often a
// decimal comma or another separator.
func (f *file) fits(r row) bool {
	if len(r.cells) == len(f.order) {
		return true
	}
	switch {
	case strings.ContainsAny(r.text, ";\t") && f.commaNumbers(r), f.commaNumbers(r):
		f.problem("U14", r, 0, "export the file with decimal points and commas between columns",
			"a decimal comma: %d cells where survey.order names %d", len(r.cells), len(f.order))
	case strings.ContainsAny(r.text, ";\t"):
		f.problem("F07", r, 0, "separate the columns by commas",
			"columns are separated by something else than commas: expected %s", strings.Join(f.order, ","))
	default:
		f.problem("F07", r, -1, "declare survey.order as the file has its columns",
			"%d columns, expected %d: %s", len(r.cells), len(f.order), strings.Join(f.order, ","))
	}
	return false
}

// commaNumbers reports whether a row looks as if its numbers had decimal
// commas: split at semicolons or tabs, or by twice as many cells as columns
// that hold numbers.
func (f *file) commaNumbers(r row) bool {
	sep := ";"
	if strings.Contains(r.text, "\t") {
		sep = "\t"
	}
	if strings.Contains(r.text, sep) {
		for _, c := range strings.Split(r.text, sep) {
			c = strings.TrimSpace(c)
			if strings.Contains(c, ",") && isNumber(strings.Replace(c, ",", ".", 1)) {
				return true
			}
		}
		return false
	}
	numeric := 0
	for _, c := range f.order {
		if c == northing || c == easting || c == elevation || c == offsetColumn {
			numeric++
		}
	}
	return len(r.cells) == len(f.order)+numeric
}

func isNumber(s string) bool {
	v, err := strconv.ParseFloat(s, 64)
	return err == nil && !math.IsNaN(v) && !math.IsInf(v, 0)
}

// number reads a cell as a length and brings it to metres.
func (f *file) number(r row, cell int, unit float64) (float64, bool) {
	text := r.cells[cell]
	v, err := strconv.ParseFloat(text, 64)
	switch {
	case text == "":
		f.problem("F06", r, cell, "fill it in, or take the row out", "the %s is empty", f.order[cell])
	case spoiled(text):
		f.problem("U14", r, cell, "export the column as plain numbers", "the %s %q looks like a date or a number that a spreadsheet made of it", f.order[cell], text)
	case strings.ContainsAny(text, "xXpP_") || err != nil && !strings.Contains(err.Error(), "range"):
		if strings.Contains(text, ",") {
			f.problem("U14", r, cell, "write a decimal point", "a decimal comma in the %s %q", f.order[cell], text)
			break
		}
		f.problem("F06", r, cell, "write a plain decimal number", "the %s %q is not a number", f.order[cell], text)
	case math.IsNaN(v) || math.IsInf(v, 0) || math.Abs(v*unit) > farthest:
		f.problem("F06", r, cell, "correct it, or take the row out", "the %s %s lies outside ±%.0f m", f.order[cell], text, farthest)
	default:
		return v * unit, true
	}
	return 0, false
}
