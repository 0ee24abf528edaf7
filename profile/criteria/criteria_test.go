package criteria_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/criteria"
)

func ks(rows []criteria.Control) (out []float64) {
	for _, r := range rows {
		out = append(out, r.K)
	}
	return out
}

// Printed design controls: AASHTO Green Book (2011), tables 3-34 (crest) and
// 3-36 (sag), US units, every entry exact; 3-35 (passing) from memory.
func TestPrintedTables(t *testing.T) {
	crest, ok := criteria.Table(criteria.US, "stopping")
	require.True(t, ok)
	assert.Equal(t, []float64{3, 7, 12, 19, 29, 44, 61, 84, 114, 151, 193, 247, 312, 384}, ks(crest))
	assert.Equal(t, 80.0, crest[0].Sight)
	assert.Equal(t, 910.0, crest[13].Sight)
	sag, _ := criteria.Table(criteria.US, "headlight")
	assert.Equal(t, []float64{10, 17, 26, 37, 49, 64, 79, 96, 115, 136, 157, 181, 206, 231}, ks(sag))
	pass, _ := criteria.Table(criteria.US, "passing")
	assert.Equal(t, []float64{57, 72, 89, 108, 129, 175, 229, 289, 357, 432, 514, 604, 700}, ks(pass))
	_, ok = criteria.Table(criteria.US, "turning")
	assert.False(t, ok)
}

// Metric stopping distances for design, 20 to 130 km/h: AASHTO Green Book, table
// of stopping sight distance on level roadways (as in the published cases).
func TestMetricStopping(t *testing.T) {
	rows, _ := criteria.Table(criteria.Metric, "stopping")
	want := []float64{20, 35, 50, 65, 85, 105, 130, 160, 185, 220, 250, 285}
	for i, r := range rows {
		assert.Equal(t, want[i], r.Sight)
	}
}

// Laws: the two branches meet at S = L; sight over the curve found is the sight
// asked for; more sight never needs less curve.
func TestBranchesMeet(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.Float64Range(20, 900).Draw(t, "s")
		a := rapid.Float64Range(0.1, 14).Draw(t, "a")
		n := criteria.Crest(s, 1.08, 0.6, a)
		if n.Branch == criteria.Within {
			assert.GreaterOrEqual(t, n.Length, s)
		} else {
			assert.Less(t, n.Length, s)
		}
		assert.LessOrEqual(t, n.Length, criteria.Crest(s*1.01, 1.08, 0.6, a).Length+1e-9)
		edge := n.Constant / a // S = L there
		assert.InDelta(t, edge, criteria.Crest(edge, 1.08, 0.6, a).Length, 1e-6*edge)
		if n.Length > 0 && n.Branch == criteria.Within {
			assert.InDelta(t, s, math.Sqrt(n.Length*n.Constant/a), 1e-9*s)
		}
	})
}

// Printed constants: 658 and 2158 (crest, 1.08/0.60 m and 3.5/2.0 ft), 440
// (1.2/0.15 m); the printed figures are rounded to whole numbers.
func TestConstants(t *testing.T) {
	assert.InDelta(t, 658, criteria.Crest(100, 1.08, 0.6, 5).Constant, 1)
	assert.InDelta(t, 2158, criteria.Crest(100, 3.5, 2, 5).Constant, 1)
	assert.InDelta(t, 440, criteria.Crest(100, 1.2, 0.15, 5).Constant, 1)
	beam := math.Pi / 180
	assert.InDelta(t, 120+3.5*100, criteria.Headlight(100, 0.6, nil, 5).Constant, 1e-9)
	assert.InDelta(t, 120+3.49*100, criteria.Headlight(100, 0.6, &beam, 5).Constant, 0.2)
}

// A downgrade steeper than the brakes has no stopping distance.
func TestNoStop(t *testing.T) {
	f := 0.05
	_, err := criteria.Metric.StoppingDistance(50, 2.5, criteria.Braker{Friction: &f}, -0.06)
	assert.ErrorIs(t, err, criteria.ErrNoStop)
	_, err = criteria.CurveClearance(1.5, 10, 3.6)
	assert.Error(t, err)
	_, ok := criteria.Find("nobody", criteria.Metric)
	assert.False(t, ok)
}

// Stopping from 100 km/h on a downgrade of 3 %.
func ExampleSystem_StoppingDistance() {
	d, err := criteria.Metric.StoppingDistance(100, 2.5, criteria.Braker{Deceleration: 3.4}, -0.03)
	fmt.Printf("%.1f m, for design %.0f m, %v\n", d.Total, d.Design, err)
	// Output: 193.9 m, for design 195 m, <nil>
}
