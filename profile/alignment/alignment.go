package alignment

import (
	"math"
	"sort"

	"github.com/paulmach/orb"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Kind of an element.
type Kind string

// The elements of an alignment.
const (
	Tangent  Kind = "tangent"
	Arc      Kind = "arc"
	Clothoid Kind = "clothoid"
)

// Element is a stretch of one kind. Radii in metres, positive turning right,
// +Inf for straight; Start is easting and northing; Azimuth the direction there
// in radians. PI is the index of its point of intersection, −1 for a tangent.
type Element struct {
	Kind                 Kind
	Over                 station.Interval
	RadiusFrom, RadiusTo float64
	Start                orb.Point
	Azimuth              float64
	PI                   int

	rule *rule
}

// Alignment is a chain of elements without gaps or kinks.
type Alignment struct {
	elements []Element
	rows     []PIRow
	gaps     []float64 // from each PI to the next, for the checks
	length   station.Station
	rule     *rule
}

// leftOver is the shortage of tangent in metres that still counts as none: the
// rounding of coordinates given to a millimetre and better.
const leftOver = 1e-6

// New lays an alignment through at least two PIs; the first and the last are its
// ends, and a curve given there is not looked at. It returns nil and findings
// A16 when arcs and clothoids overlap or do not fit their deflection, when a PI
// folds back or stands on the one before, and when one has only part of what
// makes a curve: deflection, radius, clothoids. Fewer than two PIs are F05.
func New(pi []PI) (*Alignment, []finding.Finding) {
	if found := checkPoints(pi); found != nil {
		return nil, found
	}
	rule := newRule()
	a := &Alignment{rows: rule.solveAll(pi), rule: rule}
	for i := 1; i < len(pi); i++ {
		a.gaps = append(a.gaps, math.Hypot(pi[i].E-pi[i-1].E, pi[i].N-pi[i-1].N))
	}
	if found := a.checkRows(); found != nil {
		return nil, found
	}
	if found := a.checkTangents(); found != nil {
		return nil, found
	}
	at := orb.Point{pi[0].E, pi[0].N}
	for _, r := range a.rows {
		p := orb.Point{r.PI.E, r.PI.N}
		a.tangent(at, ahead(p, r.AzimuthIn, -r.TangentIn))
		at = a.curve(r, ahead(p, r.AzimuthIn, -r.TangentIn))
	}
	last := pi[len(pi)-1]
	a.tangent(at, orb.Point{last.E, last.N})
	return a, nil
}

// solveAll solves the interior PIs.
func (q *rule) solveAll(pi []PI) (rows []PIRow) {
	for i := 1; i < len(pi)-1; i++ {
		prev, p, next := pi[i-1], pi[i], pi[i+1]
		before := azimuth(orb.Point{prev.E, prev.N}, orb.Point{p.E, p.N})
		after := azimuth(orb.Point{p.E, p.N}, orb.Point{next.E, next.N})
		rows = append(rows, q.solve(i, p, before, after))
	}
	return rows
}

func (a *Alignment) tangent(from, to orb.Point) {
	d := math.Hypot(to[0]-from[0], to[1]-from[1])
	if d <= leftOver {
		return
	}
	a.add(Element{Kind: Tangent, RadiusFrom: math.Inf(1), RadiusTo: math.Inf(1), Start: from, Azimuth: azimuth(from, to), PI: -1}, d)
}

// add appends an element of the given length.
func (a *Alignment) add(e Element, length float64) {
	e.rule = a.rule
	e.Over = station.Interval{From: a.length, To: a.length + station.Station(length)}
	a.elements = append(a.elements, e)
	a.length = e.Over.To
}

// curve appends clothoids and arc of a PI and returns where they end.
func (a *Alignment) curve(r PIRow, at orb.Point) orb.Point {
	if r.PI.Radius <= 0 {
		return at
	}
	az, R := r.AzimuthIn, math.Copysign(r.PI.Radius, r.Deflection)
	parts := []struct {
		kind     Kind
		from, to float64
		length   float64
	}{
		{Clothoid, math.Inf(1), R, r.PI.SpiralIn},
		{Arc, R, R, r.ArcLength},
		{Clothoid, R, math.Inf(1), r.PI.SpiralOut},
	}
	for _, p := range parts {
		if p.length <= leftOver {
			continue // two clothoids that just meet have no arc between them
		}
		e := Element{Kind: p.kind, RadiusFrom: p.from, RadiusTo: p.to, Start: at, Azimuth: az, PI: r.Index}
		a.add(e, p.length)
		pose := a.elements[len(a.elements)-1].at(p.length)
		at, az = pose.XY, pose.Azimuth
	}
	return at
}

// Length returns the length of the alignment in metres.
func (a *Alignment) Length() station.Station { return a.length }

// Elements returns the elements in order; the caller must not change them.
func (a *Alignment) Elements() []Element { return a.elements }

// PITable returns the interior PIs with what follows from them.
func (a *Alignment) PITable() []PIRow { return append([]PIRow(nil), a.rows...) }

// Pose is a place with its direction and curvature (1/m, positive right).
type Pose struct {
	XY                 orb.Point
	Azimuth, Curvature float64
}

// curvature returns the curvature at the start of an element and its change
// per metre.
func (e *Element) curvature() (k, c float64) {
	k = 1 / e.RadiusFrom
	return k, (1/e.RadiusTo - k) / e.Over.Length()
}

// at returns the pose l metres from the start of an element.
func (e *Element) at(l float64) Pose {
	k, c := e.curvature()
	p := Pose{Azimuth: e.Azimuth + k*l + c/2*l*l, Curvature: k + c*l}
	switch {
	case k == 0 && c == 0:
		p.XY = ahead(e.Start, e.Azimuth, l)
	case c == 0:
		// The chord of an arc of angle k·l lies at half that angle.
		half := k * l / 2
		p.XY = ahead(e.Start, e.Azimuth+half, l*sinc(half))
	default:
		n, x := e.rule.run(e.Azimuth, k, c, l)
		p.XY = orb.Point{e.Start[0] + x, e.Start[1] + n}
	}
	return p
}

// sinc returns sin(x)/x.
func sinc(x float64) float64 {
	if math.Abs(x) < 1e-4 {
		return 1 - x*x/6 // the next term is below 1e-18
	}
	return math.Sin(x) / x
}

// At returns the pose at a station. Before the start and beyond the end the
// alignment goes on straight.
func (a *Alignment) At(s station.Station) Pose {
	switch {
	case s < 0:
		p := a.elements[0].at(0)
		return Pose{XY: ahead(p.XY, p.Azimuth, float64(s)), Azimuth: p.Azimuth}
	case s > a.length:
		last := &a.elements[len(a.elements)-1]
		p := last.at(last.Over.Length())
		return Pose{XY: ahead(p.XY, p.Azimuth, float64(s-a.length)), Azimuth: p.Azimuth}
	}
	e := a.element(s)
	return e.at(float64(s - e.Over.From))
}

// element returns the element that holds a station of the alignment.
func (a *Alignment) element(s station.Station) *Element {
	i := sort.Search(len(a.elements), func(i int) bool { return a.elements[i].Over.To > s })
	return &a.elements[min(i, len(a.elements)-1)]
}

// Point returns easting and northing at a station and offset.
func (a *Alignment) Point(s station.Station, o station.Offset) orb.Point {
	p := a.At(s)
	return ahead(p.XY, p.Azimuth+math.Pi/2, float64(o))
}

// Curvature returns the curvature at a station, 0 off the alignment.
func (a *Alignment) Curvature(s station.Station) float64 {
	if s < 0 || s > a.length {
		return 0
	}
	e := a.element(s)
	k, c := e.curvature()
	return k + c*float64(s-e.Over.From)
}

// Breaks returns the stations between elements, increasing.
func (a *Alignment) Breaks() (out []station.Station) {
	for _, e := range a.elements[1:] {
		out = append(out, e.Over.From)
	}
	return out
}

// Straight reports whether a stretch lies on tangents only.
func (a *Alignment) Straight(over station.Interval) bool {
	for _, e := range a.elements {
		if e.Kind != Tangent && e.Over.From < over.To && over.From < e.Over.To {
			return false
		}
	}
	return true
}
