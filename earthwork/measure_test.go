package earthwork_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// rounding is the rounding of sums of a few dozen volumes of up to 1e5 m³.
const rounding = 1e-8

// figures lists what must add up along a road.
func figures(q earthwork.Quantities) []float64 {
	out := []float64{float64(q.Cut), float64(q.Fill), q.Strip, q.Respread, q.Land[0], q.Land[1], q.Mass.End(),
		q.Mass.Total.Cut, q.Mass.Total.Fill}
	for _, m := range q.Methods {
		out = append(out, float64(m.Cut), float64(m.Fill), float64(m.SliverCut), float64(m.SliverFill))
	}
	for _, id := range []section.MaterialID{"till", "rock", "peat"} {
		sum := 0.0
		for _, m := range q.Materials {
			if m.Material.ID == id {
				sum = float64(m.Cut)
			}
		}
		out = append(out, sum)
	}
	return out
}

func measure(t require.TestingT, req earthwork.Request, c earthwork.Cuts) earthwork.Quantities {
	q, _ := earthwork.Measure(req, c, soils(), everywhere("till"))
	require.NotNil(t, q.Mass)
	return q
}

// Law: V[a,c] = V[a,b] + V[b,c] for b a pay station.
func TestVolumesAddUp(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		last := len(c.Stations) - 1
		b := rapid.IntRange(1, last-1).Draw(t, "b")
		whole := figures(measure(t, req, c))
		one, two := figures(measure(t, req, part(c, 0, b))), figures(measure(t, req, part(c, b, last)))
		for i := range whole {
			assert.InDelta(t, whole[i], one[i]+two[i], 1e-5, "figure %d", i)
		}
	})
}

// Law: walked backwards, a road has the same volumes; left and right change
// places.
func TestBackwards(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		var back earthwork.Cuts
		for i := len(c.Stations) - 1; i >= 0; i-- {
			p := c.Stations[i]
			turn := func(s section.Slice) *section.Slice {
				s.At, s.Left, s.Right = -s.At, s.Right, s.Left
				return &s
			}
			back.Stations = append(back.Stations, earthwork.PayStation{At: -p.At, Changes: p.Changes, Paid: p.Paid})
			back.Before, back.After = append(back.Before, turn(*c.After[i])), append(back.After, turn(*c.Before[i]))
		}
		a, b := measure(t, req, c), measure(t, req, back)
		b.Land[0], b.Land[1] = b.Land[1], b.Land[0]
		assert.InDeltaSlice(t, figures(a), figures(b), rounding)
		for i, v := range a.Between {
			w := b.Between[len(b.Between)-1-i]
			assert.InDelta(t, float64(v.Cut), float64(w.Cut), rounding)
		}
	})
}

// Law: swapping the areas of cut and fill swaps the volumes.
func TestSwappingAreasSwapsVolumes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		var swapped earthwork.Cuts
		swapped.Stations = c.Stations
		swap := func(s *section.Slice) *section.Slice {
			return slice(s.At, s.Cut.Area, map[section.MaterialID]float64{"till": s.Fill.Area})
		}
		for i := range c.Stations {
			swapped.Before, swapped.After = append(swapped.Before, swap(c.Before[i])), append(swapped.After, swap(c.After[i]))
		}
		a, b := measure(t, req, c), measure(t, req, swapped)
		for i := range a.Methods {
			assert.InDelta(t, float64(a.Methods[i].Cut), float64(b.Methods[i].Fill), rounding)
			assert.InDelta(t, float64(a.Methods[i].Fill), float64(b.Methods[i].Cut), rounding)
		}
	})
}

