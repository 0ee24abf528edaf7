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

func fault(i int, key, text string, measured, limit float64, unit string) finding.Finding {
	return finding.Finding{Code: "A16", Severity: finding.Error,
		At:       finding.Place{Key: fmt.Sprintf("alignment.pi[%d].%s", i, key)},
		Measured: finding.Of(measured, unit), Limit: finding.Of(limit, unit),
		Args: []any{fmt.Sprintf("PI %d", i), text}}
}

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
			out = append(out, fault(i, "n", "it stands where the PI before it stands", d, samePoint, "m"))
		}
	}
	return out
}

// checkRows looks at every PI by itself.
func (a *Alignment) checkRows() (out []finding.Finding) {
	for _, r := range a.rows {
		d, deg := math.Abs(r.Deflection), 180/math.Pi
		switch turned := r.AngleIn + r.AngleOut; {
		case d > math.Pi-1e-6:
			out = append(out, fault(r.Index, "n", "the alignment folds back on itself there", d*deg, 180, "deg"))
		case r.PI.Radius <= 0 && d > noArc:
			out = append(out, fault(r.Index, "radius",
				fmt.Sprintf("it turns by %.6f degrees and has no radius", d*deg), d*deg, 0, "deg"))
		case turned > d+noArc:
			// A clothoid turns by L/2R, so the longest equal pair that fits is R·Δ.
			out = append(out, fault(r.Index, "spiral",
				fmt.Sprintf("its clothoids turn by %.4f degrees, but it deflects by %.4f only: with a radius of %.3f m equal clothoids up to %.3f m fit",
					turned*deg, d*deg, r.PI.Radius, r.PI.Radius*d), turned*deg, d*deg, "deg"))
		}
	}
	return out
}

// checkTangents looks at what is left between neighbours.
func (a *Alignment) checkTangents() (out []finding.Finding) {
	for i := range len(a.rows) + 1 {
		before, after, at, distance := 0.0, 0.0, i, 0.0
		if i > 0 {
			before = a.rows[i-1].TangentOut
		}
		if i < len(a.rows) {
			after, at = a.rows[i].TangentIn, i+1
		}
		distance = a.gaps[i]
		if left := distance - before - after; left < -leftOver {
			out = append(out, fault(at, "radius",
				fmt.Sprintf("the tangents of PI %d and PI %d need %.3f m and %.3f m, but stand only %.3f m apart: %.3f m are missing",
					i, i+1, before, after, distance, -left), before+after, distance, "m"))
		}
	}
	return out
}

// Rules returns the page of the code that this package raises.
func Rules() []finding.Rule {
	return []finding.Rule{{
		Code: "A16", Default: finding.Error,
		Title:   "Arcs or clothoids do not fit",
		Message: "%v: %v",
		Formula: "tangent left over between neighbouring PIs >= −1e-6 m; clothoid angles <= deflection",
		Source:  "T. F. Hickerson, Route Location and Design, 5th ed.",
		Effect:  "No alignment follows, so there are no stations to measure along.",
		Mend:    "Use a smaller radius or shorter clothoids, or move the PIs apart.",
	}}
}
