package alignment_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/alignment"
)

// Law: any two figures of an arc give the arc back.
func TestSolveAnyTwo(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := alignment.NewCircle(rapid.Float64Range(5, 5000).Draw(t, "r"), rapid.Float64Range(0.02, 3).Draw(t, "delta"))
		values := map[alignment.Known]float64{alignment.ByRadius: c.Radius, alignment.ByDelta: c.Delta,
			alignment.ByTangent: c.Tangent, alignment.ByLength: c.Length, alignment.ByExternal: c.External}
		names := []alignment.Known{alignment.ByRadius, alignment.ByDelta, alignment.ByTangent, alignment.ByLength, alignment.ByExternal}
		for i, a := range names {
			for _, b := range names[i+1:] {
				got, err := alignment.Solve(a, values[a], b, values[b])
				require.NoError(t, err, "%s %s", a, b)
				// A flat arc hardly differs in tangent and length, so their quotient
				// carries few digits of its deflection.
				assert.InEpsilon(t, c.Radius, got.Radius, 1e-8, "%s %s", a, b)
				assert.InEpsilon(t, c.Delta, got.Delta, 1e-8, "%s %s", a, b)
			}
		}
	})
}

func TestNoArc(t *testing.T) {
	_, err := alignment.Solve(alignment.ByTangent, 10, alignment.ByLength, 25)
	assert.ErrorIs(t, err, alignment.ErrNoArc, "an arc is shorter than its two tangents")
	_, err = alignment.Solve(alignment.ByTangent, 10, alignment.ByExternal, 11)
	assert.ErrorIs(t, err, alignment.ErrNoArc)
	_, err = alignment.Solve(alignment.ByRadius, 10, alignment.ByLength, 40)
	assert.ErrorIs(t, err, alignment.ErrNoArc)
}

// The two definitions of degree of curve are inverses of themselves and differ.
func TestDegree(t *testing.T) {
	d := 15 * math.Pi / 180
	assert.InDelta(t, 5729.578/15, alignment.RadiusOfDegree(d, false), 0.001)
	assert.InDelta(t, 383.065, alignment.RadiusOfDegree(d, true), 0.001) // FM 5-233, ch. 3, case G-B01
	for _, chord := range []bool{true, false} {
		back, ok := alignment.DegreeOfRadius(alignment.RadiusOfDegree(d, chord), chord)
		assert.True(t, ok)
		assert.InDelta(t, d, back, 1e-12)
	}
	_, ok := alignment.DegreeOfRadius(49, true)
	assert.False(t, ok)
}

// A clothoid by itself and the one laid in an alignment are the same.
func TestSpiral(t *testing.T) {
	s := alignment.NewSpiral(300, 60)
	x, y, angle := s.At(60)
	assert.InDelta(t, s.X, x, 1e-12)
	assert.InDelta(t, s.Y, y, 1e-12)
	assert.InDelta(t, s.Angle, angle, 1e-15)
	a := lay(t, alignment.PI{N: 0}, alignment.PI{N: 500, Radius: 300, SpiralIn: 60, SpiralOut: 60}, alignment.PI{N: 800, E: 500})
	r := a.PITable()[0]
	tangent, external, arc := s.Between(r.Deflection)
	assert.InDelta(t, r.TangentIn, tangent, 1e-9)
	assert.InDelta(t, r.External, external, 1e-9)
	assert.InDelta(t, r.ArcLength, arc, 1e-9)
}
