package section

import (
	"math"
	"slices"

	"sagcrest/profile/station"
	"sagcrest/section/terrain"
)

// levelTie is the difference in metres below which ground and earthwork line
// are at one level at the hinge: sums of levels carry a rounding of about
// 1e-13 m, a survey one of a millimetre.
const levelTie = 1e-9

// firstWidth is the offset in metres up to which the ground is cut at first; it
// doubles until both sides catch or the ground ends.
const firstWidth = 40.0

// Slice cuts the road square at a station into dst. With before, a station
// where a typical section or a stratum ends is cut with what ends there.
// Cut and fill areas lie between the stripped ground and the earthwork line
// (underside of the pavement from hinge to hinge, finished surface less
// dressing outside), from catch point to catch point.
func (r *Road) Slice(w *Scratch, dst *Slice, at station.Station, before bool) {
	*dst = Slice{At: at, Before: before, Typical: r.TypicalAt(at, before),
		Parts: dst.Parts[:0], GroundLine: dst.GroundLine[:0]}
	dst.Finished = r.Elev(at)
	if dst.Typical < 0 {
		r.cutGround(w, dst, firstWidth)
		return
	}
	t := r.shape(dst.Typical, at)
	dst.Subgrade = dst.Finished - t.Pavement
	for width := firstWidth; ; width *= 2 {
		gaps := r.cutGround(w, dst, width)
		left, okL := r.flank(t, dst, gaps, -1, width)
		right, okR := r.flank(t, dst, gaps, +1, width)
		dst.Left, dst.Right = left, right
		if okL && okR || width >= r.ground.Reach() {
			break
		}
	}
	r.measure(t, dst)
}

// cutGround fills the ground line and the levels at the reference line.
func (r *Road) cutGround(w *Scratch, dst *Slice, width float64) []terrain.Gap {
	dst.GroundLine, w.gaps = r.ground.Across(w, dst.GroundLine[:0], w.gaps[:0], dst.At, -width, width)
	dst.Ground, dst.GroundKnown = 0, false
	if line := dst.GroundLine; len(line) > 0 && line[0].O <= 0 && line[len(line)-1].O >= 0 && !inGap(w.gaps, 0) {
		dst.Ground, dst.GroundKnown = levelAt(line, 0), true
	}
	dst.Stripped = dst.Ground - r.strip.Depth
	return w.gaps
}

// inGap reports whether an offset lies strictly inside a gap.
func inGap(gaps []terrain.Gap, o float64) bool {
	return slices.ContainsFunc(gaps, func(g terrain.Gap) bool { return g.From < o && o < g.To })
}

// flank lays the slope of one side. ok is false when the ground went on beyond
// the width that was cut and the slope has not caught it yet.
func (r *Road) flank(t *Typical, s *Slice, gaps []terrain.Gap, side int, width float64) (f Flank, ok bool) {
	half := t.Side(side)
	h := half.Hinge()
	f.Hinge = Point{float64(side) * h, s.Finished + t.Rise(float64(side)*h)}
	ground, gap := outward(s, gaps, side)
	known := 0.0
	if len(ground) > 0 {
		known = ground[len(ground)-1].O
	}
	if !s.GroundKnown || known < h {
		return f.lost(side, known, gap), gap != nil || known < width
	}
	stripped := levelAt(ground, h) - r.strip.Depth
	f.Cut = stripped > f.Hinge.Z-t.Dressing+levelTie
	outside := t.outside(nil, Point{h, f.Hinge.Z}, f.Cut)
	if f.Cut && t.Ditch != nil {
		f.Ditch = &Point{float64(side) * outside.pts[1].O, outside.pts[1].Z}
	}
	// The run is lowered by the dressing and the ground by the strip.
	m := firstMeeting(outside, t.Dressing-r.strip.Depth, ground, h, f.Cut)
	if !m.found {
		return f.lost(side, known, gap), gap != nil || known < width
	}
	f.Catch = Point{float64(side) * m.u, levelAt(ground, m.u)}
	if 1-r.line.Curvature(s.At)*f.Catch.O <= 0 {
		f.State = Folded
	}
	f.InDitch = f.Ditch != nil && m.u <= outside.ditchEnd
	f.DressedOver = m.u - h
	f.StripWidth = m.u + r.strip.Margin
	return f, true
}

// lost marks a side whose slope did not reach the ground.
func (f Flank) lost(side int, known float64, gap *terrain.Gap) Flank {
	f.State = BeyondSurvey
	if gap != nil && !gap.Outside {
		f.State = InHole
	}
	f.SearchedTo = float64(side) * known
	return f
}

// outward returns the ground of one side as distances from the reference line,
// up to its first gap, and that gap.
func outward(s *Slice, gaps []terrain.Gap, side int) (line []Point, gap *terrain.Gap) {
	limit := math.Inf(1)
	for i := range gaps {
		near, far := gaps[i].From, gaps[i].To
		if side < 0 {
			near, far = -far, -near
		}
		if far > 0 && near < limit {
			limit, gap = math.Max(near, 0), &gaps[i]
		}
	}
	if !s.GroundKnown {
		return nil, gap
	}
	line = append(line, Point{0, s.Ground})
	add := func(p Point) {
		if u := float64(side) * p.O; u > 0 && u <= limit {
			line = append(line, Point{u, p.Z})
		}
	}
	if side > 0 {
		for _, p := range s.GroundLine {
			add(p)
		}
	} else {
		for _, p := range slices.Backward(s.GroundLine) {
			add(p)
		}
	}
	return line, gap
}
