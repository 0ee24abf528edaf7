package section

import (
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Clearance is the least vertical distance between the finished surface and an
// obstacle, over the obstacle's length and width as far as hinge to hinge.
// Known is false when the obstacle does not lie on the road.
type Clearance struct {
	Obstacle Obstacle
	Known    bool
	Gap      float64
	At       station.Station
	Offset   station.Offset
	OK       bool
	Formula  struct{ Obstacle, Road float64 } // the two levels at the place
}

// touch is the shortage in metres that still counts as touching the limit,
// which is allowed: the rounding of levels computed from millimetres.
const touch = 1e-9

// Clear measures one obstacle. On an offset line the gap is one quadratic of
// the station between breaks of the road, so its least value stands at a break,
// at an edge of the obstacle, or where its slope vanishes; across the road it
// is linear between the corners of the section.
func (r *Road) Clear(o Obstacle) Clearance {
	c := Clearance{Obstacle: o, Gap: math.Inf(1)}
	if !r.On(o.Over.From) || !r.On(o.Over.To) {
		return c
	}
	from, to := max(o.Over.From, r.over.From), min(o.Over.To, r.over.To)
	marks := []station.Station{from}
	marks = append(marks, r.Breaks(station.Interval{From: from, To: to})...)
	marks = append(marks, to)
	if len(marks) == 2 && from == to {
		marks = marks[:1]
	}
	for i, a := range marks {
		b := a
		if i+1 < len(marks) {
			b = marks[i+1]
		} else if i > 0 {
			break
		}
		r.clearBetween(&c, a, b)
	}
	c.OK = c.Known && c.Gap >= o.Gap-touch
	return c
}

// clearBetween looks at one stretch without breaks.
func (r *Road) clearBetween(c *Clearance, a, b station.Station) {
	k := r.TypicalAt(a, a == b && a == r.over.To)
	if k < 0 {
		return
	}
	for _, off := range r.typicals[k].corners(c.Obstacle.Left, c.Obstacle.Right) {
		gap := func(s station.Station) (g, obstacle, road float64) {
			obstacle, road = c.Obstacle.level(s), r.Elev(s)+r.shape(k, s).Rise(off)
			if c.Obstacle.Under {
				return obstacle - road, obstacle, road
			}
			return road - obstacle, obstacle, road
		}
		for _, s := range leastPlaces(a, b, func(s station.Station) float64 { g, _, _ := gap(s); return g }) {
			c.take(s, off, gap)
		}
	}
}

// take keeps a place if it is the least so far; of equal ones the lower
// station, then the lower offset.
func (c *Clearance) take(s station.Station, off float64, gap func(station.Station) (g, obstacle, road float64)) {
	g, obstacle, road := gap(s)
	o := station.Offset(off)
	less := g < c.Gap-touch
	tied := !less && g <= c.Gap+touch && (s < c.At-1e-9 || s <= c.At+1e-9 && o < c.Offset)
	if !c.Known || less || tied {
		c.Known, c.Gap, c.At, c.Offset = true, g, s, o
		c.Formula.Obstacle, c.Formula.Road = obstacle, road
	}
}

// level returns the obstacle's level at a station.
func (o *Obstacle) level(s station.Station) float64 {
	if o.Over.To == o.Over.From {
		return o.ElevFrom
	}
	t := float64((s - o.Over.From) / (o.Over.To - o.Over.From))
	return o.ElevFrom + t*(o.ElevTo-o.ElevFrom)
}

// corners returns the offsets where the finished surface may be nearest to an
// obstacle between two offsets, kept inside the hinges, increasing. It is empty
// when the obstacle lies wholly outside the hinges.
func (t *Typical) corners(left, right *station.Offset) []float64 {
	lo, hi := -t.Left.Hinge(), t.Right.Hinge()
	if left != nil {
		lo = math.Max(lo, float64(*left))
	}
	if right != nil {
		hi = math.Min(hi, float64(*right))
	}
	if lo > hi {
		return nil
	}
	out := []float64{lo}
	for _, o := range []float64{-t.Left.Lane.Width, 0, t.Right.Lane.Width} {
		if lo < o && o < hi {
			out = append(out, o)
		}
	}
	if hi > lo {
		out = append(out, hi)
	}
	return out
}

// leastPlaces returns a, b and, where a quadratic f has its vertex strictly in
// between, the vertex.
func leastPlaces(a, b station.Station, f func(station.Station) float64) []station.Station {
	if !(b > a) {
		return []station.Station{a}
	}
	m := (a + b) / 2
	fa, fm, fb := f(a), f(m), f(b)
	curve := fa - 2*fm + fb
	// A chord that bends by less than rounding has no vertex of its own.
	if math.Abs(curve) < 1e-12 {
		return []station.Station{a, b}
	}
	h := float64(b-a) / 2
	x := h * (fa - fb) / (2 * curve)
	if v := m + station.Station(x); a < v && v < b {
		return []station.Station{a, v, b}
	}
	return []station.Station{a, b}
}

// Finding says that the clearance is short (P14) or that the obstacle does not
// lie on the road (A03); ok is true when there is nothing to say.
func (c Clearance) Finding(key, path string) (f finding.Finding, ok bool) {
	o := c.Obstacle
	switch {
	case !c.Known:
		return finding.Finding{
			Code: "A03", Severity: finding.Error,
			At:    finding.Between(o.Over.From, o.Over.To).Under(key).Named(o.Name),
			Args:  []any{"clearance " + o.Name, o.Over.From, o.Over.To},
			Stops: []string{path + ".gap", path + ".place", path + ".offset", path + ".ok"},
		}, false
	case !c.OK:
		way := "over"
		if o.Under {
			way = "under"
		}
		return finding.Finding{
			Code: "P14", Severity: finding.Error,
			At:       finding.On(c.At).Aside(c.Offset).Under(key).Named(o.Name),
			Measured: finding.Of(c.Gap, "m"), Limit: finding.Of(o.Gap, "m"),
			Args: []any{way, o.Name, finding.Of(c.Gap, "m"), c.At, c.Offset, finding.Of(o.Gap, "m"), finding.Of(o.Gap-c.Gap, "m")},
		}, false
	}
	return finding.Finding{}, true
}
