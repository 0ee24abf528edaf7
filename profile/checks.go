package profile

import (
	"fmt"
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// room is the overlap in metres that still counts as none: the rounding of
// stations and of K times grades.
const room = 1e-6

// checkOrder finds PVIs whose station does not lie beyond the one before.
func checkOrder(pvi []PVI) (out []finding.Finding) {
	if len(pvi) < 2 {
		return []finding.Finding{{Code: "F05", Severity: finding.Error,
			At:       finding.Place{Key: "profile.pvi"},
			Measured: finding.Of(float64(len(pvi)), ""), Limit: finding.Of(2, ""),
			Args: []any{"a grade line needs at least two PVIs"}}}
	}
	for i := 1; i < len(pvi); i++ {
		if !(pvi[i].At > pvi[i-1].At) {
			out = append(out, finding.Finding{Code: "A01", Severity: finding.Error,
				At:       finding.On(pvi[i].At).Under(fmt.Sprintf("profile.pvi[%d].station", i)),
				Measured: finding.Of(float64(pvi[i].At), "m"), Limit: finding.Of(float64(pvi[i-1].At), "m"),
				Args: []any{"PVI", pvi[i].At, pvi[i-1].At}})
		}
	}
	return out
}

// checkRoom finds curves that overlap, or run beyond the first or last PVI.
func (p *Profile) checkRoom() (out []finding.Finding) {
	end := Point{p.pvi[0].At, p.pvi[0].Elev}
	what := "the first PVI"
	report := func(c Curve, over float64, other string) {
		// Both halves of a curve shrink together, so the length that fits is
		// shorter by twice the overlap.
		fits := max(c.Length-2*over, 0)
		out = append(out, finding.Finding{Code: "P01", Severity: finding.Error,
			At:       finding.Between(c.PVC.At, c.PVT.At).Under(fmt.Sprintf("profile.pvi[%d].length", c.Index)),
			Measured: finding.Of(c.Length, "m"), Limit: finding.Of(fits, "m"),
			Args: []any{c.PVI.At, finding.Of(c.Length, "m"), other, finding.Of(over, "m"), finding.Of(fits, "m")}})
	}
	for _, c := range p.curves {
		if over := float64(end.At - c.PVC.At); over > room {
			report(c, over, what)
		}
		end = c.PVT
		what = "the curve of the PVI before"
	}
	if n := len(p.curves); n > 0 {
		last := p.pvi[len(p.pvi)-1].At
		if over := float64(p.curves[n-1].PVT.At - last); over > room {
			report(p.curves[n-1], over, "the last PVI")
		}
	}
	return out
}

// claimTolerance is the difference in metres up to which a table agrees with
// the grade line: five times the millimetre that tables are rounded to.
const claimTolerance = 0.005

// CurveClaim is a row of a curve table that somebody printed: the PVI's station
// and any of length (m), K (m per percent), PVC and PVT.
type CurveClaim struct {
	PVI       station.Station
	Length, K *float64
	PVC, PVT  *station.Station
}

// CheckTable compares a printed curve table with the grade line (P02). A K is
// compared by the length that it makes.
func (p *Profile) CheckTable(rows []CurveClaim) (out []finding.Finding) {
	for i, r := range rows {
		c, ok := p.curveAt(r.PVI)
		if !ok {
			out = append(out, claim(i, "pvi", "no PVI stands there", r.PVI, float64(r.PVI), math.NaN()))
			continue
		}
		compare := func(key, what string, printed, is, scale float64) {
			if math.Abs(printed-is)*scale > claimTolerance {
				out = append(out, claim(i, key, what, r.PVI, printed, is))
			}
		}
		if r.Length != nil {
			compare("length", "length", *r.Length, c.Length, 1)
		}
		if r.K != nil {
			compare("k", "K", *r.K, c.K, 100*math.Abs(c.A()))
		}
		if r.PVC != nil {
			compare("pvc", "PVC", float64(*r.PVC), float64(c.PVC.At), 1)
		}
		if r.PVT != nil {
			compare("pvt", "PVT", float64(*r.PVT), float64(c.PVT.At), 1)
		}
	}
	return out
}

func claim(i int, key, what string, at station.Station, printed, is float64) finding.Finding {
	f := finding.Finding{Code: "P02", Severity: finding.Error,
		At:       finding.On(at).Under(fmt.Sprintf("profile.curve_table[%d].%s", i, key)),
		Measured: finding.Of(printed, "m"),
		Args:     []any{at, what, finding.Of(printed, "m"), "none"}}
	if !math.IsNaN(is) {
		f.Limit = finding.Of(is, "m")
		f.Args[3] = finding.Of(is, "m")
	}
	return f
}

// curveAt returns the curve whose PVI stands at a station, to the tolerance of
// printed tables.
func (p *Profile) curveAt(s station.Station) (Curve, bool) {
	for _, c := range p.curves {
		if math.Abs(float64(c.PVI.At-s)) <= claimTolerance {
			return c, true
		}
	}
	return Curve{}, false
}

// TieIn is a level, and perhaps a grade, that the grade line must meet at one
// of its ends.
type TieIn struct {
	Name  string
	AtEnd bool
	Elev  float64
	Grade *float64 // ratio, uphill positive
}

// gradeTolerance is 0.05 % as a ratio.
const gradeTolerance = 0.0005

// CheckTieIns compares the ends of the grade line with its tie-ins (P12): 5 mm
// of level, 0.05 % of grade.
func (p *Profile) CheckTieIns(ties []TieIn) (out []finding.Finding) {
	for i, t := range ties {
		s := p.From()
		if t.AtEnd {
			s = p.To()
		}
		z, g, _ := p.At(s)
		miss := func(key, what string, is, want, tolerance float64, unit string) {
			if math.Abs(is-want) > tolerance {
				out = append(out, finding.Finding{Code: "P12", Severity: finding.Error,
					At:       finding.On(s).Under(fmt.Sprintf("tie_in[%d].%s", i, key)).Named(t.Name),
					Measured: finding.Of(is, unit), Limit: finding.Of(want, unit),
					Args: []any{t.Name, what, finding.Of(is, unit), finding.Of(want, unit)}})
			}
		}
		miss("elev", "level", z, t.Elev, claimTolerance, "m")
		if t.Grade != nil {
			miss("grade", "grade", g, *t.Grade, gradeTolerance, "ratio")
		}
	}
	return out
}
