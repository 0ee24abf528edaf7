package criteria_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/criteria"
)

// Case G-B14: printed least radii, 8 %. Source: NYSDOT Highway Design Manual,
// exhibits M2-13 and M2-14 (quoted), exact.
func TestLeastRadiiG_B14(t *testing.T) {
	printed := []float64{7, 20, 41, 73, 113, 168, 229, 304, 394, 501, 667}
	for i, want := range printed {
		c, err := criteria.NewSide(criteria.Metric, float64(20+10*i), 0.08, nil)
		require.NoError(t, err)
		assert.Equal(t, want, c.RMinDesign)
	}
}

// Case G-B17: rates at printed radii, 12 %. Source: Highway Engineering Handbook
// (2nd ed.), table 2.11, within 0.07 %.
func TestRatesG_B17(t *testing.T) {
	for rate, radii := range map[float64][]float64{
		8.2: {105, 199, 321, 470, 637, 840, 1070}, 9: {85, 164, 270, 403, 554, 738, 938},
		10: {67, 130, 219, 333, 465, 629, 806}, 11: {52, 102, 175, 272, 384, 527, 682}} {
		for i, r := range radii {
			c, err := criteria.NewSide(criteria.US, float64(15+5*i), 0.12, nil)
			require.NoError(t, err)
			assert.InDelta(t, rate, 100*c.Rate(r), 0.07, "%v ft at %v mile/h", r, c.Speed)
		}
	}
}

// Case G-B18: run-off 43.2 m, run-out 14.4 m. Source: Indiana DOT Design Manual,
// equations 43-3.1 to 43-3.3 (quoted).
func TestRunoffG_B18(t *testing.T) {
	runoff, runout, ok := criteria.Runoff(3.6, 1, 6, 0.5, 2)
	require.True(t, ok)
	assert.InDelta(t, 43.2, runoff, 0.01)
	assert.InDelta(t, 14.4, runout, 0.01)
	_, _, ok = criteria.Runoff(3.6, 4, 6, 0.5, 2)
	assert.False(t, ok)
}

// Laws: the rate never exceeds the greatest and falls as the radius grows; the
// least radius has the greatest rate; radius and rate invert each other.
func TestRateLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.SampledFrom([]criteria.System{criteria.Metric, criteria.US}).Draw(t, "system")
		v := rapid.Float64Range(20, 80).Draw(t, "speed")
		c, err := criteria.NewSide(s, v, rapid.Float64Range(0.04, 0.12).Draw(t, "emax"), nil)
		require.NoError(t, err)
		r := c.RMin * rapid.Float64Range(1, 30).Draw(t, "r")
		assert.LessOrEqual(t, c.Rate(r*1.02), c.Rate(r)+1e-12)
		assert.LessOrEqual(t, c.Rate(r), c.EMax)
		assert.InDelta(t, c.EMax, c.Rate(c.RMin), 1e-12)
		e := c.Rate(r)
		if e > 0.001 && e < c.EMax*0.999 {
			back, ok := c.RadiusOf(e)
			require.True(t, ok)
			assert.InEpsilon(t, r, back, 1e-6)
		}
	})
	_, err := criteria.NewSide(criteria.Metric, 140, 0.08, nil)
	assert.ErrorIs(t, err, criteria.ErrSpeed)
}
