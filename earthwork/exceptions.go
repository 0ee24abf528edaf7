package earthwork

import (
	"cmp"
	"fmt"
	"slices"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// onRoad returns what of each exception lies on the road, in order of the list.
func onRoad(in []Exclusion, over station.Interval) (out []station.Interval) {
	for _, e := range in {
		if i := e.Over.Intersect(over); !i.Empty() {
			out = append(out, i)
		}
	}
	return out
}

// closedLengths returns the exceptions as stretches of the road that neither
// overlap nor touch, increasing, so that each length counts once.
func closedLengths(in []Exclusion, over station.Interval) []station.Interval {
	all := onRoad(in, over)
	slices.SortFunc(all, func(a, b station.Interval) int { return cmp.Compare(a.From, b.From) })
	merged := all[:0]
	for _, i := range all {
		if n := len(merged); n > 0 && i.From <= merged[n-1].To {
			merged[n-1].To = max(merged[n-1].To, i.To)
			continue
		}
		merged = append(merged, i)
	}
	return merged
}

func strictlyInside(closed []station.Interval, s station.Station) bool {
	return slices.ContainsFunc(closed, func(i station.Interval) bool { return i.From < s && s < i.To })
}

// CheckExclusions finds exceptions that overlap or lie off the road (A11): each
// length counts once.
func CheckExclusions(in []Exclusion, over station.Interval) (out []finding.Finding) {
	warn := func(i int, text string, at station.Interval, length float64) {
		out = append(out, finding.Finding{Code: "A11", Severity: finding.Warning,
			At:       finding.Between(at.From, at.To).Under(fmt.Sprintf("exclude[%d]", i)).Named(in[i].Reason),
			Measured: finding.Of(length, "m"), Limit: finding.Of(0, "m"),
			Args: []any{at.From, at.To, text, finding.Of(length, "m")}})
	}
	for i, e := range in {
		inside := e.Over.Intersect(over)
		if off := e.Over.Length() - inside.Length(); off > station.Same+tick {
			warn(i, "lies off the road", e.Over, off)
		}
		for k := range i {
			if both := e.Over.Intersect(in[k].Over); both.Length() > station.Same+tick {
				warn(i, "overlaps the exception "+in[k].Reason, both, both.Length())
			}
		}
	}
	return out
}
