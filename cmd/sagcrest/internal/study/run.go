package study

import (
	"context"
	"fmt"
	"slices"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// Progress is told what is being done and how far it is.
type Progress func(stage string, done, total int)

// Run computes one alternative from end to end. Findings that leave no geometry
// come back as problems, and then there is no outcome; a cancelled context
// gives neither.
func Run(ctx context.Context, in *Opened, progress Progress) (*Outcome, []diag.Problem) {
	if progress == nil {
		progress = func(string, int, int) {}
	}
	progress("geometry", 0, 1)
	road, found := geometry(in)
	if stop := in.fatal(found, road == nil); stop != nil {
		return nil, stop
	}
	o := &Outcome{Opened: in, Road: road}
	found = append(found, o.lines()...)
	progress("drainage", 0, 1)
	found = append(found, o.culverts()...)
	found = append(found, o.stations()...)
	found = append(found, o.cut(ctx, progress)...)
	if ctx.Err() != nil {
		return nil, nil
	}
	found = append(found, o.quantities()...)
	if stop := in.fatal(found, false); stop != nil {
		return nil, stop
	}
	o.price()
	o.settle(found)
	return o, nil
}

// fatal returns the findings as problems when one of them ends the run.
func (o *Opened) fatal(found []finding.Finding, always bool) (out []diag.Problem) {
	for _, f := range found {
		always = always || fatal(f)
	}
	if !always {
		return nil
	}
	finding.Sort(found)
	for _, f := range found {
		out = append(out, o.Problem(f))
	}
	return out
}

// settle sorts the findings, completes what they withhold, and marks what
// somebody accepted.
func (o *Outcome) settle(found []finding.Finding) {
	withheld := o.Quantities.Withheld()
	for i := range found {
		switch found[i].Code {
		case "A06", "A10", "A14", "Q11":
			if o.stopsVolumes(found[i]) {
				found[i].Stops = append(found[i].Stops, withheld...)
			}
		}
		found[i].Stops = o.withCost(found[i].Stops)
	}
	finding.Sort(found)
	o.Findings = found
	o.Silent = o.silent()
	o.accept()
}

// stopsVolumes reports whether a finding reaches a length that is measured;
// inside an exception nothing is.
func (o *Outcome) stopsVolumes(f finding.Finding) bool {
	for _, b := range o.Quantities.Between {
		if !b.Known && !b.Excepted && b.From <= f.At.At.To && f.At.At.From <= b.To {
			return true
		}
	}
	return false
}

// withCost drops the paths that this run has no results for, and adds the lines
// of the bill that hang on what is withheld.
func (o *Outcome) withCost(stops []string) []string {
	out := stops[:0:0]
	for _, s := range stops {
		if !strings.HasPrefix(s, "cost") || o.Bill != nil {
			out = append(out, s)
		}
	}
	if o.Bill == nil {
		return out
	}
	hangs := func(item string) bool {
		for i, l := range o.Culverts {
			if item == "culvert "+l.Culvert.ID {
				return slices.Contains(stops, fmt.Sprintf("drainage.culverts[%d].length", i))
			}
		}
		if item == "borrow" || item == "waste" {
			return slices.Contains(stops, "earthwork.mass.ordinates")
		}
		return slices.Contains(stops, "earthwork.totals.cut_bank")
	}
	for i, l := range o.Bill.Lines {
		if !l.Quantity.Known && hangs(l.Item) {
			out = append(out, fmt.Sprintf("cost.lines[%d].quantity", i), fmt.Sprintf("cost.lines[%d].amount", i), "cost.total")
		}
	}
	return once(out)
}

// once drops what is named a second time and keeps the order.
func once(paths []string) (out []string) {
	for _, p := range paths {
		if !slices.Contains(out, p) {
			out = append(out, p)
		}
	}
	return out
}
