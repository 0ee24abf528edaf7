package main

import (
	"fmt"
	"strings"

	"github.com/jedib0t/go-pretty/v6/table"
	"github.com/jedib0t/go-pretty/v6/text"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/diag"
	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
)

// tellComparison prints a comparison: what spoils its basis, the ranking, and
// for two runs the figures that differ.
func (a *app) tellComparison(d *wire.CompareDoc, roads []contender, args []string) error {
	if a.opt.JSON {
		return a.print(d)
	}
	for _, f := range d.Findings {
		a.tellProblems(a.out, []diag.Problem{{Code: finding.Code(f.Code), Severity: finding.Error,
			File: given(f.Where.File), Line: given(f.Where.Line), Column: given(f.Where.Column), Message: f.Message, Help: f.Help}})
	}
	if a.opt.Plain {
		a.tellRankingPlain(d)
	} else if !a.opt.Quiet {
		a.tellRanking(d)
	}
	if len(args) == 2 {
		if !a.opt.Quiet {
			a.tellDifferences(d, roads[0].name, roads[1].name)
		}
		return nil
	}
	best := d.Order[0]
	a.next("sagcrest run " + quoted(args[0]) + alternativeWords(best))
	return nil
}

// tellRanking prints one row a road, best first. A comparison may be of roads in
// different units, so it is in metres.
func (a *app) tellRanking(d *wire.CompareDoc) {
	paper, _ := quantity.NewProfile(quantity.MetricColumn, quantity.Metric)
	t := table.NewWriter()
	t.SetStyle(table.StyleLight)
	t.Style().Format.Header = text.FormatDefault // capitals would change units
	t.Style().Options = table.Options{SeparateHeader: true}
	t.AppendHeader(table.Row{"", "road", "length m", "cut m³ bank", "fill m³ compacted", "balance m³", strings.TrimSpace("cost " + textOf(d.Basis.Currency)), "culverts", "E/W/N", "worst"})
	for i, c := range d.Alternatives {
		t.AppendRow(table.Row{
			i + 1, c.Name, paper.Length(float64(c.Length)), volumeWords(paper, c.CutBank), volumeWords(paper, c.FillCompacted),
			volumeWords(paper, c.Balance), moneyWords(paper, c.Cost), c.Culverts,
			countsWords(c.Counts), textOf(c.Worst),
		})
	}
	right := []table.ColumnConfig{}
	for n := 3; n <= 8; n++ {
		right = append(right, table.ColumnConfig{Number: n, Align: text.AlignRight, AlignHeader: text.AlignRight})
	}
	t.SetColumnConfigs(right)
	fmt.Fprintln(a.out, t.Render())
	fmt.Fprintf(a.out, "best first by %s; a road with an open error comes after all without\n", byWords(d.By))
}

// tellRankingPlain prints the same as records, bare figures in SI.
func (a *app) tellRankingPlain(d *wire.CompareDoc) {
	for i, c := range d.Alternatives {
		fields := []string{"rank", fmt.Sprint(i + 1), c.Name, c.Status, bare(float64(c.Length))}
		for _, v := range []*wire.Volume{c.CutBank, c.FillCompacted, c.Strip, c.Balance, c.Cost} {
			text := ""
			if v != nil {
				text = bare(float64(*v))
			}
			fields = append(fields, text)
		}
		fields = append(fields, fmt.Sprint(c.Culverts), fmt.Sprint(c.Counts.E), fmt.Sprint(c.Counts.W), fmt.Sprint(c.Counts.N), textOf(c.Worst))
		fmt.Fprintln(a.out, strings.Join(fields, "\t"))
	}
}

// tellDifferences prints the figures that differ between two runs, without
// those of long lists, which are only counted.
func (a *app) tellDifferences(d *wire.CompareDoc, first, second string) {
	if !a.opt.Plain {
		fmt.Fprintf(a.out, "\nfigures that differ, %s → %s\n", first, second)
	}
	long := 0
	for _, x := range d.Differences {
		before, after := valueWords(x.Values[first]), valueWords(x.Values[second])
		switch {
		case a.opt.Plain:
			fmt.Fprintf(a.out, "difference\t%s\t%s\t%s\n", x.Path, before, after)
		case isDetail(x.Path):
			long++
		default:
			fmt.Fprintf(a.out, "  %-52s %s → %s\n", x.Path, before, after)
		}
	}
	if long > 0 {
		fmt.Fprintf(a.out, "  and %d figures of sections, intervals and ordinates (--plain or --json lists all)\n", long)
	}
	if len(d.Differences) == 0 && !a.opt.Plain {
		fmt.Fprintln(a.out, "  none")
	}
}

// isDetail tells the lists that a terminal does not show figure by figure.
func isDetail(path string) bool {
	for _, d := range [...]string{"sections[", "earthwork.intervals[", "earthwork.mass.", "cover_profile["} {
		if strings.Contains(path, d) {
			return true
		}
	}
	return false
}

// valueWords prints a figure of a document, or what stands for none.
func valueWords(v any) string {
	switch v := v.(type) {
	case nil:
		return "–"
	case float64:
		return strings.TrimRight(strings.TrimRight(fmt.Sprintf("%.6f", v), "0"), ".")
	case map[string]any, []any:
		return "(present)"
	}
	return fmt.Sprint(v)
}

func volumeWords(p quantity.Profile, v *wire.Volume) string {
	if v == nil {
		return "–"
	}
	return p.Volume(float64(*v))
}

func moneyWords(p quantity.Profile, v *wire.Volume) string {
	if v == nil {
		return "–"
	}
	return p.Money(float64(*v))
}

func textOf(s *string) string {
	if s == nil {
		return ""
	}
	return *s
}

// given returns what a pointer holds, and nothing for null.
func given[T any](p *T) (v T) {
	if p != nil {
		v = *p
	}
	return v
}
