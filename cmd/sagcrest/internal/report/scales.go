package report

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/plot"
	"sagcrest/config/quantity"
	"sagcrest/profile"
	"sagcrest/profile/station"
)

// Drawings are made in metres; these scales put the marks of their axes at round
// numbers of the units that their figures are printed in.

// stationScale counts as the labels of the road do.
func (s *sheets) stationScale() plot.Scale {
	return plot.Scale{Unit: s.o.Project.Labels.Unit(), Start: s.o.Project.Labels.Value(0)}
}

// lengthScale counts metres or the feet of the paper.
func (s *sheets) lengthScale() plot.Scale { return plot.Scale{Unit: s.paperUnit()} }

// volumeScale counts cubic metres or cubic yards of 27 cubic feet.
func (s *sheets) volumeScale() plot.Scale {
	if !s.paper.Feet() {
		return plot.Scale{}
	}
	return plot.Scale{Unit: 27 * s.paperUnit() * s.paperUnit() * s.paperUnit()}
}

// paperUnit is the length in metres of the unit in which paper posts lengths:
// the foot of the project, in a metric one the international foot, as the
// rounding profile has it.
func (s *sheets) paperUnit() float64 {
	switch units := s.o.Project.Units; {
	case !s.paper.Feet():
		return 1
	case units.Feet():
		return units.Metres()
	}
	return quantity.InternationalFoot
}

// spans lists tangents and curves of the grade line from end to end, with what
// a sheet writes along them.
func (s *sheets) spans() (out []plot.Span) {
	grade := s.o.Road.Grade()
	curves := grade.Curves()
	from, name := grade.From(), ""
	for i := range curves {
		c := &curves[i]
		to := c.PVC.At
		pvi := fmt.Sprintf("PVI %d  %s", i+1, s.label(float64(c.PVI.At)))
		// Neighbouring curves may touch: there is no tangent to write on then.
		if to > from {
			out = append(out, s.tangent(from, to, c.G1, name))
		}
		from, name = c.PVT.At, ""
		if c.Length == 0 {
			name = pvi
			continue
		}
		out = append(out, plot.Span{X0: float64(to), X1: float64(from), Words: s.curveWords(pvi, c),
			From: "PVC " + s.label(float64(to)), To: "PVT " + s.label(float64(from))})
	}
	if last := grade.To(); last > from {
		_, g, _ := grade.At(last)
		out = append(out, s.tangent(from, last, g, name))
	}
	return out
}

func (s *sheets) tangent(from, to station.Station, g float64, name string) plot.Span {
	return plot.Span{X0: float64(from), X1: float64(to), Words: []string{s.paper.Grade(g) + " %"}, From: name}
}

func (s *sheets) curveWords(pvi string, c *profile.Curve) []string {
	words := []string{pvi, "level " + s.paper.Elevation(c.PVI.Elev), "L " + s.paper.Length(c.Length)}
	if c.Kind != profile.None {
		words = append(words, "K "+s.paper.K(c.K))
	}
	return words
}
