package drainage

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that this package raises of its own;
// A03 and A09 are those of the section.
func Rules() []finding.Rule {
	const practice = "common practice"
	return []finding.Rule{
		{
			Code: "D03", Default: finding.Error,
			Title:   "Adverse or level barrel",
			Message: "culvert %v %v: inlet invert %v, outlet invert %v, a drop of %v",
			Formula: "drop = inlet invert − outlet invert; below −1 mm adverse (E), within 1 mm level (W)",
			Source:  practice,
			Effect:  "Water stands in the barrel or runs back; an equaliser pipe may be level.",
			Mend:    "Correct the inverts, or name the upstream end with inlet_side.",
		},
		{
			Code: "D04", Default: finding.Error,
			Title:   "Too little cover over a barrel",
			Message: "culvert %v: cover %v over the %v at %v, offset %v; required %v, short by %v (%v)",
			Formula: "cover = datum − (invert + inside height + wall), least from hinge to hinge along every barrel",
			Source:  "the culvert's cover rule, or the project's own figure",
			Effect:  "Wheel loads reach the barrel; it may crack or flatten.",
			Mend:    "Raise the grade line there, lower the inverts, or use smaller or more barrels; the culvert's table lists the figures.",
		},
		{
			Code: "D05", Default: finding.Error,
			Title:   "Cover measured to another datum than the rule's",
			Message: "culvert %v: cover_datum is %q, but the rule %q measures to %q",
			Formula: "cover_datum = datum of the cover rule",
			Source:  "the cover rule named by the culvert",
			Effect:  "The cover is judged from the wrong surface, off by the thickness of the pavement.",
			Mend:    "Leave cover_datum out, or give a figure of the project with its own datum instead of the rule.",
		},
		{
			Code: "D25", Default: finding.Error,
			Title:   "The slope is in cut where the barrel should end",
			Message: "culvert %v: on the %v the side is in cut where the barrel crosses the hinge, at %v, offset %v",
			Formula: "stripped ground at the hinge above the earthwork line just outside it",
			Source:  practice,
			Effect:  "No fill slope stands there for the barrel to come out of, so it has no end, length or inverts.",
			Mend:    "Move or turn the crossing, or end the barrel in an inlet.",
		},
		{
			Code: "D26", Default: finding.Error,
			Title:   "Barrel beyond the known ground",
			Message: "culvert %v: %v",
			Formula: "the finished slope, cut along the barrel, meets the surveyed ground",
			Source:  practice,
			Effect:  "Ends, length and inverts are unknown.",
			Mend:    "Survey the stream farther up and down, or give both inverts where they are known.",
		},
		{
			Code: "D30", Default: finding.Error,
			Title:   "Flow direction unknown",
			Message: "culvert %v: no inlet_side is given and the ground at its ends is equal (left %v, right %v)",
			Formula: "|ground left − ground right| > 1 mm, or inlet_side",
			Source:  practice,
			Effect:  "Which end is the inlet, and the sign of the slope, cannot be told.",
			Mend:    "Name the upstream end with inlet_side.",
		},
	}
}
