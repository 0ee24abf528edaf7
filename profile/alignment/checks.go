package alignment

import (
	"fmt"
	"math"

	"sagcrest/profile/finding"
)

// samePoint is the distance in metres below which two PIs are one.
const samePoint = 1e-6

// noArc is the shortage of deflection in radians that still counts as an arc
// of no length: two clothoids that meet.
const noArc = 1e-6

// fault is what one PI cannot have together: two figures, and the nearest that
// could hold. The figures in args are what the message names, in order.
func fault(i int, key string, measured, limit finding.Measure, args ...any) finding.Finding {
	return finding.Finding{Code: "A16", Severity: finding.Error,
		At:       finding.Place{Key: fmt.Sprintf("alignment.pi[%d].%s", i, key)},
		Measured: measured, Limit: limit,
		Args: append([]any{i}, args...)}
}

func metres(v float64) finding.Measure { return finding.Of(v, "m") }

func degrees(rad float64) finding.Measure { return finding.Of(rad*180/math.Pi, "deg") }

// angle writes radians with so many places that two angles which differ by
// noArc are told apart.
func angle(rad float64) string { return fmt.Sprintf("%.5f degrees", rad*180/math.Pi) }

// down rounds metres down to the millimetre, so that a length which is said to
// fit does; a whole millimetre survives its last bits.
func down(v float64) finding.Measure { return metres(math.Floor(v*1000*(1+1e-12)) / 1000) }

// checkPoints finds tables that are too short and PIs that stand on each other.
func checkPoints(pi []PI) (out []finding.Finding) {
	if len(pi) < 2 {
		return []finding.Finding{{Code: "F05", Severity: finding.Error,
			At:       finding.Place{Key: "alignment.pi"},
			Measured: finding.Of(float64(len(pi)), ""), Limit: finding.Of(2, ""),
			Args: []any{"an alignment needs at least two PIs"}}}
	}
	for i := 1; i < len(pi); i++ {
		if d := math.Hypot(pi[i].E-pi[i-1].E, pi[i].N-pi[i-1].N); d <= samePoint {
			out = append(out, fault(i, "n", metres(d), metres(samePoint),
				"it stands from the PI before by", metres(d), "but two PIs stand apart by more than", "a thousandth of a millimetre",
				"take out", "one of the two"))
		}
	}
	return out
}

// checkRows looks at every PI by itself.
func (a *Alignment) checkRows() (out []finding.Finding) {
	for _, r := range a.rows {
		if f, bad := a.checkRow(r); bad {
			out = append(out, f)
		}
	}
	return out
}

// checkRow holds radius and clothoids of a PI against its deflection; the first
// fault hides those that follow from it.
func (a *Alignment) checkRow(r PIRow) (finding.Finding, bool) {
	d, turned := math.Abs(r.Deflection), r.AngleIn+r.AngleOut
	spirals := r.PI.SpiralIn + r.PI.SpiralOut
	switch {
	case d > math.Pi-noArc:
		return fault(r.Index, "n", degrees(d), degrees(math.Pi),
			"the alignment folds back by", angle(d), "but one PI deflects by less than", "180 degrees",
			"two PIs could share the turn, each with", angle(d/2)), true
	case r.PI.Radius <= 0 && spirals > 0:
		return fault(r.Index, "spiral", metres(spirals), metres(0),
			"its clothoids are together", metres(spirals), "but lead to an arc with a radius of", metres(r.PI.Radius),
			"without a radius there is", "no clothoid"), true
	case r.PI.Radius <= 0 && d > noArc:
		return fault(r.Index, "radius", degrees(d), degrees(0),
			"it has no radius, but deflects by", angle(d), "and without a radius may by", angle(noArc),
			"an arc fits with", a.roomFor(r)), true
	case r.PI.Radius > 0 && d <= noArc:
		return fault(r.Index, "radius", degrees(d), degrees(noArc),
			"it has a radius of", metres(r.PI.Radius), "but deflects by only", angle(d),
			"a PI without deflection has", "no curve"), true
	case turned > d+noArc:
		// A clothoid turns by L/2R, so the longest equal pair that fits is R·Δ.
		return fault(r.Index, "spiral", degrees(turned), degrees(d),
			"its clothoids turn by", angle(turned), "but it deflects by only", angle(d),
			"with this radius equal clothoids fit up to", down(r.PI.Radius*d)), true
	}
	return finding.Finding{}, false
}

// roomFor returns the greatest radius of a plain arc at a PI that has none, or
// says that its neighbours leave no room.
func (a *Alignment) roomFor(r PIRow) any {
	i := r.Index - 1
	before, after := a.gaps[i], a.gaps[i+1]
	if i > 0 {
		before -= a.rows[i-1].TangentOut
	}
	if i+1 < len(a.rows) {
		after -= a.rows[i+1].TangentIn
	}
	room := math.Min(before, after)
	if room <= leftOver {
		return "shorter curves beside it"
	}
	return down(room / math.Tan(math.Abs(r.Deflection)/2))
}

// checkTangents looks at what is left between neighbours.
func (a *Alignment) checkTangents() (out []finding.Finding) {
	for i, distance := range a.gaps {
		before, after := 0.0, 0.0
		if i > 0 {
			before = a.rows[i-1].TangentOut
		}
		if i < len(a.rows) {
			after = a.rows[i].TangentIn
		}
		if distance-before-after < -leftOver {
			out = append(out, a.overlap(i, before+after, distance))
		}
	}
	return out
}

// overlap tells of the tangents between PI i and the next. Tangents grow in
// proportion with radius and clothoids, as the angles stay the same; so the
// curves that just fit are known.
func (a *Alignment) overlap(i int, need, distance float64) finding.Finding {
	what, at := fmt.Sprintf("its tangent and that of PI %d need", i), i+1
	fits := "both curves fit when shrunk alike, this one to a radius of"
	if i == 0 || i == len(a.rows) { // the first and the last PI have no curve
		other := i
		if i > 0 {
			at, other = i, i+1
		}
		what = fmt.Sprintf("its tangent towards PI %d needs", other)
		fits = "a radius fits up to"
		if p := a.rows[at-1].PI; p.SpiralIn+p.SpiralOut > 0 {
			fits = "with clothoids shortened alike " + fits
		}
	}
	return fault(at, "radius", metres(need), metres(distance),
		what, metres(need), "but the PIs stand apart by only", metres(distance),
		fits, down(a.rows[at-1].PI.Radius*distance/need))
}

// Rules returns the page of the code that this package raises.
func Rules() []finding.Rule {
	return []finding.Rule{{
		Code: "A16", Default: finding.Error,
		Title:   "Arcs or clothoids do not fit",
		Message: "PI %v: %v %v, %v %v; %v %v",
		Formula: "tangent left over between neighbouring PIs >= −1e-6 m; clothoid angles <= deflection; 0 < deflection < 180 degrees where there is a radius, and only there",
		Source:  "T. F. Hickerson, Route Location and Design, 5th ed.",
		Effect:  "No alignment follows, so there are no stations to measure along.",
		Mend:    "Use a smaller radius or shorter clothoids, or move the PIs apart.",
	}}
}
