package profile

import (
	"math"
	"sort"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// PVI is a point of vertical intersection: station, level in metres, and the
// size of its curve by at most one of Length (m), K (m per percent) and Radius
// (m, of the parabola at its vertex: L = R·A). None of them: a break of grade.
type PVI struct {
	At                      station.Station
	Elev, Length, K, Radius float64
}

// Piece is a stretch on which the level is Z + G·x + R/2·x² metres, with x
// metres from Over.From; G is the grade there and R its change per metre.
type Piece struct {
	Over    station.Interval
	Z, G, R float64
}

// At returns level and grade at a station of the piece.
func (p Piece) At(s station.Station) (z, g float64) {
	x := float64(s - p.Over.From)
	return p.Z + p.G*x + p.R/2*x*x, p.G + p.R*x
}

// Profile is a grade line: tangents and symmetrical parabolas, without gaps.
type Profile struct {
	pvi    []PVI
	curves []Curve
	pieces []Piece
}

// New builds the grade line through at least two PVIs of increasing station. It
// returns nil and the reasons when stations do not increase (A01), or when
// curves overlap one another or run beyond the first or last PVI (P01).
func New(pvi []PVI) (*Profile, []finding.Finding) {
	if found := checkOrder(pvi); found != nil {
		return nil, found
	}
	p := &Profile{pvi: append([]PVI(nil), pvi...)}
	for i := 1; i < len(pvi)-1; i++ {
		p.curves = append(p.curves, newCurve(pvi, i))
	}
	if found := p.checkRoom(); found != nil {
		return nil, found
	}
	p.lay()
	return p, nil
}

// lay cuts the grade line into pieces.
func (p *Profile) lay() {
	s, z := p.pvi[0].At, p.pvi[0].Elev
	tangent := func(to Point) {
		if to.At > s {
			g := (to.Elev - z) / float64(to.At-s)
			p.pieces = append(p.pieces, Piece{station.Interval{From: s, To: to.At}, z, g, 0})
		}
		s, z = to.At, to.Elev
	}
	for _, c := range p.curves {
		tangent(c.PVC)
		if c.Length > 0 {
			over := station.Interval{From: c.PVC.At, To: c.PVT.At}
			p.pieces = append(p.pieces, Piece{over, c.PVC.Elev, c.G1, (c.G2 - c.G1) / c.Length})
			s, z = c.PVT.At, c.PVT.Elev
		}
	}
	last := p.pvi[len(p.pvi)-1]
	tangent(Point{last.At, last.Elev})
}

// From and To return the ends of the grade line.
func (p *Profile) From() station.Station { return p.pvi[0].At }

// To returns the station of the last PVI.
func (p *Profile) To() station.Station { return p.pvi[len(p.pvi)-1].At }

// At returns level (m) and grade (ratio) at a station; at a break the grade is
// the one ahead, except at the end. ok is false off the grade line.
func (p *Profile) At(s station.Station) (z, g float64, ok bool) {
	if s < p.From() || s > p.To() || math.IsNaN(float64(s)) {
		return 0, 0, false
	}
	i := sort.Search(len(p.pieces), func(i int) bool { return p.pieces[i].Over.To > s })
	z, g = p.pieces[min(i, len(p.pieces)-1)].At(s)
	return z, g, true
}

// GradeBefore returns the grade just before a station; ok is false off the
// grade line.
func (p *Profile) GradeBefore(s station.Station) (g float64, ok bool) {
	if s < p.From() || s > p.To() || math.IsNaN(float64(s)) {
		return 0, false
	}
	i := sort.Search(len(p.pieces), func(i int) bool { return p.pieces[i].Over.To >= s })
	_, g = p.pieces[min(i, len(p.pieces)-1)].At(s)
	return g, true
}

// Pieces returns the stretches with one quadratic each, in order. The caller
// must not change them.
func (p *Profile) Pieces() []Piece { return p.pieces }

// PVIs returns the points the grade line was built from.
func (p *Profile) PVIs() []PVI { return append([]PVI(nil), p.pvi...) }

// Breaks returns the stations between pieces, increasing.
func (p *Profile) Breaks() (out []station.Station) {
	for _, q := range p.pieces[1:] {
		out = append(out, q.Over.From)
	}
	return out
}
