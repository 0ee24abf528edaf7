package study

import (
	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// geometry lays alignment, grade line, ground and road. Without any of them no
// geometry follows and the road is nil.
func geometry(o *Opened) (*section.Road, []finding.Finding) {
	p := o.Project
	line, found := alignment.New(p.Alignment)
	grade, more := profile.New(p.PVI)
	found = append(found, more...)
	if line == nil || grade == nil {
		return nil, found
	}
	found = append(found, grade.CheckTable(p.CurveTable)...)
	found = append(found, grade.CheckTieIns(p.TieIns)...)
	ground, more := lay(o, line)
	found = append(found, more...)
	if ground == nil {
		return nil, found
	}
	road, more := section.NewRoad(section.Parts{
		Line: line, Grade: grade, Ground: ground,
		Typicals: p.Typicals, Strata: p.Strata, Table: p.Superelevation, Strip: p.Request.Stripping,
	})
	return road, append(found, more...)
}

// lay makes the one ground of the project from what was surveyed.
func lay(o *Opened, line *alignment.Alignment) (section.Ground, []finding.Finding) {
	g, acc := o.Ground, o.Project.Survey.Accuracy
	switch {
	case g.Raster != nil:
		grid, err := terrain.NewGrid(*g.Raster, acc)
		if err != nil {
			return nil, []finding.Finding{{Code: "F02", Severity: finding.Error,
				At: finding.Place{Key: "survey.grid"}, Args: []any{err.Error()}}}
		}
		return section.OnSurface(grid, line), nil
	case g.Lines != nil:
		return section.Surveyed(g.Lines, line), nil
	}
	tri, found := terrain.Triangulate(g.Points, acc)
	if tri == nil {
		return nil, found
	}
	return section.OnSurface(tri, line), found
}
