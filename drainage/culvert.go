package drainage

import "sagcrest/profile/station"

// Shape of a barrel.
type Shape string

// The shapes that can be laid.
const (
	Circular Shape = "circular"
	Box      Shape = "box"
)

// Datum is the surface to which cover is measured.
type Datum string

// The datums: underside of all pavement layers, underside of the bound ones,
// finished surface.
const (
	ToSubgrade Datum = "subgrade"
	ToPavement Datum = "pavement_underside"
	ToSurface  Datum = "surface"
)

// Culvert is what a project says of one crossing. Sizes are inside, all
// lengths in metres, Skew in radians from the normal (>= 0).
type Culvert struct {
	ID         string
	Station    *station.Station  // where the middle axis meets the reference line …
	Between    *station.Interval // … or lowest ground in between
	Skew       float64
	RightAhead bool // the right end lies ahead; only where Skew > 0
	InletSide  int  // −1 left, +1 right, 0 unsaid
	Shape      Shape
	Diameter   float64 // circular
	Span, Rise float64 // box
	Wall       float64
	Barrels    int
	Spacing    *float64 // clear distance; nil: one outside diameter or span
	Rule       string   // an id of the cover rules, or empty
	Cover      *float64 // the project's own figure
	CoverDatum Datum    // of Cover, or beside a rule (then D05 when it differs)
	// InletInvert and OutletInvert are both given or both nil.
	InletInvert, OutletInvert *float64
}

// Height returns the inside height of the barrel.
func (c *Culvert) Height() float64 {
	if c.Shape == Box {
		return c.Rise
	}
	return c.Diameter
}
