package main

import (
	"bytes"
	"context"
	_ "embed"
	"fmt"
	"html/template"

	"sagcrest/cmd/sagcrest/internal/plot"
	"sagcrest/cmd/sagcrest/internal/report"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/quantity"
	"sagcrest/profile/station"
)

//go:embed compare.tmpl
var comparePage string

// comparisonData is what the page of a comparison shows.
type comparisonData struct {
	Title, By string
	Tool      wire.Tool
	Doc       *wire.CompareDoc
	Currency  string
	Drawing   template.HTML
	Rows      []comparisonRow
}

// comparisonRow is a road as people read it.
type comparisonRow struct {
	Name, Length, Cut, Fill, Balance, Cost, Counts, Worst string
	Place, Culverts                                       int
}

// writeComparison writes the page and the document of a comparison where
// --out names a folder; else there is no plan.
func (a *app) writeComparison(ctx context.Context, d *wire.CompareDoc, roads []contender) (*plan, string, error) {
	if a.opt.Out == "" {
		return nil, "", nil
	}
	page, err := pageOf(d, roads)
	if err != nil {
		return nil, "", faultError{err}
	}
	document, err := wire.Encode(d)
	if err != nil {
		return nil, "", faultError{err}
	}
	var read []string
	for _, r := range roads {
		if r.outcome != nil {
			read = append(read, inputs(r.outcome.Opened)...)
		}
	}
	return a.writeFolder(ctx, a.opt.Out, ofComparison(), []outputFile{{"compare.html", page}, {ofComparison().name, document}}, read)
}

// pageOf makes one self-contained page.
func pageOf(d *wire.CompareDoc, roads []contender) ([]byte, error) {
	t, err := template.New("compare").Parse(comparePage)
	if err != nil {
		return nil, err
	}
	data := comparisonData{Title: "Comparison", By: byWords(d.By), Tool: d.Tool, Doc: d, Currency: textOf(d.Basis.Currency)}
	if o := roads[0].outcome; o != nil {
		data.Title = o.Project.Title
	}
	if data.Drawing, err = drawn(roads); err != nil {
		return nil, err
	}
	paper, _ := quantity.NewProfile(quantity.MetricColumn, quantity.Metric)
	for i, c := range d.Alternatives {
		data.Rows = append(data.Rows, comparisonRow{
			c.Name, paper.Length(float64(c.Length)), volumeWords(paper, c.CutBank), volumeWords(paper, c.FillCompacted),
			volumeWords(paper, c.Balance), moneyWords(paper, c.Cost), countsWords(c.Counts), textOf(c.Worst), i + 1, c.Culverts,
		})
	}
	var b bytes.Buffer
	err = t.Execute(&b, data)
	return b.Bytes(), err
}

// drawn draws the grade lines over each other on the ground of the first road.
// Roads of which only the results were read have no lines to draw.
func drawn(roads []contender) (template.HTML, error) {
	a := plot.Alternatives{ID: "alternatives", Title: "Grade lines of the alternatives"}
	for _, r := range roads {
		o := r.outcome
		if o == nil {
			continue
		}
		if a.Lines == nil {
			paper := o.Project.Paper()
			a.LevelUnit, a.Level = paper.LengthUnit(), paper.Elevation
			a.Label = func(x float64) string { return o.Project.Labels.Format(station.Station(x)) }
			a.Ground = report.LongGround(o.Road)
		}
		a.Lines = append(a.Lines, plot.Named{Name: r.name, Line: report.GradeLine(o.Road)})
	}
	if a.Lines == nil {
		return "", nil
	}
	svg, err := a.Draw()
	return template.HTML(svg), err
}

// tellComparisonFolder says what was written, or would be.
func (a *app) tellComparisonFolder(done *plan, aside string) {
	if !a.opt.Plain && !a.opt.Quiet {
		fmt.Fprintln(a.out)
	}
	a.tellSteps(a.out, done)
	if aside != "" && !a.opt.Quiet {
		fmt.Fprintf(a.out, "  what was there before is kept in %s\n", aside)
	}
}

// byWords says by what roads are ranked.
func byWords(by string) string {
	if by == "cost" {
		return "cost"
	}
	return "volume to be moved, cut and fill"
}

func countsWords(c wire.Counts) string { return fmt.Sprintf("%d/%d/%d", c.E, c.W, c.N) }