// Law: materials, intervals and methods all sum to the total; the pyramid never
// gives more than end areas, and no less than two thirds of them.
func TestLedgers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		q := measure(t, req, c)
		var materials, intervals earthwork.Bank
		for _, m := range q.Materials {
			materials += m.Cut
		}
		width := 0.0
		for i, v := range q.Between {
			intervals += v.Cut
			var parts earthwork.Bank
			for _, p := range v.Parts {
				parts += p.Cut
			}
			assert.InDelta(t, float64(v.Cut), float64(parts), rounding)
			width += (c.After[i].StripWidth + c.Before[i+1].StripWidth) / 2 * float64(v.To-v.From)
		}
		assert.InDelta(t, float64(q.Cut), float64(materials), 1e-5)
		assert.InDelta(t, float64(q.Cut), float64(intervals), rounding)
		// Left and right land sum to the width between the strip limits (Q13).
		assert.InDelta(t, width, q.Land[0]+q.Land[1], rounding)
		assert.InDelta(t, 0.25*width, q.Strip, rounding)

		paid := 0
		if req.Method == earthwork.Pyramid {
			paid = 1
		}
		assert.Equal(t, q.Methods[paid].Cut, q.Cut)
		assert.Equal(t, q.Methods[paid].Fill, q.Fill)
		end, pyramid := q.Methods[0], q.Methods[1]
		assert.LessOrEqual(t, float64(pyramid.Cut), float64(end.Cut)+rounding)
		assert.GreaterOrEqual(t, float64(pyramid.Cut), float64(end.Cut)*2/3-rounding)
		assert.LessOrEqual(t, float64(pyramid.Fill), float64(end.Fill)+rounding)
		assert.LessOrEqual(t, float64(pyramid.SliverCut), float64(pyramid.Cut)+rounding)
	})
}

// Law: an exception counts in nothing: what is left is the road without it.
func TestExceptionsCountInNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		req, c := drawMethod(t), drawCuts(t)
		last := len(c.Stations) - 1
		i := rapid.IntRange(0, last-1).Draw(t, "from")
		k := rapid.IntRange(i+1, last).Draw(t, "to")
		out := req
		// In two exceptions that overlap, so that a length must count once.
		out.Exclusions = []earthwork.Exclusion{
			{Over: station.Interval{From: c.Stations[i].At, To: c.Stations[k].At}},
			{Over: station.Interval{From: c.Stations[k-1].At, To: c.Stations[k].At}},
		}
		q := measure(t, out, c)
		whole, inside := figures(measure(t, req, c)), figures(measure(t, req, part(c, i, k)))
		for n, v := range figures(q) {
			assert.InDelta(t, whole[n], v+inside[n], 1e-5, "figure %d", n)
		}
		for n, s := range q.Mass.Stations {
			assert.False(t, s > c.Stations[i].At && s < c.Stations[k].At, "no ordinate inside")
			if s == c.Stations[k].At && n > 0 {
				assert.Equal(t, q.Mass.Values[n-1], q.Mass.Values[n], "level across")
			}
		}
	})
}

// A slice without areas makes its two intervals and every total unknown, and
// nothing else; inside an exception it does not matter.
func TestUnknownSlices(t *testing.T) {
	c := cutsOf(slice(0, 1, nil), slice(20, 1, nil), slice(40, 1, nil), slice(60, 1, nil), slice(80, 1, nil))
	lost := *c.Before[2]
	lost.OK = false
	c.Before = append([]*section.Slice(nil), c.Before...)
	c.Before[2] = &lost
	c.After = c.Before

	q, found := earthwork.Measure(earthwork.Request{}, c, soils(), everywhere("till"))
	assert.Empty(t, found)
	assert.False(t, q.Known)
	assert.Nil(t, q.Mass)
	known := []bool{true, false, false, true}
	for i, v := range q.Between {
		assert.Equal(t, known[i], v.Known)
	}
	assert.Contains(t, q.Withheld(), "earthwork.intervals[1].cut_bank")
	assert.Contains(t, q.Withheld(), "earthwork.totals.methods[1].fill_compacted")
	assert.NotContains(t, q.Withheld(), "earthwork.intervals[3].cut_bank")

	q, _ = earthwork.Measure(earthwork.Request{Exclusions: []earthwork.Exclusion{{Over: station.Interval{From: 20, To: 60}}}}, c, soils(), everywhere("till"))
	assert.True(t, q.Known)
	assert.Empty(t, q.Withheld())
	assert.InDelta(t, 40, float64(q.Fill), 1e-12)

	// Rows of intervals leave exceptions out.
	q, _ = earthwork.Measure(earthwork.Request{Exclusions: []earthwork.Exclusion{{Over: station.Interval{From: 0, To: 20}}}}, c, soils(), everywhere("till"))
	assert.Contains(t, q.Withheld(), "earthwork.intervals[0].strip")
	assert.Contains(t, q.Withheld(), "earthwork.intervals[1].strip")
	assert.NotContains(t, q.Withheld(), "earthwork.intervals[2].strip")
}

