package study

import (
	"cmp"
	"fmt"
	"slices"

	"sagcrest/config"
	"sagcrest/config/diag"
	"sagcrest/drainage"
	"sagcrest/earthwork"
	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// Catalogue returns the pages of every code that the program raises, in order
// of code.
func Catalogue() []finding.Rule {
	all := slices.Concat(
		profile.Rules(), alignment.Rules(), terrain.Rules(), section.Rules(),
		drainage.Rules(), earthwork.Rules(), config.Rules(), diag.Rules(),
	)
	slices.SortStableFunc(all, func(a, b finding.Rule) int { return cmp.Compare(a.Code, b.Code) })
	return slices.CompactFunc(all, func(a, b finding.Rule) bool { return a.Code == b.Code })
}

// Rule returns the page of a code.
func Rule(code finding.Code) (finding.Rule, bool) {
	all := Catalogue()
	i, ok := slices.BinarySearchFunc(all, code, func(r finding.Rule, c finding.Code) int { return cmp.Compare(r.Code, c) })
	if !ok {
		return finding.Rule{}, false
	}
	return all[i], true
}

// Message puts a finding into words: the rule's message with the finding's
// figures, stations as labels and lengths in the units of the project's paper.
func (o *Opened) Message(f finding.Finding) string {
	rule, ok := Rule(f.Code)
	if !ok {
		return string(f.Code)
	}
	paper := o.Project.Paper()
	args := make([]any, len(f.Args))
	for i, a := range f.Args {
		switch v := a.(type) {
		case station.Station:
			args[i] = o.Project.Labels.Format(v)
		case station.Offset:
			args[i] = paper.Offset(v) + " " + paper.LengthUnit()
		case finding.Measure:
			args[i] = paper.Measure(v)
		default:
			args[i] = v
		}
	}
	return fmt.Sprintf(rule.Message, args...)
}

// Problem is a finding in words at its place in a file.
type Problem = diag.Problem

// Problem gives a finding its words and its place in the project file.
func (o *Opened) Problem(f finding.Finding) Problem {
	rule, _ := Rule(f.Code)
	p := Problem{
		Code: f.Code, Severity: f.Severity, Key: f.At.Key, ID: f.At.ID,
		Message: o.Message(f), Help: rule.Mend,
		Measured: f.Measured, Limit: f.Limit,
	}
	if line, col, ok := o.Project.Locate(f.At.Key); ok {
		p.File, p.Line, p.Column = o.Project.File(), line, col
	}
	return p
}
