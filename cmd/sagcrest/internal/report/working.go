package report

import (
	"fmt"

	"sagcrest/drainage"
)

// step is one line of a working: what it is, the formula, the numbers put in,
// and the result.
type step struct{ Symbol, Formula, Substituted, Result, Source string }

// working is a calculation as it is handed in for checking.
type working struct {
	ID      string // of the page
	Title   string
	Steps   []step
	Verdict string
	Missing string // why there is none
}

// coverWorking writes the cover of one culvert at its governing place.
func (s *sheets) coverWorking(i int) working {
	c := &s.r.Result.Drainage.Culverts[i]
	l := &s.o.Culverts[i]
	w := working{ID: workingID(i), Title: "Culvert " + c.ID + ": least cover"}
	if c.CoverMin == nil {
		w.Missing = "The cover is " + s.none(path("drainage.culverts[%d]", i, "cover_min")).Paper + "."
		return w
	}
	f, unit := s.paper.Length, " "+s.paper.LengthUnit()
	p := l.Least
	height := l.Culvert.Height()
	w.Steps = []step{
		{"z_i", "z_l + (z_r − z_l)·s/L, invert at s from the left end, along the barrel in plan", s.invertAt(l), f(p.Invert) + unit, "geometry"},
		{"z_c", "z_i + D + t, outside of the crown", fmt.Sprintf("%s + %s + %s", f(p.Invert), f(height), f(l.Culvert.Wall)), f(p.Crown) + unit, "geometry"},
		{"z_d", datumWords(l.Rule.Datum), fmt.Sprintf("%s − %s", f(p.Surface), f(p.Surface-p.Datum)), f(p.Datum) + unit, "typical section"},
		{"c", "z_d − z_c, least from hinge to hinge", fmt.Sprintf("%s − %s", f(p.Datum), f(p.Crown)), f(p.Cover()) + unit, "geometry"},
		{"c_req", l.Rule.Formula, s.requiredAt(l), f(l.Required) + unit, s.ruleSource(l.Rule)},
	}
	w.Verdict = fmt.Sprintf("c = %s%s at %s, offset %s%s, over the %s; c_req = %s%s: ", f(p.Cover()), unit, c.CoverMin.Place.Station,
		f(float64(p.Offset)), unit, c.CoverMin.Where, f(l.Required), unit)
	if l.CoverOK {
		w.Verdict += "OK"
		return w
	}
	w.Verdict += "NOT OK, short by " + f(l.Required-p.Cover()) + unit
	for _, m := range l.Mends {
		w.Verdict += "; " + m.Text
	}
	return w
}

// invertAt puts the two ends and the place of the least cover into the line of
// the invert.
func (s *sheets) invertAt(l *drainage.Laid) string {
	a, b := l.Ends[0], l.Ends[1]
	left := s.paper.Elevation(a.Invert)
	return fmt.Sprintf("%s + (%s − %s)·%s/%s", left, s.paper.Elevation(b.Invert), left, s.paper.Length(l.Least.X-a.X), s.paper.Length(b.X-a.X))
}

// requiredAt puts the pipe into the rule: a share of one of its sizes, a floor,
// or the greater of both; a rule without a number takes the project's figure.
func (s *sheets) requiredAt(l *drainage.Laid) string {
	r, c, f := l.Rule, &l.Culvert, s.paper.Length
	if !r.HasNumber || c.Cover != nil {
		return f(l.Required)
	}
	size := f(c.Height())
	switch {
	case r.Of == drainage.OutsideDiameter:
		size = fmt.Sprintf("(%s + 2·%s)", size, f(c.Wall))
	case r.Of == drainage.ClearSpan && c.Shape == drainage.Box:
		size = f(c.Span)
	}
	if r.Fraction == 0 {
		return f(r.Floor)
	}
	share := size + "/" + s.paper.Count(1/r.Fraction)
	if r.Floor == 0 {
		return share
	}
	return "max(" + share + ", " + f(r.Floor) + ")"
}

func datumWords(d drainage.Datum) string {
	return map[drainage.Datum]string{
		drainage.ToSurface:  "finished surface",
		drainage.ToSubgrade: "finished surface − all pavement layers",
		drainage.ToPavement: "finished surface − bound pavement layers",
	}[d]
}

func (s *sheets) ruleSource(r drainage.CoverRule) string {
	source := "rule “" + r.ID + "”: " + r.Source
	if r.FromMemory {
		source += "; an assumption, to be replaced by project data"
	}
	return source
}
