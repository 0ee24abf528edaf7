package report

import (
	"fmt"
	"strings"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/config/quantity"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// echoTables lists what the project says, to be ticked against its sources.
func (s *sheets) echoTables() []*table.Table {
	return []*table.Table{s.echo(), s.typicalsEcho(), s.layersEcho(), s.crossfallsEcho(), s.pvisEcho(), s.tieInsEcho(),
		s.obstaclesEcho(), s.culvertsEcho(), s.limitsEcho()}
}

func (s *sheets) echo() *table.Table {
	t := &table.Table{Name: "echo", Title: "Project and survey", Tick: true, Columns: []table.Column{words("what", "input"), words("value", "as read")}}
	p := s.o.Project
	row := func(what, format string, args ...any) {
		t.Add(table.Words(what), table.Words(fmt.Sprintf(format, args...)))
	}
	l := func(v float64) string { return s.paper.Length(v) + " " + s.paper.LengthUnit() }
	row("units of the project", "%s", p.Units)
	row("label of the first point", "%s", p.Labels.Format(0))
	row("ground", "%s, %s", p.Survey.Kind, p.Survey.Path)
	if len(p.Survey.Order) > 0 {
		row("order of its columns", "%s", strings.Join(p.Survey.Order, ", "))
	}
	row("units of the survey", "%s", p.Survey.Units)
	row("vertical datum", "%s", p.Survey.VerticalDatum)
	if p.Survey.CRS != "" {
		row("coordinate system", "%s", p.Survey.CRS)
	}
	req := p.Request
	row("paid by", "%s, every %s %s of the labels, key points %s", methodName(string(req.Method)), s.paper.Count(req.PayStep), labelUnit(p.Labels), onOff(req.KeyPoints))
	row("strip depth, margin", "%s, %s; billed %s", l(req.Stripping.Depth), l(req.Stripping.Margin), stripWords(string(p.StripBasis)))
	for _, x := range req.Exclusions {
		row("exception", "%s to %s: %s", p.Labels.Format(x.Over.From), p.Labels.Format(x.Over.To), x.Reason)
	}
	for _, x := range req.Extras {
		at := p.Labels.Format(x.Over.From)
		if !x.Point {
			at += " to " + p.Labels.Format(x.Over.To)
		}
		row("by hand", "%s: %s %s at %s %s", x.Item, s.paper.Count(x.Quantity), x.Unit, at, x.Note)
	}
	for _, m := range p.Strata {
		row("stratum "+string(m.Material), "top %s below the stripped ground, %s", l(m.Top), s.stretch(m.Over.From, m.Over.To))
	}
	if p.DesignSpeed > 0 {
		row("design speed", "%s %s (kept, without effect in this version)", s.paper.Speed(p.DesignSpeed), s.paper.SpeedUnit())
	}
	return t
}

// labelUnit names the unit in which stations are labelled.
func labelUnit(l station.Labels) string {
	if l.US() {
		return "ft"
	}
	return "m"
}

func onOff(b bool) string {
	if b {
		return "on"
	}
	return "off"
}

func stripWords(basis string) string {
	if basis == "in_cut" {
		return "as excavation"
	}
	return "as an item of its own"
}

func (s *sheets) typicalsEcho() *table.Table {
	t := &table.Table{Name: "typicals", Title: "Typical sections", Tick: true, Columns: []table.Column{
		words("name", "name"), words("over", "stretch"), words("side", "side"), s.length("lane", "lane"), inPercent("lane_fall", "crossfall"),
		s.length("shoulder", "shoulder"), inPercent("shoulder_fall", "crossfall"), words("slopes", "side slopes, H:V"), words("ditch", "ditch"),
		s.length("pavement", "pavement"), s.length("dressing", "dressing"), words("material", "material")}}
	for _, ty := range s.o.Road.Typicals() {
		for _, side := range []struct {
			name string
			half section.Side
		}{{"left", ty.Left}, {"right", ty.Right}} {
			f := func(v float64) table.Cell { return table.Figure(v, s.paper.Length(v)) }
			pct := func(v float64) table.Cell { return table.Figure(100*v, s.paper.Grade(v)) }
			t.Add(table.Words(ty.Name), table.Words(s.stretch(ty.Over.From, ty.Over.To)), table.Words(side.name),
				f(side.half.Lane.Width), pct(side.half.Lane.Crossfall), f(side.half.Shoulder.Width), pct(side.half.Shoulder.Crossfall),
				table.Words(fmt.Sprintf("cut %s, fill %s", quantity.Decimal(ty.CutSlope, 2), quantity.Decimal(ty.FillSlope, 2))),
				table.Words(s.ditchWords(ty.Ditch)), f(ty.Pavement), f(ty.Dressing), table.Words(string(ty.Material)))
		}
	}
	return t
}

// crossfallsEcho lists the superelevation table.
func (s *sheets) crossfallsEcho() *table.Table {
	t := &table.Table{Name: "superelevation", Title: "Superelevation, linear between the rows", Tick: true, Columns: []table.Column{
		placeCol("station", "station"), inPercent("left_shoulder", "left shoulder"), inPercent("left_lane", "left lane"),
		inPercent("right_lane", "right lane"), inPercent("right_shoulder", "right shoulder")},
		Note: "Crossfall: rise to the right; about the reference line. Outside the rows the typical section's own hold."}
	for _, c := range s.o.Road.Superelevation() {
		pct := func(v float64) table.Cell { return table.Figure(100*v, s.paper.Grade(v)) }
		t.Add(s.at(c.At), pct(c.LeftShoulder), pct(c.LeftLane), pct(c.RightLane), pct(c.RightShoulder))
	}
	return t
}

func (s *sheets) ditchWords(d *section.Ditch) string {
	if d == nil {
		return "none"
	}
	text := fmt.Sprintf("%s deep, fore slope %s, bottom %s", s.paper.Length(d.Depth), quantity.Decimal(d.ForeSlope, 2), s.paper.Length(d.Bottom))
	if d.BackSlope > 0 {
		text += ", back slope " + quantity.Decimal(d.BackSlope, 2)
	}
	return text
}

func (s *sheets) pvisEcho() *table.Table {
	t := &table.Table{Name: "pvis", Title: "PVIs as given", Tick: true, Columns: []table.Column{
		placeCol("station", "station"), s.length("elev", "level"), words("size", "curve given by")}}
	for _, p := range s.o.Project.PVI {
		size := "no curve"
		switch {
		case p.Length > 0:
			size = "length " + s.paper.Length(p.Length)
		case p.K > 0:
			size = "K " + s.paper.K(p.K)
		case p.Radius > 0:
			size = "radius " + s.paper.Length(p.Radius)
		}
		t.Add(s.at(p.At), table.Figure(p.Elev, s.paper.Elevation(p.Elev)), table.Words(size))
	}
	return t
}

// echoWords says who must be asked about what is missing.
func (s *sheets) echoWords() (out []string) {
	p := s.o.Project
	var missing []string
	for _, field := range [][2]string{{"revision", p.Revision}, {"date", p.Date}, {"originator", p.Originator}, {"checker", p.Checker}} {
		if field[1] == "" {
			missing = append(missing, field[0])
		}
	}
	if len(missing) > 0 {
		out = append(out, "Not given in the project file, to be filled in by hand in the title block: "+strings.Join(missing, ", ")+".")
	}
	return out
}
