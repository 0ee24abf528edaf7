package section

import "sagcrest/profile/station"

// LinePoint is a surveyed point of a section line: offset from the reference
// line (left negative) and level, in metres.
type LinePoint struct {
	Offset station.Offset
	Z      float64
}

// SurveyLine is the ground as surveyed square to the road at one station;
// offsets increase.
type SurveyLine struct {
	At     station.Station
	Points []LinePoint
}
