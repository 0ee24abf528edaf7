package drainage

import (
	"math"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// axis is the plan line of one barrel: x metres along it, positive to the
// right end, 0 where the middle axis meets the reference line. Every point of
// it sees the section of its own station, found by projecting it square to the
// alignment, on curves too.
type axis struct {
	road *section.Road
	ray  section.Ray
	hint station.Station
}

// newAxis returns the axis of a barrel that crosses the reference line at s,
// moved sideways by off (positive ahead).
func newAxis(r *section.Road, c *Culvert, s station.Station, off float64) axis {
	pose := r.Line().At(s)
	sin, cos := math.Sincos(pose.Azimuth)
	ahead, right := [2]float64{sin, cos}, [2]float64{cos, -sin}
	skew := c.Skew
	if !c.RightAhead {
		skew = -skew
	}
	ss, cs := math.Sincos(skew)
	d := [2]float64{cs*right[0] + ss*ahead[0], cs*right[1] + ss*ahead[1]}
	from := pose.XY
	// Square to the barrel, on the side of growing stations.
	from[0] += off * -d[1]
	from[1] += off * d[0]
	return axis{r, section.Ray{From: from, Dir: d}, s}
}

// at returns station and offset of the point x metres along the axis.
func (a axis) at(x float64) (station.Station, float64) {
	s, o, _ := a.road.Line().LocateNear(a.ray.Point(x), a.hint)
	return s, float64(o)
}

// finished returns the finished surface above the point x; ok is false off the
// road.
func (a axis) finished(x float64) (z float64, t *section.Typical, ok bool) {
	s, o := a.at(x)
	return a.road.Finished(s, o)
}

// marchStep is the step in metres of a walk along a barrel that looks for a
// change of sign: no lane, shoulder or step of a section is narrower.
const marchStep = 0.25

// farthest bounds every walk along a barrel, in metres: no culvert is longer.
const farthest = 500.0

// crossing walks from x0 in the direction of side (±1) to the first x where
// |offset| reaches the limit that a typical section gives for that side.
// ok is false when the road ends before.
func (a axis) crossing(x0 float64, side int, limit func(*section.Typical) float64) (x float64, ok bool) {
	f := func(x float64) (float64, bool) {
		s, o := a.at(x)
		_, t, ok := a.road.Finished(s, o)
		if !ok {
			return 0, false
		}
		return float64(side)*o - limit(t), true
	}
	prev := x0
	for d := 0.0; d <= farthest; d += marchStep {
		x := x0 + float64(side)*d
		v, ok := f(x)
		if !ok {
			return 0, false
		}
		if v >= 0 {
			return bisect(func(x float64) float64 { v, _ := f(x); return v }, prev, x), true
		}
		prev = x
	}
	return 0, false
}

// hinge returns the x where the axis crosses the hinge of a side.
func (a axis) hinge(side int) (float64, bool) {
	return a.crossing(a.centre(), side, func(t *section.Typical) float64 { return t.Side(side).Hinge() })
}

// centre returns the x where the axis crosses the reference line.
func (a axis) centre() float64 {
	x := 0.0
	// Newton with the slope of a straight road: exact there, and on curves the
	// offset falls by the square of what is left in each step.
	for range 20 {
		_, o := a.at(x)
		if math.Abs(o) < searchEnd {
			break
		}
		p := a.road.Line().At(a.hint)
		x -= o / (a.ray.Dir[0]*math.Cos(p.Azimuth) - a.ray.Dir[1]*math.Sin(p.Azimuth))
	}
	return x
}

// searchEnd is the length in metres at which a search along a barrel ends: a
// thousandth of what results are written with.
const searchEnd = 1e-12

// bisect returns the place between a and b where f reaches zero; f(b) >= 0 or
// f changes sign between them. It halves until the bracket is as narrow as
// numbers allow.
func bisect(f func(float64) float64, a, b float64) float64 {
	fa, fb := f(a), f(b)
	if fa == 0 {
		return a
	}
	for range 200 {
		if fb == 0 || math.Abs(b-a) <= searchEnd {
			break
		}
		m := a + (b-a)/2
		// A secant step first: the functions here are linear or nearly so.
		if t := a + (b-a)*fa/(fa-fb); t != a && t != b && !math.IsNaN(t) && !math.IsInf(t, 0) {
			if ft := f(t); ft == 0 {
				return t
			} else if (ft > 0) == (fb > 0) {
				b, fb = t, ft
			} else {
				a, fa = t, ft
			}
			m = a + (b-a)/2
		}
		fm := f(m)
		if (fm > 0) == (fb > 0) {
			b, fb = m, fm
		} else {
			a, fa = m, fm
		}
	}
	if fb == 0 || math.Abs(fb) < math.Abs(fa) {
		return b
	}
	return a
}
