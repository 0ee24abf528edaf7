package wire

import (
	"math"
	"path/filepath"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Build makes the results document of a run. What findings withhold is null.
func Build(o *study.Outcome) *Results {
	b := builder{o}
	r := &Results{
		Head: head("results"), Inputs: inputs(o), Alternative: o.Project.Alternative,
		Status: "complete", Findings: b.findings(),
		Result: Result{
			Alignment: b.alignment(), Profile: b.profile(), Sections: b.sections(),
			Earthwork: b.earthwork(), Drainage: b.drainage(), Land: b.land(), Cost: b.cost(),
		},
	}
	for i, f := range o.Findings {
		// An accepted error is answered for, so what hung on it stands.
		if o.Accepted[i] != nil || len(f.Stops) == 0 {
			continue
		}
		r.Status = "withheld"
		for _, path := range f.Stops {
			withhold(&r.Result, path)
		}
	}
	return r
}

// Check makes the document of the check command.
func Check(o *study.Outcome) *CheckDoc {
	d := &CheckDoc{Head: head("check"), Inputs: inputs(o), Alternative: o.Project.Alternative,
		Findings: builder{o}.findings(), Silent: []string{}}
	d.Counts = count(d.Findings)
	for _, c := range o.Silent {
		d.Silent = append(d.Silent, string(c))
	}
	return d
}

// Failed makes the document of a run that ended early.
func Failed(problems []study.Problem) *ErrorDoc {
	d := &ErrorDoc{Head: head("error"), Findings: []Finding{}}
	for _, p := range problems {
		rule, _ := study.Rule(p.Code)
		d.Findings = append(d.Findings, Finding{
			Code: string(p.Code), Severity: p.Severity.String(), Message: p.Message,
			Where:    Where{Key: some(p.Key), File: some(p.File), Line: some(p.Line), Column: some(p.Column), ID: some(p.ID)},
			Measured: figure(p.Measured), Limit: figure(p.Limit),
			Source: rule.Source, Help: p.Help, Stops: []string{},
		})
	}
	return d
}

func count(fs []Finding) (c Counts) {
	for _, f := range fs {
		if f.Accepted != nil {
			continue
		}
		switch f.Severity {
		case "E":
			c.E++
		case "W":
			c.W++
		default:
			c.N++
		}
	}
	return c
}

func inputs(o *study.Outcome) (out []Input) {
	for _, i := range o.Inputs {
		out = append(out, Input{Path: i.Path, SHA256: i.SHA256, Bytes: int(i.Bytes)})
	}
	return out
}

func figure(m finding.Measure) *Figure {
	if !m.Known {
		return nil
	}
	return &Figure{Fine(m.Value), m.Unit}
}

// builder copies one outcome.
type builder struct{ *study.Outcome }

func (b builder) place(s station.Station) Place {
	return Place{Fine(s), b.Project.Labels.Format(s)}
}

func (b builder) findings() []Finding {
	out := []Finding{}
	for i, f := range b.Findings {
		p := b.Problem(f)
		rule, _ := study.Rule(f.Code)
		w := Where{Key: some(f.At.Key), File: some(b.file(p.File)), Line: some(p.Line), Column: some(p.Column), ID: some(f.At.ID)}
		if f.At.On {
			w.From, w.To = fine(float64(f.At.At.From)), fine(float64(f.At.At.To))
		}
		if f.At.Beside {
			w.Offset = fine(float64(f.At.Off))
		}
		d := Finding{Code: string(f.Code), Severity: f.Severity.String(), Message: p.Message, Where: w,
			Measured: figure(f.Measured), Limit: figure(f.Limit),
			Source: rule.Source, Help: rule.Mend, Stops: append([]string{}, f.Stops...)}
		if f.Source != "" {
			d.Source = f.Source
		}
		if a := b.Accepted[i]; a != nil {
			d.Accepted = &Accepted{By: a.By, Date: a.Date, Reason: a.Reason}
		}
		out = append(out, d)
	}
	return out
}

func (b builder) alignment() Alignment {
	line := b.Road.Line()
	a := Alignment{Length: Fine(line.Length())}
	radius := func(r float64) *Fine { return fineIf(!math.IsInf(r, 0), r) }
	for _, e := range line.Elements() {
		a.Elements = append(a.Elements, Element{Kind: string(e.Kind), From: b.place(e.Over.From), To: b.place(e.Over.To),
			RadiusFrom: radius(e.RadiusFrom), RadiusTo: radius(e.RadiusTo)})
	}
	return a
}

// file returns a path as the documents name it: relative to the project, so
// that they do not depend on where it was called from.
func (b builder) file(path string) string {
	if rel, err := filepath.Rel(filepath.Dir(b.Project.File()), path); err == nil && path != "" {
		return filepath.ToSlash(rel)
	}
	return path
}
