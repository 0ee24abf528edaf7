package profile

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that this package raises.
func Rules() []finding.Rule {
	const practice = "common practice"
	return []finding.Rule{
		{
			Code: "A01", Default: finding.Error,
			Title:   "Stations do not increase",
			Message: "%v at %v does not lie beyond the one before it, at %v",
			Formula: "station of each row > station of the row before",
			Source:  practice,
			Effect:  "No grade, area or length follows from rows out of order.",
			Mend:    "Put the rows in order of station and take out repeats.",
		},
		{
			Code: "P01", Default: finding.Error,
			Title:   "Vertical curves overlap",
			Message: "the curve at PVI %v is %v long and runs beyond the start or end of %v by %v; a length up to %v fits",
			Formula: "PVC >= PVT of the curve before; curves lie between the first and the last PVI; 1e-6 m is allowed",
			Source:  practice,
			Effect:  "The grade line would have two levels at one station.",
			Mend:    "Shorten a curve, or move the PVIs apart.",
		},
		{
			Code: "P02", Default: finding.Error,
			Title:   "Curve table and grade line disagree",
			Message: "the curve table says of PVI %v: %v %v, the grade line has %v",
			Formula: "|printed − computed| <= 5 mm (K by the length it makes)",
			Source:  practice,
			Effect:  "One of the two is wrong, and both get built.",
			Mend:    "Correct the table, or the PVI it was made from.",
		},
		{
			Code: "P12", Default: finding.Error,
			Title:   "The grade line misses a tie-in",
			Message: "at the tie-in %v the %v is %v, wanted %v",
			Formula: "|level − wanted| <= 5 mm, |grade − wanted| <= 0.05 %",
			Source:  practice,
			Effect:  "A step or a kink where the new road meets what is there.",
			Mend:    "Move the first or last PVI to the level of the tie-in.",
		},
	}
}
