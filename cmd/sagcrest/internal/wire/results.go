package wire

// Results is the document of a run.
type Results struct {
	Head
	Inputs      []Input   `json:"inputs"`
	Alternative string    `json:"alternative"`
	Status      string    `json:"status" jsonschema:"enum=complete,enum=withheld"`
	Findings    []Finding `json:"findings"`
	Result      Result    `json:"result"`
}

// Result holds what was computed; keys of stages that are not built are absent.
type Result struct {
	Alignment Alignment `json:"alignment"`
	Profile   Profile   `json:"profile"`
	Sections  []Section `json:"sections"`
	Earthwork Earthwork `json:"earthwork"`
	Drainage  Drainage  `json:"drainage"`
	Land      Land      `json:"land"`
	Cost      *Cost     `json:"cost,omitempty"`
}

// Alignment lists the horizontal elements in order.
type Alignment struct {
	Length   Fine      `json:"length"`
	Elements []Element `json:"elements"`
}

// Element of the alignment; radii are positive turning right, null is straight.
type Element struct {
	Kind       string `json:"kind" jsonschema:"enum=tangent,enum=arc,enum=clothoid"`
	From       Place  `json:"from"`
	To         Place  `json:"to"`
	RadiusFrom *Fine  `json:"radius_from"`
	RadiusTo   *Fine  `json:"radius_to"`
}

// Profile is the grade line and the lines that hang on it.
type Profile struct {
	Curves     []Curve     `json:"curves"`
	LowPoints  []Turning   `json:"low_points"`
	HighPoints []Turning   `json:"high_points"`
	Ends       []LineEnd   `json:"ends"`
	Clearances []Clearance `json:"clearances"`
}

// Level is a place with its level.
type Level struct {
	Place Place `json:"place"`
	Elev  Fine  `json:"elev"`
}

// Curve is what stands at an interior PVI.
type Curve struct {
	PVI     Level  `json:"pvi"`
	PVC     Level  `json:"pvc"`
	PVT     Level  `json:"pvt"`
	G1Pct   Fine   `json:"g1_pct"`
	G2Pct   Fine   `json:"g2_pct"`
	Length  Fine   `json:"length"`
	K       *Fine  `json:"k"`
	Kind    string `json:"kind" jsonschema:"enum=crest,enum=sag,enum=none"`
	Shape   string `json:"shape" jsonschema:"enum=parabola,enum=unsymmetrical,enum=circular,enum=break"`
	Turning *Level `json:"turning"`
}

// Turning is a low or high point of a line; To is set for a level stretch.
type Turning struct {
	Line   string `json:"line"`
	Place  Place  `json:"place"`
	To     *Place `json:"to,omitempty"`
	Offset Fine   `json:"offset"`
	Elev   Fine   `json:"elev"`
	Kind   string `json:"kind" jsonschema:"enum=curve,enum=angle,enum=level"`
}

// LineEnd is a line at an end of the road.
type LineEnd struct {
	Line     string `json:"line"`
	End      string `json:"end" jsonschema:"enum=start,enum=end"`
	Place    Place  `json:"place"`
	Elev     Fine   `json:"elev"`
	GradePct Fine   `json:"grade_pct"`
}

// Clearance under or over an obstacle.
type Clearance struct {
	Name     string `json:"name"`
	Side     string `json:"side" jsonschema:"enum=under,enum=over"`
	Gap      *Fine  `json:"gap"`
	Required Fine   `json:"required"`
	Place    *Place `json:"place"`
	Offset   *Fine  `json:"offset"`
	OK       *bool  `json:"ok"`
}

// Catch is a catch point: offset and original ground.
type Catch struct {
	Offset Fine `json:"offset"`
	Elev   Fine `json:"elev"`
}

