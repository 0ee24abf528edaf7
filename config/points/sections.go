package points

import (
	"math"
	"slices"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// ReadLines reads lines surveyed square to the road: columns station, offset,
// elevation and, if declared, id, code; "-" skips one. Stations are labels of
// the project or bare numbers from its start, in the label's unit; offsets are
// left negative. Rows of one station stand together, stations increase (A01),
// offsets increase within a line (Q12).
func ReadLines(name string, data []byte, o Options, labels station.Labels) ([]section.SurveyLine, []diag.Problem) {
	f := &file{name: name, order: o.Order}
	if !f.checkOrder([]string{stationColumn, offsetColumn, elevation, id, code, skip}, []string{stationColumn, offsetColumn, elevation}) {
		return nil, f.list.Problems()
	}
	var lines []section.SurveyLine
	for _, r := range f.body(f.rows(data)) {
		if f.fits(r) {
			lines = f.addToLine(lines, r, o.unit(), labels)
		}
	}
	return lines, f.list.Problems()
}

// sameLine is the difference in metres below which two rows belong to one line:
// half of what labels are written with.
const sameLine = 0.0005

func (f *file) addToLine(lines []section.SurveyLine, r row, unit float64, labels station.Labels) []section.SurveyLine {
	cell := func(column string) int { return slices.Index(f.order, column) }
	s, okS := f.station(r, cell(stationColumn), labels)
	off, okO := f.number(r, cell(offsetColumn), unit)
	z, okZ := f.number(r, cell(elevation), unit)
	if !okS || !okO || !okZ {
		return lines
	}
	if isVoid(r.cells[cell(elevation)]) {
		f.problem("U09", r, cell(elevation), "take the row out", "the elevation %s stands for nothing known", r.cells[cell(elevation)])
		return lines
	}
	p := section.LinePoint{Offset: station.Offset(off), Z: z}
	last := len(lines) - 1
	switch {
	case last < 0 || float64(s-lines[last].At) > sameLine:
		return append(lines, section.SurveyLine{At: s, Points: []section.LinePoint{p}})
	case float64(lines[last].At-s) > sameLine:
		f.problem("A01", r, cell(stationColumn), "put the lines in order of station",
			"the line at %s does not lie beyond the one before it, at %s", labels.Format(s), labels.Format(lines[last].At))
		return lines
	}
	pts := lines[last].Points
	if prev := pts[len(pts)-1].Offset; !(p.Offset > prev) {
		f.problem("Q12", r, cell(offsetColumn), "put the points in order from left to right; left is negative",
			"at %s the offset %.3f m does not lie to the right of the one before it, %.3f m", labels.Format(s), off, float64(prev))
		return lines
	}
	lines[last].Points = append(pts, p)
	return lines
}

// station reads a label, or a bare number of label units from the start.
func (f *file) station(r row, cell int, labels station.Labels) (station.Station, bool) {
	text := r.cells[cell]
	if strings.Contains(text, "+") && !spoiled(text) {
		s, err := labels.Parse(text)
		if err != nil {
			f.problem("F06", r, cell, "write stations as the project does", "%v", err)
			return 0, false
		}
		return s, true
	}
	if spoiled(text) {
		f.problem("U14", r, cell, "export the stations as text", "the station %q looks like a date or a number that a spreadsheet made of it", text)
		return 0, false
	}
	v, ok := f.number(r, cell, labels.Unit())
	if !ok || math.IsNaN(v) {
		return 0, false
	}
	return station.Station(v), true
}
