package report

import (
	"fmt"
	"html/template"

	"sagcrest/cmd/sagcrest/internal/plot"
	"sagcrest/drainage"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// drawn finishes a figure.
func drawn(title, note string, svg string, err error) ([]figureOf, error) {
	if err != nil {
		return nil, err
	}
	return []figureOf{{title, template.HTML(svg), note}}, nil
}

func (s *sheets) label(x float64) string {
	return s.o.Project.Labels.Format(station.Station(x))
}

// gradeFigure draws the long profile and the mass diagram.
func (s *sheets) gradeFigure() ([]figureOf, error) {
	g := plot.Grade{ID: "grade-line-drawing", Title: "Grade line of " + s.o.Project.Title, LevelUnit: s.paper.LengthUnit(),
		Label: s.label, Level: s.paper.Elevation, Stations: s.stationScale(), Levels: s.lengthScale(), Spans: s.spans(), Ground: LongGround(s.o.Road), Line: GradeLine(s.o.Road)}
	for i, c := range s.o.Road.Grade().Curves() {
		g.PVIs = append(g.PVIs, plot.Mark{X: float64(c.PVI.At), Y: c.PVI.Elev, Name: fmt.Sprintf("PVI %d", i+1)})
		if c.Length > 0 {
			g.Ends = append(g.Ends, plot.Mark{X: float64(c.PVC.At), Y: c.PVC.Elev}, plot.Mark{X: float64(c.PVT.At), Y: c.PVT.Elev})
		}
	}
	for _, t := range s.o.Turnings {
		if t.Line != section.Centre {
			continue
		}
		name := "high "
		if t.Low {
			name = "low "
		}
		name += s.label(float64(t.At)) + "  " + s.paper.Elevation(t.Elev)
		g.Turns = append(g.Turns, plot.Turn{Mark: plot.Mark{X: float64(t.At), Y: t.Elev, Name: name}, Low: t.Low})
	}
	for _, l := range s.o.Culverts {
		if l.Ended {
			g.Culverts = append(g.Culverts, plot.Mark{X: float64(l.At), Y: (l.Ends[0].Invert + l.Ends[1].Invert) / 2, Name: l.Culvert.ID})
		}
	}
	for _, c := range s.o.Project.Obstacles {
		g.Windows = append(g.Windows, plot.Window{X0: float64(c.Over.From), X1: float64(c.Over.To), Y0: c.ElevFrom, Y1: c.ElevTo, Name: c.Name})
	}
	s.massMarks(&g)
	svg, err := g.Draw()
	return drawn("Grade line and mass diagram", "triangles: PVIs; short strokes: ends of curves; discs: low and high points of the centre line; band: grades, and at curves the PVI, its level, length L and K", svg, err)
}

func (s *sheets) massMarks(g *plot.Grade) {
	m := s.o.Quantities.Mass
	if m == nil || s.r.Result.Earthwork.Mass.Ordinates == nil {
		return
	}
	g.MassTitle = "mass ordinates, " + s.paper.VolumeUnit() + " " + string(m.State) + ", rising in cut; discs: balance points"
	g.Volume, g.Volumes = s.paper.Volume, s.volumeScale()
	for i, at := range m.Stations {
		g.Mass = append(g.Mass, plot.Pt{X: float64(at), Y: m.Values[i]})
	}
	for _, at := range m.BalancePoints() {
		g.Balance = append(g.Balance, plot.Mark{X: float64(at), Name: s.label(float64(at))})
	}
}

// GradeLine returns the grade line for drawings: straight between ends of
// tangents, every two metres along curves.
func GradeLine(r *section.Road) (out []plot.Pt) {
	const every = 2.0
	for _, p := range r.Grade().Pieces() {
		n := 1.0
		if p.R != 0 {
			n = max(1, p.Over.Length()/every)
		}
		for i := 0.0; i < n; i++ {
			at := p.Over.From + station.Station(i/n*p.Over.Length())
			z, _ := p.At(at)
			out = append(out, plot.Pt{X: float64(at), Y: z})
		}
	}
	z, _, _ := r.Grade().At(r.Grade().To())
	return append(out, plot.Pt{X: float64(r.Grade().To()), Y: z})
}

// LongGround returns the ground under the reference line for drawings, its
// points at least a metre apart.
func LongGround(r *section.Road) (out []plot.Pt) {
	var w section.Scratch
	for _, p := range r.LongGround(&w) {
		if n := len(out); n > 0 && p.O-out[n-1].X < 1 {
			continue
		}
		out = append(out, plot.Pt{X: p.O, Y: p.Z})
	}
	return out
}

// planStations is how many stations a plan names at most: more would stand on
// each other along the width of its sheet.
const planStations = 20

// planFigure draws the alignment from above.
func (s *sheets) planFigure() ([]figureOf, error) {
	line := s.o.Road.Line()
	point := func(at station.Station, o float64) plot.Pt {
		p := line.Point(at, station.Offset(o))
		return plot.Pt{X: p[0], Y: p[1]}
	}
	p := plot.Plan{ID: "plan-drawing", Title: "Plan of " + s.o.Project.Title,
		Scale: s.lengthScale(), Unit: s.paper.LengthUnit(), Length: s.paper.Length}
	for at := s.o.Road.Over().From; at < s.o.Road.Over().To; at += 5 {
		p.Line = append(p.Line, point(at, 0))
	}
	p.Line = append(p.Line, point(s.o.Road.Over().To, 0))
	for i := range s.o.Slices {
		if c := &s.o.Slices[i]; c.OK {
			p.Left = append(p.Left, point(c.At, c.Left.Catch.O))
			p.Right = append(p.Right, point(c.At, c.Right.Catch.O))
		}
	}
	for _, side := range [][]section.Limit{s.o.Project.RightOfWay.Left, s.o.Project.RightOfWay.Right} {
		var l []plot.Pt
		for i := range side {
			l = append(l, limitPoints(side, i, point)...)
		}
		if len(l) > 1 {
			p.Limits = append(p.Limits, l)
		}
	}
	for _, at := range s.stationScale().Marks(float64(s.o.Road.Over().From), float64(s.o.Road.Over().To), planStations) {
		q := point(station.Station(at), 0)
		p.Stations = append(p.Stations, plot.Mark{X: q.X, Y: q.Y, Name: s.label(at)})
	}
	for _, e := range line.Elements()[1:] {
		q := point(e.Over.From, 0)
		p.Ends = append(p.Ends, plot.Mark{X: q.X, Y: q.Y, Name: string(e.Kind)})
	}
	for _, l := range s.o.Culverts {
		if l.Ended {
			p.Barrels = append(p.Barrels, [2]plot.Pt{point(l.Ends[0].At, float64(l.Ends[0].Offset)), point(l.Ends[1].At, float64(l.Ends[1].Offset))})
			p.BarrelNames = append(p.BarrelNames, l.Culvert.ID)
		}
	}
	svg, err := p.Draw()
	return drawn("Plan", "", svg, err)
}

// limitPoints returns a corner of the right of way and, up to the next one, a
// point every 20 m, since the line bends with the alignment.
func limitPoints(side []section.Limit, i int, point func(station.Station, float64) plot.Pt) (out []plot.Pt) {
	out = append(out, point(side[i].At, float64(side[i].Offset)))
	if i+1 == len(side) {
		return out
	}
	a, b := side[i], side[i+1]
	for at := a.At + 20; at < b.At; at += 20 {
		t := float64((at - a.At) / (b.At - a.At))
		out = append(out, point(at, float64(a.Offset)+t*float64(b.Offset-a.Offset)))
	}
	return out
}

// perSheet is how many sections stand on one drawing: four rows of three.
const perSheet = 12

// sectionFigures draws every slice.
func (s *sheets) sectionFigures() (out []figureOf, err error) {
	for from := 0; from < len(s.o.Slices); from += perSheet {
		to := min(from+perSheet, len(s.o.Slices))
		sheet := plot.CrossSheet{ID: fmt.Sprintf("sections-%d", from/perSheet+1), Across: 3, Unit: s.paper.LengthUnit(), Scale: s.lengthScale(), Offset: s.paper.Length,
			Title: fmt.Sprintf("Sections %s to %s", s.label(float64(s.o.Slices[from].At)), s.label(float64(s.o.Slices[to-1].At)))}
		for i := from; i < to; i++ {
			sheet.Sections = append(sheet.Sections, s.cross(&s.o.Slices[i]))
		}
		svg, err := sheet.Draw()
		if err != nil {
			return nil, err
		}
		out = append(out, figureOf{sheet.Title, template.HTML(svg), ""})
	}
	return out, nil
}

func (s *sheets) cross(c *section.Slice) plot.Cross {
	outline := s.o.Road.Outline(c)
	depth := s.o.Road.Strip().Depth
	x := plot.Cross{Title: s.label(float64(c.At)), Ground: points(c.GroundLine, 0), Stripped: points(c.GroundLine, depth),
		Finished: points(outline.Finished, 0), Earthwork: points(outline.Earthwork, 0)}
	x.Below = "no areas: " + s.none("earthwork.totals.cut_bank").Paper
	if c.OK {
		x.Below = fmt.Sprintf("finished %s   cut %s %s   fill %s %s", s.paper.Elevation(c.Finished), s.paper.Area(c.Cut.Area), s.paper.AreaUnit(),
			s.paper.Area(c.Fill.Area), s.paper.AreaUnit())
	}
	for _, f := range []section.Flank{c.Left, c.Right} {
		if c.OK {
			name := s.paper.Length(f.Catch.O) + " / " + s.paper.Elevation(f.Catch.Z)
			x.Catches = append(x.Catches, plot.Catch{Mark: plot.Mark{X: f.Catch.O, Y: f.Catch.Z, Name: name}, Below: !f.Cut})
		}
	}
	return x
}

func points(in []section.Point, drop float64) []plot.Pt {
	out := make([]plot.Pt, len(in))
	for i, p := range in {
		out[i] = plot.Pt{X: p.O, Y: p.Z - drop}
	}
	return out
}

// barrelFigures draws every culvert along its barrel.
func (s *sheets) barrelFigures() (out []figureOf, err error) {
	var w section.Scratch
	for i := range s.o.Culverts {
		l := &s.o.Culverts[i]
		d, ok := l.Draw(s.o.Road, &w)
		if !ok || s.r.Result.Drainage.Culverts[i].CoverMin == nil {
			continue
		}
		svg, err := s.barrel(i, l, d).Draw()
		if err != nil {
			return nil, err
		}
		out = append(out, figureOf{"Culvert " + l.Culvert.ID + " along its barrel", template.HTML(svg), "upright lines: where cover is judged"})
	}
	return out, nil
}

func (s *sheets) barrel(i int, l *drainage.Laid, d drainage.Drawing) plot.Barrel {
	spots := func(in []drainage.Spot) []plot.Pt {
		out := make([]plot.Pt, len(in))
		for k, p := range in {
			out[k] = plot.Pt{X: p.X, Y: p.Z}
		}
		return out
	}
	unit := " " + s.paper.LengthUnit()
	b := plot.Barrel{ID: fmt.Sprintf("culvert-%d", i+1), Title: "Culvert " + l.Culvert.ID, Unit: s.paper.LengthUnit(), Level: s.paper.Elevation,
		Length: s.paper.Length, Scale: s.lengthScale(),
		Ground: spots(d.Ground), Surface: spots(d.Surface), Datum: spots(d.Datum), Invert: spots(d.Invert), Soffit: spots(d.Soffit), Crown: spots(d.Crown),
		Hinges: d.Hinges, Least: plot.Pt{X: d.Least.X, Y: d.Least.Z}, Cover: l.Least.Cover(), Required: l.Required,
		CoverWords: fmt.Sprintf("cover %s%s, required %s%s", s.paper.Length(l.Least.Cover()), unit, s.paper.Length(l.Required), unit)}
	words := func(e drainage.End) string {
		name := map[int]string{-1: "left", 1: "right"}[e.Side]
		switch l.InletSide {
		case e.Side:
			name += ", inlet"
		case -e.Side:
			name += ", outlet"
		}
		return name + " invert " + s.paper.Elevation(e.Invert)
	}
	b.LeftWords, b.RightWords = words(l.Ends[0]), words(l.Ends[1])
	return b
}
