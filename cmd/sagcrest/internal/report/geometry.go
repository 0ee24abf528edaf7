package report

import (
	"strconv"
	"strings"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

func (s *sheets) elementsTable() *table.Table {
	t := &table.Table{Name: "alignment", Title: "Horizontal alignment", Tick: true, Columns: []table.Column{
		words("kind", "element"), placeCol("from", "from"), placeCol("to", "to"), s.length("length", "length"),
		s.length("radius_from", "radius at start"), s.length("radius_to", "radius at end")},
		Note: "Radii are positive turning right; – is straight."}
	for i, e := range s.r.Result.Alignment.Elements {
		row := "alignment.elements[%d]"
		t.Add(table.Words(e.Kind), table.At(e.From), table.At(e.To), figure(e.To.Distance-e.From.Distance, s.paper.Length),
			s.fine(e.RadiusFrom, path(row, i, "radius_from"), s.paper.Length), s.fine(e.RadiusTo, path(row, i, "radius_to"), s.paper.Length))
	}
	return t
}

func (s *sheets) pisTable() *table.Table {
	t := &table.Table{Name: "points_of_intersection", Title: "Points of intersection", Tick: true, Columns: []table.Column{
		words("pi", "PI"), s.length("northing", "northing"), s.length("easting", "easting"),
		{Key: "deflection", SI: "rad", Title: "deflection", Unit: "deg, + right", Kind: table.Number},
		s.length("radius", "radius"), s.length("spiral_in", "clothoid in"), s.length("spiral_out", "clothoid out"),
		s.length("tangent_in", "tangent in"), s.length("tangent_out", "tangent out"), s.length("arc", "arc")}}
	for _, r := range s.o.Road.Line().PITable() {
		f := func(v float64) table.Cell { return table.Figure(v, s.paper.Length(v)) }
		t.Add(table.Words(strconv.Itoa(r.Index)), f(r.PI.N), f(r.PI.E), table.Figure(r.Deflection, s.paper.Degrees(r.Deflection)),
			f(r.PI.Radius), f(r.PI.SpiralIn), f(r.PI.SpiralOut), f(r.TangentIn), f(r.TangentOut), f(r.ArcLength))
	}
	return t
}

func (s *sheets) curvesTable() *table.Table {
	t := &table.Table{Name: "vertical_curves", Title: "Vertical curves", Tick: true, Columns: []table.Column{
		words("no", "PVI no."), placeCol("pvi", "PVI"), s.length("pvi_elev", "PVI level"),
		inPercent("g1", "g1"), inPercent("g2", "g2"), inPercent("a", "A"), s.length("length", "L"),
		{Key: "k", SI: "m/%", Title: "K", Unit: s.paper.LengthUnit() + "/%", Kind: table.Number}, words("kind", "kind"), words("shape", "shape"),
		placeCol("pvc", "PVC"), s.length("pvc_elev", "level"), placeCol("pvt", "PVT"), s.length("pvt_elev", "level"),
		placeCol("turning", "turns at"), s.length("turning_elev", "level")},
		Note: "A = g2 − g1; L = K·|A| with A in percent. Grades are positive uphill with growing stations."}
	for i, c := range s.r.Result.Profile.Curves {
		row := "profile.curves[%d]"
		turning, level := table.None("–"), table.None("–")
		if c.Turning != nil {
			turning, level = table.At(c.Turning.Place), figure(c.Turning.Elev, s.paper.Elevation)
		}
		t.Add(table.Words(strconv.Itoa(i+1)), table.At(c.PVI.Place), figure(c.PVI.Elev, s.paper.Elevation),
			figure(c.G1Pct, percent), figure(c.G2Pct, percent), figure(c.G2Pct-c.G1Pct, percent), figure(c.Length, s.paper.Length),
			s.fine(c.K, path(row, i, "k"), s.paper.K), table.Words(c.Kind), table.Words(c.Shape),
			table.At(c.PVC.Place), figure(c.PVC.Elev, s.paper.Elevation), table.At(c.PVT.Place), figure(c.PVT.Elev, s.paper.Elevation),
			turning, level)
	}
	return t
}

// lineName writes a line's key as words.
func lineName(key string) string { return strings.ReplaceAll(key, "_", " ") }

func (s *sheets) turningsTable() *table.Table {
	t := &table.Table{Name: "turning_points", Title: "Low and high points of the section's lines", Tick: true, Columns: []table.Column{
		words("line", "line"), words("point", "point"), placeCol("station", "station"), placeCol("to", "to"),
		s.length("offset", "offset"), s.length("elev", "level"), words("kind", "turns"), words("remark", "remark")},
		Note: "Strictly inside the road; the ends of the road are listed in the results as ends. Every low point needs a way out for its water."}
	add := func(name string, ps []wire.Turning, remark string) {
		for _, p := range ps {
			to := table.None("–")
			if p.To != nil {
				to = table.At(*p.To)
			}
			kind := map[string]string{"curve": "on a curve", "angle": "at an angular break", "level": "level stretch"}[p.Kind]
			t.Add(table.Words(lineName(p.Line)), table.Words(name), table.At(p.Place), to, figure(p.Offset, s.paper.Length),
				figure(p.Elev, s.paper.Elevation), table.Words(kind), table.Words(remark))
		}
	}
	add("low", s.r.Result.Profile.LowPoints, "inlet or outfall wanted")
	add("high", s.r.Result.Profile.HighPoints, "")
	return t
}

func (s *sheets) clearancesTable() *table.Table {
	t := &table.Table{Name: "clearances", Title: "Clearances", Tick: true, Columns: []table.Column{
		words("name", "obstacle"), words("side", "road passes"), s.length("gap", "least gap"), s.length("required", "wanted"),
		placeCol("station", "at"), s.length("offset", "offset"), words("ok", "judgement")},
		Note: "Vertical, from the finished surface to the obstacle, the least over its stations and offsets as far as the hinges."}
	for i, c := range s.r.Result.Profile.Clearances {
		row := "profile.clearances[%d]"
		at, verdict := s.none(path(row, i, "place")), s.none(path(row, i, "ok"))
		if c.Place != nil {
			at = table.At(*c.Place)
		}
		if c.OK != nil {
			verdict = judged(*c.OK)
		}
		t.Add(table.Words(c.Name), table.Words(c.Side), s.fine(c.Gap, path(row, i, "gap"), s.paper.Length), figure(c.Required, s.paper.Length),
			at, s.fine(c.Offset, path(row, i, "offset"), s.paper.Length), verdict)
	}
	return t
}

// judged says OK or NOT OK in words.
func judged(ok bool) table.Cell {
	if ok {
		return table.Words("OK")
	}
	c := table.Words("NOT OK")
	c.Strong = true
	return c
}
