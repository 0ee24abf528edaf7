package drainage

import "math"

// CoverRule is a published rule for the least cover over a pipe: the greater
// of Fraction times a size of the pipe and Floor (m). HasNumber false marks a
// rule that only names its datum: the figure is then the project's.
type CoverRule struct {
	ID         string
	Datum      Datum
	Fraction   float64
	Of         Size
	Floor      float64
	HasNumber  bool
	Formula    string // as an engineer writes it, lengths in m
	FromMemory bool   // not seen in print: editable, marked as an assumption
	Source     string
}

// Size is the dimension of a pipe that a cover rule looks at.
type Size string

// The dimensions that cover rules look at.
const (
	OutsideDiameter Size = "outside diameter"
	InsideDiameter  Size = "inside diameter"
	ClearSpan       Size = "span"
)

// CoverRules returns the rules that a culvert may name, in the order of the
// published table. The datum is our reading of the source; where the source is
// silent it is common practice.
func CoverRules() []CoverRule {
	const restated = "AASHTO LRFD Bridge Design Specifications, 9th ed., 12.6.6 (restated by the American Concrete Pipe Association)"
	const metal = "AASHTO LRFD Bridge Design Specifications, Table 12.6.6.3-1 (from memory)"
	return []CoverRule{
		{"storm drain under highway", ToSurface, 0, "", 0.9, true, "0.9 m", false, "FHWA HEC-22, 3rd ed., section 7.2.5 (desirable; never below 0.3 m)"},
		{"reinforced concrete", ToPavement, 1.0 / 8, OutsideDiameter, 0.3, true, "max(OD/8, 0.300 m)", false, restated},
		{"reinforced concrete under rigid pavement", ToPavement, 0, "", 9 * 0.0254, true, "9 in = 0.2286 m", false, restated},
		{"two thirds of the fill", ToSurface, 1.0 / 2, InsideDiameter, 0, true, "D/2", false, "US Army Engineer School, EN5465, p. 5-21 (D at most two thirds of the fill)"},
		{"military tables", ToSubgrade, 0, "", 0, false, "figure of the project", false, "UFC 3-230-17FA / TM 5-820-4, Table C-5, note 4"},
		{"county code example", ToSubgrade, 0, "", 0, false, "figure of the project", false, "Covington, Kentucky, code of ordinances, App. C, section 2"},
		{"corrugated metal", ToPavement, 1.0 / 8, ClearSpan, 0.3, true, "max(span/8, 0.300 m)", true, metal},
		{"spiral rib steel", ToPavement, 1.0 / 4, ClearSpan, 0.3, true, "max(span/4, 0.300 m)", true, metal},
		{"thermoplastic unpaved", ToSurface, 1.0 / 8, InsideDiameter, 0.3, true, "max(ID/8, 0.300 m)", true, metal},
		{"thermoplastic paved", ToSurface, 1.0 / 2, InsideDiameter, 0.6, true, "max(ID/2, 0.600 m)", true, metal},
	}
}

// FindCoverRule returns the rule with the given id.
func FindCoverRule(id string) (CoverRule, bool) {
	for _, r := range CoverRules() {
		if r.ID == id {
			return r, true
		}
	}
	return CoverRule{}, false
}

// Required returns the least cover in metres for a barrel of the given inside
// height and span and wall thickness (m). A box counts with its rise for
// diameter.
func (r CoverRule) Required(height, span, wall float64) float64 {
	size := 0.0
	switch r.Of {
	case OutsideDiameter:
		size = height + 2*wall
	case InsideDiameter:
		size = height
	case ClearSpan:
		size = span
	}
	return math.Max(r.Fraction*size, r.Floor)
}
