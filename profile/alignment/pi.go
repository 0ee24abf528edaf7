package alignment

import (
	"math"

	"github.com/paulmach/orb"
)

// PI is a point of intersection: easting and northing in metres, and the curve
// that rounds it. Radius 0 means none; the side follows from the PIs. SpiralIn
// and SpiralOut are the lengths of the clothoids before and after the arc.
type PI struct {
	E, N                        float64
	Radius, SpiralIn, SpiralOut float64
}

// PIRow is a PI with everything that follows from it. Angles in radians,
// lengths in metres, Deflection positive to the right.
type PIRow struct {
	Index                 int
	PI                    PI
	AzimuthIn             float64
	Deflection            float64
	AngleIn, AngleOut     float64 // turned by the two clothoids
	ShiftIn, ShiftOut     float64 // by which they move the arc inward
	TangentIn, TangentOut float64
	ArcAngle, ArcLength   float64
	External              float64 // PI to the middle of the arc; 0 with unequal clothoids
}

// Length returns the length of clothoids and arc together.
func (r PIRow) Length() float64 { return r.PI.SpiralIn + r.ArcLength + r.PI.SpiralOut }

// solve computes one PI from the directions before and after it.
func (q *rule) solve(index int, p PI, before, after float64) PIRow {
	r := PIRow{Index: index, PI: p, AzimuthIn: before, Deflection: turn(after - before)}
	if p.Radius <= 0 {
		return r
	}
	d, R := math.Abs(r.Deflection), p.Radius
	in, out := q.spiralAt(p.SpiralIn, R), q.spiralAt(p.SpiralOut, R)
	r.AngleIn, r.AngleOut = in.angle, out.angle
	r.ShiftIn, r.ShiftOut = in.shift, out.shift
	r.ArcAngle = math.Max(d-in.angle-out.angle, 0)
	r.ArcLength = R * r.ArcAngle
	if sin := math.Sin(d); d > 0 && sin > 0 {
		// Hickerson: tangents of unequal clothoids.
		a, b := R+in.shift, R+out.shift
		r.TangentIn = in.abscissa + (b-a*math.Cos(d))/sin
		r.TangentOut = out.abscissa + (a-b*math.Cos(d))/sin
	}
	if p.SpiralIn == p.SpiralOut {
		r.External = (R+in.shift)/math.Cos(d/2) - R
	}
	return r
}

// turn brings an angle into (−π, π].
func turn(a float64) float64 {
	a = math.Remainder(a, 2*math.Pi)
	if a == -math.Pi {
		return math.Pi
	}
	return a
}

// azimuth returns the direction from one point to another.
func azimuth(a, b orb.Point) float64 { return math.Atan2(b[0]-a[0], b[1]-a[1]) }

// ahead returns the point at a distance along an azimuth.
func ahead(p orb.Point, az, d float64) orb.Point {
	s, c := math.Sincos(az)
	return orb.Point{p[0] + d*s, p[1] + d*c}
}
