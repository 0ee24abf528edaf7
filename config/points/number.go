package points

import (
	"math"
	"regexp"
	"strconv"
	"strings"
)

// farthest is the largest coordinate or level in metres that is read: no map
// grid on earth reaches it.
const farthest = 1e8

// plainNumber is a decimal number, with an exponent or without.
var plainNumber = regexp.MustCompile(`^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$`)

// date is what a spreadsheet makes of ids and stations such as 3-4: 04-Mar,
// 3/4/2026, 2026-03-04.
var date = regexp.MustCompile(`(?i)^(\d{1,2}-` + month + `(-\d{2,4})?|` + month + `-\d{1,4}|\d{1,4}[/.]\d{1,2}[/.]\d{2,4}|\d{4}-\d{2}-\d{2})$`)

const month = `(jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)`

// rounded is what a spreadsheet makes of an id such as 950E2862: a number with
// few digits and an exponent with its sign.
var rounded = regexp.MustCompile(`(?i)^\d(\.\d{1,5})?e[+-]\d{2,}$`)

// pair is what becomes a date as soon as a spreadsheet sees it.
var pair = regexp.MustCompile(`^\d{1,4}-\d{1,4}$`)

// madeDate reports whether an id is what a spreadsheet made of another: a
// date, or a number with an exponent. An id 3-4 or 950E2862 is still whole.
func madeDate(s string) bool { return date.MatchString(s) || rounded.MatchString(s) }

// spoilt reports whether a cell that must be a number is a date, what becomes
// one, or a number whose digits a spreadsheet has cut off: 5.46E+06 may be any
// northing within 10 km, and 950E2862 is none at all.
func spoilt(s string) bool {
	if date.MatchString(s) || pair.MatchString(s) {
		return true
	}
	mantissa, exponent, found := strings.Cut(strings.ToLower(s), "e")
	if !found || !plainNumber.MatchString(s) {
		return false
	}
	_, decimals, _ := strings.Cut(mantissa, ".")
	// The last digit stands for 10 or more. A level such as 1.00E+02 may have
	// lost its decimals too, but nothing shows it.
	power, err := strconv.Atoi(exponent)
	return (err != nil || power > len(decimals)) && strings.Trim(mantissa, "+-0.") != ""
}

// decimalComma reports whether a text is a number but for one comma.
func decimalComma(s string) bool {
	return strings.Count(s, ",") == 1 && plainNumber.MatchString(strings.Replace(s, ",", ".", 1))
}

// looksNumeric reports whether a cell is meant for a number, sound or not.
func looksNumeric(s string) bool {
	if _, err := strconv.ParseFloat(s, 64); err == nil {
		return true // NaN and infinity as well
	}
	return s == "" || plainNumber.MatchString(s) || spoilt(s) || decimalComma(s)
}

// number reads a cell as a length and brings it to metres.
func (f *file) number(r row, cell int, unit float64) (float64, bool) {
	text, name := r.cells[cell], f.order[cell]
	v, _ := strconv.ParseFloat(text, 64)
	v *= unit
	switch {
	case text == "":
		f.tell("F06", r, cell, "fill it in, or take the row out", "the %s is empty", name)
	case decimalComma(text):
		f.tell("U14", r, cell, "write a decimal point", "a decimal comma in the %s %q", name, text)
	case spoilt(text):
		f.tell("U14", r, cell, "export the column as plain numbers with all digits", "the %s %q is a date or a number cut short, as spreadsheets make them", name, text)
	case !plainNumber.MatchString(text):
		f.tell("F06", r, cell, "write a plain decimal number", "the %s %q is not a number", name, text)
	case !(math.Abs(v) <= farthest):
		f.tell("F06", r, cell, "correct it, or take the row out", "the %s %s lies outside ±%.0f m", name, text, farthest)
	default:
		return v, true
	}
	return 0, false
}
