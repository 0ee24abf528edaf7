package terrain

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"sagcrest/profile/finding"
)

// Point is a surveyed point: easting, northing, level in metres, and its line
// in the survey file, which only findings use (0: none).
type Point struct {
	E, N, Z float64
	Row     int
}

// farthest is the largest coordinate or level in metres that is taken: no map
// grid on earth reaches it, and exact arithmetic is far from its limits there.
const farthest = 1e8

// levelSpread is how far, in metres, levels at one place may lie apart before
// the survey contradicts itself: fine print 2.
const levelSpread = 0.020

// listed is the number of contradicting places that are reported one by one,
// worst first; each finding says how many there are in all.
const listed = 20

// site is a place of the triangulation: local coordinates in millimetres and a
// level in metres.
type site struct{ x, y, z float64 }

// frame turns map coordinates into local ones: millimetres from an origin in
// whole metres. Millimetres, because a survey written to three decimals or
// fewer becomes whole numbers: four corners of a 0.1 m grid then lie exactly on
// one circle, which binary fractions of a metre do not.
type frame struct{ e, n float64 }

// local returns the local coordinates of a place.
func (f frame) local(at XY) (x, y float64) {
	return millimetres(at[0], f.e), millimetres(at[1], f.n)
}

// global undoes local, to the last bit but one.
func (f frame) global(x, y float64) XY { return XY{f.e + x/1000, f.n + y/1000} }

// millimetres returns v − origin. A v that differs from a whole number of
// millimetres by its last two bits at most, decimals being what they are, is
// that number. All else is kept to 2⁻³⁰ mm (1e-12 m): then no product of the
// exact tests can underflow.
func millimetres(v, origin float64) float64 {
	k := math.Round(v * 1000)
	a := math.Abs(v)
	if ulp := math.Nextafter(a, math.Inf(1)) - a; math.Abs(k/1000-v) <= 2*ulp {
		return k - origin*1000
	}
	const grain = 1 << 30
	return math.Round((v-origin)*1000*grain) / grain
}

// checkPoints names the first point that cannot be used.
func checkPoints(pts []Point) []finding.Finding {
	for _, p := range pts {
		for _, v := range [3]float64{p.E, p.N, p.Z} {
			if !(math.Abs(v) <= farthest) {
				return noSurface(fmt.Sprintf("row %d holds %v, which is no coordinate or level within ±%v m", p.Row, v, farthest))
			}
		}
	}
	return nil
}

// keyed is a point with its local coordinates and those rounded to the
// millimetre. The rounded ones are taken from the local ones, so that points
// that stay two are never at one place.
type keyed struct {
	e, n, x, y float64
	Point
}

func byPlace(a, b keyed) int {
	return cmp.Or(cmp.Compare(a.e, b.e), cmp.Compare(a.n, b.n), cmp.Compare(a.Z, b.Z),
		cmp.Compare(a.x, b.x), cmp.Compare(a.y, b.y), cmp.Compare(a.Row, b.Row))
}

// merge returns the frame and one site for all points that round to the same
// millimetre, in order of place, so that nothing later depends on the order of
// the input. The levels of such points are summed in order of level. The site
// stands at the mean of their places: points of a plane stay in the plane.
func merge(pts []Point) (frame, []site, []finding.Finding) {
	west, south := math.Inf(1), math.Inf(1)
	for _, p := range pts {
		west, south = math.Min(west, p.E), math.Min(south, p.N)
	}
	f := frame{math.Floor(west), math.Floor(south)}
	all := make([]keyed, len(pts))
	for i, p := range pts {
		x, y := f.local(XY{p.E, p.N})
		all[i] = keyed{math.Round(x), math.Round(y), x, y, p}
	}
	slices.SortFunc(all, byPlace)
	sites := make([]site, 0, len(all))
	var spread []contradiction
	for len(all) > 0 {
		n := 1
		for n < len(all) && all[n].e == all[0].e && all[n].n == all[0].n {
			n++
		}
		sites = append(sites, mean(all[:n]))
		if d := all[n-1].Z - all[0].Z; d > levelSpread+levelTie {
			spread = append(spread, contradiction{all[0].Point, all[n-1].Point, d})
		}
		all = all[n:]
	}
	return f, sites, contradictions(spread)
}

// levelTie keeps two levels written 20 mm apart in decimals from counting as
// more: the rounding of a level up to 10 km.
const levelTie = 1e-11

// mean returns the site of points that are one, given in order of level.
func mean(same []keyed) site {
	var x, y, z float64
	a := same[0]
	lo, hi := a, a
	for _, p := range same {
		// Differences first: equal places give exactly that place.
		x += p.x - a.x
		y += p.y - a.y
		z += p.Z
		lo.x, hi.x = math.Min(lo.x, p.x), math.Max(hi.x, p.x)
		lo.y, hi.y = math.Min(lo.y, p.y), math.Max(hi.y, p.y)
	}
	n := float64(len(same))
	// Rounding must not carry the mean beyond the points, onto a neighbour.
	return site{min(max(a.x+x/n, lo.x), hi.x), min(max(a.y+y/n, lo.y), hi.y), z / n}
}

// contradiction is a place with two levels too far apart.
type contradiction struct {
	low, high Point
	apart     float64
}

// contradictions turns places into findings, the worst first; equal ones by
// place.
func contradictions(all []contradiction) []finding.Finding {
	slices.SortStableFunc(all, func(a, b contradiction) int { return cmp.Compare(b.apart, a.apart) })
	var out []finding.Finding
	for _, c := range all[:min(len(all), listed)] {
		out = append(out, finding.Finding{
			Code: "U08", Severity: finding.Warning,
			Measured: finding.Of(c.apart, "m"), Limit: finding.Of(levelSpread, "m"),
			Args: []any{
				finding.Of(c.low.E, "m"), finding.Of(c.low.N, "m"), c.low.Row, c.high.Row,
				finding.Of(c.apart, "m"), finding.Of(levelSpread, "m"), len(all),
			},
		})
	}
	return out
}
