package report

import (
	"fmt"
	"strconv"
	"strings"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

func (s *sheets) findingsTable() *table.Table {
	t := &table.Table{Name: "findings", Title: "Findings", Tick: true, Columns: []table.Column{
		words("code", "code"), words("severity", "E/W/N"), words("place", "place"), words("message", "what is wrong"),
		words("measured", "measured"), words("limit", "limit"), words("source", "source of the limit"), words("effect", "what it changes"),
		words("input", "in the project file"), words("help", "how to mend it"), words("accepted", "accepted by")},
		Note: "E is an error and marks the sheets, W a warning, N a note. A place leads to the section or working that it lies in. `sagcrest explain CODE` prints the formula of a check."}
	for i, f := range s.r.Findings {
		accepted := ""
		if f.Accepted != nil {
			accepted = f.Accepted.By + ", " + f.Accepted.Date + ": " + f.Accepted.Reason
		}
		code := table.Words(f.Code)
		code.Strong = f.Severity == "E" && f.Accepted == nil
		place := table.Words(s.findingPlace(s.o.Findings[i]))
		place.Link = s.target(s.o.Findings[i])
		t.Add(code, table.Words(f.Severity), place, table.Words(f.Message),
			table.Words(s.paper.Measure(s.o.Findings[i].Measured)), table.Words(s.paper.Measure(s.o.Findings[i].Limit)),
			table.Words(f.Source), table.Words(effect(f)), table.Words(inputPlace(f.Where)), table.Words(f.Help), table.Words(accepted))
	}
	return t
}

// effect says what a finding changes, and how many results it withholds: an
// accepted one none.
func effect(f wire.Finding) string {
	rule, _ := study.Rule(finding.Code(f.Code))
	if n := len(f.Stops); n > 0 && f.Accepted == nil {
		return rule.Effect + " It withholds " + plural(n, "figure") + "."
	}
	return rule.Effect
}

// target returns the id of the cell or working that a finding leads to: the
// working of a culvert that it names, else the first section at or beyond its
// place. A finding without a place leads nowhere.
func (s *sheets) target(f finding.Finding) string {
	if strings.HasPrefix(f.At.Key, "culvert[") {
		for i, c := range s.r.Result.Drainage.Culverts {
			if c.ID == f.At.ID {
				return workingID(i)
			}
		}
	}
	sections := s.r.Result.Sections
	if !f.At.On || len(sections) == 0 {
		return ""
	}
	for i, c := range sections {
		if float64(c.Place.Distance) >= float64(f.At.At.From)-float64(station.Same) {
			return sectionID(i)
		}
	}
	return sectionID(len(sections) - 1)
}

// sectionID and workingID name the row of a section and the working of a
// culvert within the page.
func sectionID(i int) string { return "section-" + strconv.Itoa(i+1) }
func workingID(i int) string { return "cover-" + strconv.Itoa(i+1) }

// findingPlace writes name, stretch and offset of a finding.
func (s *sheets) findingPlace(f finding.Finding) string {
	var parts []string
	if f.At.ID != "" {
		parts = append(parts, f.At.ID)
	}
	if at := f.At.At; f.At.On {
		text := s.o.Project.Labels.Format(at.From)
		if at.To != at.From {
			text += " to " + s.o.Project.Labels.Format(at.To)
		}
		parts = append(parts, text)
	}
	if f.At.Beside {
		parts = append(parts, "offset "+s.paper.Offset(f.At.Off)+" "+s.paper.LengthUnit())
	}
	return strings.Join(parts, ", ")
}

// inputPlace writes where in the project file a finding points.
func inputPlace(w wire.Where) string {
	switch {
	case w.Key == nil:
		return ""
	case w.Line == nil:
		return *w.Key
	}
	return fmt.Sprintf("%s, line %d", *w.Key, *w.Line)
}

// mostErrors is how many open errors the first page spells out.
const mostErrors = 12

// openErrors writes the errors that nobody accepted, for the first page.
func (s *sheets) openErrors() (all []string) {
	for _, f := range s.r.Findings {
		if f.Severity == "E" && f.Accepted == nil {
			all = append(all, f.Code+" "+f.Message)
		}
	}
	if more := len(all) - mostErrors; more > 0 {
		all = append(all[:mostErrors], fmt.Sprintf("… and %d more, in the table of findings", more))
	}
	return all
}

// openWords counts the findings that nobody accepted.
func (s *sheets) openWords() string {
	return plural(s.o.Errors(), "open error") + ", " + plural(s.o.Warnings(), "open warning")
}

func plural(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
