package criteria

import (
	"errors"
	"math"
)

// Stopping is a stopping sight distance with its parts, in the units of its
// system. Design is the total, up to the next five units.
type Stopping struct {
	Reaction, Braking, Total, Design float64
	// Level tells that the form for level road was used.
	Level bool
}

// Braker says how a vehicle stops: by a deceleration (m/s² or ft/s²) or, if
// Friction is given, by a coefficient.
type Braker struct {
	Deceleration float64
	Friction     *float64
}

// Deceleration returns the deceleration of comfort: 3.4 m/s² or 11.2 ft/s²
// (AASHTO, ch. 3).
func (s System) Deceleration() float64 { return s.pick(3.4, 11.2) }

// ErrNoStop says that a downgrade is too steep to stop on.
var ErrNoStop = errors.New("the grade takes more than the brakes give: there is no stopping distance")

// StoppingDistance returns the distance in which a vehicle at speed v stops
// after t seconds of reaction on a grade (ratio, uphill positive). Level, with a
// deceleration a: 0.278Vt + 0.039V²/a (metric), 1.47Vt + 1.075V²/a (US); on a
// grade, or with friction f, braking is V²/(254(a/9.81 + G)) or V²/(254(f + G)),
// and V²/(30(a/32.2 + G)) in US units (AASHTO, ch. 3, stopping sight distance).
func (s System) StoppingDistance(v, t float64, b Braker, grade float64) (Stopping, error) {
	d := Stopping{Reaction: s.pick(0.278, 1.47) * v * t, Level: grade == 0 && b.Friction == nil}
	if d.Level {
		d.Braking = s.pick(0.039, 1.075) * v * v / b.Deceleration
	} else {
		f := b.Deceleration / s.pick(9.81, 32.2)
		if b.Friction != nil {
			f = *b.Friction
		}
		if f+grade <= 0 {
			return d, ErrNoStop
		}
		d.Braking = v * v / (s.pick(254, 30) * (f + grade))
	}
	d.Total = d.Reaction + d.Braking
	// Sums of decimals must not climb a step for their last bit.
	d.Design = 5 * math.Ceil(d.Total/5-1e-9)
	return d, nil
}

// Clearance is what a sight line needs on the inside of a horizontal curve:
// from the middle of the inner lane, and from that lane's inner edge.
type Clearance struct{ InnerRadius, Middle, FromEdge float64 }

// CurveClearance returns the middle ordinate of a sight line of length s on a
// curve whose centre line has radius r, with lanes of the given width: the line
// runs on the middle of the inner lane, R' = r − lane/2, M = R'(1 − cos(S/2R'))
// (AASHTO, ch. 3, sight distance on horizontal curves).
func CurveClearance(r, s, lane float64) (Clearance, error) {
	c := Clearance{InnerRadius: r - lane/2}
	if c.InnerRadius <= 0 {
		return c, errors.New("the radius is no larger than half a lane")
	}
	half := s / (2 * c.InnerRadius)
	if half > math.Pi {
		return c, errors.New("the sight line is longer than the whole circle")
	}
	c.Middle = c.InnerRadius * (1 - math.Cos(half))
	c.FromEdge = c.Middle - lane/2
	return c, nil
}

// Comfort returns the length of sag at which riding stays comfortable:
// A·V²/395 (metric), A·V²/46.5 (US), A in percent (AASHTO, ch. 3). IRC:SP:23 has
// 2·√(N·v³/C) with N = A/100, v in m/s and C = 0.6 m/s³.
func (s System) Comfort(standard string, v, aPct float64) float64 {
	if standard == "irc" {
		mps := v / s.pick(3.6, 3600.0/(5280*0.3048))
		return 2 * math.Sqrt(aPct/100*mps*mps*mps/0.6) * s.pick(1, 1/0.3048)
	}
	return aPct * v * v / s.pick(395, 46.5)
}

// Appearance returns the least length of curve that looks right: 0.6V m, 3V ft
// (AASHTO, ch. 3).
func (s System) Appearance(v float64) float64 { return s.pick(0.6, 3) * v }

// DrainageK returns the greatest K that still drains between kerbs: 51 m/% or
// 167 ft/% (AASHTO, ch. 3).
func (s System) DrainageK() float64 { return s.pick(51, 167) }

// Lane returns the width of a lane that is taken where none is given: 3.6 m or
// 12 ft (AASHTO, ch. 4).
func (s System) Lane() float64 { return s.pick(3.6, 12) }
