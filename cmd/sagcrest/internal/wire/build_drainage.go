package wire

import (
	"math"

	"sagcrest/drainage"
)

func (b builder) drainage() Drainage {
	d := Drainage{Culverts: []Culvert{}}
	for i := range b.Culverts {
		d.Culverts = append(d.Culverts, b.culvert(&b.Culverts[i]))
	}
	return d
}

func (b builder) culvert(l *drainage.Laid) Culvert {
	c := &l.Culvert
	w := Culvert{ID: c.ID, SkewDeg: Fine(c.Skew * 180 / math.Pi), Shape: string(c.Shape), Wall: Fine(c.Wall),
		Barrels: max(c.Barrels, 1), Verdict: string(l.Verdict), Mends: []Mend{}}
	if c.Skew > 0 {
		side := "left_ahead"
		if c.RightAhead {
			side = "right_ahead"
		}
		w.SkewSide = &side
	}
	if c.Shape == drainage.Box {
		w.Span, w.Rise = fine(c.Span), fine(c.Rise)
	} else {
		w.Diameter = fine(c.Diameter)
	}
	if l.Known {
		at := b.place(l.At)
		w.Place = &at
	}
	if l.Ended {
		b.ends(&w, l)
	}
	if l.Judged {
		b.cover(&w, l)
	}
	return w
}

func (b builder) ends(w *Culvert, l *drainage.Laid) {
	w.Length, w.LengthPlan = fine(l.Length), fine(l.LengthPlan)
	order := []drainage.End{l.Ends[0], l.Ends[1]}
	inlet, known := l.Inlet()
	if known {
		outlet, _ := l.Outlet()
		w.InletInvert, w.OutletInvert, w.Slope = fine(inlet.Invert), fine(outlet.Invert), fine(l.Slope)
		order = []drainage.End{inlet, outlet}
	}
	ends := []CulvertEnd{}
	for i, e := range order {
		end := CulvertEnd{Side: "left", Place: b.place(e.At), Offset: Fine(e.Offset), Invert: Fine(e.Invert),
			GroundElev: fineIf(e.GroundKnown, e.Ground)}
		if e.Side > 0 {
			end.Side = "right"
		}
		if known {
			name := [2]string{"inlet", "outlet"}[i]
			end.End = &name
		}
		ends = append(ends, end)
	}
	w.Ends = &ends
}

func (b builder) cover(w *Culvert, l *drainage.Laid) {
	m := l.Least
	w.CoverMin = &CoverMin{Value: Fine(m.Cover()), Place: b.place(m.At), Offset: Fine(m.Offset), Where: string(m.What),
		MeasuredTo: string(l.Rule.Datum), Rule: l.Rule.ID, Required: Fine(l.Required)}
	rows := []CoverPoint{}
	for _, p := range l.Profile {
		rows = append(rows, CoverPoint{Place: b.place(p.At), Offset: Fine(p.Offset), Invert: Fine(p.Invert), Crown: Fine(p.Crown),
			Datum: fineIf(p.Required && p.SurfaceKnown, p.Datum), Surface: fineIf(p.SurfaceKnown, p.Surface), RequiredHere: p.Required})
	}
	ok := l.CoverOK
	w.CoverProfile, w.CoverOK = &rows, &ok
	for _, m := range l.Mends {
		w.Mends = append(w.Mends, Mend{string(m.Kind), Fine(m.Value), m.Unit, m.Text})
	}
}
