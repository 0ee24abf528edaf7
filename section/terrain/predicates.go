package terrain

import "math"

// point is a place in local millimetres.
type point struct{ x, y float64 }

// The tests below decide on which side of a line or circle a point lies. They
// first compute in plain floats with a bound on the rounding error; where the
// result is smaller than its bound they compute again with expansions, first
// of the rounded coordinate differences, at last of the exact ones. The sign
// is always right; only points that are exactly on the line give 0.
//
// unit is half a unit in the last place of 1; the bounds are polynomials in it
// (source: as in expansion.go, figures 21 and 30, from memory; the tests
// compare the signs with rational arithmetic).
const (
	unit       = 1.0 / (1 << 53)
	crossBound = (3 + 16*unit) * unit
	crossExact = (2 + 12*unit) * unit
	circle1    = (10 + 96*unit) * unit
	circle2    = (4 + 48*unit) * unit
)

// orient returns a number with the sign of the area of the triangle a, b, c:
// positive anticlockwise. Its value is twice the area, rounded.
func orient(a, b, c point) float64 { return cross(a, c, b, c) }

// cross returns (p − q) × (r − s), rounded, with the exact sign.
func cross(p, q, r, s point) float64 {
	left := float64((p.x - q.x) * (r.y - s.y))
	right := float64((p.y - q.y) * (r.x - s.x))
	det := left - right
	if size := math.Abs(left) + math.Abs(right); math.Abs(det) <= crossBound*size {
		return crossStaged(p, q, r, s, size)
	}
	return det
}

// crossStaged is cross where the filter fails; size is the sum of the absolute
// products.
func crossStaged(p, q, r, s point, size float64) float64 {
	if size == 0 {
		return 0
	}
	v := [4]exactDiff{diff(p.x, q.x), diff(p.y, q.y), diff(r.x, s.x), diff(r.y, s.y)}
	var room [128]float64 // 18 and 64 are taken
	a := arena(room[:])
	det := estimate(a.crossOf(v[0].rounded(), v[1].rounded(), v[2].rounded(), v[3].rounded()))
	if math.Abs(det) > crossExact*size || v[0].whole() && v[1].whole() && v[2].whole() && v[3].whole() {
		return det
	}
	return estimate(a.crossOf(v[0].exact(), v[1].exact(), v[2].exact(), v[3].exact()))
}

// exactDiff is a difference of two floats: its rounding error and its rounded
// value.
type exactDiff [2]float64

func diff(a, b float64) (d exactDiff) {
	d[1], d[0] = twoDiff(a, b)
	return d
}

// whole reports whether the rounded value is the difference.
func (d *exactDiff) whole() bool { return d[0] == 0 }

// rounded returns the rounded value as an expansion.
func (d *exactDiff) rounded() []float64 { return d[1:] }

// exact returns the difference as an expansion.
func (d *exactDiff) exact() []float64 {
	if d.whole() {
		return d[1:]
	}
	return d[:]
}

// crossOf returns ux·vy − uy·vx.
func (a *arena) crossOf(ux, uy, vx, vy []float64) []float64 {
	return a.minus(a.times(ux, vy), a.times(uy, vx))
}

// incircle returns a number with the sign of the answer whether d lies inside
// the circle through a, b, c (anticlockwise): positive inside, 0 on it.
func incircle(a, b, c, d point) float64 {
	ax, ay, bx, by, cx, cy := a.x-d.x, a.y-d.y, b.x-d.x, b.y-d.y, c.x-d.x, c.y-d.y
	bxcy, cxby := float64(bx*cy), float64(cx*by)
	cxay, axcy := float64(cx*ay), float64(ax*cy)
	axby, bxay := float64(ax*by), float64(bx*ay)
	aa := float64(ax*ax) + float64(ay*ay)
	bb := float64(bx*bx) + float64(by*by)
	cc := float64(cx*cx) + float64(cy*cy)
	det := float64(aa*(bxcy-cxby)) + float64(bb*(cxay-axcy)) + float64(cc*(axby-bxay))
	size := float64((math.Abs(bxcy)+math.Abs(cxby))*aa) +
		float64((math.Abs(cxay)+math.Abs(axcy))*bb) +
		float64((math.Abs(axby)+math.Abs(bxay))*cc)
	if math.Abs(det) <= circle1*size {
		return incircleStaged(a, b, c, d, size)
	}
	return det
}

// incircleStaged is incircle where the filter fails.
func incircleStaged(a, b, c, d point, size float64) float64 {
	v := [6]exactDiff{diff(a.x, d.x), diff(a.y, d.y), diff(b.x, d.x), diff(b.y, d.y), diff(c.x, d.x), diff(c.y, d.y)}
	var e [6][]float64
	whole := true
	for i := range v {
		e[i] = v[i].rounded()
		whole = whole && v[i].whole()
	}
	var room [640]float64 // 510 are taken
	small := arena(room[:])
	det := estimate(small.circleOf(&e))
	if whole || math.Abs(det) > circle2*size {
		return det
	}
	return incircleExact(&v)
}

// incircleExact is the last stage, in a function of its own because clearing
// its large array costs time.
func incircleExact(v *[6]exactDiff) float64 {
	var e [6][]float64
	for i := range v {
		e[i] = v[i].exact()
	}
	var room [8192]float64 // 6600 are taken
	large := arena(room[:])
	return estimate(large.circleOf(&e))
}

// circleOf returns the determinant of incircle for the differences of a, b, c
// from d, eastings and northings in turn.
func (a *arena) circleOf(e *[6][]float64) []float64 {
	var det []float64
	for i := 0; i < 6; i += 2 {
		j, k := (i+2)%6, (i+4)%6
		lift := a.plus(a.times(e[i], e[i]), a.times(e[i+1], e[i+1]))
		det = a.plus(det, a.times(lift, a.crossOf(e[j], e[j+1], e[k], e[k+1])))
	}
	return det
}
