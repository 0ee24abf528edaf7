package study

import (
	"slices"

	"sagcrest/profile/finding"
)

// silent lists the checks of this program that had nothing to look at in a
// project, because an optional input is missing.
func (o *Outcome) silent() (out []finding.Code) {
	p := o.Project
	none := []struct {
		missing bool
		codes   []finding.Code
	}{
		{len(p.RightOfWay.Left)+len(p.RightOfWay.Right) == 0, []finding.Code{"A09"}},
		{len(p.Request.Exclusions) == 0, []finding.Code{"A11"}},
		{len(p.CurveTable) == 0, []finding.Code{"P02"}},
		{len(p.TieIns) == 0, []finding.Code{"P12"}},
		{len(p.Obstacles) == 0, []finding.Code{"P14"}},
		{len(p.Culverts) == 0, []finding.Code{"D03", "D04", "D05", "D25", "D26", "D30"}},
		{len(p.Request.Extras) == 0, []finding.Code{"Q24"}},
	}
	for _, n := range none {
		if n.missing {
			out = append(out, n.codes...)
		}
	}
	slices.Sort(out)
	return out
}

// fatal reports whether a finding leaves no geometry or no meaning: the run
// ends and writes nothing.
func fatal(f finding.Finding) bool {
	if f.Severity != finding.Error {
		return false
	}
	switch f.Code {
	case "A01", "A02", "A16", "P01", "P15", "Q12":
		return true
	}
	return f.Code[0] == 'F' || f.Code[0] == 'U'
}
