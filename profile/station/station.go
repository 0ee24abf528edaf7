package station

import "math"

// Station is a length in metres along the horizontal alignment from its start.
type Station float64

// Offset is a length in metres square to the alignment, right positive when
// looking up-station.
type Offset float64

// Same is the distance in metres below which two places along a road are one:
// pay stations that close are merged and road ends that far apart are no
// finding. A centimetre is the least that is ever set out.
const Same = 0.010

// Interval is the stretch [From, To) in metres. It is empty when From >= To;
// the zero value is empty.
type Interval struct{ From, To Station }

// Everywhere is the interval that holds every station.
func Everywhere() Interval {
	return Interval{Station(math.Inf(-1)), Station(math.Inf(1))}
}

// Empty reports whether no station lies inside.
func (i Interval) Empty() bool { return !(i.From < i.To) }

// Length returns To − From in metres, 0 for an empty interval.
func (i Interval) Length() float64 {
	if i.Empty() {
		return 0
	}
	return float64(i.To - i.From)
}

// Contains reports whether From <= s < To.
func (i Interval) Contains(s Station) bool { return i.From <= s && s < i.To }

// Intersect returns the stretch that both intervals hold; it may be empty.
func (i Interval) Intersect(j Interval) Interval {
	return Interval{max(i.From, j.From), min(i.To, j.To)}
}

// At returns the empty interval that marks a single place.
func At(s Station) Interval { return Interval{s, s} }
