package criteria

import (
	"errors"
	"fmt"
	"math"
)

// Curve speeds: what AASHTO's superelevation method needs by design speed. The
// running speeds, side friction factors and relative gradients are from memory
// (AASHTO, ch. 3, horizontal alignment); the friction factors reproduce every
// printed radius of the published cases. Linear between rows, never outside.
type speedRow struct{ design, running, friction, gradient float64 }

func speedRows(s System) []speedRow {
	if s == US {
		return []speedRow{
			{15, 15, .32, .78}, {20, 20, .27, .74}, {25, 24, .23, .70}, {30, 28, .20, .66}, {35, 32, .18, .62}, {40, 36, .16, .58}, {45, 40, .15, .54},
			{50, 44, .14, .50}, {55, 48, .13, .47}, {60, 52, .12, .45}, {65, 55, .11, .43}, {70, 58, .10, .40}, {75, 61, .09, .38}, {80, 64, .08, .35}}
	}
	return []speedRow{
		{20, 20, .35, .80}, {30, 30, .28, .75}, {40, 40, .23, .70}, {50, 47, .19, .65}, {60, 55, .17, .60}, {70, 63, .15, .55}, {80, 70, .14, .50},
		{90, 77, .13, .47}, {100, 85, .12, .44}, {110, 91, .11, .41}, {120, 98, .09, .38}, {130, 102, .08, .35}}
}

// ErrSpeed says that a speed lies outside the table.
var ErrSpeed = errors.New("the speed lies outside the table of superelevation")

// bySpeed reads the table at a speed.
func (s System) bySpeed(v float64) (speedRow, error) {
	rows := speedRows(s)
	first, last := rows[0].design, rows[len(rows)-1].design
	if !(v >= first && v <= last) {
		return speedRow{}, fmt.Errorf("%w: %v to %v", ErrSpeed, first, last)
	}
	for i := 1; i < len(rows); i++ {
		if a, b := rows[i-1], rows[i]; v <= b.design {
			t := (v - a.design) / (b.design - a.design)
			mix := func(x, y float64) float64 { return x + t*(y-x) }
			return speedRow{v, mix(a.running, b.running), mix(a.friction, b.friction), mix(a.gradient, b.gradient)}, nil
		}
	}
	return rows[len(rows)-1], nil
}

// Side is the curve side of a design speed: unrounded and rounded least radius,
// and AASHTO's distribution of superelevation by method 5. Rates are ratios,
// lengths in the units of the system.
type Side struct {
	Speed, EMax, Friction, Running float64
	Gradient                       float64 // relative gradient, percent
	RMin, RMinDesign               float64
	perG                           float64 // 127 or 15: V²/(perG·R) = e + f
}

// NewSide returns the curve side of a speed and a greatest rate (ratio).
// Friction, if given, replaces the standard's. R_min = V²/(127(e + f)) or
// V²/(15(e + f)), rounded to the nearest whole, in feet from 1,000 to the nearest
// ten.
func NewSide(s System, v, eMax float64, friction *float64) (Side, error) {
	row, err := s.bySpeed(v)
	if err != nil {
		return Side{}, err
	}
	c := Side{Speed: v, EMax: eMax, Friction: row.friction, Running: row.running, Gradient: row.gradient, perG: s.pick(127, 15)}
	if friction != nil {
		c.Friction = *friction
	}
	c.RMin = v * v / (c.perG * (eMax + c.Friction))
	c.RMinDesign = math.Round(c.RMin)
	if s == US && c.RMin >= 1000 {
		c.RMinDesign = 10 * math.Round(c.RMin/10)
	}
	return c, nil
}

// Rate returns the superelevation of a radius by AASHTO's method 5: side friction
// follows a parabola between two legs that meet where the greatest rate balances
// the running speed. Radii below RMin give the greatest rate.
func (c Side) Rate(r float64) float64 {
	if r <= c.RMin {
		return c.EMax
	}
	x := 1 / r
	rPI := c.Running * c.Running / (c.perG * c.EMax)
	hPI := c.EMax*c.Speed*c.Speed/(c.Running*c.Running) - c.EMax
	s1 := hPI * rPI
	l1, l2 := 1/rPI, 1/c.RMin-1/rPI
	gross := c.Speed * c.Speed / (c.perG * r)
	if l2 <= 0 {
		// The greatest rate is too high for the legs to meet above RMin.
		return math.Min(gross, c.EMax)
	}
	s2 := (c.Friction - hPI) / l2
	mo := l1 * l2 * (s2 - s1) / (2 * (l1 + l2))
	f := mo*(x/l1)*(x/l1) + x*s1
	if x > l1 {
		u := (1/c.RMin - x) / l2
		f = mo*u*u + hPI + s2*(x-l1)
	}
	return math.Min(math.Max(gross-f, 0), c.EMax)
}

// RadiusOf returns the radius at which a rate is reached; ok is false above the
// greatest rate and at none. The rate falls as the radius grows.
func (c Side) RadiusOf(e float64) (r float64, ok bool) {
	if e > c.EMax || e <= 0 {
		return 0, false
	}
	lo, hi := c.RMin, 1e7*c.RMin
	for range 200 {
		m := math.Sqrt(lo * hi)
		if c.Rate(m) >= e {
			lo = m
		} else {
			hi = m
		}
	}
	return lo, true
}

// laneFactors are the adjustments for lanes rotated, 1 to 3.5 by a half (AASHTO,
// ch. 3, from memory).
func laneFactors() []float64 { return []float64{1, 0.83, 0.75, 0.70, 0.67, 0.64} }

// Runoff returns the length over which the superelevation is turned in and the
// run-out before it: w·n·b_w·e/Δ and that times crown/e, rates and gradient in
// percent (AASHTO, ch. 3). ok is false for a number of lanes outside 1 to 3.5.
func Runoff(lane, lanes, ePct, gradientPct, crownPct float64) (runoff, runout float64, ok bool) {
	factors := laneFactors()
	i := (lanes - 1) * 2
	if !(i >= 0 && i <= float64(len(factors)-1)) {
		return 0, 0, false
	}
	k := int(math.Min(i, float64(len(factors)-2)))
	b := factors[k] + (i-float64(k))*(factors[k+1]-factors[k])
	runoff = lane * lanes * b * ePct / gradientPct
	// The run-out turns the crown level at the same rate.
	return runoff, lane * lanes * b * crownPct / gradientPct, true
}
