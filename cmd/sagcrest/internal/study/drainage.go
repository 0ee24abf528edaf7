package study

import (
	"fmt"

	"sagcrest/drainage"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// lines follows every line of the section and measures the clearances.
func (o *Outcome) lines() (found []finding.Finding) {
	o.Turnings, o.Ends = o.Road.Turnings(), o.Road.Ends()
	for i, obstacle := range o.Project.Obstacles {
		c := o.Road.Clear(obstacle)
		o.Clearances = append(o.Clearances, c)
		if f, ok := c.Finding(fmt.Sprintf("clearance[%d]", i), fmt.Sprintf("profile.clearances[%d]", i)); !ok {
			found = append(found, f)
		}
	}
	return found
}

// culverts lays every culvert of the project.
func (o *Outcome) culverts() (found []finding.Finding) {
	var w section.Scratch
	for i, c := range o.Project.Culverts {
		l, f := drainage.Lay(o.Road, &w, c, i)
		o.Culverts = append(o.Culverts, l)
		found = append(found, f...)
	}
	return append(found, drainage.BeyondLimits(o.Culverts, o.Project.RightOfWay)...)
}

// crossings lists where culverts cross the centre line: key points.
func (o *Outcome) crossings() (out []station.Station) {
	for _, l := range o.Culverts {
		if l.Known {
			out = append(out, l.At)
		}
	}
	return out
}
