package points

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/section/terrain"
)

// Law: the tree finds what comparing with every point finds, of those equally
// near the one whose level is nearest to zero, in whatever order they come.
func TestNearestAgainstAll(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		whole := func(name string) float64 { return float64(rapid.IntRange(-6, 6).Draw(t, name)) }
		n := rapid.IntRange(0, 60).Draw(t, "n")
		var all []terrain.Point
		for i := range n {
			all = append(all, terrain.Point{E: whole("e"), N: whole("n"), Z: whole("z"), Row: i})
		}
		p := terrain.Point{E: whole("at e"), N: whole("at n")}
		least, level := math.Inf(1), math.Inf(1)
		for _, q := range all {
			d := math.Hypot(q.E-p.E, q.N-p.N)
			if d < least || d == least && math.Abs(q.Z) < level {
				least, level = d, math.Abs(q.Z)
			}
		}
		got, ok := newNearest(all).to(p)
		require.Equal(t, n > 0, ok)
		if ok {
			require.Equal(t, least, math.Hypot(got.E-p.E, got.N-p.N))
			require.Equal(t, level, math.Abs(got.Z))
		}
	})
}
