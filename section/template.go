package section

import "math"

// run is a polyline of one half of the road, outward from the reference line:
// u is the distance from it, never decreasing. Beyond the last corner it goes
// on with the slope rise per metre, for ever.
type run struct {
	pts  []Point // O holds u
	rise float64
	// ditchEnd is the u where the ditch's bottom ends, 0 without a ditch.
	ditchEnd float64
}

// outside returns the finished surface of a side from the hinge outward, given
// the finished hinge.
func (t *Typical) outside(dst []Point, hinge Point, cut bool) run {
	dst = append(dst, hinge)
	if !cut {
		return run{pts: dst, rise: -1 / t.FillSlope}
	}
	r := run{rise: 1 / t.CutSlope}
	if d := t.Ditch; d != nil {
		bottom := Point{hinge.O + d.Depth*d.ForeSlope, hinge.Z - d.Depth}
		dst = append(dst, bottom)
		if d.Bottom > 0 {
			bottom.O += d.Bottom
			dst = append(dst, bottom)
		}
		r.ditchEnd = bottom.O
		if d.BackSlope > 0 {
			dst = append(dst, Point{bottom.O + d.Depth*d.BackSlope, hinge.Z})
		}
	}
	r.pts = dst
	return r
}

// at returns the level of the run at distance u, which must not lie before its
// first corner.
func (r run) at(u float64) float64 {
	last := r.pts[len(r.pts)-1]
	if u >= last.O {
		return last.Z + (u-last.O)*r.rise
	}
	for i := len(r.pts) - 1; i > 0; i-- {
		a, b := r.pts[i-1], r.pts[i]
		if u >= a.O && b.O > a.O {
			return a.Z + (b.Z-a.Z)*(u-a.O)/(b.O-a.O)
		}
	}
	return r.pts[0].Z
}

// deck returns the finished surface of one half from the reference line to the
// hinge, as corners of distance and level; side is −1 or +1.
func (t *Typical) deck(dst []Point, side int, centre float64) []Point {
	half := t.Side(side)
	dst = append(dst, Point{0, centre})
	edge := half.Lane.Width
	if edge > 0 {
		dst = append(dst, Point{edge, centre + t.Rise(float64(side)*edge)})
	}
	if half.Shoulder.Width > 0 {
		h := half.Hinge()
		dst = append(dst, Point{h, centre + t.Rise(float64(side)*h)})
	}
	return dst
}

// meeting is where a run first meets the ground.
type meeting struct {
	u     float64
	found bool
	until float64 // the last u looked at, when not found
}

// firstMeeting walks outward from u0 and returns the first place where the run
// (lowered by drop) and the ground meet. The ground is a polyline in u that
// reaches back to u0 at least. cut tells that the run starts below the ground.
func firstMeeting(r run, drop float64, ground []Point, u0 float64, cut bool) meeting {
	diff := func(u, g float64) float64 {
		d := r.at(u) - drop - g
		if cut {
			return -d
		}
		return d
	}
	prevU, prevD := u0, diff(u0, levelAt(ground, u0))
	if prevD <= 0 {
		return meeting{u: u0, found: true}
	}
	step := func(u, g float64) (meeting, bool) {
		d := diff(u, g)
		if d <= 0 {
			return meeting{u: prevU + (u-prevU)*prevD/(prevD-d), found: true}, true
		}
		prevU, prevD = u, d
		return meeting{}, false
	}
	corner := 0
	for i := range ground {
		if ground[i].O <= u0 {
			continue
		}
		for ; corner < len(r.pts) && r.pts[corner].O < ground[i].O; corner++ {
			if u := r.pts[corner].O; u > prevU {
				if m, ok := step(u, levelAt(ground, u)); ok {
					return m
				}
			}
		}
		if m, ok := step(ground[i].O, ground[i].Z); ok {
			return m
		}
	}
	return meeting{until: prevU}
}

// levelAt returns the level of a polyline at distance u, clamped to its ends.
func levelAt(line []Point, u float64) float64 {
	if len(line) == 0 {
		return math.NaN()
	}
	if u <= line[0].O {
		return line[0].Z
	}
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		if u <= b.O {
			if b.O == a.O {
				return b.Z
			}
			return a.Z + (b.Z-a.Z)*(u-a.O)/(b.O-a.O)
		}
	}
	return line[len(line)-1].Z
}
