package section

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that this package raises.
func Rules() []finding.Rule {
	const practice = "common practice"
	return []finding.Rule{
		{
			Code: "A03", Default: finding.Error,
			Title:   "A station lies off the road",
			Message: "%v does not lie on the road, which runs from %v to %v",
			Formula: "start of road − 0.010 m <= station <= end of road + 0.010 m",
			Source:  practice,
			Effect:  "The thing cannot be placed, so nothing is computed for it.",
			Mend:    "Correct the station, or lengthen alignment and grade line so that they reach it.",
		},
		{
			Code: "A06", Default: finding.Error,
			Title:   "A side slope does not catch the ground within the survey",
			Message: "the %v side slope finds no ground from %v to %v: the survey ends at offset %v",
			Formula: "first meeting of earthwork line and stripped ground, going outward from the hinge",
			Source:  practice,
			Effect:  "Areas, volumes, strip and land take of the lengths concerned are unknown, so the totals are withheld.",
			Mend:    "Survey a wider strip, use a steeper side slope, or move the grade line nearer to the ground.",
		},
		{
			Code: "A09", Default: finding.Warning,
			Title:   "The works reach beyond the right of way",
			Message: "the %v on the %v at %v, offset %v, lies %v beyond the right of way at %v",
			Formula: "|offset of catch point, ditch or barrel end| − |offset of the right of way|",
			Source:  practice,
			Effect:  "Land outside the right of way would be used.",
			Mend:    "Acquire the land or an easement, steepen the slope, or move the grade line nearer to the ground.",
		},
		{
			Code: "A10", Default: finding.Error,
			Title:   "A section folds over itself inside a curve",
			Message: "on the %v at %v the works reach %v from the reference line, but the centre of the curve lies at %v",
			Formula: "1 − curvature × offset > 0",
			Source:  "geometry: the lines square to a curve meet at its centre",
			Effect:  "Slices overlap there and areas times length are no volumes; the totals are withheld.",
			Mend:    "Use a larger radius, or narrow the works on the inside of the curve.",
		},
		{
			Code: "A12", Default: finding.Warning,
			Title:   "A ditch runs out",
			Message: "the %v ditch runs out from %v to %v: the ground is met at offset %v, on its fore slope or bottom",
			Formula: "catch point not beyond the outer end of the ditch bottom",
			Source:  practice,
			Effect:  "Water in the ditch leaves the road there; the section has no back slope.",
			Mend:    "Lead the ditch away at that place, lower it, or let the section change to fill.",
		},
		{
			Code: "A14", Default: finding.Error,
			Title:   "A hole in the ground inside the section",
			Message: "on the %v the ground has a hole from %v to %v, beginning at offset %v",
			Formula: "every offset between the catch points has a known level",
			Source:  practice,
			Effect:  "Areas and volumes of the lengths concerned are unknown, so the totals are withheld.",
			Mend:    "Survey the hole, or exclude the length with its reason.",
		},
		{
			Code: "A15", Default: finding.Warning,
			Title:   "Alignment and grade line end apart",
			Message: "at the %v the alignment stands at %v and the grade line at %v, %v apart",
			Formula: "|end of alignment − end of grade line| <= 0.010 m",
			Source:  practice,
			Effect:  "The road runs only where both exist; the rest is not measured.",
			Mend:    "Let the first and last PVI stand at the ends of the alignment.",
		},
		{
			Code: "P14", Default: finding.Error,
			Title:   "A clearance is violated",
			Message: "passing %v %v: clearance %v at %v, offset %v; %v is wanted, %v more",
			Formula: "least vertical distance of finished surface and obstacle over its stations and offsets",
			Source:  "the project's own limit",
			Effect:  "Vehicles or works do not fit.",
			Mend:    "Move the grade line by the shortage at that place, or change the obstacle.",
		},
		{
			Code: "Q11", Default: finding.Error,
			Title:   "Gap or overlap between typical sections",
			Message: "%v the road from %v to %v",
			Formula: "exactly one typical section at every station",
			Source:  practice,
			Effect:  "The shape of the road is not defined there, so volumes and what hangs on them are withheld.",
			Mend:    "Let each typical section begin where the one before ends.",
		},
	}
}
