package drainage

import (
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// Verdict sums a culvert up.
type Verdict string

// A culvert is fine, has too little cover, or cannot be judged.
const (
	OK       Verdict = "ok"
	Short    Verdict = "short"
	Withheld Verdict = "withheld"
)

// Laid is a culvert in its place. Known false: no geometry (off the road);
// Ended false: an end is missing, so inverts, length and cover are unknown.
// Lengths in metres, Slope as a ratio, positive when water runs from the inlet
// to the outlet.
type Laid struct {
	Culvert Culvert
	At      station.Station
	Known   bool
	Ended   bool
	Ends    [2]End // left, right

	InletSide          int // −1 left, +1 right, 0 unknown (D30)
	Drop               float64
	LengthPlan, Length float64
	Slope              float64

	Rule     CoverRule // its Required figure is Required; ID "project" for the project's own
	Required float64
	Least    CoverPoint
	Judged   bool // Least was found
	Profile  []CoverPoint
	CoverOK  bool
	Verdict  Verdict
	Mends    []Mend
}

// Inlet and Outlet return the ends by the way the water runs; ok is false when
// that is unknown.
func (l *Laid) Inlet() (e End, ok bool)  { return l.byFlow(l.InletSide) }
func (l *Laid) Outlet() (e End, ok bool) { return l.byFlow(-l.InletSide) }

func (l *Laid) byFlow(side int) (End, bool) {
	switch side {
	case -1:
		return l.Ends[0], l.Ended
	case 1:
		return l.Ends[1], l.Ended
	}
	return End{}, false
}

// sameLevel is the difference in metres below which two ends lie at one level:
// levels are surveyed to a millimetre.
const sameLevel = 0.001

// Lay places one culvert on a road: crossing, ends, inverts, slope, cover
// between the hinges, and what would mend a shortage. index counts culverts as
// the project and the results do.
func Lay(r *section.Road, w *section.Scratch, c Culvert, index int) (Laid, []finding.Finding) {
	l := Laid{Culvert: c, Verdict: Withheld}
	p := pages{culvert: &l.Culvert, index: index}
	at, f := cross(r, w, &c, p)
	if f != nil {
		return l, f
	}
	l.At, l.Known = at, true
	l.rule()
	if f := l.findEnds(w, newAxis(r, &c, at, 0), p); f != nil {
		return l, f
	}
	l.Ended = true
	out := l.run(p)
	return l, append(out, l.judge(r, p)...)
}

// cross finds where the middle axis meets the reference line.
func cross(r *section.Road, w *section.Scratch, c *Culvert, p pages) (station.Station, []finding.Finding) {
	if c.Station != nil {
		if !r.On(*c.Station) {
			return 0, []finding.Finding{p.offRoad(r, station.At(*c.Station), "station")}
		}
		over := r.Over()
		return min(max(*c.Station, over.From), over.To), nil
	}
	if !r.On(c.Between.From) || !r.On(c.Between.To) {
		return 0, []finding.Finding{p.offRoad(r, *c.Between, "between")}
	}
	over := r.Over()
	between := station.Interval{From: max(c.Between.From, over.From), To: min(c.Between.To, over.To)}
	at, ok := r.LowestGround(w, between)
	if !ok {
		return 0, []finding.Finding{p.noLowest(between)}
	}
	return at, nil
}

// findEnds finds both ends and the inlet side. Given inverts never tell which
// end is the inlet: where the project does not name it, the ends are first found
// on the ground, and the higher ground is upstream.
func (l *Laid) findEnds(w *section.Scratch, middle axis, p pages) []finding.Finding {
	c := &l.Culvert
	l.InletSide = c.InletSide
	if l.InletSide == 0 {
		if f := l.bothEnds(w, middle, p, [2]*float64{}); f != nil {
			return f
		}
		l.InletSide = upstream(l.Ends[0].Ground, l.Ends[1].Ground)
		if c.InletInvert == nil {
			return nil
		}
	}
	switch {
	case c.InletInvert == nil:
		return l.bothEnds(w, middle, p, [2]*float64{})
	case l.InletSide < 0:
		return l.bothEnds(w, middle, p, [2]*float64{c.InletInvert, c.OutletInvert})
	case l.InletSide > 0:
		return l.bothEnds(w, middle, p, [2]*float64{c.OutletInvert, c.InletInvert})
	}
	return []finding.Finding{p.noFlow(l)}
}

// upstream returns the side of higher ground, 0 when both are equal.
func upstream(left, right float64) int {
	switch d := left - right; {
	case d > sameLevel:
		return -1
	case d < -sameLevel:
		return 1
	}
	return 0
}

func (l *Laid) bothEnds(w *section.Scratch, middle axis, p pages, inverts [2]*float64) (out []finding.Finding) {
	for i, side := range []int{-1, 1} {
		e, why := findEnd(w, middle, side, inverts[i])
		l.Ends[i] = e
		if why != fine {
			out = append(out, p.noEnd(e, why))
		}
	}
	return out
}

// run finds lengths, drop and slope.
func (l *Laid) run(p pages) []finding.Finding {
	left, right := l.Ends[0], l.Ends[1]
	l.LengthPlan = right.X - left.X
	l.Length = math.Hypot(l.LengthPlan, right.Invert-left.Invert)
	if l.InletSide == 0 {
		return []finding.Finding{p.noFlow(l)}
	}
	// The right end is the outlet where the inlet is on the left.
	l.Drop = float64(-l.InletSide) * (left.Invert - right.Invert)
	l.Slope = l.Drop / l.LengthPlan
	if l.Drop <= sameLevel {
		return []finding.Finding{p.adverse(l)}
	}
	return nil
}

// rule settles which cover is required and to which datum it is measured.
func (l *Laid) rule() {
	c := &l.Culvert
	rule, named := FindCoverRule(c.Rule)
	if !named {
		rule = CoverRule{ID: "project", Datum: c.CoverDatum, Formula: "figure of the project", Source: "project"}
	}
	l.Required = rule.Required(c.Height(), c.span(), c.Wall)
	if c.Cover != nil {
		l.Required = *c.Cover
	}
	l.Rule = rule
}

// span returns the inside width of one barrel.
func (c *Culvert) span() float64 {
	if c.Shape == Box {
		return c.Span
	}
	return c.Diameter
}

// pitch returns the distance between the axes of neighbouring barrels. A box
// counts with its span: its wall is the top slab's.
func (c *Culvert) pitch() float64 {
	outside := c.span()
	if c.Shape == Circular {
		outside += 2 * c.Wall
	}
	if c.Spacing != nil {
		return outside + *c.Spacing
	}
	return 2 * outside
}
