package alignment_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
)

// bend turns right by 90 degrees between two arms of one length.
func bend(r, in, out, arm float64) []alignment.PI {
	return []alignment.PI{{N: 0}, {N: arm, Radius: r, SpiralIn: in, SpiralOut: out}, {N: arm, E: arm}}
}

// words puts a finding into the rule's message, metres plainly.
func words(f finding.Finding) string {
	var args []any
	for _, a := range f.Args {
		if m, ok := a.(finding.Measure); ok {
			a = fmt.Sprintf("%.3f %s", m.Value, m.Unit)
		}
		args = append(args, a)
	}
	return fmt.Sprintf(alignment.Rules()[0].Message, args...)
}

// What cannot be laid: the message names both numbers and the nearest that fits.
func TestWhatDoesNotFit(t *testing.T) {
	cases := []struct {
		name    string
		pi      []alignment.PI
		key     string
		message string
	}{
		{"tangent too short", []alignment.PI{{N: 0}, {N: 199.9, Radius: 200}, {N: 199.9, E: 500}}, "alignment.pi[1].radius",
			"PI 1: its tangent towards PI 0 needs 200.000 m, but the PIs stand apart by only 199.900 m; a radius fits up to 199.900 m"},
		{"two curves too close", []alignment.PI{{N: 0}, {N: 500, Radius: 60}, {N: 500, E: 100, Radius: 60}, {N: 900, E: 100}}, "alignment.pi[2].radius",
			"PI 2: its tangent and that of PI 1 need 120.000 m, but the PIs stand apart by only 100.000 m; both curves fit when shrunk alike, this one to a radius of 50.000 m"},
		{"too close to the end", []alignment.PI{{N: 0}, {N: 500, Radius: 60}, {N: 500, E: 45}}, "alignment.pi[1].radius",
			"PI 1: its tangent towards PI 2 needs 60.000 m, but the PIs stand apart by only 45.000 m; a radius fits up to 45.000 m"},
		{"clothoids turn too far", bend(100, 160, 160, 900), "alignment.pi[1].spiral",
			"PI 1: its clothoids turn by 91.67325 degrees, but it deflects by only 90.00000 degrees; with this radius equal clothoids fit up to 157.079 m"},
		{"folds back", []alignment.PI{{N: 0}, {N: 100, Radius: 10}, {N: 0}}, "alignment.pi[1].n",
			"PI 1: the alignment folds back by 180.00000 degrees, but one PI deflects by less than 180 degrees; two PIs could share the turn, each with 90.00000 degrees"},
		{"twice the same point", []alignment.PI{{N: 0}, {N: 0}, {N: 100}}, "alignment.pi[1].n",
			"PI 1: it stands from the PI before by 0.000 m, but two PIs stand apart by more than a thousandth of a millimetre; take out one of the two"},
		{"turns without a radius", []alignment.PI{{N: 0}, {N: 100}, {N: 100, E: 50}}, "alignment.pi[1].radius",
			"PI 1: it has no radius, but deflects by 90.00000 degrees, and without a radius may by 0.00006 degrees; an arc fits with 50.000 m"},
		{"a radius and nothing to turn", []alignment.PI{{N: 0}, {N: 100, Radius: 300}, {N: 200}}, "alignment.pi[1].radius",
			"PI 1: it has a radius of 300.000 m, but deflects by only 0.00000 degrees; a PI without deflection has no curve"},
		{"clothoids without a radius", bend(0, 40, 20, 500), "alignment.pi[1].spiral",
			"PI 1: its clothoids are together 60.000 m, but lead to an arc with a radius of 0.000 m; without a radius there is no clothoid"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			a, found := alignment.New(c.pi)
			assert.Nil(t, a)
			require.Len(t, found, 1, "one fault, one complaint")
			assert.Equal(t, "A16", string(found[0].Code))
			assert.Equal(t, c.key, found[0].At.Key)
			assert.True(t, found[0].Measured.Known && found[0].Limit.Known)
			assert.Equal(t, c.message, words(found[0]))
		})
	}
	_, found := alignment.New([]alignment.PI{{N: 5}})
	require.Len(t, found, 1)
	assert.Equal(t, "F05", string(found[0].Code))
}

// The near misses: just enough tangent, two clothoids that just meet or miss
// each other by less than is counted, the least deflection with a radius.
func TestWhatJustFits(t *testing.T) {
	lay(t, bend(200, 0, 0, 200)...)
	lay(t, bend(200, 0, 0, 200-0.9e-6)...)
	a := lay(t, bend(100, 50*math.Pi+0.9e-4, 50*math.Pi, 900)...)
	assert.Len(t, a.Elements(), 4, "no arc")
	lay(t, alignment.PI{}, alignment.PI{N: 100}, alignment.PI{N: 200, E: 0.9e-4})
	lay(t, alignment.PI{}, alignment.PI{N: 100, Radius: 1000}, alignment.PI{N: 200, E: 1.1e-4})
}

// Two clothoids without an arc between them are laid like any other curve: no
// element has zero length, and every pose is a number.
func TestClothoidsThatMeet(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := rapid.Float64Range(50, 500).Draw(t, "radius")
		in, out := rapid.Float64Range(10, 100).Draw(t, "in"), rapid.Float64Range(10, 100).Draw(t, "out")
		d := (in + out) / (2 * r)
		a := lay(t, alignment.PI{}, alignment.PI{N: 900, Radius: r, SpiralIn: in, SpiralOut: out},
			alignment.PI{N: 900 + 900*math.Cos(d), E: 900 * math.Sin(d)})
		require.Len(t, a.Elements(), 4)
		for _, e := range a.Elements() {
			assert.Greater(t, e.Over.Length(), 1.0)
		}
		end := a.At(a.Length())
		assert.InDelta(t, 900*math.Sin(d), end.XY[0], 1e-8)
		assert.InDelta(t, d, end.Azimuth, 1e-9)
	})
}

// Law: the curves that a message proposes are laid.
func TestWhatIsProposedFits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pi := drawn(t)
		i := rapid.IntRange(1, len(pi)-2).Draw(t, "i")
		pi[i].Radius *= 20
		_, found := alignment.New(pi)
		require.NotEmpty(t, found)
		for range 40 {
			if len(found) == 0 {
				return
			}
			f := found[0]
			at, fits := f.Args[0].(int), f.Args[6].(finding.Measure).Value
			shrink := fits / pi[at].Radius
			require.Less(t, shrink, 1.0)
			for k := max(at-1, 1); k <= min(at+1, len(pi)-2); k++ {
				pi[k].Radius, pi[k].SpiralIn, pi[k].SpiralOut = pi[k].Radius*shrink, pi[k].SpiralIn*shrink, pi[k].SpiralOut*shrink
			}
			_, found = alignment.New(pi)
			for _, again := range found {
				assert.False(t, again.Args[0] == f.Args[0] && again.Args[1] == f.Args[1], "what was proposed does not fit: %s", words(again))
			}
		}
		t.Fatal("it never fits")
	})
}
