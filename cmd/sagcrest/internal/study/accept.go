package study

import (
	"math"
	"strconv"
	"strings"

	"sagcrest/config"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// accept marks the findings that somebody answers for. Warnings and notes can
// be accepted, and of the errors only D01 (relief barrels).
func (o *Outcome) accept() {
	o.Accepted = make([]*config.Accept, len(o.Findings))
	for i := range o.Project.Accepts {
		a := &o.Project.Accepts[i]
		for k, f := range o.Findings {
			if o.Accepted[k] == nil && covers(a, f) {
				o.Accepted[k] = a
			}
		}
	}
}

// Idle returns the acceptances that no finding of this run needs: the figure
// changed, the fault is mended, or the code cannot be accepted.
func (o *Outcome) Idle() (out []config.Accept) {
	for i := range o.Project.Accepts {
		used := false
		for _, a := range o.Accepted {
			used = used || a == &o.Project.Accepts[i]
		}
		if !used {
			out = append(out, o.Project.Accepts[i])
		}
	}
	return out
}

func covers(a *config.Accept, f finding.Finding) bool {
	if f.Severity == finding.Error && f.Code != "D01" {
		return false
	}
	return a.Code == f.Code && sameThing(a, f) && sameFigure(a, f.Measured)
}

// sameThing compares the place: the id of the thing, or a station that lies in
// the stretch of the finding.
func sameThing(a *config.Accept, f finding.Finding) bool {
	if a.At == f.At.ID && a.At != "" {
		return true
	}
	if a.Station == nil || !f.At.On {
		return false
	}
	over := f.At.At
	return *a.Station >= over.From-station.Same && *a.Station <= over.To+station.Same
}

// sameFigure compares the figure as it was printed: to the places that the
// acceptance writes.
func sameFigure(a *config.Accept, m finding.Measure) bool {
	if !m.Known || !a.Measured.Known {
		return m.Known == a.Measured.Known
	}
	return math.Abs(a.Measured.Value-m.Value) <= halfPlace(a)+1e-9
}

// halfPlace returns half a unit, in SI, of the last place of a written figure
// such as "0.42 m".
func halfPlace(a *config.Accept) float64 {
	text := strings.TrimSpace(a.Value)
	end := strings.IndexFunc(text, func(r rune) bool { return !strings.ContainsRune("+-.0123456789", r) })
	if end < 0 {
		end = len(text)
	}
	_, decimals, _ := strings.Cut(text[:end], ".")
	half := 0.5 * math.Pow10(-len(decimals))
	// The size of the unit follows from the figure itself; zero has none, and
	// then the place is taken as one of SI.
	if written, err := strconv.ParseFloat(text[:end], 64); err == nil && written != 0 {
		half *= math.Abs(a.Measured.Value / written)
	}
	return half
}
