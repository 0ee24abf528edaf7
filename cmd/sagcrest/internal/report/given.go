package report

import (
	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/drainage"
	"sagcrest/section"
)

// What the project gives beside its typical sections and grade line, to be
// ticked against its sources: these figures are set against results further on,
// where only the outcome of the comparison stands.

// layersEcho lists the pavement of sections that name its layers.
func (s *sheets) layersEcho() *table.Table {
	t := &table.Table{Name: "layers", Title: "Pavement layers, from the top", Tick: true, Columns: []table.Column{
		words("section", "typical section"), words("layer", "layer"), s.length("thickness", "thickness"), words("bound", "bound")},
		Note: "A cover rule that counts to the underside of the pavement takes off the bound layers only."}
	for _, ty := range s.o.Road.Typicals() {
		for _, l := range ty.Layers {
			bound := "no"
			if l.Bound {
				bound = "yes"
			}
			t.Add(table.Words(ty.Name), table.Words(l.Name), table.Figure(l.Thickness, s.paper.Length(l.Thickness)), table.Words(bound))
		}
	}
	return t
}

func (s *sheets) tieInsEcho() *table.Table {
	t := &table.Table{Name: "tie_ins", Title: "What the ends must meet", Tick: true, Columns: []table.Column{
		words("name", "name"), words("end", "end"), s.length("elev", "level"), inPercent("grade", "grade")}}
	for _, x := range s.o.Project.TieIns {
		end, grade := "start", table.None("–")
		if x.AtEnd {
			end = "end"
		}
		if x.Grade != nil {
			grade = table.Figure(100**x.Grade, s.paper.Grade(*x.Grade))
		}
		t.Add(table.Words(x.Name), table.Words(end), table.Figure(x.Elev, s.paper.Elevation(x.Elev)), grade)
	}
	return t
}

func (s *sheets) obstaclesEcho() *table.Table {
	t := &table.Table{Name: "obstacles", Title: "Obstacles to stay clear of", Tick: true, Columns: []table.Column{
		words("name", "name"), words("side", "road passes"), placeCol("from", "from"), placeCol("to", "to"),
		s.length("elev_from", "level at from"), s.length("elev_to", "level at to"), words("across", "offsets"), s.length("gap", "wanted gap")}}
	for _, x := range s.o.Project.Obstacles {
		side := "over"
		if x.Under {
			side = "under"
		}
		t.Add(table.Words(x.Name), table.Words(side), s.at(x.Over.From), s.at(x.Over.To), table.Figure(x.ElevFrom, s.paper.Elevation(x.ElevFrom)),
			table.Figure(x.ElevTo, s.paper.Elevation(x.ElevTo)), table.Words(s.acrossWords(x)), table.Figure(x.Gap, s.paper.Length(x.Gap)))
	}
	return t
}

// acrossWords says how far an obstacle reaches across the road.
func (s *sheets) acrossWords(x section.Obstacle) string {
	left, right := "left hinge", "right hinge"
	if x.Left != nil {
		left = s.paper.Offset(*x.Left)
	}
	if x.Right != nil {
		right = s.paper.Offset(*x.Right)
	}
	return left + " to " + right
}

func (s *sheets) culvertsEcho() *table.Table {
	t := &table.Table{Name: "culverts_given", Title: "Culverts as given", Tick: true, Columns: []table.Column{
		words("id", "id"), words("place", "placed"), words("skew", "skew"), words("inlet", "inlet side"), words("size", "barrels and inside size"),
		words("spacing", "clear distance"), words("rule", "cover"), words("inverts", "inverts, inlet and outlet")}}
	for i := range s.o.Culverts {
		c := &s.o.Culverts[i].Culvert
		place := "–"
		if c.Station != nil {
			place = "at " + s.o.Project.Labels.Format(*c.Station)
		} else if c.Between != nil {
			place = "lowest ground, " + s.o.Project.Labels.Format(c.Between.From) + " to " + s.o.Project.Labels.Format(c.Between.To)
		}
		w := &s.r.Result.Drainage.Culverts[i]
		t.Add(table.Words(c.ID), table.Words(place), table.Words(s.skewWords(w)), table.Words(inletWords(c)), table.Words(s.sizeWords(w)),
			table.Words(s.spacingWords(c)), table.Words(s.coverWords(c)), table.Words(s.invertWords(c)))
	}
	return t
}

func inletWords(c *drainage.Culvert) string {
	switch {
	case c.InletSide < 0:
		return "left"
	case c.InletSide > 0:
		return "right"
	}
	return "unsaid: the end of higher ground"
}

func (s *sheets) spacingWords(c *drainage.Culvert) string {
	switch {
	case c.Barrels < 2:
		return "–"
	case c.Spacing == nil:
		return "unsaid: one outside diameter or span"
	}
	return s.paper.Length(*c.Spacing) + " " + s.paper.LengthUnit()
}

// coverWords writes the rule of a culvert, the project's own figure, or both.
func (s *sheets) coverWords(c *drainage.Culvert) string {
	text := c.Rule
	if c.Cover != nil {
		if text != "" {
			text += ", "
		}
		text += s.paper.Length(*c.Cover) + " " + s.paper.LengthUnit()
	}
	if c.CoverDatum != "" {
		text += ", to " + datumWords(c.CoverDatum)
	}
	return text
}

func (s *sheets) invertWords(c *drainage.Culvert) string {
	if c.InletInvert == nil || c.OutletInvert == nil {
		return "unsaid: the ground at the two ends"
	}
	return s.paper.Elevation(*c.InletInvert) + ", " + s.paper.Elevation(*c.OutletInvert)
}

func (s *sheets) limitsEcho() *table.Table {
	t := &table.Table{Name: "right_of_way", Title: "Right of way, straight between the rows", Tick: true, Columns: []table.Column{
		words("side", "side"), placeCol("station", "station"), s.length("offset", "offset")}}
	add := func(side string, limits []section.Limit) {
		for _, l := range limits {
			t.Add(table.Words(side), s.at(l.At), table.Figure(float64(l.Offset), s.paper.Offset(l.Offset)))
		}
	}
	add("left", s.o.Project.RightOfWay.Left)
	add("right", s.o.Project.RightOfWay.Right)
	return t
}
