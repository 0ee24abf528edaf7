package earthwork

import (
	"sagcrest/profile/station"
	"sagcrest/section"
)

// Method is a rule that turns areas into volumes.
type Method string

// The rules built so far: average end areas, and the same with a pyramid where
// an area runs out to zero.
const (
	EndArea Method = "end_area"
	Pyramid Method = "pyramid"
)

// MassState is the state in which mass ordinates are counted.
type MassState string

// Mass ordinates are compacted volumes, or bank volumes where all cut has one
// shrinkage.
const (
	InCompacted MassState = "compacted"
	InBank      MassState = "bank"
)

// Exclusion is a stretch that is measured and paid elsewhere.
type Exclusion struct {
	Over   station.Interval
	Reason string
}

// Extra is a quantity entered by hand. Excavation (bank) and embankment
// (compacted) are in m³ and enter the mass ordinates; every other item only
// the bill. It sits at Over.From when Point, else it is spread evenly.
type Extra struct {
	Item     section.ItemID
	Quantity float64
	Unit     string // "m3", "m2", "m", "" for a bare count
	Over     station.Interval
	Point    bool
	Note     string
}

// Request says what is measured and how it is paid.
type Request struct {
	Method     Method
	PayStep    float64 // interval of the printed label, in label units
	Labels     station.Labels
	KeyPoints  bool
	MassState  MassState
	Stripping  section.Stripping
	Exclusions []Exclusion
	Extras     []Extra
	// CulvertStations are key points too.
	CulvertStations []station.Station
}
