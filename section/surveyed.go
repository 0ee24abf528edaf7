package section

import (
	"math"
	"slices"
	"sort"

	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
	"sagcrest/section/terrain"
)

// surveyedGround interpolates between section lines: at one offset the level
// is linear in the station between two neighbouring lines. Outside the offsets
// of either line, and beyond the last line, nothing is known.
type surveyedGround struct {
	lines []SurveyLine
	along *alignment.Alignment
	reach float64
}

// Surveyed returns the ground of lines surveyed square to the road, in order
// of station, each with at least one point and increasing offsets.
func Surveyed(lines []SurveyLine, a *alignment.Alignment) Ground {
	g := &surveyedGround{lines: lines, along: a}
	for _, l := range lines {
		first, last := l.Points[0].Offset, l.Points[len(l.Points)-1].Offset
		g.reach = math.Max(g.reach, math.Max(math.Abs(float64(first)), math.Abs(float64(last))))
	}
	return g
}

// around returns the two lines that hold s and the weight of the second. A
// station on a line uses that line alone (both indices equal).
func (g *surveyedGround) around(s station.Station) (i, j int, t float64, ok bool) {
	n := len(g.lines)
	j = sort.Search(n, func(k int) bool { return g.lines[k].At >= s-onLine })
	if j == n {
		return 0, 0, 0, false
	}
	if math.Abs(float64(g.lines[j].At-s)) <= onLine {
		return j, j, 0, true
	}
	if j == 0 {
		return 0, 0, 0, false
	}
	a, b := g.lines[j-1].At, g.lines[j].At
	return j - 1, j, float64((s - a) / (b - a)), true
}

// onLine is the distance below which a station lies on a surveyed line: the
// rounding of station arithmetic, far below anything measured.
const onLine = 1e-7

func (g *surveyedGround) Across(_ *Scratch, dst []Point, gaps []terrain.Gap, at station.Station, from, to float64) ([]Point, []terrain.Gap) {
	i, j, t, ok := g.around(at)
	if !ok {
		return dst, append(gaps, terrain.Gap{From: from, To: to, Outside: true})
	}
	a, b := g.lines[i].Points, g.lines[j].Points
	lo := math.Max(float64(max(a[0].Offset, b[0].Offset)), from)
	hi := math.Min(float64(min(a[len(a)-1].Offset, b[len(b)-1].Offset)), to)
	if lo > hi {
		return dst, append(gaps, terrain.Gap{From: from, To: to, Outside: true})
	}
	if lo > from {
		gaps = append(gaps, terrain.Gap{From: from, To: lo, Outside: true})
	}
	for _, o := range offsetsBetween(a, b, lo, hi) {
		dst = append(dst, Point{o, (1-t)*levelOn(a, o) + t*levelOn(b, o)})
	}
	if hi < to {
		gaps = append(gaps, terrain.Gap{From: hi, To: to, Outside: true})
	}
	return dst, gaps
}

// offsetsBetween returns lo, hi and every offset of either line in between,
// increasing and without repeats.
func offsetsBetween(a, b []LinePoint, lo, hi float64) []float64 {
	all := make([]float64, 0, len(a)+len(b)+2)
	all = append(all, lo, hi)
	for _, l := range [][]LinePoint{a, b} {
		for _, p := range l {
			if o := float64(p.Offset); lo < o && o < hi {
				all = append(all, o)
			}
		}
	}
	slices.Sort(all)
	return slices.Compact(all)
}

// levelOn returns the level of a line at an offset that it holds.
func levelOn(l []LinePoint, o float64) float64 {
	k := sort.Search(len(l), func(k int) bool { return float64(l[k].Offset) >= o })
	switch {
	case k == len(l):
		return l[k-1].Z
	case k == 0 || float64(l[k].Offset) == o:
		return l[k].Z
	}
	p, q := l[k-1], l[k]
	u := (o - float64(p.Offset)) / float64(q.Offset-p.Offset)
	return (1-u)*p.Z + u*q.Z
}

func (g *surveyedGround) Level(_ *Scratch, at station.Station, o float64) (float64, bool) {
	i, j, t, ok := g.around(at)
	if !ok {
		return 0, false
	}
	a, b := g.lines[i].Points, g.lines[j].Points
	for _, l := range [][]LinePoint{a, b} {
		if o < float64(l[0].Offset) || o > float64(l[len(l)-1].Offset) {
			return 0, false
		}
	}
	return (1-t)*levelOn(a, o) + t*levelOn(b, o), true
}

// Corners returns the places where the ray passes a surveyed line or the
// offset of a surveyed point. In between, the ground along the ray is smooth.
func (g *surveyedGround) Corners(_ *Scratch, dst []float64, r Ray, x0, x1 float64) []float64 {
	first := len(dst)
	dst = append(dst, x0, x1)
	// On a straight stretch both station and offset are linear in x; on a curve
	// a fixed fine step keeps the pieces short enough to be smooth.
	const step = 0.25
	for x := x0 + step; x < x1; x += step {
		dst = append(dst, x)
	}
	s0, _, _ := g.along.LocateNear(r.Point(x0), 0)
	prev := s0
	at := func(x float64) (float64, float64) {
		s, o, _ := g.along.LocateNear(r.Point(x), prev)
		return float64(s), float64(o)
	}
	sa, oa := at(x0)
	sb, ob := at(x1)
	for _, l := range g.lines {
		dst = appendBetween(dst, x0, x1, sa, sb, float64(l.At))
		for _, p := range l.Points {
			dst = appendBetween(dst, x0, x1, oa, ob, float64(p.Offset))
		}
	}
	slices.Sort(dst[first:])
	return dst[:first+len(slices.Compact(dst[first:]))]
}

// appendBetween appends the x where a quantity that runs linearly from a at x0
// to b at x1 takes the value v, if it lies inside.
func appendBetween(dst []float64, x0, x1, a, b, v float64) []float64 {
	if (v-a)*(v-b) < 0 {
		dst = append(dst, x0+(x1-x0)*(v-a)/(b-a))
	}
	return dst
}

func (g *surveyedGround) Reach() float64 { return g.reach }
