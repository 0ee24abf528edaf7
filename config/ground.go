package config

import (
	"fmt"
	"math"
	"path/filepath"

	"sagcrest/config/diag"
	"sagcrest/config/points"
	"sagcrest/config/quantity"
	"sagcrest/config/raster"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// Ground is the survey of a project as it was read, in metres: points, a
// raster or section lines, whichever the project names.
type Ground struct {
	Points []terrain.Point
	Raster *terrain.Raster
	Lines  []section.SurveyLine
	// Grid is what the file of a raster says about itself, for the echo of
	// inputs; nil for other surveys. Its levels are those of Raster.
	Grid *raster.Raster
	// Inputs are the files that were read.
	Inputs []Input
}

// LoadGround reads the survey that a project names, from its path relative to
// the project file. A missing file is F01 at the key that names it; every
// other problem is one of the survey file's own lines, but for U01.
func LoadGround(files Files, p *Project) (Ground, []diag.Problem) {
	key := "survey." + string(p.Survey.Kind)
	path := filepath.FromSlash(p.Survey.Path)
	if !filepath.IsAbs(path) {
		path = filepath.Join(filepath.Dir(p.File()), path)
	}
	data, err := files(path)
	if err != nil {
		n, _ := p.root.locate(key)
		message := fmt.Sprintf("%s: %s cannot be read: %v", key, p.Survey.Path, reason(err))
		return Ground{}, []diag.Problem{p.document.problem("F01", n.at, key, message, "the path is relative to the project file")}
	}
	g := Ground{Inputs: []Input{newInput(filepath.ToSlash(p.Survey.Path), data)}}
	options := points.Options{Order: p.Survey.Order, Unit: p.Survey.Units.Metres()}
	var problems []diag.Problem
	switch p.Survey.Kind {
	case SurveyPoints:
		g.Points, problems = points.Read(path, data, options)
	case SurveySections:
		g.Lines, problems = points.ReadLines(path, data, options, p.Labels)
	case SurveyGrid:
		g.Grid, problems = raster.Read(path, data, raster.Options{Unit: p.Survey.Units.Metres()})
		if g.Grid != nil {
			g.Raster = &g.Grid.Levels
		}
	}
	p.placeOrder(problems)
	if which := p.whichFoot(g); which != nil {
		problems = append(problems, *which)
	}
	return g, problems
}

// placeOrder moves what is wrong with the declared order, which the reader of
// the points finds, to the line of the project file that declares it.
func (p *Project) placeOrder(problems []diag.Problem) {
	for i, q := range problems {
		if q.Key == "survey.order" && q.Line == 0 {
			n, _ := p.root.locate(q.Key)
			problems[i] = p.document.problem(q.Code, n.at, q.Key, q.Message, q.Help)
		}
	}
}

// whichFoot refuses a survey on map coordinates in a foot that nobody named
// (U01). Section lines have no map coordinates.
func (p *Project) whichFoot(g Ground) *diag.Problem {
	if p.Survey.Units != quantity.FeetUnsaid {
		return nil
	}
	largest := 0.0
	for _, pt := range g.Points {
		largest = max(largest, math.Abs(pt.E), math.Abs(pt.N))
	}
	if g.Raster != nil {
		largest = max(math.Abs(g.Raster.West), math.Abs(g.Raster.North))
	}
	largest /= p.Survey.Units.Metres()
	if largest <= quantity.MapCoordinate {
		return nil
	}
	key := "survey.units"
	if n, depth := p.root.locate(key); depth < 2 || n == nil {
		key = "units"
	}
	n, _ := p.root.locate(key)
	problem := p.document.problem("U01", n.at, key, fmt.Sprintf(`the survey is in "ft" on map coordinates (up to %s ft): which foot is unsaid`, quantity.Decimal(largest, 0)),
		`write "international feet" or "us survey feet"`)
	return &problem
}
