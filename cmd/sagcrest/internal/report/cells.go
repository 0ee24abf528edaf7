package report

import (
	"fmt"
	"strings"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/quantity"
	"sagcrest/profile/station"
)

// sheets makes the tables and pages of one run.
type sheets struct {
	o     *study.Outcome
	r     *wire.Results
	paper quantity.Profile
	// stopped maps a result path to the code that withholds it.
	stopped map[string]string
}

func newSheets(o *study.Outcome, r *wire.Results) *sheets {
	s := &sheets{o: o, r: r, paper: o.Project.Paper(), stopped: map[string]string{}}
	for i, f := range o.Findings {
		if o.Accepted[i] != nil {
			continue
		}
		for _, path := range f.Stops {
			if _, ok := s.stopped[path]; !ok {
				s.stopped[path] = string(f.Code)
			}
		}
	}
	return s
}

// none says why a figure is missing: withheld by a finding on it or on what it
// is part of, else it does not exist.
func (s *sheets) none(path string) table.Cell {
	for p := path; p != ""; {
		if code, ok := s.stopped[p]; ok {
			return table.None("withheld: " + code)
		}
		cut := strings.LastIndexAny(p, ".[")
		if cut < 0 {
			break
		}
		p = p[:cut]
	}
	return table.None("–")
}

// fine makes a cell of a nullable figure with the printer of its quantity.
func (s *sheets) fine(v *wire.Fine, path string, print func(float64) string) table.Cell {
	if v == nil {
		return s.none(path)
	}
	return table.Figure(float64(*v), print(float64(*v)))
}

// volume does the same for volumes and money.
func (s *sheets) volume(v *wire.Volume, path string, print func(float64) string) table.Cell {
	if v == nil {
		return s.none(path)
	}
	return table.Figure(float64(*v), print(float64(*v)))
}

// figure makes a cell of a figure that always exists.
func figure(v wire.Fine, print func(float64) string) table.Cell {
	return table.Figure(float64(v), print(float64(v)))
}

// percent prints a figure that already is a percentage.
func percent(v float64) string { return quantity.Decimal(v, 2) }

// path builds a result path of a row.
func path(format string, i int, key string) string { return fmt.Sprintf(format, i) + "." + key }

// Columns that many tables share.
func (s *sheets) length(key, title string) table.Column {
	return table.Column{Key: key, SI: "m", Title: title, Unit: s.paper.LengthUnit(), Kind: table.Number}
}

func (s *sheets) area(key, title string) table.Column {
	return table.Column{Key: key, SI: "m2", Title: title, Unit: s.paper.AreaUnit(), Kind: table.Number}
}

// volumeOf names the state of a volume in the column's unit.
func (s *sheets) volumeOf(key, title, state string) table.Column {
	si, unit := "m3", s.paper.VolumeUnit()
	if state != "" {
		si, unit = si+" "+state, unit+", "+state
	}
	return table.Column{Key: key, SI: si, Title: title, Unit: unit, Kind: table.Number}
}

func placeCol(key, title string) table.Column {
	return table.Column{Key: key, Title: title, Kind: table.Station}
}

func words(key, title string) table.Column { return table.Column{Key: key, Title: title} }

func inPercent(key, title string) table.Column {
	return table.Column{Key: key, SI: "%", Title: title, Unit: "%", Kind: table.Number}
}

// at makes a cell of a station.
func (s *sheets) at(v station.Station) table.Cell {
	return table.At(wire.Place{Distance: wire.Fine(v), Station: s.o.Project.Labels.Format(v)})
}

// stretch writes a stretch of the road, clipped to it.
func (s *sheets) stretch(from, to station.Station) string {
	over := s.o.Road.Over()
	return s.o.Project.Labels.Format(max(from, over.From)) + " to " + s.o.Project.Labels.Format(min(to, over.To))
}
