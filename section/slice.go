package section

import "sagcrest/profile/station"

// Area is a plane figure of a section: its area in m² and its first moment
// about the reference line, ∫ offset · depth, in m³.
type Area struct{ Area, Moment float64 }

// Part is the share of one item and material in a slice.
type Part struct {
	Item      ItemID
	Material  MaterialID
	Cut, Fill Area
}

// Point is a corner of a line across the road: offset and level in metres.
type Point struct{ O, Z float64 }

// CatchState tells how a side slope ended.
type CatchState byte

// A side slope catches the ground, runs beyond the known ground (A06), meets a
// hole in it (A14), or catches at or beyond the centre of the curve (A10).
const (
	Caught CatchState = iota
	BeyondSurvey
	InHole
	Folded
)

// Flank is what happens outside the hinge on one side. Offsets are signed
// (left negative), levels in metres.
type Flank struct {
	Cut         bool // the side is in cut
	State       CatchState
	Catch       Point   // offset and original ground there; only if Caught
	InDitch     bool    // the slope meets the ground on the ditch: it runs out (A12)
	Hinge       Point   // finished hinge
	Ditch       *Point  // finished ditch bottom nearest to the road, if the ditch exists
	SearchedTo  float64 // the offset up to which ground was known, if not caught
	StripWidth  float64 // reference line to strip limit, margin included (m)
	DressedOver float64 // hinge to catch point (m)
}

// Slice is the road cut square at one station.
type Slice struct {
	At      station.Station
	Before  bool // cut with the sections and strata that end here
	Typical int  // index of the typical section, −1 for none
	// Levels at the reference line; GroundKnown false: no ground there.
	Ground, Stripped, Finished, Subgrade float64
	GroundKnown                          bool

	Left, Right Flank
	// OK: both sides caught the ground and there is no hole in between.
	OK        bool
	Cut, Fill Area
	Parts     []Part // cut by material from the top down, then fill

	// StripWidth is the width between the strip limits, StripArea its product
	// with the strip depth, RespreadArea the dressing outside the hinges (m²).
	StripWidth, StripArea, RespreadArea float64

	// GroundLine is the original ground around the section, from left to right,
	// for drawings.
	GroundLine []Point
}
