package earthwork

import (
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Mass is the mass diagram: the ordinate at a station is what all cut up to it
// makes less what all fill up to it needs, hand quantities included; it rises
// in cut. State names what it counts.
//
// In compacted volumes the ordinate rises by cut × (1 − s) and falls by fill; in
// bank volumes it rises by cut and falls by fill / (1 − s), the cut that such a
// fill takes, with the one shrinkage s that all cut then has. Unsuitable
// material adds nothing.
type Mass struct {
	State MassState
	// Stations are the pay stations but for those inside an exception, where
	// nothing is counted; Values are m³ in State, one a station, the first 0.
	Stations []station.Station
	Values   []float64
	// Steps holds what each stretch adds, one less than Stations.
	Steps []MassStep
	// Total is the sum of the steps. Its net is the last ordinate (Q19).
	Total MassStep
	// Shrinkage is the one factor of a diagram in bank volumes, else 0.
	Shrinkage float64
}

// MassStep is one stretch of the diagram: what its cut makes, what its fill
// needs, and the hand quantities in it, all in m³ in the state of the diagram.
type MassStep struct{ Cut, Fill, ExtraCut, ExtraFill float64 }

// Net returns what the step adds to the ordinate.
func (s MassStep) Net() float64 { return s.Cut - s.Fill + s.ExtraCut - s.ExtraFill }

// plus returns the sum of two steps.
func (s MassStep) plus(t MassStep) MassStep {
	return MassStep{s.Cut + t.Cut, s.Fill + t.Fill, s.ExtraCut + t.ExtraCut, s.ExtraFill + t.ExtraFill}
}

// End returns the last ordinate: positive is surplus, negative a shortage.
func (m *Mass) End() float64 { return m.Values[len(m.Values)-1] }

// mass builds the diagram in a state. Volumes, and the shrinkage of all that is
// cut, must be known; shrinkage is the one of a diagram in bank volumes, else 0.
func (q *Quantities) mass(b *book, state MassState, shrinkage float64) *Mass {
	m := &Mass{State: state, Shrinkage: shrinkage}
	hand := make([]MassStep, len(q.Between))
	for _, h := range q.Hand {
		hand[h.Between] = hand[h.Between].plus(MassStep{ExtraCut: m.gives(b.of(h.Material), h.Cut), ExtraFill: m.takes(h.Fill)})
	}
	m.Stations, m.Values = []station.Station{q.Between[0].From}, []float64{0}
	inside := false
	for i, v := range q.Between {
		step := hand[i].plus(MassStep{Fill: m.takes(v.Fill)})
		for _, p := range v.Parts {
			step.Cut += m.gives(b.of(p.Material), p.Cut)
		}
		m.append(v.To, step, inside && v.Excepted)
		inside = v.Excepted
	}
	return m
}

// append adds a stretch; with joined it lengthens the last one, since no
// ordinate stands inside an exception.
func (m *Mass) append(to station.Station, s MassStep, joined bool) {
	m.Total = m.Total.plus(s)
	value := m.End() + s.Net()
	if last := len(m.Steps) - 1; joined {
		m.Stations[last+1], m.Values[last+1] = to, value
		m.Steps[last] = m.Steps[last].plus(s)
		return
	}
	m.Stations, m.Values = append(m.Stations, to), append(m.Values, value)
	m.Steps = append(m.Steps, s)
}

// gives brings a cut into the state of the diagram. A material without
// shrinkage has no cut here: Q01 withholds the diagram where it has.
func (m *Mass) gives(of Material, cut Bank) float64 {
	c, ok := of.Compact(cut)
	if ok && m.State == InBank {
		return float64(cut)
	}
	return float64(c)
}

// takes brings a fill into the state of the diagram.
func (m *Mass) takes(fill Compacted) float64 { return float64(fill) / (1 - m.Shrinkage) }

// bankShrinkage returns the shrinkage for a diagram in bank volumes: the one of
// all cut that is used, hand quantities included; without any such cut, that of
// the materials which the typical sections name, for the cut that would be
// borrowed. Where there is not one it says so (F08); cut whose shrinkage is
// missing is Q01's.
func (q *Quantities) bankShrinkage(b *book, site Site) (float64, []finding.Finding) {
	var used oneOf
	for _, p := range q.ByMaterial() {
		if p.Cut >= noVolume {
			used.add(b.of(p.Material))
		}
	}
	if !used.any {
		for _, v := range q.Between {
			if !v.Excepted {
				used.add(b.of(site.MaterialAt((v.From + v.To) / 2)))
			}
		}
	}
	if used.any && !used.several {
		return used.shrinkage, nil
	}
	return 0, []finding.Finding{{Code: "F08", Severity: finding.Error,
		At:   finding.Place{Key: "earthwork.mass_state"},
		Args: []any{"mass_state = \"bank\" needs one shrinkage for all cut, but the materials of this road have none or several"}}}
}

// oneOf looks whether materials have one shrinkage between them.
type oneOf struct {
	shrinkage    float64
	any, several bool
}

func (o *oneOf) add(m Material) {
	if m.Unsuitable || m.Shrinkage == nil {
		return
	}
	o.several = o.several || o.any && *m.Shrinkage != o.shrinkage
	o.shrinkage, o.any = *m.Shrinkage, true
}

// balanceTie is the part of the largest ordinate below which one counts as
// zero: sums of thousands of volumes carry a rounding of about 1e-13 of it. A
// diagram that is small all over has an absolute floor in m³ of the same kind.
const (
	balanceTie   = 1e-12
	balanceFloor = 1e-9
)

// BalancePoints returns every station where the straight-line mass curve meets
// zero, increasing: road ends and touches included, of a stretch along zero its
// corners. The road's start is always one.
func (m *Mass) BalancePoints() (out []station.Station) {
	tie := balanceFloor
	for _, v := range m.Values {
		tie = math.Max(tie, balanceTie*math.Abs(v))
	}
	for i, v := range m.Values {
		if math.Abs(v) <= tie {
			out = append(out, m.Stations[i])
			continue
		}
		if i+1 == len(m.Values) {
			break
		}
		if w := m.Values[i+1]; v*w < 0 && math.Abs(w) > tie {
			t := v / (v - w)
			out = append(out, m.Stations[i]+station.Station(t)*(m.Stations[i+1]-m.Stations[i]))
		}
	}
	return out
}
