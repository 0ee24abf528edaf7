package alignment

import (
	"math"

	"gonum.org/v1/gonum/integrate/quad"
)

// spiral is a clothoid from infinite radius to R over its length: the angle it
// turns by, the coordinates of its end along and square to the tangent, the
// shift of the arc and the abscissa of the shifted centre. Metres, radians.
type spiral struct{ angle, x, y, shift, abscissa float64 }

func (r *rule) spiralAt(length, radius float64) spiral {
	if length <= 0 {
		return spiral{}
	}
	s := spiral{angle: length / (2 * radius)}
	s.x, s.y = r.run(0, 0, 1/(radius*length), length)
	sin, cos := math.Sincos(s.angle)
	s.shift = s.y - radius*(1-cos)
	s.abscissa = s.x - radius*sin
	return s
}

// order is the number of points of one panel of the quadrature.
const order = 10

// rule holds the nodes and weights of Gauss–Legendre quadrature on [−1, 1].
type rule struct{ x, w [order]float64 }

func newRule() *rule {
	r := new(rule)
	quad.Legendre{}.FixedLocations(r.x[:], r.w[:], -1, 1)
	return r
}

// panelAngle is the greatest change of direction in radians that one panel of
// the quadrature takes. With ten points the error of a panel is below
// L·(angle)^20/20!/10^9, so 0.75 rad leaves nothing of double precision.
const panelAngle = 0.75

// run integrates a curve whose direction starts at azimuth az with curvature k
// that grows by c per metre: it returns how far it gets after l metres, along
// the axis from which az is measured and square to it.
func (r *rule) run(az, k, c, l float64) (x, y float64) {
	turned := math.Max(math.Abs(k*l), math.Abs(k*l+c*l*l)) + math.Abs(c*l*l/2)
	n := int(math.Ceil(turned/panelAngle)) + 1
	h := l / float64(2*n)
	for i := range n {
		mid := h * float64(2*i+1)
		for j, at := range r.x {
			u := mid + h*at
			sin, cos := math.Sincos(az + k*u + c/2*u*u)
			x += r.w[j] * cos
			y += r.w[j] * sin
		}
	}
	return x * h, y * h
}
