package terrain

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// rat holds a point as exact rationals, the oracle of the exact tests.
type rat struct{ x, y *big.Rat }

func exactly(p point) rat {
	return rat{new(big.Rat).SetFloat64(p.x), new(big.Rat).SetFloat64(p.y)}
}

func mul(a, b *big.Rat) *big.Rat   { return new(big.Rat).Mul(a, b) }
func minus(a, b *big.Rat) *big.Rat { return new(big.Rat).Sub(a, b) }
func plus(a, b *big.Rat) *big.Rat  { return new(big.Rat).Add(a, b) }

func (p rat) less(q rat) rat { return rat{minus(p.x, q.x), minus(p.y, q.y)} }

func (p rat) cross(q rat) *big.Rat { return minus(mul(p.x, q.y), mul(p.y, q.x)) }

func bigOrient(a, b, c point) int {
	p, q, r := exactly(a), exactly(b), exactly(c)
	return p.less(r).cross(q.less(r)).Sign()
}

func bigIncircle(a, b, c, d point) int {
	o := exactly(d)
	p, q, r := exactly(a).less(o), exactly(b).less(o), exactly(c).less(o)
	lift := func(v rat) *big.Rat { return plus(mul(v.x, v.x), mul(v.y, v.y)) }
	det := mul(lift(p), q.cross(r))
	det = plus(det, mul(lift(q), r.cross(p)))
	return plus(det, mul(lift(r), p.cross(q))).Sign()
}

func sign(v float64) int {
	switch {
	case v > 0:
		return 1
	case v < 0:
		return -1
	}
	return 0
}

// awkward draws coordinates of the kinds that break plain floats: tiny steps
// beside a common value, whole numbers, and anything in the range of a map.
func awkward(t *rapid.T, name string) point {
	draw := func(axis string) float64 {
		switch rapid.IntRange(0, 3).Draw(t, name+axis+" kind") {
		case 0:
			return 0.5 + float64(rapid.IntRange(-8, 8).Draw(t, name+axis))/(1<<52)
		case 1:
			return float64(rapid.IntRange(-6, 6).Draw(t, name+axis))
		case 2:
			return 12 + 12*float64(rapid.IntRange(-3, 3).Draw(t, name+axis)) + float64(rapid.IntRange(-4, 4).Draw(t, name+axis+" step"))/(1<<48)
		}
		return rapid.Float64Range(-1e11, 1e11).Draw(t, name+axis)
	}
	return point{draw(" x"), draw(" y")}
}

// Law: the signs are those of rational arithmetic, whatever the points.
func TestPredicatesAgainstRationals(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b, c, d := awkward(t, "a"), awkward(t, "b"), awkward(t, "c"), awkward(t, "d")
		require.Equal(t, bigOrient(a, b, c), sign(orient(a, b, c)), "orient %v %v %v", a, b, c)
		require.Equal(t, bigIncircle(a, b, c, d), sign(incircle(a, b, c, d)), "incircle %v %v %v %v", a, b, c, d)
		want := exactly(a).less(exactly(b)).cross(exactly(c).less(exactly(d))).Sign()
		require.Equal(t, want, sign(cross(a, b, c, d)), "cross %v %v %v %v", a, b, c, d)
	})
}

// Each stage must be reached: the plain filter, the rounded differences and the
// exact ones, else the test above proves less than it says.
func TestLastStage(t *testing.T) {
	tiny := math.Ldexp(1, -60)
	// On the circle through (0,0), (1,0), (1,1) lies (0,1); one corner moved by
	// 2⁻⁶⁰ leaves differences that no float holds.
	a, b, c, d := point{tiny, 0}, point{1, 0}, point{1, 1}, point{0, 1}
	require.Equal(t, bigIncircle(a, b, c, d), sign(incircle(a, b, c, d)))
	require.NotZero(t, sign(incircle(a, b, c, d)))
	require.Equal(t, bigOrient(point{tiny, 0}, point{1, 1}, point{2, 2}), sign(orient(point{tiny, 0}, point{1, 1}, point{2, 2})))
	require.NotZero(t, orient(point{tiny, 0}, point{1, 1}, point{2, 2}))
}

// Law: expansions add and multiply exactly.
func TestExpansions(t *testing.T) {
	sum := func(e []float64) *big.Rat {
		s := new(big.Rat)
		for _, c := range e {
			s = plus(s, new(big.Rat).SetFloat64(c))
		}
		return s
	}
	rapid.Check(t, func(t *rapid.T) {
		draw := func(name string) []float64 {
			hi := rapid.Float64Range(-1e6, 1e6).Draw(t, name)
			// Multiples of 2⁻⁹⁰, for a product below 10⁻³⁰⁸ has no exact float.
			lo := float64(rapid.Int64Range(-1<<50, 1<<50).Draw(t, name+" error"))
			s, err := twoSum(math.Round(hi*(1<<30))/(1<<30), math.Ldexp(lo, -90))
			if s == 0 {
				return nil
			}
			d := exactDiff{err, s}
			return d.exact()
		}
		e, f, g := draw("e"), draw("f"), draw("g")
		var room [4096]float64
		a := arena(room[:])
		want := minus(mul(mul(sum(e), sum(f)), plus(sum(e), sum(g))), sum(g))
		got := a.minus(a.times(a.times(e, f), a.plus(e, g)), g)
		require.Zero(t, want.Cmp(sum(got)))
		require.Equal(t, want.Sign(), sign(estimate(got)))
	})
}
