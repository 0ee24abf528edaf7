package points

import (
	"slices"
	"strconv"
	"strings"

	"sagcrest/config/diag"
)

// Column names that an order may use; skip stands for a column that is passed
// over.
const (
	id, northing, easting, elevation = "id", "northing", "easting", "elevation"
	code, kind, line, seq, skip      = "code", "kind", "line", "seq", "-"
	stationColumn, offsetColumn      = "station", "offset"
)

// checkOrder holds the declared order against the columns that a reader knows.
func (f *file) checkOrder(known, required []string) bool {
	complain := func(format string, args ...any) {
		p := f.problem("F07", row{}, -1, "name the columns in the order in which the file has them, such as "+strings.Join(required, ","), format, args...)
		p.Key = "survey.order"
		f.list.Add(p)
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
	return !f.list.Any()
}

// column returns the place of a column in the order, −1 when it is not there.
func (f *file) column(name string) int { return slices.Index(f.order, name) }

// numeric returns the columns of the order that must hold numbers.
func (f *file) numeric() (out []int) {
	for i, c := range f.order {
		switch c {
		case northing, easting, elevation, offsetColumn:
			out = append(out, i)
		}
	}
	return out
}

// declare is how F07 is mended.
const declare = "declare survey.order as the file has its columns; a line that begins with # is passed over"

// body hands the rows below the header on that have as many cells as the order
// has columns.
func (f *file) body(use func(r row)) {
	first, data := true, 0
	f.each(func(r row) {
		wasFirst := first
		first = false
		if wasFirst && f.isHeader(r) {
			f.checkHeader(r)
			return
		}
		data++
		if f.fits(r) {
			use(r)
		}
	})
	if data == 0 && !f.list.Any() {
		f.tellFile("F02", "export the survey again", "the file holds a header and no rows")
	}
}

// isHeader reports whether the first row is a header: its elevation is no
// number. What is meant for a number but is none (empty, NaN, a decimal comma,
// a date) makes a bad row and no header.
func (f *file) isHeader(r row) bool {
	cells := f.otherwise(r)
	at := f.column(elevation)
	if at >= len(cells) {
		return !slices.ContainsFunc(cells, looksNumeric)
	}
	return !looksNumeric(cells[at])
}

// otherwise returns the cells of a row, cut at semicolons or tabs if that and
// not commas gives as many as there are columns.
func (f *file) otherwise(r row) []string {
	if sep := foreign(r.text); sep != "" && len(r.cells) != len(f.order) {
		cells := strings.Split(r.text, sep)
		for i := range cells {
			cells[i] = strings.Trim(cells[i], " \t\"")
		}
		return cells
	}
	return r.cells
}

// spellings are the ways in which headers write the names of columns beside
// the name itself; each means one column only.
func spellings(column string) []string {
	switch column {
	case id:
		return []string{"p", "point", "no"}
	case northing:
		return []string{"n"}
	case easting:
		return []string{"e"}
	case elevation:
		return []string{"z", "elev", "level"}
	case code:
		return []string{"desc", "description"}
	}
	return nil
}

// checkHeader holds the header against the order: each name must be that of
// its column.
func (f *file) checkHeader(r row) {
	cells := f.otherwise(r)
	if len(cells) != len(f.order) {
		f.tell("F07", r, -1, declare, "the header has %d columns, survey.order names %d: %s", len(cells), len(f.order), strings.Join(f.order, ","))
		return
	}
	var says, wants []string
	at := -1
	for i, c := range cells {
		name := strings.ToLower(c)
		if f.order[i] == skip || name == f.order[i] || slices.Contains(spellings(f.order[i]), name) {
			continue
		}
		if at < 0 {
			at = i
		}
		says, wants = append(says, strconv.Quote(c)), append(wants, f.order[i])
	}
	if at < 0 {
		return
	}
	if slices.ContainsFunc(f.numeric(), func(i int) bool { return looksNumeric(cells[i]) }) {
		at = f.column(elevation)
		f.tell("F07", r, at, declare, "the elevation %q of the first row is no number, and the row is no header: expected %s", cells[at], strings.Join(f.order, ","))
		return
	}
	f.tell("F07", r, at, declare, "the header has %s where survey.order says %s", strings.Join(says, ", "), strings.Join(wants, ", "))
}

// fits holds the number of cells of a row against the order. A wrong number
// often comes of a decimal comma or another separator.
func (f *file) fits(r row) bool {
	want := strings.Join(f.order, ",")
	if len(r.cells) == len(f.order) && !f.heldTogether(r) {
		return true
	}
	if sep := foreign(r.text); sep != "" {
		f.tellForeign(r, sep)
		return false
	}
	switch n := len(r.cells) - len(f.order); {
	case f.decimalCommas(r):
		// The first number ends where its decimal comma stands.
		first := f.numeric()[0]
		if k := f.column(stationColumn); k >= 0 && n > len(f.numeric()) {
			first = min(first, k)
		}
		f.tellColumn("U14", r, r.at[first]+len(r.cells[first]), "export the file with decimal points", "decimal commas: %d cells where survey.order names %d: %s", len(r.cells), len(f.order), want)
	case len(r.cells) == 1 && len(strings.Fields(r.text)) > 1:
		f.tell("F07", r, 0, "part the columns by commas", "columns parted by blanks; expected commas: %s", want)
	case n > 0 && n < len(f.numeric()) && !strings.Contains(r.text, "."):
		f.tell("F07", r, len(f.order), "if the file has decimal commas, export it with decimal points; else "+declare, "%d columns, expected %d: %s", len(r.cells), len(f.order), want)
	case n > 0:
		f.tell("F07", r, len(f.order), declare, "%d columns, expected %d: %s", len(r.cells), len(f.order), want)
	default:
		f.tell("F07", r, -1, declare, "%d columns, expected %d: %s", len(r.cells), len(f.order), want)
	}
	return false
}

// foreign returns the separator other than a comma that a line holds outside
// quotes, "" for none.
func foreign(text string) string {
	if strings.Contains(text, `"`) {
		return ""
	}
	for _, sep := range []string{";", "\t"} {
		if strings.Contains(strings.Trim(text, " \t"), sep) {
			return sep
		}
	}
	return ""
}

// behindQuote returns the foreign separator that follows a closing quote, ""
// for none.
func behindQuote(text string) string {
	for _, sep := range []string{";", "\t"} {
		if strings.Contains(text, `"`+sep) {
			return sep
		}
	}
	return ""
}

// heldTogether reports whether a cell that must be one number holds a foreign
// separator: "1;2,5;3,5" has three cells, as it happens.
func (f *file) heldTogether(r row) bool {
	return slices.ContainsFunc(f.numeric(), func(i int) bool { return strings.ContainsAny(r.cells[i], ";\t") })
}

// tellForeign notes a row whose columns are parted by something else than
// commas: U14 when its numbers have decimal commas, F07 otherwise.
func (f *file) tellForeign(r row, sep string) {
	name := map[string]string{";": "semicolons", "\t": "tabs"}[sep]
	from := 0
	for _, c := range strings.Split(r.text, sep) {
		if number := strings.Trim(c, " \t\""); decimalComma(number) {
			f.tellColumn("U14", r, from+strings.IndexByte(c, ',')+1, "export the file with decimal points, and commas between columns", "a decimal comma in %q, and columns parted by %s", number, name)
			return
		}
		from += len(c) + 1
	}
	f.tellColumn("F07", r, strings.Index(r.text, sep)+1, "part the columns by commas", "columns parted by %s; expected commas: %s", name, strings.Join(f.order, ","))
}

// decimalCommas reports whether a row has one cell more for each number, and no
// decimal point: every number fell apart at its decimal comma.
func (f *file) decimalCommas(r row) bool {
	extra, numbers := len(r.cells)-len(f.order), len(f.numeric())
	return (extra == numbers || extra == numbers+1 && f.column(stationColumn) >= 0) && !strings.Contains(r.text, ".")
}
