package terrain

import "sagcrest/profile/finding"

// Rules lists the findings that a triangulation raises of its own; F02, a survey
// that makes no surface, has the page of every file that cannot be used.
func Rules() []finding.Rule {
	return []finding.Rule{
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
	return []finding.Finding{{Code: "F02", Severity: finding.Error, At: finding.Place{Key: "survey.points"}, Args: []any{"the survey makes no surface: " + why}}}
}
