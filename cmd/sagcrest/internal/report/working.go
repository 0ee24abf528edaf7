package report

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/wire"
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
		{"z_i", "invert of the barrel at the place, straight between its ends", s.endsWords(c), f(p.Invert) + unit, "geometry"},
		{"z_c", "z_i + D + t, outside of the crown", fmt.Sprintf("%s + %s + %s", f(p.Invert), f(height), f(l.Culvert.Wall)), f(p.Crown) + unit, "geometry"},
		{"z_d", datumWords(l.Rule.Datum), fmt.Sprintf("%s − %s", f(p.Surface), f(p.Surface-p.Datum)), f(p.Datum) + unit, "typical section"},
		{"c", "z_d − z_c, least from hinge to hinge", fmt.Sprintf("%s − %s", f(p.Datum), f(p.Crown)), f(p.Cover()) + unit, "geometry"},
		{"c_req", l.Rule.Formula, "rule: " + l.Rule.ID, f(l.Required) + unit, s.ruleSource(l.Rule)},
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

func (s *sheets) endsWords(c *wire.Culvert) string {
	if c.InletInvert == nil || c.OutletInvert == nil {
		return "from the two ends"
	}
	return fmt.Sprintf("inlet %s, outlet %s, length in plan %s", s.paper.Elevation(float64(*c.InletInvert)),
		s.paper.Elevation(float64(*c.OutletInvert)), s.paper.Length(float64(*c.LengthPlan)))
}

func datumWords(d drainage.Datum) string {
	return map[drainage.Datum]string{
		drainage.ToSurface:  "finished surface",
		drainage.ToSubgrade: "finished surface − all pavement layers",
		drainage.ToPavement: "finished surface − bound pavement layers",
	}[d]
}

func (s *sheets) ruleSource(r drainage.CoverRule) string {
	if r.FromMemory {
		return r.Source + "; an assumption, to be replaced by project data"
	}
	return r.Source
}
