package terrain

import "sagcrest/profile/finding"

// Rules lists the findings that a triangulation raises.
func Rules() []finding.Rule {
	return []finding.Rule{
		{
			Code: "F02", Default: finding.Error,
			Title:   "The survey makes no surface",
			Message: "the survey makes no surface: %v",
			Formula: "at least three points that do not lie on one line, every coordinate and level a finite number within ±1e8 m",
			Source:  "common practice",
			Effect:  "there is no ground, so nothing can be computed",
			Mend:    "correct the row that is named, or add points beside the line",
		},
		{
			Code: "U08", Default: finding.Warning,
			Title:   "One place, two levels",
			Message: "at E %v N %v the levels in rows %v and %v lie %v apart (limit %v); places like this in the survey: %v",
			Formula: "highest − lowest level of the points whose coordinates round to the same millimetre > 20 mm",
			Source:  "common practice",
			Effect:  "the mean of the levels is used: the ground is wrong there by up to half the difference",
			Mend:    "delete the wrong row, or correct its level or its place",
		},
	}
}

// noSurface returns the finding for points that no surface can be made of.
func noSurface(why string) []finding.Finding {
	return []finding.Finding{{Code: "F02", Severity: finding.Error, Args: []any{why}}}
}
