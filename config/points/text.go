package points

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// widestLine bounds one line of text in bytes; a row of a survey is far
// shorter, and a file without line feeds is no survey.
const widestLine = 4096

// mostRows is the largest survey that is read: 250 MB of points. What is larger
// is a raster or a cloud.
const mostRows = 5_000_000

// byteOrderMark is the sign that some programs write before UTF-8.
const byteOrderMark = "\xef\xbb\xbf"

// file is a text survey while it is read.
type file struct {
	name, key string // key: the project's key that names the file
	text      string
	order     []string
	list      diag.List
}

// row is one line of data: its number, where it begins in the file, its text,
// and its cells with the column of the text at which each begins. Cells are
// valid until the next row is cut.
type row struct {
	number, start int
	text          string
	cells         []string
	at            []int
}

// problem makes a problem of a cell of a row; cell −1 is the whole line.
func (f *file) problem(code finding.Code, r row, cell int, help, format string, args ...any) diag.Problem {
	p := diag.Problem{
		Code: code, Severity: finding.Error, File: f.name, Line: r.number,
		Excerpt: r.text, Key: f.key, Message: fmt.Sprintf(format, args...), Help: help,
	}
	if cell >= 0 && cell < len(r.at) {
		p.Column = r.at[cell]
	}
	return p
}

// tell notes a problem of a cell of a row. When enough of its code are kept it
// is only counted, and not put into words.
func (f *file) tell(code finding.Code, r row, cell int, help, format string, args ...any) {
	if f.list.Full(code) {
		f.list.Count(code)
		return
	}
	f.list.Add(f.problem(code, r, cell, help, format, args...))
}

// tellColumn is tell for a place within a line, as a column counted from 1.
func (f *file) tellColumn(code finding.Code, r row, column int, help, format string, args ...any) {
	r.at = []int{column}
	f.tell(code, r, 0, help, format, args...)
}

// tellFile notes a problem of the file as a whole.
func (f *file) tellFile(code finding.Code, help, format string, args ...any) {
	f.tell(code, row{}, -1, help, format, args...)
}

// open takes the bytes of the file and reports whether they may be text.
func (f *file) open(data []byte) bool {
	f.text = string(data)
	if strings.HasPrefix(f.text, "\xff\xfe") || strings.HasPrefix(f.text, "\xfe\xff") {
		f.tell("U14", row{number: 1, at: []int{1}}, 0, "save it as plain text in UTF-8 without the mark", "the file begins with the byte order mark of UTF-16")
		return false
	}
	if rest, marked := strings.CutPrefix(f.text, byteOrderMark); marked {
		f.text = rest
		first, _, _ := strings.Cut(rest[:min(len(rest), widestLine)], "\n")
		f.tell("U14", row{number: 1, at: []int{1}, text: first}, 0, "save it as plain UTF-8 without the mark",
			"the file begins with a byte order mark, which is no part of its first cell")
	}
	return true
}

// each hands every row of data on, in order. It stops at a line that is no
// text, for then the file is none.
func (f *file) each(use func(r row)) {
	var r row
	rows := 0
	for start := 0; start < len(f.text); {
		end := len(f.text)
		if n := strings.IndexByte(f.text[start:], '\n'); n >= 0 {
			end = start + n
		}
		r.number, r.start, r.text = r.number+1, start, strings.TrimSuffix(f.text[start:end], "\r")
		start = end + 1
		if !f.checkLine(r) {
			return
		}
		if t := strings.TrimLeft(r.text, " \t"); t == "" || t[0] == '#' {
			continue
		}
		if !f.split(&r) || r.blank() {
			continue
		}
		if rows++; rows > mostRows {
			f.tell("F02", r, -1, "thin the survey", "more than the %d rows that are read", mostRows)
			return
		}
		use(r)
	}
	if rows == 0 && !f.list.Any() {
		f.tellFile("F02", "export the survey again", "the file holds no rows")
	}
}

// checkLine reports whether a line is text of a fair length.
func (f *file) checkLine(r row) bool {
	const help = "export the survey as plain text in UTF-8, one point a line"
	if len(r.text) > widestLine {
		r.text = ""
		f.tell("F02", r, -1, help, "the line is longer than %d bytes", widestLine)
		return false
	}
	for i, c := range r.text {
		if c == 0 || c == utf8.RuneError && !strings.HasPrefix(r.text[i:], string(utf8.RuneError)) {
			f.tellColumn("F02", r, i+1, help, "the line is no text in UTF-8")
			return false
		}
	}
	return true
}

// blank reports whether all cells are empty: what spreadsheets leave of rows
// that were cleared.
func (r row) blank() bool {
	for _, c := range r.cells {
		if c != "" {
			return false
		}
	}
	return true
}

// split cuts the text of a row at its commas. A cell may stand in double
// quotes, within which two stand for one (RFC 4180).
func (f *file) split(r *row) bool {
	r.cells, r.at = r.cells[:0], r.at[:0]
	for pos := 0; ; pos++ { // pos: behind the last comma
		for pos < len(r.text) && (r.text[pos] == ' ' || r.text[pos] == '\t') {
			pos++
		}
		r.at = append(r.at, pos+1)
		cell, end, ok := cut(r.text, pos)
		if sep := behindQuote(r.text[pos:]); !ok && sep != "" {
			f.tellForeign(*r, sep)
			return false
		}
		if !ok {
			f.tellColumn("F02", *r, pos+1, "close the quote, or take it out", "a double quote that does not close before the next comma or the end of the line")
			return false
		}
		r.cells = append(r.cells, cell)
		if pos = end; pos >= len(r.text) {
			return true
		}
	}
}

// cut returns the cell that begins at pos, and where the comma behind it or the
// end of the line is.
func cut(text string, pos int) (cell string, end int, ok bool) {
	if pos >= len(text) || text[pos] != '"' {
		cell, _, _ = strings.Cut(text[pos:], ",")
		return strings.TrimRight(cell, " \t"), pos + len(cell), true
	}
	for end = pos + 1; end < len(text); end++ {
		if text[end] != '"' {
			continue
		}
		if end+1 < len(text) && text[end+1] == '"' {
			end++
			continue
		}
		cell = strings.ReplaceAll(text[pos+1:end], `""`, `"`)
		rest := strings.TrimLeft(text[end+1:], " \t")
		if rest != "" && rest[0] != ',' {
			return "", 0, false
		}
		return strings.TrimSpace(cell), len(text) - len(rest), true
	}
	return "", 0, false
}
