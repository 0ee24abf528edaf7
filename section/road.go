package section

import (
	"math"
	"slices"

	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Road is a grade line and typical sections laid along an alignment on ground.
// It is immutable; many goroutines may slice it, each with its own Scratch.
type Road struct {
	line     *alignment.Alignment
	grade    *profile.Profile
	ground   Ground
	typicals []Typical
	strata   []Stratum
	table    []Crossfalls
	strip    Stripping
	over     station.Interval
}

// Parts is what a road is laid from.
type Parts struct {
	Line     *alignment.Alignment
	Grade    *profile.Profile
	Ground   Ground
	Typicals []Typical
	Strata   []Stratum
	Table    []Crossfalls // superelevation, by station; empty: none
	Strip    Stripping
}

// NewRoad lays a road where alignment and grade line both exist. It returns nil
// and a finding A15 of severity E when they have no length in common; A15 of
// severity W when their ends lie apart by more than a centimetre; Q11 where a
// stretch has no typical section or two; A01 and F08 where the superelevation
// table does not fit.
func NewRoad(p Parts) (*Road, []finding.Finding) {
	r := &Road{line: p.Line, grade: p.Grade, ground: p.Ground, strip: p.Strip}
	both := station.Interval{From: max(0, p.Grade.From()), To: min(p.Line.Length(), p.Grade.To())}
	found := r.checkEnds()
	if both.Length() <= station.Same {
		for i := range found {
			found[i].Severity = finding.Error
		}
		return nil, found
	}
	r.over = both
	r.snap(p.Typicals, p.Strata)
	r.table = slices.Clone(p.Table)
	found = append(found, r.checkCover()...)
	return r, append(found, r.checkTable()...)
}

// checkEnds compares the ends of alignment and grade line (A15).
func (r *Road) checkEnds() (out []finding.Finding) {
	pairs := []struct {
		key, end string
		a, g     station.Station
	}{
		{"profile.pvi[0].station", "start", 0, r.grade.From()},
		{"profile.pvi", "end", r.line.Length(), r.grade.To()},
	}
	for _, p := range pairs {
		if d := float64(p.g - p.a); math.Abs(d) > station.Same {
			out = append(out, finding.Finding{
				Code: "A15", Severity: finding.Warning,
				At:       finding.On(p.g).Under(p.key),
				Measured: finding.Of(math.Abs(d), "m"), Limit: finding.Of(station.Same, "m"),
				Args: []any{p.end, p.a, p.g, finding.Of(math.Abs(d), "m")},
			})
		}
	}
	return out
}

// snap moves ends of typical sections and strata that lie within a centimetre
// of the road's ends or of one another onto each other, so that no sliver of
// road is left without a section or with another material.
func (r *Road) snap(typicals []Typical, strata []Stratum) {
	r.typicals, r.strata = slices.Clone(typicals), slices.Clone(strata)
	marks := []station.Station{r.over.From, r.over.To}
	move := func(over *station.Interval) {
		for _, s := range []*station.Station{&over.From, &over.To} {
			near := slices.IndexFunc(marks, func(m station.Station) bool {
				return math.Abs(float64(m-*s)) <= station.Same
			})
			if near >= 0 {
				*s = marks[near]
			} else {
				marks = append(marks, *s)
			}
		}
	}
	for i := range r.typicals {
		move(&r.typicals[i].Over)
	}
	for i := range r.strata {
		move(&r.strata[i].Over)
	}
}

// checkCover finds the stretches that no typical section covers, or two (Q11).
func (r *Road) checkCover() (out []finding.Finding) {
	marks := []station.Station{r.over.From, r.over.To}
	for _, t := range r.typicals {
		for _, s := range []station.Station{t.Over.From, t.Over.To} {
			if r.over.From < s && s < r.over.To {
				marks = append(marks, s)
			}
		}
	}
	slices.Sort(marks)
	marks = slices.Compact(marks)
	for i := 1; i < len(marks); i++ {
		n := 0
		for _, t := range r.typicals {
			if t.Over.Contains(marks[i-1]) {
				n++
			}
		}
		if n == 1 {
			continue
		}
		what := "no typical section covers"
		if n > 1 {
			what = "more than one typical section covers"
		}
		out = append(out, finding.Finding{
			Code: "Q11", Severity: finding.Error,
			At:       finding.Between(marks[i-1], marks[i]).Under("typical_section"),
			Measured: finding.Of(float64(n), ""), Limit: finding.Of(1, ""),
			Args: []any{what, marks[i-1], marks[i]},
		})
	}
	return out
}

// Over returns the stretch on which the road runs; its end belongs to it.
func (r *Road) Over() station.Interval { return r.over }

// On reports whether s lies on the road, its end included, give or take a
// centimetre.
func (r *Road) On(s station.Station) bool {
	return s >= r.over.From-station.Same && s <= r.over.To+station.Same
}

// Line returns the alignment.
func (r *Road) Line() *alignment.Alignment { return r.line }

// Grade returns the grade line.
func (r *Road) Grade() *profile.Profile { return r.grade }

// Ground returns the surveyed ground.
func (r *Road) Ground() Ground { return r.ground }

// Typicals returns the typical sections with their ends snapped together.
func (r *Road) Typicals() []Typical { return r.typicals }

// Strata returns the bodies of material, their ends snapped likewise.
func (r *Road) Strata() []Stratum { return r.strata }

// Strip returns the stripping.
func (r *Road) Strip() Stripping { return r.strip }

// TypicalAt returns the index of the section that holds s, or −1 where there is
// none or more than one. With before, a station where sections change belongs
// to the one that ends there; the road's end belongs to the last.
func (r *Road) TypicalAt(s station.Station, before bool) int {
	at := -1
	for i, t := range r.typicals {
		if r.holds(t.Over, s, before) {
			if at >= 0 {
				return -1
			}
			at = i
		}
	}
	return at
}

// holds reports whether a stretch of the road holds s, which is clamped to the
// road; within a centimetre of an end of the stretch s is at it. With before,
// and at the road's end, the end of the stretch belongs to it and its start does
// not.
func (r *Road) holds(over station.Interval, s station.Station, before bool) bool {
	s = min(max(s, r.over.From), r.over.To)
	for _, end := range []station.Station{over.From, over.To} {
		if math.Abs(float64(s-end)) < station.Same {
			s = end
		}
	}
	if before && s > r.over.From || s >= r.over.To {
		return over.From < s && s <= over.To
	}
	return over.Contains(s)
}

// Breaks returns the stations strictly inside over where the road's own
// geometry changes: ends of vertical curves, of horizontal elements and of
// typical sections, rows of the superelevation table, increasing.
func (r *Road) Breaks(over station.Interval) []station.Station {
	all := append(r.grade.Breaks(), r.line.Breaks()...)
	for _, t := range r.typicals {
		all = append(all, t.Over.From, t.Over.To)
	}
	for _, c := range r.table {
		all = append(all, c.At)
	}
	inside := all[:0:0]
	for _, s := range all {
		if over.From < s && s < over.To {
			inside = append(inside, s)
		}
	}
	slices.Sort(inside)
	return slices.Compact(inside)
}

// Elev returns the grade line's level at s, clamped to the road's ends.
func (r *Road) Elev(s station.Station) float64 {
	z, _, _ := r.grade.At(min(max(s, r.grade.From()), r.grade.To()))
	return z
}
