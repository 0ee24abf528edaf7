package report

import (
	"strconv"
	"strings"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

func (s *sheets) culvertsTable() *table.Table {
	t := &table.Table{Name: "culverts", Title: "Culverts", Tick: true, Columns: []table.Column{
		words("id", "id"), placeCol("station", "station"), words("skew", "skew"), words("size", "barrels and inside size"),
		s.length("length", "length along slope"), s.length("inlet_invert", "inlet invert"), s.length("outlet_invert", "outlet invert"),
		inPercent("slope", "slope"), s.length("cover", "least cover"), placeCol("cover_station", "at"), s.length("cover_offset", "offset"),
		words("cover_over", "over the"), s.length("required", "required"), words("verdict", "judgement")},
		Note: "Skew is measured from the normal to the road; the end named lies ahead. Hydraulic capacity is not judged here."}
	for i := range s.r.Result.Drainage.Culverts {
		s.culvertRow(t, i)
	}
	return t
}

func (s *sheets) culvertRow(t *table.Table, i int) {
	c := &s.r.Result.Drainage.Culverts[i]
	row := "drainage.culverts[%d]"
	cell := func(v *wire.Fine, key string) table.Cell { return s.fine(v, path(row, i, key), s.paper.Length) }
	at := s.none(path(row, i, "place"))
	if c.Place != nil {
		at = table.At(*c.Place)
	}
	slope := s.none(path(row, i, "slope"))
	if c.Slope != nil {
		slope = table.Figure(100*float64(*c.Slope), s.paper.Grade(float64(*c.Slope)))
	}
	missing := s.none(path(row, i, "cover_min"))
	cover, coverAt, offset, over, required := missing, missing, missing, missing, missing
	if m := c.CoverMin; m != nil {
		cover, coverAt, offset = figure(m.Value, s.paper.Length), table.At(m.Place), figure(m.Offset, s.paper.Length)
		over, required = table.Words(m.Where), figure(m.Required, s.paper.Length)
	}
	verdict := table.Words(verdictWords(c.Verdict))
	verdict.Strong = c.Verdict != "ok"
	t.Add(table.Words(c.ID), at, table.Words(s.skewWords(c)), table.Words(s.sizeWords(c)), cell(c.Length, "length"),
		cell(c.InletInvert, "inlet_invert"), cell(c.OutletInvert, "outlet_invert"), slope, cover, coverAt, offset, over, required, verdict)
}

func verdictWords(v string) string {
	return map[string]string{"ok": "OK", "short": "NOT OK: cover short", "withheld": "withheld"}[v]
}

func (s *sheets) skewWords(c *wire.Culvert) string {
	if c.SkewSide == nil {
		return "none"
	}
	return percent(float64(c.SkewDeg)) + " deg, " + strings.ReplaceAll(*c.SkewSide, "_", " ")
}

// sizeWords writes number, shape and inside size.
func (s *sheets) sizeWords(c *wire.Culvert) string {
	n := ""
	if c.Barrels > 1 {
		n = s.paper.Count(float64(c.Barrels)) + " × "
	}
	unit := " " + s.paper.SizeUnit()
	if c.Diameter != nil {
		return n + s.paper.Size(float64(*c.Diameter)) + unit + " pipe, wall " + s.paper.Size(float64(c.Wall)) + unit
	}
	return n + s.paper.Size(float64(*c.Span)) + " × " + s.paper.Size(float64(*c.Rise)) + unit + " box, top slab " + s.paper.Size(float64(c.Wall)) + unit
}

// coverTable lists the places along the barrel that governs.
func (s *sheets) coverTable(i int) *table.Table {
	c := &s.r.Result.Drainage.Culverts[i]
	t := &table.Table{Name: s.coverName(i), Title: "Culvert " + c.ID + ": cover along the barrel", Tick: true, Columns: []table.Column{
		placeCol("station", "station"), s.length("offset", "offset"), s.length("invert", "invert"), s.length("crown", "outside of crown"),
		s.length("surface", "finished surface"), s.length("datum", "datum"), s.length("cover", "cover"), words("judged", "judged here")},
		Note: "From inlet to outlet. Cover = datum − outside of crown, judged from hinge to hinge; beyond, the depth to the finished slope is listed and never judged."}
	if c.CoverProfile == nil {
		return t
	}
	row := path("drainage.culverts[%d]", i, "cover_profile[%d]")
	for k, p := range *c.CoverProfile {
		cover, judgedHere := table.None("–"), "no"
		if p.Datum != nil {
			v := float64(*p.Datum - p.Crown)
			cover = table.Figure(v, s.paper.Length(v))
		}
		if p.RequiredHere {
			judgedHere = "yes"
		}
		t.Add(table.At(p.Place), figure(p.Offset, s.paper.Length), figure(p.Invert, s.paper.Elevation), figure(p.Crown, s.paper.Elevation),
			s.fine(p.Surface, path(row, k, "surface"), s.paper.Elevation), s.fine(p.Datum, path(row, k, "datum"), s.paper.Elevation), cover, table.Words(judgedHere))
	}
	return t
}

// coverName names the cover table of a culvert. Ids that differ only in signs or
// case would share a file, so the later ones are numbered.
func (s *sheets) coverName(i int) string {
	own, before := fileSafe(s.r.Result.Drainage.Culverts[i].ID), 0
	for _, c := range s.r.Result.Drainage.Culverts[:i] {
		if strings.EqualFold(fileSafe(c.ID), own) {
			before++
		}
	}
	if before > 0 {
		// "_" cannot come out of fileSafe, so no other id makes this name.
		own += "_" + strconv.Itoa(before+1)
	}
	return "cover_" + own
}

// fileSafe turns every run of other signs than letters and digits into "-".
func fileSafe(s string) string {
	f := func(r rune) bool {
		return !(r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z' || r >= '0' && r <= '9')
	}
	if out := strings.Join(strings.FieldsFunc(s, f), "-"); out != "" {
		return out
	}
	return "unnamed"
}
