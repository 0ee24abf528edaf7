package earthwork_test

import (
	"pgregory.net/rapid"

	"sagcrest/earthwork"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// Slices with any areas, for laws that hold whatever the ground.

// everywhere is a road whose typical sections all name one material.
type everywhere section.MaterialID

func (e everywhere) MaterialAt(station.Station) section.MaterialID { return section.MaterialID(e) }

func ptr(v float64) *float64 { return &v }

// soils has invented factors: till shrinks, rock gains, peat is of no use.
func soils() []earthwork.Material {
	return []earthwork.Material{
		{ID: "till", Shrinkage: ptr(0.10), Swell: ptr(0.25)},
		{ID: "rock", Shrinkage: ptr(-0.10)},
		{ID: "peat", Unsuitable: true},
	}
}

// slice makes a slice of the given areas whose cut is made of the materials in
// the given areas.
func slice(at station.Station, fill float64, cut map[section.MaterialID]float64) *section.Slice {
	s := &section.Slice{At: at, OK: true, Fill: section.Area{Area: fill}}
	for _, id := range []section.MaterialID{"", "till", "rock", "peat"} {
		if a, ok := cut[id]; ok {
			s.Cut.Area += a
			s.Parts = append(s.Parts, section.Part{Item: section.Excavation, Material: id, Cut: section.Area{Area: a}})
		}
	}
	if fill > 0 {
		s.Parts = append(s.Parts, section.Part{Item: section.Embankment, Fill: s.Fill})
	}
	return s
}

// drawSlice draws areas that run out, hardly run out, or do not.
func drawSlice(t *rapid.T, at station.Station) *section.Slice {
	area := rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0, 0.2), rapid.Float64Range(0, 300))
	cut := map[section.MaterialID]float64{}
	for _, id := range []section.MaterialID{"till", "rock", "peat"} {
		if a := area.Draw(t, string(id)); a > 0 {
			cut[id] = a
		}
	}
	s := slice(at, area.Draw(t, "fill"), cut)
	width := rapid.Float64Range(0, 60)
	s.Left.StripWidth, s.Right.StripWidth = width.Draw(t, "left"), width.Draw(t, "right")
	s.StripWidth = s.Left.StripWidth + s.Right.StripWidth
	s.StripArea, s.RespreadArea = 0.25*s.StripWidth, 0.1*s.StripWidth
	return s
}

// drawCuts draws a road of some pay stations; at some of them a section changes.
func drawCuts(t *rapid.T) earthwork.Cuts {
	c := earthwork.Cuts{}
	at := station.Station(rapid.Float64Range(0, 1000).Draw(t, "start"))
	for range rapid.IntRange(3, 10).Draw(t, "stations") {
		before := drawSlice(t, at)
		after := before
		changes := rapid.Bool().Draw(t, "changes")
		if changes {
			after = drawSlice(t, at)
		}
		c.Stations = append(c.Stations, earthwork.PayStation{At: at, Changes: changes, Paid: true})
		c.Before, c.After = append(c.Before, before), append(c.After, after)
		at += station.Station(rapid.Float64Range(0.01, 50).Draw(t, "length"))
	}
	return c
}

// cutsOf makes a road of slices at which nothing changes.
func cutsOf(slices ...*section.Slice) (c earthwork.Cuts) {
	for _, s := range slices {
		c.Stations = append(c.Stations, earthwork.PayStation{At: s.At, Paid: true})
	}
	c.Before, c.After = slices, slices
	return c
}

// part returns the stations from i to k.
func part(c earthwork.Cuts, i, k int) earthwork.Cuts {
	return earthwork.Cuts{Stations: c.Stations[i : k+1], Before: c.Before[i : k+1], After: c.After[i : k+1]}
}

// drawMethod draws a rule that pays.
func drawMethod(t *rapid.T) earthwork.Request {
	return earthwork.Request{Method: rapid.SampledFrom([]earthwork.Method{earthwork.EndArea, earthwork.Pyramid}).Draw(t, "method")}
}
