package earthwork

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that this package raises.
func Rules() []finding.Rule {
	const practice = "common practice"
	return []finding.Rule{
		{
			Code: "A11", Default: finding.Warning,
			Title:   "Exception lengths overlap, or lie off the road",
			Message: "the exception from %v to %v %v, over %v",
			Formula: "exceptions are disjoint stretches of the road; each length counts once",
			Source:  practice,
			Effect:  "The lengths on the contract do not add up.",
			Mend:    "Let one exception end where the next begins, inside the road.",
		},
		{
			Code: "Q01", Default: finding.Error,
			Title:   "Cut of a material without shrinkage",
			Message: "%v of cut in %v have no shrinkage",
			Formula: "compacted = bank × (1 − s)",
			Source:  practice,
			Effect:  "How much embankment the cut makes is unknown: balance, mass ordinates and what is priced by them are withheld. Areas and volumes stand.",
			Mend:    "Give the material a shrinkage (negative where it gains), or mark it unsuitable.",
		},
		{
			Code: "Q22", Default: finding.Note,
			Title:   "A total hangs on slivers",
			Message: "%v (%v of %v) hang on end areas below 0.1 m2 under the pyramid rule",
			Formula: "sum of the intervals with an end area between 0.5e-6 and 0.1 m2",
			Source:  practice,
			Effect:  "The rule jumps by half when such an area becomes zero, so a hair of survey moves the total.",
			Mend:    "Add a section where the area runs out, or pay by end areas.",
		},
		{
			Code: "Q24", Default: finding.Warning,
			Title:   "Hand quantity for an item that is measured too",
			Message: "%v of %v were entered by hand; the program measures %v of it",
			Formula: "item of the hand quantity is none of excavation, embankment, strip, respread, land",
			Source:  practice,
			Effect:  "The same work may be paid twice.",
			Mend:    "Keep it only if it lies outside the sections, and say so in its note.",
		},
	}
}
