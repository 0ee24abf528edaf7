package config

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// number brings one value to SI.
func (r *reading) number(n numeric, path, limits string) {
	v, f := n.cell(), n.form()
	if !v.given {
		return
	}
	switch {
	case v.bare && !f.bare:
		r.noUnit(v, path, f)
	case v.bare:
		r.bareNumber(v, path, f)
	case !f.quoted:
		r.complain(textFault(v.text), path, fmt.Sprintf("%s is the text %q", path, v.text), "write "+f.what)
	default:
		r.textNumber(n, path)
	}
	if _, whole := n.(*count); whole && v.ok && v.si != math.Trunc(v.si) {
		v.ok = false
		r.complain("F06", path, fmt.Sprintf("%s is %s", path, shortest(v.number)), "write "+f.what)
	}
	if v.ok && limits != "" {
		r.within(v, path, f, limits)
	}
}

// noUnit complains of a bare number where text with a unit is meant.
func (r *reading) noUnit(v *value, path string, f form) {
	_, err := quantity.Parse(shortest(v.number), f.kind)
	var e *quantity.Error
	if errors.As(err, &e) && e.Fault == quantity.ErrMissing {
		r.complain("F04", path, fmt.Sprintf("%s is the bare number %s: %v", path, shortest(v.number), e.Fault), e.Help)
		return
	}
	r.complain("F06", path, fmt.Sprintf("%s is no finite number", path), "write "+f.what)
}

// textFault chooses the code for text where only a bare number may stand: with
// a unit behind the number it is one that does not belong there.
func textFault(s string) finding.Code {
	if _, unit, err := quantity.ParseAny(s); err == nil && unit.Token != "" {
		return "F04"
	}
	if _, err := quantity.Number(s); errors.Is(err, quantity.ErrComma) {
		return "U14"
	}
	return "F06"
}

// bareNumber scales a number without unit: by the project's unit of length where
// it counts in that, from degrees where it is an angle.
func (r *reading) bareNumber(v *value, path string, f form) {
	if math.IsNaN(v.number) || math.IsInf(v.number, 0) {
		r.complain("F06", path, fmt.Sprintf("%s is no finite number", path), "write "+f.what)
		return
	}
	v.si, v.ok = v.number, true
	if f.local {
		v.si *= r.units.Metres()
	}
	if f.kind == quantity.Angle {
		v.si *= f.size
	}
}

// textNumber reads a number with its unit, or what stands in its place: a
// station, a printed figure, the word "solve".
func (r *reading) textNumber(n numeric, path string) {
	v, f := n.cell(), n.form()
	var err error
	switch n.(type) {
	case *place:
		if !strings.HasPrefix(path, "accept") { // there it may be a name: see acceptPlace
			r.station(v, path)
		}
		return
	case *figure:
		v.si, v.unit, err = parseFigure(v.text)
	case *amount:
		v.si, v.unit, err = quantity.ParseAny(v.text)
		if err == nil && v.unit.Token == "" {
			err = &quantity.Error{Fault: quantity.ErrMissing, Text: v.text, Help: "write " + f.what}
		}
	default:
		v.si, err = quantity.Parse(v.text, f.kind)
	}
	switch {
	case err == nil:
		v.ok = true
	case v.text == "solve" && strings.HasPrefix(path, "profile.pvi"):
		r.complain("F09", path, fmt.Sprintf("%s %q: %s", path, v.text, notBuilt), notBuiltHelp)
	default:
		r.quantityFault(err, path, f)
	}
}

// quantityFault gives the error of a number with unit its code.
func (r *reading) quantityFault(err error, path string, f form) {
	var e *quantity.Error
	if !errors.As(err, &e) { // Parse returns no other
		panic("config: " + err.Error())
	}
	code := finding.Code("F04")
	switch e.Fault {
	case quantity.ErrComma:
		code = "U14"
	case quantity.ErrNumber:
		code = "F06"
		e.Help = "write " + f.what
	}
	r.complain(code, path, fmt.Sprintf("%s is %q: %v", path, e.Text, e.Fault), e.Help)
}

// dated matches what spreadsheets make of stations and ids: "3-4", "4-Mar",
// "950E2862".
var dated = regexp.MustCompile(`^(\d+[-/.](\d+|[A-Za-z]{3})([-/.]\d+)?|[A-Za-z]{3}-\d+|\d+(\.\d+)?[Ee][+-]?\d+)$`)

// station reads a label. It tells a slip of the pen (F06) from the traces of a
// spreadsheet or of another locale (U14), since these are mended at the source.
func (r *reading) station(v *value, path string) {
	s, err := r.labels.Parse(v.text)
	if err == nil {
		v.si, v.ok = float64(s), true
		return
	}
	code, help := finding.Code("F06"), stationHelp(r.labels)
	trimmed := strings.TrimSpace(v.text)
	if _, number := quantity.Number(trimmed); number == nil {
		help = "write the bare number without quotes, or " + help
	}
	switch {
	case strings.Contains(trimmed, ","):
		code, help = "U14", "write a decimal point: "+strings.Replace(trimmed, ",", ".", 1)
	case dated.MatchString(trimmed) && !isDecimal(trimmed):
		code, help = "U14", "a spreadsheet has rewritten it; "+help
	}
	r.complain(code, path, fmt.Sprintf("%s is %q, which is no station", path, v.text), help)
}

// isDecimal tells "12.5" from the dates that look like it.
func isDecimal(s string) bool {
	whole, rest, found := strings.Cut(s, ".")
	_, errWhole := strconv.Atoi(whole)
	_, errRest := strconv.Atoi(rest)
	return found && errWhole == nil && errRest == nil
}

// stationHelp shows the form of the labels that the project uses.
func stationHelp(l station.Labels) string {
	if l.US() {
		return `a station is written "12+34.5": two digits before the decimal point`
	}
	return `a station is written "1+234.5": three digits before the decimal point`
}

// shortest prints a number as a person would have typed it.
func shortest(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }
