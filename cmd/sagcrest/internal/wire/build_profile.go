package wire

import (
	"sagcrest/profile"
	"sagcrest/section"
)

func (b builder) profile() Profile {
	p := Profile{Curves: []Curve{}, LowPoints: []Turning{}, HighPoints: []Turning{}, Ends: []LineEnd{}, Clearances: []Clearance{}}
	level := func(q profile.Point) Level { return Level{b.place(q.At), Fine(q.Elev)} }
	for _, c := range b.Road.Grade().Curves() {
		w := Curve{PVI: level(c.PVI), PVC: level(c.PVC), PVT: level(c.PVT),
			G1Pct: Fine(100 * c.G1), G2Pct: Fine(100 * c.G2), Length: Fine(c.Length),
			K: fineIf(c.Length > 0 && c.Kind != profile.None, c.K), Kind: string(c.Kind), Shape: string(c.Shape)}
		if c.Turning != nil {
			l := level(*c.Turning)
			w.Turning = &l
		}
		p.Curves = append(p.Curves, w)
	}
	for _, t := range b.Turnings {
		w := Turning{Line: string(t.Line), Place: b.place(t.At), Offset: Fine(t.Offset), Elev: Fine(t.Elev), Kind: string(t.Kind)}
		if t.Kind == section.Level {
			to := b.place(t.To)
			w.To = &to
		}
		if t.Low {
			p.LowPoints = append(p.LowPoints, w)
		} else {
			p.HighPoints = append(p.HighPoints, w)
		}
	}
	for _, e := range b.Ends {
		end := "start"
		if e.AtEnd {
			end = "end"
		}
		p.Ends = append(p.Ends, LineEnd{string(e.Line), end, b.place(e.At), Fine(e.Elev), Fine(100 * e.Grade)})
	}
	for _, c := range b.Clearances {
		p.Clearances = append(p.Clearances, b.clearance(c))
	}
	return p
}

func (b builder) clearance(c section.Clearance) Clearance {
	w := Clearance{Name: c.Obstacle.Name, Side: "over", Required: Fine(c.Obstacle.Gap)}
	if c.Obstacle.Under {
		w.Side = "under"
	}
	if c.Known {
		at, ok := b.place(c.At), c.OK
		w.Gap, w.Place, w.Offset, w.OK = fine(c.Gap), &at, fine(float64(c.Offset)), &ok
	}
	return w
}

// sections lists the slices. A station where only a stratum ends has two equal
// ones, of which the second is left out.
func (b builder) sections() []Section {
	out := []Section{}
	next := 0
	for _, p := range b.Stations {
		first := &b.Slices[next]
		if p.Changes {
			next++
		}
		last := &b.Slices[next]
		next++
		out = append(out, b.section(first, p.Paid, string(p.Why)))
		if last.Typical != first.Typical {
			out = append(out, b.section(last, p.Paid, string(p.Why)))
		}
	}
	return out
}

func (b builder) section(s *section.Slice, pay bool, why string) Section {
	w := Section{Place: b.place(s.At), Pay: pay, Why: why,
		GroundElev: fineIf(s.GroundKnown, s.Ground), StrippedGroundElev: fineIf(s.GroundKnown, s.Stripped),
		FinishedElev: Fine(s.Finished), SubgradeElev: fineIf(s.Typical >= 0, s.Subgrade),
		CutArea: fineIf(s.OK, s.Cut.Area), FillArea: fineIf(s.OK, s.Fill.Area),
		CutMoment: fineIf(s.OK, s.Cut.Moment), FillMoment: fineIf(s.OK, s.Fill.Moment),
		StripWidth: fineIf(s.OK, s.StripWidth),
		LeftCatch:  catch(&s.Left, s), RightCatch: catch(&s.Right, s)}
	if s.Typical >= 0 {
		name := b.Road.Typicals()[s.Typical].Name
		w.Typical = &name
	}
	return w
}

func catch(f *section.Flank, s *section.Slice) *Catch {
	if s.Typical < 0 || f.State != section.Caught {
		return nil
	}
	return &Catch{Fine(f.Catch.O), Fine(f.Catch.Z)}
}
