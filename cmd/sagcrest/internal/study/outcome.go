package study

import (
	"sagcrest/config"
	"sagcrest/drainage"
	"sagcrest/earthwork"
	"sagcrest/earthwork/bill"
	"sagcrest/profile/finding"
	"sagcrest/section"
)

// Outcome is everything that one run of one alternative found out.
type Outcome struct {
	*Opened
	Road *section.Road

	Turnings   []section.Turning
	Ends       []section.LineEnd
	Clearances []section.Clearance

	Stations []earthwork.PayStation
	Slices   []section.Slice // as Stations say, two where sections change
	Beyond   []section.Beyond

	Culverts   []drainage.Laid
	Quantities earthwork.Quantities
	Bill       *bill.Bill // nil without prices

	// Findings are in order of severity, station and code; Accepted stands
	// beside each, nil where nobody accepted it.
	Findings []finding.Finding
	Accepted []*config.Accept
	// Silent names the checks that had nothing to look at.
	Silent []finding.Code
}

// Errors and Warnings count the findings that nobody accepted.
func (o *Outcome) Errors() int   { return o.count(finding.Error) }
func (o *Outcome) Warnings() int { return o.count(finding.Warning) }

func (o *Outcome) count(s finding.Severity) (n int) {
	for i, f := range o.Findings {
		if f.Severity == s && o.Accepted[i] == nil {
			n++
		}
	}
	return n
}
