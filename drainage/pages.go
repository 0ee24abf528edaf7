package drainage

import (
	"fmt"
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// pages writes the findings about one culvert.
type pages struct {
	culvert *Culvert
	index   int
}

func (p pages) key(name string) string { return fmt.Sprintf("culvert[%d].%s", p.index, name) }

// stops lists result paths of this culvert.
func (p pages) stops(names ...string) (out []string) {
	for _, n := range names {
		out = append(out, fmt.Sprintf("drainage.culverts[%d].%s", p.index, n))
	}
	return out
}

// geometry is everything that hangs on the two ends.
func (p pages) geometry() []string {
	return p.stops("ends", "inlet_invert", "outlet_invert", "length", "length_plan", "slope",
		"cover_min", "cover_profile", "cover_ok", "verdict")
}

func (p pages) offRoad(r *section.Road, at station.Interval, name string) finding.Finding {
	return finding.Finding{
		Code: "A03", Severity: finding.Error,
		At:    finding.Between(at.From, at.To).Under(p.key(name)).Named(p.culvert.ID),
		Args:  []any{"culvert " + p.culvert.ID, r.Over().From, r.Over().To},
		Stops: append(p.stops("place"), p.geometry()...),
	}
}

func (p pages) noLowest(at station.Interval) finding.Finding {
	return finding.Finding{
		Code: "D26", Severity: finding.Error,
		At:    finding.Between(at.From, at.To).Under(p.key("between")).Named(p.culvert.ID),
		Args:  []any{p.culvert.ID, "the ground is not known all along the reference line where its lowest place is looked for"},
		Stops: append(p.stops("place"), p.geometry()...),
	}
}

func (p pages) noEnd(e End, why trouble) finding.Finding {
	f := finding.Finding{
		Severity: finding.Error,
		At:       finding.On(e.At).Aside(e.Offset).Under(p.key("id")).Named(p.culvert.ID),
		Stops:    p.geometry(),
	}
	side := "left"
	if e.Side > 0 {
		side = "right"
	}
	switch why {
	case inCut:
		f.Code, f.Args = "D25", []any{p.culvert.ID, side, e.At, e.Offset}
	case offRoad:
		f.Code, f.Args = "D26", []any{p.culvert.ID, "its " + side + " end lies beyond the end of the road"}
	default:
		f.Code = "D26"
		f.Args = []any{p.culvert.ID, fmt.Sprintf("on the %s the slope has not met the ground where the survey ends, %.1f m along the barrel", side, math.Abs(e.X))}
	}
	return f
}

func (p pages) noFlow(l *Laid) finding.Finding {
	left, right := l.Ends[0], l.Ends[1]
	f := finding.Finding{
		Code: "D30", Severity: finding.Error,
		At:       finding.On(l.At).Under(p.key("inlet_side")).Named(p.culvert.ID),
		Measured: finding.Of(math.Abs(left.Ground-right.Ground), "m"), Limit: finding.Of(sameLevel, "m"),
		Args:  []any{p.culvert.ID, finding.Of(left.Ground, "m"), finding.Of(right.Ground, "m")},
		Stops: p.stops("inlet_invert", "outlet_invert", "slope", "verdict"),
	}
	if p.culvert.InletInvert != nil {
		f.Stops = p.geometry()
	}
	return f
}

func (p pages) adverse(l *Laid) finding.Finding {
	inlet, _ := l.Inlet()
	outlet, _ := l.Outlet()
	f := finding.Finding{
		Code: "D03", Severity: finding.Warning,
		At:       finding.On(l.At).Under(p.key("inlet_invert")).Named(p.culvert.ID),
		Measured: finding.Of(l.Drop, "m"), Limit: finding.Of(sameLevel, "m"),
		Args: []any{p.culvert.ID, "is level", finding.Of(inlet.Invert, "m"), finding.Of(outlet.Invert, "m"), finding.Of(l.Drop, "m")},
	}
	if l.Drop < -sameLevel {
		f.Severity = finding.Error
		f.Args[1] = "falls the wrong way"
		f.Stops = p.stops("verdict")
	}
	return f
}

func (p pages) otherDatum(l *Laid) finding.Finding {
	return finding.Finding{
		Code: "D05", Severity: finding.Error,
		At:    finding.On(l.At).Under(p.key("cover_datum")).Named(p.culvert.ID),
		Args:  []any{p.culvert.ID, string(p.culvert.CoverDatum), l.Rule.ID, string(l.Rule.Datum)},
		Stops: p.stops("cover_min", "cover_ok", "verdict"),
	}
}

func (p pages) short(l *Laid) finding.Finding {
	c, source := l.Least, l.Rule.Source
	if l.Culvert.Cover != nil {
		source = "project"
	}
	return finding.Finding{
		Code: "D04", Severity: finding.Error,
		At:       finding.On(c.At).Aside(c.Offset).Under(p.key("cover_rule")).Named(p.culvert.ID),
		Measured: finding.Of(c.Cover(), "m"), Limit: finding.Of(l.Required, "m"),
		Args: []any{p.culvert.ID, finding.Of(c.Cover(), "m"), string(c.What), c.At, c.Offset,
			finding.Of(l.Required, "m"), finding.Of(l.Required-c.Cover(), "m"), l.Rule.ID},
		Source: source,
	}
}

// BeyondLimits finds barrel ends outside the right of way (A09).
func BeyondLimits(ls []Laid, w section.RightOfWay) (out []finding.Finding) {
	for i, l := range ls {
		if !l.Ended {
			continue
		}
		for _, e := range l.Ends {
			o, ok := w.LimitAt(e.At, e.Side)
			excess := float64(e.Side) * (float64(e.Offset) - o)
			if !ok || excess <= coverTouch {
				continue
			}
			side := map[int]string{-1: "left", 1: "right"}[e.Side]
			out = append(out, finding.Finding{
				Code: "A09", Severity: finding.Warning,
				At:       finding.On(e.At).Aside(e.Offset).Under(pages{&l.Culvert, i}.key("id")).Named(l.Culvert.ID),
				Measured: finding.Of(excess, "m"), Limit: finding.Of(0, "m"),
				Args: []any{"end of barrel " + l.Culvert.ID, side, e.At, e.Offset, finding.Of(excess, "m"), station.Offset(o)},
			})
		}
	}
	return out
}
