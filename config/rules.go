package config

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that reading a project raises beside
// those of every file (package diag).
func Rules() []finding.Rule {
	return []finding.Rule{
		{
			Code: "Q12", Default: finding.Error,
			Title:   "A surveyed section line doubles back in offset",
			Message: "%v",
			Formula: "offset of each point > offset of the point before it on its line",
			Source:  "common practice",
			Effect:  "The ground would have two levels at one offset.",
			Mend:    "Put the points of the line in order from left to right; left is negative.",
		},
		{
			Code: "Q21", Default: finding.Error,
			Title:   "Alternatives compared on different surfaces, units or prices",
			Message: "%v",
			Formula: "same ground (SHA-256 of the survey), pay method and currency; an alternative may not change survey, units or prices",
			Source:  "common practice",
			Effect:  "The ranking would compare surveys or prices, not roads.",
			Mend:    "Give all alternatives one survey, one set of units and one price list.",
		},
	}
}
