package main

import (
	"fmt"
	"math"
	"path/filepath"
	"slices"
	"strings"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/drainage"
	"sagcrest/earthwork"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// row is one line of the summary: what it is, its figure as people read it, and
// the bare figure in SI for --plain ("" where it is withheld or unknown).
type row struct{ name, text, bare string }

// summary picks what somebody must know before opening the report.
func summary(o *study.Outcome) (rows []row) {
	paper, over := o.Project.Paper(), o.Road.Over()
	label := o.Project.Labels.Format
	rows = append(rows, row{"length",
		fmt.Sprintf("%s %s, from %s to %s", paper.Length(over.Length()), paper.LengthUnit(), label(over.From), label(over.To)),
		bare(over.Length())})
	rows = append(rows, volumes(o)...)
	rows = append(rows, balance(o))
	return append(rows, cost(o)...)
}

// volumes are the totals by the method that pays.
func volumes(o *study.Outcome) []row {
	paper, q := o.Project.Paper(), &o.Quantities
	volume := func(v float64) string { return paper.Volume(v) + " " + paper.VolumeUnit() }
	one := func(name, path string, v float64, state string) row {
		if by := stoppedBy(o, "earthwork.totals."+path); by != "" {
			return row{name, "withheld: " + by, ""}
		}
		return row{name, volume(v) + " " + state, bare(v)}
	}
	paid := map[earthwork.Method]string{earthwork.EndArea: "end areas", earthwork.Pyramid: "end areas and pyramids"}[q.Method]
	strip := one("topsoil", "strip", q.Strip, "stripped, "+volume(q.Respread)+" re-spread")
	return []row{
		one("cut", "cut_bank", float64(q.Cut), "bank, by "+paid),
		one("fill", "fill_compacted", float64(q.Fill), "compacted"),
		strip,
	}
}

// balance is the last mass ordinate.
func balance(o *study.Outcome) row {
	m := o.Quantities.Mass
	if by := stoppedBy(o, "earthwork.mass.ordinates"); by != "" || m == nil {
		return row{"balance", "withheld: " + by, ""}
	}
	paper, side := o.Project.Paper(), "surplus"
	if m.End() < 0 {
		side = "short, to be borrowed"
	}
	return row{"balance", fmt.Sprintf("%s %s %s %s", paper.Volume(math.Abs(m.End())), paper.VolumeUnit(), m.State, side), bare(m.End())}
}

// cost is the total of the bill; without prices there is no row.
func cost(o *study.Outcome) []row {
	switch {
	case o.Bill == nil:
		return nil
	case stoppedBy(o, "cost.total") != "":
		return []row{{"cost", "withheld: " + stoppedBy(o, "cost.total"), ""}}
	case o.Bill.Total == nil:
		var open []string
		for _, l := range o.Bill.Lines {
			if l.Amount == nil {
				open = append(open, l.Item)
			}
		}
		return []row{{"cost", "unknown: no rate for " + strings.Join(open, ", "), ""}}
	}
	return []row{{"cost", o.Project.Paper().Money(*o.Bill.Total) + " " + o.Project.Prices.Currency, bare(*o.Bill.Total)}}
}

// stoppedBy returns the code that withholds a result, "" where none does. What
// is accepted withholds nothing.
func stoppedBy(o *study.Outcome, path string) string {
	for i, f := range o.Findings {
		if o.Accepted[i] == nil && slices.Contains(f.Stops, path) {
			return string(f.Code)
		}
	}
	return ""
}

func bare(v float64) string { return fmt.Sprintf("%.6f", v) }

// sameLow is how near a low point of another line must be to one of the
// centre line for one inlet station to stand for both: a metre is less than
// any inlet is long.
const sameLow = 1.0

// lowPoints lists where water gathers on the road: the low points of the
// centre line, and those of other lines that lie elsewhere.
func lowPoints(o *study.Outcome) (out []section.Turning) {
	for _, t := range o.Turnings {
		near := func(c section.Turning) bool { return math.Abs(float64(c.At-t.At)) <= sameLow }
		if t.Low && !slices.ContainsFunc(out, near) {
			out = append(out, t)
		}
	}
	slices.SortStableFunc(out, func(a, b section.Turning) int { return int(math.Copysign(1, float64(a.At-b.At))) })
	return out
}

func lowWords(o *study.Outcome, t section.Turning) string {
	paper, label := o.Project.Paper(), o.Project.Labels.Format
	where := label(t.At)
	if t.Kind == section.Level {
		where += " to " + label(t.To)
	}
	return fmt.Sprintf("%s  %s, level %s %s", where, strings.ReplaceAll(string(t.Line), "_", " "), paper.Elevation(t.Elev), paper.LengthUnit())
}

// culvertWords tells size, place, barrel and cover of a culvert.
func culvertWords(o *study.Outcome, l *drainage.Laid) string {
	paper, c := o.Project.Paper(), l.Culvert
	size := paper.Size(c.Diameter)
	if c.Shape == drainage.Box {
		size = paper.Size(c.Span) + " × " + paper.Size(c.Rise)
	}
	parts := []string{fmt.Sprintf("%s  %d × %s %s", c.ID, max(c.Barrels, 1), size, paper.SizeUnit())}
	if l.Known {
		parts[0] += " at " + o.Project.Labels.Format(l.At)
	}
	if l.Ended {
		parts = append(parts, fmt.Sprintf("length %s %s, slope %s %%", paper.Length(l.Length), paper.LengthUnit(), paper.Grade(l.Slope)))
	}
	if l.Judged {
		parts = append(parts, fmt.Sprintf("least cover %s %s at the %s%s, %s wanted", paper.Cover(l.Least.Cover()),
			paper.LengthUnit(), sideOf(l.Least.Offset), l.Least.What, paper.Cover(l.Required)))
	}
	return strings.Join(append(parts, string(l.Verdict)), "; ")
}

// sideOf says on which side of the reference line something lies, in front of
// its name.
func sideOf(o station.Offset) string {
	switch {
	case o < 0:
		return "left "
	case o > 0:
		return "right "
	}
	return ""
}

// tellRun prints what a run found out, worst news last, where people look.
func (a *app) tellRun(o *study.Outcome, done *plan, aside, arg string) {
	if a.opt.Plain {
		a.tellRunPlain(o, done)
		return
	}
	problems := fewOfEach(problemsOf(o))
	if a.opt.Quiet {
		a.tellProblems(a.out, problems)
		return
	}
	fmt.Fprintf(a.out, "%s, %s\n", o.Project.Title, roadName(o.Project.Alternative))
	for _, r := range summary(o) {
		fmt.Fprintf(a.out, "  %-9s %s\n", r.name, r.text)
	}
	if lows := lowPoints(o); len(lows) > 0 {
		fmt.Fprintln(a.out, "\nlow points, each needs an inlet or another way out for its water")
		for _, t := range lows {
			fmt.Fprintln(a.out, "  "+lowWords(o, t))
		}
	}
	if len(o.Culverts) > 0 {
		fmt.Fprintln(a.out, "\nculverts")
		for i := range o.Culverts {
			fmt.Fprintln(a.out, "  "+culvertWords(o, &o.Culverts[i]))
			for _, m := range o.Culverts[i].Mends {
				fmt.Fprintln(a.out, "      mend: "+m.Text)
			}
		}
	}
	a.tellFolder(done, aside)
	fmt.Fprintf(a.out, "\nfindings: %s\n", countWords(o))
	a.tellProblems(a.out, problems)
	a.tellAccepted(o)
	a.suggest(o, done, arg)
}

// tellFolder names the folder and what is in it; a dry run lists what would
// happen to each file.
func (a *app) tellFolder(done *plan, aside string) {
	if a.opt.DryRun {
		fmt.Fprintf(a.out, "\nwould be written to %s\n", done.dir)
		a.tellSteps(a.out, done)
		return
	}
	var names []string
	tables, gone := 0, 0
	for _, s := range done.steps {
		switch {
		case s.fate == remove:
			gone++
		case filepath.Ext(s.name) == ".csv":
			tables++
		default:
			names = append(names, s.name)
		}
	}
	fmt.Fprintf(a.out, "\nwritten to %s\n  %s and %d tables (*.csv)\n", done.dir, strings.Join(names, ", "), tables)
	if gone > 0 {
		fmt.Fprintf(a.out, "  %d files of the earlier run are gone\n", gone)
	}
	if aside != "" {
		fmt.Fprintf(a.out, "  what was there before is kept in %s\n", aside)
	}
}

// tellRunPlain prints the same as records.
func (a *app) tellRunPlain(o *study.Outcome, done *plan) {
	for _, r := range summary(o) {
		fmt.Fprintf(a.out, "figure\t%s\t%s\n", r.name, r.bare)
	}
	for _, t := range lowPoints(o) {
		fmt.Fprintf(a.out, "low_point\t%s\t%s\t%s\t%s\n", t.Line, o.Project.Labels.Format(t.At), bare(float64(t.At)), bare(t.Elev))
	}
	for _, l := range o.Culverts {
		fmt.Fprintf(a.out, "culvert\t%s\t%s\n", l.Culvert.ID, l.Verdict)
	}
	a.tellProblems(a.out, problemsOf(o))
	fmt.Fprintf(a.out, "counts\t%d\t%d\t%d\n", o.Errors(), o.Warnings(), notes(o))
	a.tellSteps(a.out, done)
}

// suggest names the next step: mend what is wrong, else read the report, else
// compare.
func (a *app) suggest(o *study.Outcome, done *plan, arg string) {
	switch {
	case a.opt.DryRun:
		a.next("sagcrest run " + quoted(arg) + alternativeWords(o.Project.Alternative))
	case o.Errors() > 0:
		a.next("sagcrest explain " + worst(o) + ", then read " + quoted(filepath.Join(done.dir, "report.html")))
	case len(o.Doc.Alternatives()) > 0 && o.Project.Alternative == "base":
		a.next("read " + quoted(filepath.Join(done.dir, "report.html")) + ", then sagcrest compare " + quoted(arg))
	default:
		a.next("read " + quoted(filepath.Join(done.dir, "report.html")))
	}
}

// worst returns the code of the gravest open finding, "" where there is none.
func worst(o *study.Outcome) string {
	for i, f := range o.Findings {
		if o.Accepted[i] == nil {
			return string(f.Code)
		}
	}
	return ""
}
