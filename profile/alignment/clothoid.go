package alignment

import "math"

// spiral is a clothoid from infinite radius to R over its length: the angle it
// turns by, the coordinates of its end along and square to the tangent, the
// shift of the arc and the abscissa of the shifted centre. Metres, radians.
type spiral struct{ angle, x, y, shift, abscissa float64 }

func spiralAt(length, radius float64) spiral {
	if length <= 0 {
		return spiral{}
	}
	s := spiral{angle: length / (2 * radius)}
	s.x, s.y = run(0, 0, 1/(radius*length), length)
	sin, cos := math.Sincos(s.angle)
	s.shift = s.y - radius*(1-cos)
	s.abscissa = s.x - radius*sin
	return s
}

// The nodes and weights of Gauss–Legendre quadrature with 10 points on [−1, 1]
// (M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, table 25.4),
// positive half.
func nodes() ([5]float64, [5]float64) {
	return [5]float64{0.148874338981631211, 0.433395394129247191, 0.679409568299024406, 0.865063366688984511, 0.973906528517171720},
		[5]float64{0.295524224714752870, 0.269266719309996355, 0.219086362515982044, 0.149451349150580593, 0.066671344308688138}
}

// panelAngle is the greatest change of direction in radians that one panel of
// the quadrature takes. With ten points the error of a panel is below
// L·(angle)^20/20!/10^9, so 0.75 rad leaves nothing of double precision.
const panelAngle = 0.75

// run integrates a curve whose direction starts at azimuth az with curvature k
// that grows by c per metre: it returns how far it gets, along the direction
// north and east in the frame where az is measured from the first axis.
func run(az, k, c, l float64) (x, y float64) {
	turned := math.Max(math.Abs(k*l), math.Abs(k*l+c*l*l)) + math.Abs(c*l*l/2)
	n := int(math.Ceil(turned/panelAngle)) + 1
	at, wt := nodes()
	h := l / float64(2*n)
	for i := range n {
		mid := h * float64(2*i+1)
		for j := range at {
			for _, u := range [2]float64{mid - h*at[j], mid + h*at[j]} {
				sin, cos := math.Sincos(az + k*u + c/2*u*u)
				x += wt[j] * cos
				y += wt[j] * sin
			}
		}
	}
	return x * h, y * h
}
