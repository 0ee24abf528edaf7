package terrain

import "math"

// An expansion is a sum of floats, smallest first, none of which overlaps
// another in its bits: it holds a number that one float cannot, exactly. Zero
// components are left out; no component at all is zero. The largest component
// alone has the sign of the sum.
// Source: Shewchuk, Adaptive precision floating-point arithmetic and fast
// robust geometric predicates, Discrete Comput. Geom. 18:305–363, 1997,
// theorems 6–19 (from memory).

// twoSum returns a + b as a rounded sum and its error.
func twoSum(a, b float64) (sum, err float64) {
	sum = a + b
	bv := sum - a
	return sum, (a - (sum - bv)) + (b - bv)
}

// twoDiff returns a − b as a rounded difference and its error.
func twoDiff(a, b float64) (diff, err float64) { return twoSum(a, -b) }

// twoProduct returns a · b as a rounded product and its error.
func twoProduct(a, b float64) (product, err float64) {
	product = a * b
	return product, math.FMA(a, b, -product)
}

// arena hands out room for expansions; the caller owns the array behind it, so
// that nothing is allocated.
type arena []float64

// take returns an empty expansion with room for n components.
func (a *arena) take(n int) []float64 {
	s := (*a)[:0:n]
	*a = (*a)[n:]
	return s
}

// add appends e + f to dst, which has room for len(e) + len(f) components.
// The components of both are merged by magnitude and summed up from the
// smallest.
func add(dst, e, f []float64) []float64 {
	if len(e) == 0 || len(f) == 0 {
		return append(append(dst, e...), f...)
	}
	i, j := 0, 0
	next := func() float64 {
		if j == len(f) || i < len(e) && math.Abs(e[i]) < math.Abs(f[j]) {
			i++
			return e[i-1]
		}
		j++
		return f[j-1]
	}
	q := next()
	for range len(e) + len(f) - 1 {
		var err float64
		if q, err = twoSum(q, next()); err != 0 {
			dst = append(dst, err)
		}
	}
	if q != 0 {
		dst = append(dst, q)
	}
	return dst
}

// scale appends e · b to dst, which has room for 2·len(e) components.
func scale(dst, e []float64, b float64) []float64 {
	if len(e) == 0 || b == 0 {
		return dst
	}
	q, err := twoProduct(e[0], b)
	if err != 0 {
		dst = append(dst, err)
	}
	for _, c := range e[1:] {
		hi, lo := twoProduct(c, b)
		var sum float64
		if sum, err = twoSum(q, lo); err != 0 {
			dst = append(dst, err)
		}
		if q, err = twoSum(hi, sum); err != 0 {
			dst = append(dst, err)
		}
	}
	if q != 0 {
		dst = append(dst, q)
	}
	return dst
}

// times returns e · f, taking room from a.
func (a *arena) times(e, f []float64) []float64 {
	if len(e) < len(f) {
		e, f = f, e
	}
	n := 2 * len(e) * len(f)
	sum, spare, part := a.take(n), a.take(n), a.take(2*len(e))
	for _, c := range f {
		spare = add(spare[:0], sum, scale(part[:0], e, c))
		sum, spare = spare, sum
	}
	return sum
}

// plus returns e + f, taking room from a.
func (a *arena) plus(e, f []float64) []float64 {
	return add(a.take(len(e)+len(f)), e, f)
}

// minus returns e − f, taking room from a.
func (a *arena) minus(e, f []float64) []float64 {
	g := a.take(len(f))
	for _, c := range f {
		g = append(g, -c)
	}
	return a.plus(e, g)
}

// estimate returns the rounded value of an expansion; its sign is exact.
func estimate(e []float64) float64 {
	sum := 0.0
	for _, c := range e {
		sum += c
	}
	return sum
}
