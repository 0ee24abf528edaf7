package points

import (
	"math"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// ReadLines reads lines surveyed square to the road: columns station, offset,
// elevation and, if declared, id, code, kind, line, seq; "-" skips one.
// Stations are labels of the project or bare numbers of label units from its
// start; offsets and levels are in the unit of the options, offsets left
// negative. Rows of one station stand together, stations increase from line to
// line (A01), offsets increase within a line (Q12).
func ReadLines(name string, data []byte, o Options, labels station.Labels) ([]section.SurveyLine, []diag.Problem) {
	f := &file{name: name, key: "survey.sections", order: o.Order}
	known := []string{stationColumn, offsetColumn, elevation, id, code, kind, line, seq, skip}
	if !f.checkOrder(known, []string{stationColumn, offsetColumn, elevation}) || !f.open(data) {
		return nil, f.list.Problems()
	}
	s := &survey{cloud: cloud{file: f, unit: o.unit(), elevation: f.column(elevation)}, labels: labels}
	s.station, s.offset = f.column(stationColumn), f.column(offsetColumn)
	s.misplaced = station.Station(math.NaN())
	f.body(s.add)
	s.checkLevels()
	return s.lines, f.list.Problems()
}

// survey gathers section lines. The points of its cloud are their points with
// the station for easting and the offset for northing: levels are compared in
// plan like those of other surveys.
type survey struct {
	cloud
	labels          station.Labels
	station, offset int // columns
	lines           []section.SurveyLine
	misplaced       station.Station // of the last line out of order, told once
}

// sameLine is the difference in metres below which two rows belong to one line:
// half of what labels are written with.
const sameLine = 0.0005

func (s *survey) add(r row) {
	if !s.isPoint(r) {
		return
	}
	at, okS := s.readStation(r)
	off, okO := s.number(r, s.offset, s.unit)
	z, okZ := s.number(r, s.elevation, s.unit)
	if okZ && isSign(r.cells[s.elevation]) {
		s.tellSign(r, s.elevation)
		okZ = false
	}
	if !okS || !okO || !okZ {
		return
	}
	if s.place(r, at, section.LinePoint{Offset: station.Offset(off), Z: z}) {
		s.points = append(s.points, terrain.Point{E: float64(at), N: off, Z: z, Row: r.number})
		s.starts = append(s.starts, r.start)
	}
}

// place appends a point to the last line, or begins a new one.
func (s *survey) place(r row, at station.Station, p section.LinePoint) bool {
	last := len(s.lines) - 1
	switch {
	case last < 0 || float64(at-s.lines[last].At) > sameLine:
		s.lines = append(s.lines, section.SurveyLine{At: at, Points: []section.LinePoint{p}})
		return true
	case float64(s.lines[last].At-at) > sameLine:
		if at != s.misplaced {
			s.misplaced = at
			s.tell("A01", r, s.station, "put the lines in order of station, all rows of a line together",
				"the line at %s does not lie beyond the one before it, at %s", s.labels.Format(at), s.labels.Format(s.lines[last].At))
		}
		return false
	}
	l := &s.lines[last]
	if before := l.Points[len(l.Points)-1].Offset; p.Offset <= before {
		s.tell("Q12", r, s.offset, "put the points in order from left to right; left is negative",
			"at %s the offset %.3f m does not lie to the right of the one before it, %.3f m", s.labels.Format(at), p.Offset, before)
		return false
	}
	l.Points = append(l.Points, p)
	return true
}

// readStation reads a label, or a bare number of label units from the start.
func (s *survey) readStation(r row) (station.Station, bool) {
	text := r.cells[s.station]
	if !strings.Contains(text, "+") || spoilt(text) || plainNumber.MatchString(text) {
		v, ok := s.number(r, s.station, s.labels.Unit())
		return station.Station(v), ok
	}
	at, err := s.labels.Parse(text)
	switch {
	case err != nil && strings.Contains(text, ","):
		s.tell("U14", r, s.station, "write a decimal point", "a decimal comma in the station %q", text)
	case err != nil:
		s.tell("F06", r, s.station, "write stations as the project does, such as 1+250.5", "%v", err)
	case !(math.Abs(float64(at)) <= farthest):
		s.tell("F06", r, s.station, "correct it, or take the row out", "the station %s lies outside ±%.0f m", text, farthest)
	default:
		return at, true
	}
	return 0, false
}
