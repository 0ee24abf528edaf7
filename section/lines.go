package section

import (
	"slices"

	"sagcrest/profile/station"
)

// LineID names a line of the section that water may follow.
type LineID string

// The lines of a section, from the middle outward. Edges are those of the
// lanes, hinges the outer edges of the shoulders.
const (
	Centre     LineID = "centre"
	LeftEdge   LineID = "left_edge"
	RightEdge  LineID = "right_edge"
	LeftHinge  LineID = "left_hinge"
	RightHinge LineID = "right_hinge"
)

// LineIDs lists the lines in the order in which results name them.
func LineIDs() []LineID {
	return []LineID{Centre, LeftEdge, RightEdge, LeftHinge, RightHinge}
}

// offset returns where a line of a typical section lies.
func (t *Typical) offset(id LineID) float64 {
	switch id {
	case LeftEdge:
		return -t.Left.Lane.Width
	case RightEdge:
		return t.Right.Lane.Width
	case LeftHinge:
		return -t.Left.Hinge()
	case RightHinge:
		return t.Right.Hinge()
	}
	return 0
}

// stretch is a part of a line on which its level is one quadratic of the
// distance x from over.From: z + g·x + r/2·x².
type stretch struct {
	over    station.Interval
	offset  float64
	z, g, r float64
}

// grade returns the slope at a station, as rise per metre of the reference
// line. Along an offset line in a curve the true slope is this divided by
// (1 − κo); its sign, and so every turning point, is the same.
func (p stretch) grade(s station.Station) float64 { return p.g + p.r*float64(s-p.over.From) }

func (p stretch) level(s station.Station) float64 {
	x := float64(s - p.over.From)
	return p.z + p.g*x + p.r/2*x*x
}

// stretches cuts a line of the section into parts with one quadratic each.
// Stretches without exactly one typical section are left out.
func (r *Road) stretches(id LineID) (out []stretch) {
	for _, p := range r.grade.Pieces() {
		base := stretch{over: p.Over, z: p.Z, g: p.G, r: p.R}
		over := p.Over.Intersect(r.over)
		if over.Empty() {
			continue
		}
		marks := append([]station.Station{over.From}, r.shapeEnds(over)...)
		marks = append(marks, over.To)
		for i := 1; i < len(marks); i++ {
			k := r.TypicalAt(marks[i-1], false)
			if k < 0 {
				continue
			}
			from, to := marks[i-1], marks[i]
			o := r.typicals[k].offset(id)
			// Between rows the crossfalls are linear in the station.
			rise := r.shape(k, from).Rise(o)
			turn := (r.shape(k, to).Rise(o) - rise) / float64(to-from)
			out = append(out, stretch{
				over: station.Interval{From: from, To: to}, offset: o,
				z: base.level(from) + rise, g: base.grade(from) + turn, r: base.r,
			})
		}
	}
	return out
}

// shapeEnds returns the ends of typical sections and the rows of the
// superelevation table strictly inside over, increasing.
func (r *Road) shapeEnds(over station.Interval) []station.Station {
	var all []station.Station
	for _, t := range r.typicals {
		all = append(all, t.Over.From, t.Over.To)
	}
	for _, c := range r.table {
		all = append(all, c.At)
	}
	all = slices.DeleteFunc(all, func(s station.Station) bool { return s <= over.From || s >= over.To })
	slices.Sort(all)
	return slices.Compact(all)
}

// LineEnd is a line at one end of the road: an end is no turning point.
type LineEnd struct {
	Line   LineID
	AtEnd  bool
	At     station.Station
	Offset station.Offset
	Elev   float64
	Grade  float64 // ratio along the reference line
}

// Ends returns every line of the section at the two ends of the road.
func (r *Road) Ends() (out []LineEnd) {
	for _, id := range LineIDs() {
		ps := r.stretches(id)
		if len(ps) == 0 {
			continue
		}
		a, b := ps[0], ps[len(ps)-1]
		out = append(out,
			LineEnd{id, false, a.over.From, station.Offset(a.offset), a.level(a.over.From), a.grade(a.over.From)},
			LineEnd{id, true, b.over.To, station.Offset(b.offset), b.level(b.over.To), b.grade(b.over.To)})
	}
	return out
}
