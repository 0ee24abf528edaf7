package section

import (
	"fmt"
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Beyond is a stretch of neighbouring slices on one side that lie beyond the
// right of way, and by how much at most (m).
type Beyond struct {
	Left     bool
	From, To station.Station
	Most     float64
	MostAt   station.Station
	Reach    float64 // offset of the works at MostAt, left negative
	Limit    float64 // offset of the line there
}

// sides of a slice, left first.
func (s *Slice) sides() [2]*Flank { return [2]*Flank{&s.Left, &s.Right} }

// sideName is the word and path part of a side: 0 left, 1 right.
func sideName(side int) string { return [2]string{"left", "right"}[side] }

// Inspect looks at slices in order of station and returns what is wrong with
// them: no catch within the survey (A06), a hole in the ground (A14), a section
// that folds over itself (A10), a ditch that runs out (A12). Neighbouring
// slices with the same fault make one finding. Paths of withheld results count
// slices as `sections`.
func (r *Road) Inspect(slices []Slice) (out []finding.Finding) {
	for side := range 2 {
		out = append(out, r.lostStretches(slices, side, BeyondSurvey, "A06")...)
		out = append(out, r.lostStretches(slices, side, InHole, "A14")...)
		out = append(out, r.folds(slices, side)...)
		out = append(out, r.ditchesRunOut(slices, side)...)
	}
	return out
}

// group calls f for every longest run of neighbouring slices that hold.
func group(slices []Slice, holds func(*Slice) bool, f func(first, last int)) {
	for i := 0; i < len(slices); i++ {
		if !holds(&slices[i]) {
			continue
		}
		j := i
		for j+1 < len(slices) && holds(&slices[j+1]) {
			j++
		}
		f(i, j)
		i = j
	}
}

func (r *Road) lostStretches(slices []Slice, side int, state CatchState, code finding.Code) (out []finding.Finding) {
	holds := func(s *Slice) bool { return s.Typical >= 0 && s.sides()[side].State == state }
	group(slices, holds, func(i, j int) {
		short := slices[i].sides()[side].SearchedTo
		for k := i; k <= j; k++ {
			if o := slices[k].sides()[side].SearchedTo; math.Abs(o) < math.Abs(short) {
				short = o
			}
		}
		out = append(out, finding.Finding{
			Code: code, Severity: finding.Error,
			At:       finding.Between(slices[i].At, slices[j].At).Aside(station.Offset(short)).Under("survey"),
			Measured: finding.Of(math.Abs(short), "m"),
			Args:     []any{sideName(side), slices[i].At, slices[j].At, station.Offset(short)},
			Stops:    slicePaths(i, j, side),
		})
	})
	return out
}

// slicePaths lists what a side without a catch point withholds in its slices.
func slicePaths(i, j, side int) (out []string) {
	for k := i; k <= j; k++ {
		for _, key := range []string{"cut_area", "fill_area", "cut_moment", "fill_moment", "strip_width", sideName(side) + "_catch"} {
			out = append(out, fmt.Sprintf("sections[%d].%s", k, key))
		}
	}
	return out
}

// folds finds slices whose works reach the centre of the curve they lie in.
func (r *Road) folds(slices []Slice, side int) (out []finding.Finding) {
	holds := func(s *Slice) bool { return s.Typical >= 0 && s.sides()[side].State == Folded }
	group(slices, holds, func(i, j int) {
		worst := i
		room := func(k int) float64 {
			return 1 - r.line.Curvature(slices[k].At)*slices[k].sides()[side].Catch.O
		}
		for k := i; k <= j; k++ {
			if room(k) < room(worst) {
				worst = k
			}
		}
		s := &slices[worst]
		radius, reach := 1/math.Abs(r.line.Curvature(s.At)), math.Abs(s.sides()[side].Catch.O)
		out = append(out, finding.Finding{
			Code: "A10", Severity: finding.Error,
			At:       finding.Between(slices[i].At, slices[j].At).Under("alignment.pi"),
			Measured: finding.Of(reach, "m"), Limit: finding.Of(radius, "m"),
			Args:  []any{sideName(side), s.At, finding.Of(reach, "m"), finding.Of(radius, "m")},
			Stops: slicePaths(i, j, side),
		})
	})
	return out
}

func (r *Road) ditchesRunOut(slices []Slice, side int) (out []finding.Finding) {
	holds := func(s *Slice) bool { f := s.sides()[side]; return s.OK && f.InDitch }
	group(slices, holds, func(i, j int) {
		c := slices[i].sides()[side].Catch
		out = append(out, finding.Finding{
			Code: "A12", Severity: finding.Warning,
			At:       finding.Between(slices[i].At, slices[j].At).Aside(station.Offset(c.O)).Under("typical_section"),
			Measured: finding.Of(math.Abs(c.O), "m"),
			Args:     []any{sideName(side), slices[i].At, slices[j].At, station.Offset(c.O)},
		})
	})
	return out
}

// LimitAt returns the right of way's offset on one side (−1 left, +1 right) at
// a station; ok is false before its first and after its last corner.
func (w RightOfWay) LimitAt(s station.Station, side int) (o float64, ok bool) {
	line := w.Left
	if side > 0 {
		line = w.Right
	}
	for i, c := range line {
		if c.At == s {
			return float64(c.Offset), true
		}
		if i > 0 && line[i-1].At < s && s < c.At {
			a := line[i-1]
			t := float64((s - a.At) / (c.At - a.At))
			return float64(a.Offset) + t*float64(c.Offset-a.Offset), true
		}
	}
	return 0, false
}

// CheckOnRoad finds corners of the right of way that lie off the road (A03).
func (w RightOfWay) CheckOnRoad(r *Road) (out []finding.Finding) {
	for side, line := range [2][]Limit{w.Left, w.Right} {
		for i, c := range line {
			if !r.On(c.At) {
				out = append(out, finding.Finding{
					Code: "A03", Severity: finding.Error,
					At:    finding.On(c.At).Under(fmt.Sprintf("right_of_way.%s[%d].station", sideName(side), i)),
					Args:  []any{"right of way, " + sideName(side), r.over.From, r.over.To},
					Stops: []string{"land." + sideName(side) + ".beyond"},
				})
			}
		}
	}
	return out
}

// Outside returns the stretches where catch points or ditches lie beyond the
// right of way, and a finding A09 for each. Slices inside exceptions count.
func (w RightOfWay) Outside(slices []Slice) (bs []Beyond, out []finding.Finding) {
	for side := range 2 {
		over := func(s *Slice) (excess, reach, limit float64) {
			f := s.sides()[side]
			o, ok := w.LimitAt(s.At, 2*side-1)
			if s.Typical < 0 || !ok || f.State != Caught {
				return 0, 0, 0
			}
			return f.reach() - float64(2*side-1)*o, float64(2*side-1) * f.reach(), o
		}
		group(slices, func(s *Slice) bool { e, _, _ := over(s); return e > touch }, func(i, j int) {
			b := Beyond{Left: side == 0, From: slices[i].At, To: slices[j].At}
			for k := i; k <= j; k++ {
				if e, reach, limit := over(&slices[k]); e > b.Most {
					b.Most, b.MostAt, b.Reach, b.Limit = e, slices[k].At, reach, limit
				}
			}
			bs = append(bs, b)
			out = append(out, b.finding())
		})
	}
	return bs, out
}

// reach is how far from the reference line the works of a side go: to the
// catch point, or to a ditch that lies farther out.
func (f *Flank) reach() float64 {
	u := math.Abs(f.Catch.O)
	if f.Ditch != nil && !f.InDitch {
		u = math.Max(u, math.Abs(f.Ditch.O))
	}
	return u
}

func (b Beyond) finding() finding.Finding {
	side := 1
	if b.Left {
		side = 0
	}
	return finding.Finding{
		Code: "A09", Severity: finding.Warning,
		At:       finding.Between(b.From, b.To).Aside(station.Offset(b.Reach)).Under("right_of_way." + sideName(side)),
		Measured: finding.Of(b.Most, "m"), Limit: finding.Of(0, "m"),
		Args: []any{"catch point", sideName(side), b.MostAt, station.Offset(b.Reach), finding.Of(b.Most, "m"), station.Offset(b.Limit)},
	}
}
