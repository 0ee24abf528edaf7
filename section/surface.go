package section

import (
	"math"

	"sagcrest/profile/station"
)

// Place tells what part of the section lies at an offset.
type Place string

// What lies at an offset. At a joint the outer name holds: edge, hinge.
const (
	OnLane     Place = "lane"
	OnEdge     Place = "edge"
	OnShoulder Place = "shoulder"
	OnHinge    Place = "hinge"
	OnSlope    Place = "slope"
)

// atJoint is the distance in metres below which an offset lies on a joint of
// the section: it allows for the search along a skewed barrel, which ends at
// 1e-10 m, and is far below anything set out.
const atJoint = 1e-7

// Finished returns the finished surface at a station and offset, and the
// typical section there. Beyond a hinge it is the fill slope, whatever the
// ground: what ends a barrel is decided by FillSide. ok is false off the road
// and where no single typical section holds.
func (r *Road) Finished(s station.Station, o float64) (z float64, t *Typical, ok bool) {
	if !r.On(s) {
		return 0, nil, false
	}
	k := r.TypicalAt(s, false)
	if k < 0 {
		return 0, nil, false
	}
	t = r.shape(k, s)
	z = r.Elev(s) + t.Rise(o)
	if beyond := math.Abs(o) - t.hinge(o); beyond > 0 {
		z -= beyond / t.FillSlope
	}
	return z, t, true
}

// hinge returns the distance of the hinge on the side of an offset.
func (t *Typical) hinge(o float64) float64 {
	if o < 0 {
		return t.Left.Hinge()
	}
	return t.Right.Hinge()
}

// What names the part of the section at an offset.
func (t *Typical) What(o float64) Place {
	half := t.Left
	if o > 0 {
		half = t.Right
	}
	u, lane, h := math.Abs(o), half.Lane.Width, half.Hinge()
	switch {
	case math.Abs(u-h) <= atJoint:
		return OnHinge
	case u > h:
		return OnSlope
	case math.Abs(u-lane) <= atJoint:
		return OnEdge
	case u > lane:
		return OnShoulder
	}
	return OnLane
}

// InCut reports whether a side is in cut at a station: the stripped ground at
// the hinge lies above the earthwork line just outside it. known is false where
// there is no ground or no section.
func (r *Road) InCut(w *Scratch, s station.Station, side int) (cut, known bool) {
	k := r.TypicalAt(s, false)
	if k < 0 {
		return false, false
	}
	t := r.shape(k, s)
	o := float64(side) * t.Side(side).Hinge()
	g, ok := r.ground.Level(w, s, o)
	if !ok {
		return false, false
	}
	return g-r.strip.Depth > r.Elev(s)+t.Rise(o)-t.Dressing+levelTie, true
}

// LowestGround returns the station with the lowest original ground on the
// reference line inside over, both ends included; ties take the lower station.
// ok is false where the ground is not known all along.
func (r *Road) LowestGround(w *Scratch, over station.Interval) (at station.Station, ok bool) {
	best := math.Inf(1)
	for _, s := range r.groundStations(w, over) {
		z, known := r.ground.Level(w, s, 0)
		if !known {
			return 0, false
		}
		// A level must be lower by more than rounding to move the place.
		if z < best-levelTie {
			best, at = z, s
		}
	}
	return at, true
}

// groundStations returns the stations of over where the ground under the
// reference line may bend, ends included. Along a straight element they are
// the corners of the surface; along a curve the chords between close stations
// stand in, each of them cut exactly.
func (r *Road) groundStations(w *Scratch, over station.Interval) []station.Station {
	marks := []station.Station{over.From}
	marks = append(marks, r.Breaks(over)...)
	marks = append(marks, over.To)
	var out []station.Station
	for i := 1; i < len(marks); i++ {
		out = append(out, r.cornersBetween(w, marks[i-1], marks[i])...)
	}
	return out
}

func (r *Road) cornersBetween(w *Scratch, a, b station.Station) (out []station.Station) {
	const chord = 0.25 // m: a chord of 0.25 m leaves an arc of R 30 m by 0.3 mm
	n := 1
	if !r.line.Straight(station.Interval{From: a, To: b}) {
		n = int(math.Ceil(float64(b-a) / chord))
	}
	var xs []float64
	for i := range n {
		s0 := a + (b-a)*station.Station(i)/station.Station(n)
		s1 := a + (b-a)*station.Station(i+1)/station.Station(n)
		p, q := r.line.Point(s0, 0), r.line.Point(s1, 0)
		d := math.Hypot(q[0]-p[0], q[1]-p[1])
		ray := Ray{From: p, Dir: [2]float64{(q[0] - p[0]) / d, (q[1] - p[1]) / d}}
		xs = r.ground.Corners(w, xs[:0], ray, 0, d)
		out = append(out, s0)
		for _, x := range xs {
			out = append(out, s0+(s1-s0)*station.Station(x/d))
		}
		out = append(out, s1)
	}
	return out
}
