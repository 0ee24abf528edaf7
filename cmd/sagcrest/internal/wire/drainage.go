package wire

// Drainage holds culverts; inlets, ditches and catchments are absent until they
// are computed.
type Drainage struct {
	Culverts []Culvert `json:"culverts"`
}

// Culvert in its place. Lists run from inlet to outlet; where the direction is
// unknown, from left to right.
type Culvert struct {
	ID           string        `json:"id"`
	Place        *Place        `json:"place"`
	SkewDeg      Fine          `json:"skew_deg"`
	SkewSide     *string       `json:"skew_side" jsonschema:"enum=right_ahead,enum=left_ahead"`
	Shape        string        `json:"shape" jsonschema:"enum=circular,enum=box,enum=ellipse,enum=arch"`
	Diameter     *Fine         `json:"diameter,omitempty"`
	Span         *Fine         `json:"span,omitempty"`
	Rise         *Fine         `json:"rise,omitempty"`
	Wall         Fine          `json:"wall"`
	Barrels      int           `json:"barrels"`
	Ends         *[]CulvertEnd `json:"ends"`
	InletInvert  *Fine         `json:"inlet_invert"`
	OutletInvert *Fine         `json:"outlet_invert"`
	Length       *Fine         `json:"length"`
	LengthPlan   *Fine         `json:"length_plan"`
	Slope        *Fine         `json:"slope"`
	CoverMin     *CoverMin     `json:"cover_min"`
	CoverProfile *[]CoverPoint `json:"cover_profile"`
	CoverOK      *bool         `json:"cover_ok"`
	Verdict      string        `json:"verdict" jsonschema:"enum=ok,enum=short,enum=withheld"`
	Mends        []Mend        `json:"mends"`
}

// CulvertEnd is an end of the middle axis; End is null where the direction of
// flow is unknown.
type CulvertEnd struct {
	End        *string `json:"end" jsonschema:"enum=inlet,enum=outlet"`
	Side       string  `json:"side" jsonschema:"enum=left,enum=right"`
	Place      Place   `json:"place"`
	Offset     Fine    `json:"offset"`
	Invert     Fine    `json:"invert"`
	GroundElev *Fine   `json:"ground_elev"`
}

// CoverMin is the least cover between the hinges, over every barrel.
type CoverMin struct {
	Value      Fine   `json:"value"`
	Place      Place  `json:"place"`
	Offset     Fine   `json:"offset"`
	Where      string `json:"where" jsonschema:"enum=lane,enum=edge,enum=shoulder,enum=hinge,enum=median,enum=kerb"`
	MeasuredTo string `json:"measured_to" jsonschema:"enum=subgrade,enum=pavement_underside,enum=surface"`
	Rule       string `json:"rule"`
	Required   Fine   `json:"required"`
}

// CoverPoint is a row along the barrel that governs. Crown is the outside of
// the wall; Datum is null beyond the hinges.
type CoverPoint struct {
	Place        Place `json:"place"`
	Offset       Fine  `json:"offset"`
	Invert       Fine  `json:"invert"`
	Crown        Fine  `json:"crown"`
	Datum        *Fine `json:"datum"`
	Surface      *Fine `json:"surface"`
	RequiredHere bool  `json:"required_here"`
}

// Mend is a way to get the cover that is missing.
type Mend struct {
	Kind  string `json:"kind" jsonschema:"enum=raise_grade_line,enum=lower_invert,enum=smaller_barrel,enum=more_barrels"`
	Value Fine   `json:"value"`
	Unit  string `json:"unit"`
	Text  string `json:"text"`
}
