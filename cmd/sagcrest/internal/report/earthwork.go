package report

import (
	"fmt"
	"strings"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

func (s *sheets) sectionsTable() *table.Table {
	t := &table.Table{Name: "sections", Title: "Sections and areas", Tick: true, Columns: []table.Column{
		placeCol("station", "station"), words("why", "cut because of"), s.length("ground", "ground"), s.length("finished", "finished"),
		s.length("subgrade", "subgrade"), s.area("cut", "cut"), s.area("fill", "fill"), s.length("strip_width", "strip width"),
		s.length("left_catch", "left catch, offset"), s.length("left_catch_elev", "level"),
		s.length("right_catch", "right catch, offset"), s.length("right_catch_elev", "level")},
		Note: "Areas between stripped ground and earthwork line. Levels of ground, finished surface and subgrade at the reference line; catch points with the original ground."}
	for i, c := range s.r.Result.Sections {
		row := "sections[%d]"
		cell := func(v *wire.Fine, key string) table.Cell { return s.fine(v, path(row, i, key), s.paper.Elevation) }
		lo, lz := s.catch(c.LeftCatch, path(row, i, "left_catch"))
		ro, rz := s.catch(c.RightCatch, path(row, i, "right_catch"))
		why := c.Why
		if !c.Pay {
			why += " (not paid)"
		}
		at := table.At(c.Place)
		at.ID = sectionID(i)
		t.Add(at, table.Words(why), cell(c.GroundElev, "ground_elev"), figure(c.FinishedElev, s.paper.Elevation),
			cell(c.SubgradeElev, "subgrade_elev"), s.fine(c.CutArea, path(row, i, "cut_area"), s.paper.Area),
			s.fine(c.FillArea, path(row, i, "fill_area"), s.paper.Area), cell(c.StripWidth, "strip_width"), lo, lz, ro, rz)
	}
	return t
}

func (s *sheets) catch(c *wire.Catch, path string) (offset, elev table.Cell) {
	if c == nil {
		return s.none(path), s.none(path)
	}
	return figure(c.Offset, s.paper.Length), figure(c.Elev, s.paper.Elevation)
}

// volumesTable lists the intervals by the method that is paid, with what every
// one adds to the mass diagram.
func (s *sheets) volumesTable() *table.Table {
	t := &table.Table{Name: "volumes", Title: "Volumes between pay stations (" + methodName(string(s.o.Quantities.Method)) + ")", Tick: true, Columns: []table.Column{
		placeCol("from", "from"), placeCol("to", "to"), s.length("distance", "distance"), s.volumeOf("cut", "cut", "bank"),
		s.volumeOf("fill", "fill", "compacted"), s.volumeOf("strip", "strip", "")},
		Note: "Exceptions are left out. The curvature of the alignment is not in end areas."}
	for i, v := range s.r.Result.Earthwork.Intervals {
		row := "earthwork.intervals[%d]"
		cell := func(v *wire.Volume, key string) table.Cell { return s.volume(v, path(row, i, key), s.paper.Volume) }
		t.Add(table.At(v.From), table.At(v.To), figure(v.To.Distance-v.From.Distance, s.paper.Length),
			cell(v.CutBank, "cut_bank"), cell(v.FillCompacted, "fill_compacted"), cell(v.Strip, "strip"))
	}
	return t
}

func methodName(name string) string {
	return map[string]string{"end_area": "average end areas", "pyramid": "pyramid rule"}[name]
}

func (s *sheets) methodsTable() *table.Table {
	t := &table.Table{Name: "totals", Title: "Totals by every method", Tick: true, Columns: []table.Column{
		words("method", "method"), s.volumeOf("cut", "cut", "bank"), s.volumeOf("fill", "fill", "compacted"),
		s.volumeOf("strip", "strip", ""), s.volumeOf("slivers", "hangs on areas below 0.1 m²", ""), words("paid", "paid")},
		Note: "End areas: (A1 + A2)/2·L. Pyramid rule: A/3·L where exactly one of the two areas is zero (below 0.5e-6 m²), cut and fill apart, else end areas."}
	for i, m := range s.r.Result.Earthwork.Totals.Methods {
		row := "earthwork.totals.methods[%d]"
		cell := func(v *wire.Volume, key string) table.Cell { return s.volume(v, path(row, i, key), s.paper.Volume) }
		paid := ""
		if m.Name == s.r.Result.Earthwork.Totals.PayMethod {
			paid = "paid"
		}
		t.Add(table.Words(methodName(m.Name)), cell(m.CutBank, "cut_bank"), cell(m.FillCompacted, "fill_compacted"),
			cell(m.Strip, "strip"), cell(m.Slivers, "slivers"), table.Words(paid))
	}
	return t
}

func (s *sheets) materialsTable() *table.Table {
	t := &table.Table{Name: "materials", Title: "Cut by material in its three states", Tick: true, Columns: []table.Column{
		words("material", "material"), {Key: "shrinkage", Title: "shrinkage", Kind: table.Number}, {Key: "swell", Title: "swell", Kind: table.Number},
		s.volumeOf("bank", "cut", "bank"), s.volumeOf("compacted", "makes", "compacted"), s.volumeOf("loose", "on trucks", "loose")},
		Note: "compacted = bank × (1 − shrinkage), negative shrinkage is a gain; loose = bank × (1 + swell). An unsuitable material adds nothing to the balance."}
	for i, m := range s.r.Result.Earthwork.Totals.Materials {
		row := "earthwork.totals.materials[%d]"
		q := s.o.Quantities.Materials[i].Material
		name := "no material named"
		if m.Name != nil {
			name = *m.Name
		}
		if q.Unsuitable {
			name += " (unsuitable)"
		}
		factor := func(v *float64) table.Cell {
			if v == nil {
				return table.None("not stated")
			}
			return table.Figure(*v, s.paper.Slope(*v))
		}
		cell := func(v *wire.Volume, key string) table.Cell { return s.volume(v, path(row, i, key), s.paper.Volume) }
		t.Add(table.Words(name), factor(q.Shrinkage), factor(q.Swell), cell(m.CutBank, "cut_bank"),
			cell(m.CutCompacted, "cut_compacted"), cell(m.CutLoose, "cut_loose"))
	}
	return t
}

func (s *sheets) topsoilTable() *table.Table {
	t := &table.Table{Name: "topsoil", Title: "Topsoil", Tick: true, Columns: []table.Column{
		words("line", "ledger"), s.volumeOf("volume", "volume", "")},
		Note: "Strip limits are the catch points plus the margin; dressing lies outside the hinges. Topsoil never enters the balance of the earthwork."}
	tot := s.r.Result.Earthwork.Totals
	t.Add(table.Words("stripped"), s.volume(tot.Strip, "earthwork.totals.strip", s.paper.Volume))
	t.Add(table.Words("re-spread as dressing"), s.volume(tot.Respread, "earthwork.totals.respread", s.paper.Volume))
	surplus := s.none("earthwork.totals.strip")
	if tot.Strip != nil && tot.Respread != nil {
		v := float64(*tot.Strip - *tot.Respread)
		surplus = table.Figure(v, s.paper.Volume(v))
	}
	t.Add(table.Words("surplus (− is a shortage)"), surplus)
	return t
}

// massTable lists what every stretch adds and the ordinate it leads to.
func (s *sheets) massTable() *table.Table {
	m := s.r.Result.Earthwork.Mass
	t := &table.Table{Name: "mass", Title: "Mass ordinates, " + m.State, Tick: true, Columns: []table.Column{
		placeCol("station", "station"), s.volumeOf("cut", "cut makes", m.State), s.volumeOf("fill", "fill needs", m.State),
		s.volumeOf("by_hand", "by hand", m.State), s.volumeOf("ordinate", "ordinate", m.State)},
		Note: s.massNote()}
	if m.Ordinates == nil || s.o.Quantities.Mass == nil {
		return t
	}
	steps := s.o.Quantities.Mass.Steps
	for i, o := range *m.Ordinates {
		cut, fill, hand := table.None("–"), table.None("–"), table.None("–")
		if i > 0 {
			st := steps[i-1]
			by := st.ExtraCut - st.ExtraFill
			cut, fill, hand = table.Figure(st.Cut, s.paper.Volume(st.Cut)), table.Figure(st.Fill, s.paper.Volume(st.Fill)), table.Figure(by, s.paper.Volume(by))
		}
		t.Add(table.At(o.Place), cut, fill, hand, table.Figure(float64(o.Value), s.paper.Volume(float64(o.Value))))
	}
	return t
}

func (s *sheets) massNote() string {
	m := s.r.Result.Earthwork.Mass
	if m.Ordinates == nil {
		return "The mass ordinates are " + s.none("earthwork.mass.ordinates").Paper + "."
	}
	last := (*m.Ordinates)[len(*m.Ordinates)-1].Value
	side := "surplus, to waste"
	if last < 0 {
		side = "shortage, to borrow"
	}
	var points []string
	for _, p := range *m.BalancePoints {
		points = append(points, p.Place.Station)
	}
	return fmt.Sprintf("Ordinates rise in cut and count %s volumes. The last one is a %s: %s %s. Balance points: %s.",
		m.State, side, s.paper.Volume(float64(last)), s.paper.VolumeUnit(), strings.Join(points, ", "))
}

func (s *sheets) landTable() *table.Table {
	t := &table.Table{Name: "land", Title: "Land take", Tick: true, Columns: []table.Column{
		words("side", "side"), s.area("take", "plan area"), words("beyond", "beyond the right of way")},
		Note: "From the reference line to the strip limit, by end areas of the widths; exceptions are left out."}
	for _, side := range []struct {
		name string
		take wire.Take
	}{{"left", s.r.Result.Land.Left}, {"right", s.r.Result.Land.Right}} {
		beyond := "nowhere"
		if side.take.Beyond == nil {
			beyond = s.none("land." + side.name + ".beyond").Paper
		} else if len(*side.take.Beyond) > 0 {
			beyond = ""
			for i, b := range *side.take.Beyond {
				if i > 0 {
					beyond += "; "
				}
				beyond += fmt.Sprintf("%s to %s, %s %s at most", b.From.Station, b.To.Station, s.paper.Length(float64(b.Most)), s.paper.LengthUnit())
			}
		} else if len(s.o.Project.RightOfWay.Left)+len(s.o.Project.RightOfWay.Right) == 0 {
			beyond = "no right of way given"
		}
		t.Add(table.Words(side.name), s.fine(side.take.Take, "land."+side.name+".take", s.paper.Land), table.Words(beyond))
	}
	return t
}

func (s *sheets) costTable() *table.Table {
	t := &table.Table{Name: "cost", Title: "Cost", Tick: true}
	c := s.r.Result.Cost
	if c == nil {
		return t
	}
	t.Title = "Cost in " + c.Currency + ", by " + methodName(c.Method)
	t.Columns = []table.Column{words("item", "item"), {Key: "quantity", Title: "quantity", Kind: table.Number}, words("unit", "unit"),
		{Key: "rate", Title: "rate", Kind: table.Number}, {Key: "amount", Title: "amount", Kind: table.Number}}
	t.Note = "Quantities and rates in SI units. Excavation is bank, embankment compacted; borrow and waste are the two sides of the last mass ordinate, in its state."
	for i, l := range c.Lines {
		row := "cost.lines[%d]"
		rate := s.volume(l.Rate, path(row, i, "rate"), s.paper.Money)
		if l.Rate == nil {
			rate = table.None("no rate")
		}
		t.Add(table.Words(l.Item), s.volume(l.Quantity, path(row, i, "quantity"), s.paper.Count), table.Words(l.Unit), rate,
			s.volume(l.Amount, path(row, i, "amount"), s.paper.Money))
	}
	total := s.volume(c.Total, "cost.total", s.paper.Money)
	total.Strong = true
	t.Add(table.Words("total"), table.None(""), table.Words(""), table.None(""), total)
	return t
}