// Materials: states where factors are known, the project's order, and cut of no
// named material last, as Q01.
func TestMaterials(t *testing.T) {
	c := cutsOf(
		slice(0, 0, map[section.MaterialID]float64{"": 1, "till": 2, "rock": 4, "peat": 8}),
		slice(10, 0, map[section.MaterialID]float64{"": 1, "till": 2, "rock": 4, "peat": 8}))
	q, found := earthwork.Measure(earthwork.Request{}, c, soils(), everywhere("till"))
	require.Len(t, q.Materials, 4)
	var names []section.MaterialID
	for _, m := range q.Materials {
		names = append(names, m.Material.ID)
	}
	assert.Equal(t, []section.MaterialID{"till", "rock", "peat", ""}, names)
	assert.InDelta(t, 18, float64(*q.Materials[0].Compacted), 1e-12)
	assert.InDelta(t, 25, float64(*q.Materials[0].Loose), 1e-12)
	assert.InDelta(t, 44, float64(*q.Materials[1].Compacted), 1e-12)
	assert.Nil(t, q.Materials[1].Loose, "no swell stated")
	assert.Nil(t, q.Materials[2].Compacted, "unsuitable")
	assert.Nil(t, q.Materials[3].Compacted)

	require.Len(t, found, 1)
	assert.Equal(t, finding.Code("Q01"), found[0].Code)
	assert.Equal(t, finding.Of(10, "m3"), found[0].Measured)
	assert.Contains(t, found[0].Stops, "earthwork.totals.materials[3].cut_compacted")
	assert.Nil(t, q.Mass)
	assert.True(t, q.Known, "volumes stand")
}

// A road that cuts nothing needs no shrinkage (near miss of Q01).
func TestNoCutNeedsNoShrinkage(t *testing.T) {
	c := cutsOf(slice(0, 3, map[section.MaterialID]float64{"": 1e-9}), slice(10, 5, nil))
	q, found := earthwork.Measure(earthwork.Request{}, c, nil, everywhere(""))
	assert.Empty(t, found)
	assert.Empty(t, q.Materials)
	require.NotNil(t, q.Mass)
	assert.InDelta(t, -40, q.Mass.End(), 1e-9)
}

// Slivers are told of where the pyramid pays, and only there (Q22).
func TestSlivers(t *testing.T) {
	till := func(a float64) map[section.MaterialID]float64 { return map[section.MaterialID]float64{"till": a} }
	sliver := cutsOf(slice(0, 0, till(0.09)), slice(10, 0, till(4)), slice(20, 0, till(4)))
	for _, c := range []struct {
		name   string
		method earthwork.Method
		cuts   earthwork.Cuts
		want   int
	}{
		{"paid by pyramids", earthwork.Pyramid, sliver, 1},
		{"paid by end areas", earthwork.EndArea, sliver, 0},
		{"area at the limit", earthwork.Pyramid, cutsOf(slice(0, 0, till(0.1)), slice(10, 0, till(4))), 0},
		{"area run out", earthwork.Pyramid, cutsOf(slice(0, 0, till(0.4e-6)), slice(10, 0, till(4))), 0},
	} {
		q, found := earthwork.Measure(earthwork.Request{Method: c.method}, c.cuts, soils(), everywhere("till"))
		require.Len(t, found, c.want, c.name)
		if c.want > 0 {
			assert.Equal(t, finding.Code("Q22"), found[0].Code)
			assert.InDelta(t, 4.09/2*10, found[0].Measured.Value, 1e-12)
			assert.InDelta(t, float64(q.Cut), found[0].Limit.Value, 1e-12)
		}
	}
}
