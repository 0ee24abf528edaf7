package section

import "sagcrest/profile/station"

// Obstacle is something that the road passes under or over with a least gap.
// It spans Over along the road (both edges belong to it), its level runs
// linearly from ElevFrom to ElevTo along the road and is level across it. Left
// and Right are the offsets of its ends; nil means the hinges. Metres.
type Obstacle struct {
	Name             string
	Under            bool // the road passes under it; false: over it
	Over             station.Interval
	ElevFrom, ElevTo float64
	Gap              float64
	Left, Right      *station.Offset
}

// Limit is one corner of a line given by station and offset.
type Limit struct {
	At     station.Station
	Offset station.Offset
}

// RightOfWay is the land that the road may use: one line on each side, linear
// between its corners, nothing before the first or after the last.
type RightOfWay struct{ Left, Right []Limit }