// Section is the road cut square at a pay station. Where the typical section
// changes two stand at one place, the one that ends there first.
type Section struct {
	Place              Place   `json:"place"`
	Pay                bool    `json:"pay"`
	Why                string  `json:"why"`
	Typical            *string `json:"typical"`
	GroundElev         *Fine   `json:"ground_elev"`
	StrippedGroundElev *Fine   `json:"stripped_ground_elev"`
	FinishedElev       Fine    `json:"finished_elev"`
	SubgradeElev       *Fine   `json:"subgrade_elev"`
	CutArea            *Fine   `json:"cut_area"`
	FillArea           *Fine   `json:"fill_area"`
	CutMoment          *Fine   `json:"cut_moment"`
	FillMoment         *Fine   `json:"fill_moment"`
	StripWidth         *Fine   `json:"strip_width"`
	LeftCatch          *Catch  `json:"left_catch"`
	RightCatch         *Catch  `json:"right_catch"`
}

// Earthwork holds volumes.
type Earthwork struct {
	Totals    Totals     `json:"totals"`
	Intervals []Interval `json:"intervals"`
	Mass      Mass       `json:"mass"`
}

// Totals of the road. Respread is topsoil laid again.
type Totals struct {
	CutBank       *Volume    `json:"cut_bank"`
	FillCompacted *Volume    `json:"fill_compacted"`
	Strip         *Volume    `json:"strip"`
	Respread      *Volume    `json:"respread"`
	PayMethod     string     `json:"pay_method"`
	Methods       []Method   `json:"methods"`
	Materials     []Material `json:"materials"`
}

// Method is the totals by one rule; Slivers is the volume that hangs on end
// areas below 0.1 m².
type Method struct {
	Name          string  `json:"name" jsonschema:"enum=end_area,enum=pyramid,enum=prismoidal,enum=integrated"`
	CutBank       *Volume `json:"cut_bank"`
	FillCompacted *Volume `json:"fill_compacted"`
	Strip         *Volume `json:"strip"`
	Curvature     bool    `json:"curvature"`
	Slivers       *Volume `json:"slivers"`
}

// Material is the cut of one material; a null name is no material at all.
type Material struct {
	Name         *string `json:"name"`
	CutBank      *Volume `json:"cut_bank"`
	CutCompacted *Volume `json:"cut_compacted"`
	CutLoose     *Volume `json:"cut_loose"`
}

// Interval lies between neighbouring pay stations, exceptions left out.
type Interval struct {
	From          Place   `json:"from"`
	To            Place   `json:"to"`
	CutBank       *Volume `json:"cut_bank"`
	FillCompacted *Volume `json:"fill_compacted"`
	Strip         *Volume `json:"strip"`
}

// Mass is the mass diagram; null lists are withheld.
type Mass struct {
	State         string          `json:"state" jsonschema:"enum=compacted,enum=bank"`
	Ordinates     *[]Ordinate     `json:"ordinates"`
	BalancePoints *[]BalancePoint `json:"balance_points"`
}

// Ordinate of the mass diagram.
type Ordinate struct {
	Place Place  `json:"place"`
	Value Volume `json:"value"`
}

// BalancePoint is a place where the mass curve meets zero.
type BalancePoint struct {
	Place Place `json:"place"`
}

// Land is the area taken on either side.
type Land struct {
	Left  Take `json:"left"`
	Right Take `json:"right"`
}

// Take is the plan area from the reference line to the strip limit, and where
// the works lie beyond the right of way.
type Take struct {
	Take   *Fine     `json:"take"`
	Beyond *[]Beyond `json:"beyond"`
}

// Beyond is a stretch beyond the right of way; Most is how far at most.
type Beyond struct {
	From Place `json:"from"`
	To   Place `json:"to"`
	Most Fine  `json:"most"`
}

// Cost is the bill.
type Cost struct {
	Currency string  `json:"currency"`
	Lines    []Line  `json:"lines"`
	Total    *Volume `json:"total"`
	Method   string  `json:"method"`
}

// Line of the bill.
type Line struct {
	Item     string  `json:"item"`
	Quantity *Volume `json:"quantity"`
	Unit     string  `json:"unit"`
	Rate     *Volume `json:"rate"`
	Amount   *Volume `json:"amount"`
}
