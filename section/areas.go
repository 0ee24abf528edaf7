package section

// Areas between the stripped ground and the earthwork line.
//
// Both lines are polylines in the distance u from the reference line. Their
// difference h(u) = ground − earthwork line is linear between neighbouring
// corners of either, so areas and moments are sums of closed forms; a change of
// sign inside a piece is cut exactly where it happens. The earthwork line jumps
// at the hinge: it is handed over as two runs, which keeps every piece linear.
//
// Strata need no polygons of their own. A stratum whose top lies t below the
// stripped ground owns the part of the depth that exceeds t, so with
// E(t) = ∫ max(0, h − t) du a body between the tops t1 < t2 has the area
// E(t1) − E(t2), and the bodies sum to E(0) term by term.

// piece is one stretch of u on which h is linear.
type piece struct{ u1, h1, u2, h2 float64 }

// above returns area and first moment about u = 0 of the part of h above t.
func (p piece) above(t float64) (area, moment float64) {
	a, b := p.h1-t, p.h2-t
	u1, u2 := p.u1, p.u2
	switch {
	case a <= 0 && b <= 0:
		return 0, 0
	case a < 0:
		u1 += (u2 - u1) * a / (a - b)
		a = 0
	case b < 0:
		u2 = u1 + (u2-u1)*a/(a-b)
		b = 0
	}
	w := max(u2-u1, 0) // the cut may land a rounding beyond the end
	return w * (a + b) / 2, w * (u1*(2*a+b) + u2*(a+2*b)) / 6
}

// below returns the same of the part of h under 0, as positive figures.
func (p piece) below() (area, moment float64) {
	return piece{p.u1, -p.h1, p.u2, -p.h2}.above(0)
}

// eachPiece calls f for every linear piece of ground − (design − drop) between
// u1 and u2. The design line must hold both.
func eachPiece(ground []Point, design run, drop, u1, u2 float64, f func(piece)) {
	if !(u2 > u1) {
		return
	}
	prev := u1
	prevH := levelAt(ground, u1) - design.at(u1) + drop
	emit := func(u float64) {
		h := levelAt(ground, u) - design.at(u) + drop
		f(piece{prev, prevH, u, h})
		prev, prevH = u, h
	}
	g, d := 0, 0
	for {
		next := u2
		for g < len(ground) && ground[g].O <= prev {
			g++
		}
		for d < len(design.pts) && design.pts[d].O <= prev {
			d++
		}
		if g < len(ground) && ground[g].O < next {
			next = ground[g].O
		}
		if d < len(design.pts) && design.pts[d].O < next {
			next = design.pts[d].O
		}
		emit(next)
		if next >= u2 {
			return
		}
	}
}
