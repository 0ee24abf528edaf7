package section_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/section"
)

// Case G-C19: level ground, fill 4.5 ft at 1:3 from 22 ft, cut 5 ft at 1:2 from
// 29 ft. Source: Indiana DOT Survey Procedures, ch. 6, slope stakes, fig. 6-2
// (quoted), tolerance 0.05.
func TestSlopeStakeG_C19(t *testing.T) {
	level := func(z float64) []section.Point { return []section.Point{{O: 0, Z: z}, {O: 500, Z: z}} }
	s, ok := section.SlopeStake(section.Point{O: 22, Z: 499}, 3, level(494.5))
	require.True(t, ok)
	assert.False(t, s.Cut)
	assert.InDelta(t, 35.5, s.Offset, 0.05)
	s, ok = section.SlopeStake(section.Point{O: 29, Z: 497}, 2, level(502))
	require.True(t, ok)
	assert.True(t, s.Cut)
	assert.InDelta(t, 39, s.Offset, 0.05)
	assert.InDelta(t, 5, s.Depth, 1e-9)
	s, ok = section.SlopeStake(section.Point{O: 29, Z: 502}, 2, level(502))
	require.True(t, ok)
	assert.InDelta(t, 29, s.Offset, 1e-12, "at grade")
}

// Law: the stake stands on the ground and on the slope.
func TestSlopeStakeStandsOnBoth(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := []section.Point{{O: 0, Z: 100}, {O: 20, Z: rapid.Float64Range(95, 105).Draw(t, "a")}, {O: 200, Z: rapid.Float64Range(90, 110).Draw(t, "b")}}
		hinge := section.Point{O: 6, Z: rapid.Float64Range(94, 106).Draw(t, "hinge")}
		s, ok := section.SlopeStake(hinge, 2, g)
		if !ok {
			return
		}
		z := hinge.Z - (s.Offset-hinge.O)/2
		if s.Cut {
			z = hinge.Z + (s.Offset-hinge.O)/2
		}
		ground := shaped{corners: g}
		got, _ := ground.Level(nil, 0, s.Offset)
		assert.InDelta(t, got, z, 1e-9)
	})
}
