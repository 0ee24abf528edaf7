package calc

import (
	"errors"
	"math"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile"
	"sagcrest/profile/station"
)

// point is a place of the grade line.
type point struct {
	Station *float64 `json:"station" unit:"station"`
	Elev    *float64 `json:"elev" unit:"length"`
}

// window is something to stay clear of.
type window struct {
	From     *float64 `json:"from" unit:"station"`
	To       *float64 `json:"to" unit:"station"`
	Elev     *float64 `json:"elev" unit:"length"`
	ElevFrom *float64 `json:"elev_from" unit:"length"`
	ElevTo   *float64 `json:"elev_to" unit:"length"`
	Gap      *float64 `json:"gap" unit:"length"`
}

type curveIn struct {
	PVI        *point    `json:"pvi" doc:"point of vertical intersection"`
	PVC        *point    `json:"pvc" doc:"start of the curve"`
	PVT        *point    `json:"pvt" doc:"end of the curve"`
	PVIElev    *float64  `json:"pvi_elev" unit:"length" doc:"level of the PVI, with pvc and pvt"`
	G1         *float64  `json:"g1" unit:"percent" doc:"grade before"`
	G2         *float64  `json:"g2" unit:"percent" doc:"grade after"`
	Length     *float64  `json:"length" unit:"length" doc:"horizontal length"`
	K          *float64  `json:"k" unit:"k" doc:"length per percent"`
	Radius     *float64  `json:"radius" unit:"length" doc:"radius at the vertex of the parabola"`
	Lengths    []float64 `json:"lengths" unit:"length" doc:"two lengths, before and after the PVI"`
	Through    *point    `json:"through" doc:"a point the curve passes through"`
	ClearUnder *window   `json:"clear_under" doc:"stay below it between two stations"`
	ClearOver  *window   `json:"clear_over" doc:"stay above it between two stations"`
	Shape      *string   `json:"shape" doc:"parabola or circular"`
	Stations   []float64 `json:"stations" unit:"station" doc:"rows of the table"`
	Interval   *float64  `json:"interval" unit:"length" doc:"rows at whole multiples"`
	FlatBelow  *float64  `json:"flat_below_pct" unit:"percent" doc:"list the stretch flatter than this"`
}

// place is a point of a result.
type place struct {
	Station wire.Fine `json:"station"`
	Elev    wire.Fine `json:"elev"`
}

type curveRow struct {
	Station       wire.Fine `json:"station"`
	Elev          wire.Fine `json:"elev"`
	GradePct      wire.Fine `json:"grade_pct"`
	TangentOffset wire.Fine `json:"tangent_offset"`
}

type flatStretch struct {
	From   wire.Fine `json:"from"`
	To     wire.Fine `json:"to"`
	Length wire.Fine `json:"length"`
}

type curveRoot struct {
	Length     wire.Fine `json:"length"`
	Admissible bool      `json:"admissible"`
	Reason     *string   `json:"reason"`
}

type curveOut struct {
	PVC      *place         `json:"pvc,omitempty"`
	PVI      *place         `json:"pvi,omitempty"`
	PVT      *place         `json:"pvt,omitempty"`
	G1Pct    wire.Fine      `json:"g1_pct"`
	G2Pct    wire.Fine      `json:"g2_pct"`
	Length   wire.Fine      `json:"length"`
	K        *wire.Fine     `json:"k"`
	APct     wire.Fine      `json:"a_pct"`
	Kind     string         `json:"kind"`
	Turning  *place         `json:"turning"`
	Highest  *place         `json:"highest,omitempty"`
	Lowest   *place         `json:"lowest,omitempty"`
	Table    *[]curveRow    `json:"table,omitempty"`
	Flat     *[]flatStretch `json:"flat,omitempty"`
	Roots    *[]curveRoot   `json:"roots,omitempty"`
	LengthIs *string        `json:"length_is,omitempty"`
}

func curve(in curveIn, w *working) (out curveOut, fault *Fault) {
	v, hung, fault := solveCurve(&in, &out, w)
	if fault != nil {
		return out, fault
	}
	out.G1Pct, out.G2Pct, out.Length = wire.Fine(100*v.G1), wire.Fine(100*v.G2), wire.Fine(v.Length())
	out.APct, out.Kind = wire.Fine(math.Abs(100*v.A())), string(v.Kind())
	w.step("A", "|g2 - g1|", put("abs(%v - %v)", 100*v.G2, 100*v.G1), math.Abs(100*v.A()), "%", curveSource)
	if k, ok := v.K(); ok {
		f := wire.Fine(k)
		out.K = &f
		w.step("K", "L / A", put("%v / %v", v.Length(), math.Abs(100*v.A())), k, w.k(), curveSource)
	}
	if hung {
		locate(v, &in, &out, w)
	}
	return out, curveTable(v, &in, &out, hung)
}

const curveSource = "AASHTO, A Policy on Geometric Design of Highways and Streets, ch. 3, vertical curves"

// locate fills what needs the curve's place.
func locate(v profile.Vertical, in *curveIn, out *curveOut, w *working) {
	out.PVC, out.PVI, out.PVT = at(v.PVC), at(v.PVI), at(v.PVT)
	w.step("z_PVC", "z_PVI - g1·L1", put("%v - %v / 100 * %v", v.PVI.Elev, 100*v.G1, v.L1), v.PVC.Elev, w.length(), curveSource)
	w.step("z_PVT", "z_PVI + g2·L2", put("%v + %v / 100 * %v", v.PVI.Elev, 100*v.G2, v.L2), v.PVT.Elev, w.length(), curveSource)
	if t := v.Turning(); t != nil {
		out.Turning = at(*t)
		if !v.Circular && v.L1 == v.L2 {
			w.step("x_turn", "-g1·L / (g2 - g1)", put("-%v * %v / (%v - %v)", 100*v.G1, v.Length(), 100*v.G2, 100*v.G1), float64(t.At-v.PVC.At), w.length(), curveSource)
		}
	}
	high, low := v.Extremes()
	out.Highest, out.Lowest = at(high), at(low)
	if in.FlatBelow != nil {
		flat := []flatStretch{}
		if from, to, ok := v.Flat(*in.FlatBelow / 100); ok {
			flat = append(flat, flatStretch{wire.Fine(from), wire.Fine(to), wire.Fine(to - from)})
		}
		out.Flat = &flat
	}
}

func at(p profile.Point) *place { return &place{wire.Fine(p.At), wire.Fine(p.Elev)} }

// curveTable lists the rows asked for.
func curveTable(v profile.Vertical, in *curveIn, out *curveOut, hung bool) *Fault {
	if in.Stations == nil && in.Interval == nil {
		return nil
	}
	if !hung {
		return missing("pvi", "a table needs the place of the curve: pvi, pvc or pvt")
	}
	rows := in.Stations
	if rows == nil {
		if !(*in.Interval > 0) {
			return impossible("interval", "interval is %v; it is more than 0", *in.Interval)
		}
		if v.Length() / *in.Interval > 1e6 {
			return impossible("interval", "interval is %v: more than a million rows", *in.Interval)
		}
		rows = between(float64(v.PVC.At), float64(v.PVT.At), *in.Interval)
	}
	table := []curveRow{}
	for _, s := range rows {
		z, g := v.At(s)
		tangent := v.PVC.Elev + v.G1*(s-float64(v.PVC.At))
		table = append(table, curveRow{wire.Fine(s), wire.Fine(z), wire.Fine(100 * g), wire.Fine(math.Abs(z - tangent))})
	}
	out.Table = &table
	return nil
}

// between lists both ends and every whole multiple strictly in between.
func between(from, to, step float64) []float64 {
	out := []float64{from}
	for n := math.Floor(from/step + 1e-9); ; n++ {
		s := n * step
		if s >= to-1e-9*step {
			break
		}
		if s > from+1e-9*step {
			out = append(out, s)
		}
	}
	return append(out, to)
}

// hungOn finds which point is given.
func (in *curveIn) hungOn() (fix profile.Fix, p profile.Point, given int, fault *Fault) {
	for _, c := range []struct {
		name string
		p    *point
		fix  profile.Fix
	}{{"pvi", in.PVI, profile.AtPVI}, {"pvc", in.PVC, profile.AtPVC}, {"pvt", in.PVT, profile.AtPVT}} {
		if c.p == nil {
			continue
		}
		if c.p.Station == nil || c.p.Elev == nil {
			return 0, p, 0, missing(c.name, c.name+" needs station and elev")
		}
		given++
		fix, p = c.fix, profile.Point{At: station.Station(*c.p.Station), Elev: *c.p.Elev}
	}
	return fix, p, given, nil
}

// fromEnds solves grades and length from both ends and the level of the PVI,
// which stands half-way.
func (in *curveIn) fromEnds(w *working) (v profile.Vertical, fault *Fault) {
	if in.PVIElev == nil {
		return v, missing("pvi_elev", "pvc and pvt leave the grades open: give the level of the PVI")
	}
	for i, p := range []*point{in.PVC, in.PVT} {
		if p.Station == nil || p.Elev == nil {
			name := [2]string{"pvc", "pvt"}[i]
			return v, missing(name, name+" needs station and elev")
		}
	}
	l := *in.PVT.Station - *in.PVC.Station
	if !(l > 0) {
		return v, impossible("pvt", "the PVT at %v does not lie beyond the PVC at %v", *in.PVT.Station, *in.PVC.Station)
	}
	if in.G1 != nil || in.G2 != nil || in.sizes() > 0 {
		return v, contradiction("pvi_elev", "both ends and the level of the PVI say everything; grades and size are one too many")
	}
	g1, g2 := (*in.PVIElev-*in.PVC.Elev)/(l/2), (*in.PVT.Elev-*in.PVIElev)/(l/2)
	w.step("g1", "(z_PVI - z_PVC) / (L/2)", put("(%v - %v) / (%v / 2) * 100", *in.PVIElev, *in.PVC.Elev, l), 100*g1, "%", curveSource)
	w.step("g2", "(z_PVT - z_PVI) / (L/2)", put("(%v - %v) / (%v / 2) * 100", *in.PVT.Elev, *in.PVIElev, l), 100*g2, "%", curveSource)
	at := profile.Point{At: station.Station(*in.PVC.Station), Elev: *in.PVC.Elev}
	return profile.NewVertical(profile.AtPVC, at, g1, g2, l/2, l/2), nil
}

// sizes counts how many sizes are given.
func (in *curveIn) sizes() (n int) {
	for _, given := range []bool{in.Length != nil, in.K != nil, in.Radius != nil, in.Lengths != nil, in.Through != nil, in.ClearUnder != nil, in.ClearOver != nil} {
		if given {
			n++
		}
	}
	return n
}

// solveCurve finds the one curve that the inputs say; hung tells that its place
// is known.
func solveCurve(in *curveIn, out *curveOut, w *working) (v profile.Vertical, hung bool, fault *Fault) {
	if in.PVC != nil && in.PVT != nil && in.PVI == nil {
		v, fault = in.fromEnds(w)
		return v, true, fault
	}
	fix, p, given, fault := in.hungOn()
	if fault != nil {
		return v, false, fault
	}
	switch {
	case given > 1:
		return v, false, contradiction("pvi", "the curve hangs on one point: keep one of pvi, pvc, pvt")
	case in.G1 == nil:
		return v, false, missing("g1", "g1 and g2 are the grades before and after, in percent")
	case in.G2 == nil:
		return v, false, missing("g2", "g1 and g2 are the grades before and after, in percent")
	case in.sizes() == 0:
		return v, false, missing("length", "give the size: length, k, radius, lengths, through, clear_under or clear_over")
	case in.sizes() > 1:
		return v, false, contradiction("length", "the size is given twice: keep one of length, k, radius, lengths, through, clear_under, clear_over")
	case in.PVIElev != nil:
		return v, false, contradiction("pvi_elev", "pvi_elev goes with pvc and pvt")
	}
	h := profile.Hung{Fix: fix, At: p, G1: *in.G1 / 100, G2: *in.G2 / 100}
	if in.Through != nil || in.ClearUnder != nil || in.ClearOver != nil {
		if given == 0 {
			return v, false, missing("pvi", "solving needs the place of the curve: pvi, pvc or pvt")
		}
		v, fault = in.solveLength(h, out)
		return v, true, fault
	}
	v, fault = in.sized(h, w)
	return v, given > 0, fault
}

// sized makes the curve of a given size.
func (in *curveIn) sized(h profile.Hung, w *working) (v profile.Vertical, fault *Fault) {
	a := math.Abs(*in.G2 - *in.G1)
	var l float64
	switch {
	case in.Lengths != nil:
		if len(in.Lengths) != 2 || !(in.Lengths[0] > 0) || !(in.Lengths[1] > 0) {
			return v, impossible("lengths", "lengths are two, before and after the PVI, both more than 0")
		}
		if in.circular() {
			return v, contradiction("shape", "a circle has one length")
		}
		return profile.NewVertical(h.Fix, h.At, h.G1, h.G2, in.Lengths[0], in.Lengths[1]), nil
	case in.Length != nil:
		l = *in.Length
	case a == 0:
		return v, impossible("g2", "g1 and g2 are equal, %v %%: no K and no radius make a length of that", *in.G1)
	case in.K != nil:
		l = *in.K * a
		w.step("L", "K·A", put("%v * %v", *in.K, a), l, w.length(), curveSource)
	default:
		l = *in.Radius * a / 100
		w.step("L", "R·A / 100", put("%v * %v / 100", *in.Radius, a), l, w.length(), curveSource)
	}
	if !(l > 0) {
		return v, impossible("length", "the curve would be %v long; a length is more than 0", l)
	}
	switch {
	case in.Shape != nil && *in.Shape != "parabola" && *in.Shape != "circular":
		return v, impossible("shape", "shape is %q; it is parabola or circular", *in.Shape)
	case in.circular():
		return profile.NewCircular(h.Fix, h.At, h.G1, h.G2, l), nil
	}
	return h.With(l), nil
}

func (in *curveIn) circular() bool { return in.Shape != nil && *in.Shape == "circular" }

// solveLength finds the length that leads through a point or keeps a gap.
func (in *curveIn) solveLength(h profile.Hung, out *curveOut) (v profile.Vertical, fault *Fault) {
	if h.G1 == h.G2 {
		return v, impossible("g2", "g1 and g2 are equal: the line is straight whatever the length")
	}
	if in.Through != nil {
		if in.Through.Station == nil || in.Through.Elev == nil {
			return v, missing("through", "through needs station and elev")
		}
		return in.through(h, profile.Point{At: station.Station(*in.Through.Station), Elev: *in.Through.Elev}, out, "exact", "through")
	}
	name, g, under := "clear_under", in.ClearUnder, true
	if g == nil {
		name, g, under = "clear_over", in.ClearOver, false
	}
	w, fault := g.window(name, under)
	if fault != nil {
		return v, fault
	}
	l, minimum, err := h.Clear(w)
	switch {
	case errors.Is(err, profile.ErrAlways):
		return v, impossible(name, "every length keeps the gap of %v", w.Gap)
	case err != nil:
		return v, impossible(name, "no length keeps the gap of %v", w.Gap)
	}
	is := "maximum"
	if minimum {
		is = "minimum"
	}
	if w.From == w.To {
		z := w.ElevFrom + w.Gap
		if under {
			z = w.ElevFrom - w.Gap
		}
		return in.through(h, profile.Point{At: station.Station(w.From), Elev: z}, out, is, name)
	}
	out.LengthIs = &is
	out.Roots = &[]curveRoot{{wire.Fine(l), true, nil}}
	return h.With(l), nil
}

func (g *window) window(name string, under bool) (w profile.Window, fault *Fault) {
	switch {
	case g.From == nil || g.To == nil:
		return w, missing(name+".from", name+" needs from and to")
	case g.Gap == nil:
		return w, missing(name+".gap", name+" needs the gap to keep")
	case g.Elev == nil && (g.ElevFrom == nil || g.ElevTo == nil):
		return w, missing(name+".elev", name+" needs elev, or elev_from and elev_to")
	case g.Elev != nil && (g.ElevFrom != nil || g.ElevTo != nil):
		return w, contradiction(name+".elev", "elev stands for both elev_from and elev_to")
	case *g.To < *g.From:
		return w, impossible(name+".to", "to is %v, before from, %v", *g.To, *g.From)
	}
	w = profile.Window{From: *g.From, To: *g.To, Gap: *g.Gap, Under: under}
	if g.Elev != nil {
		w.ElevFrom, w.ElevTo = *g.Elev, *g.Elev
	} else {
		w.ElevFrom, w.ElevTo = *g.ElevFrom, *g.ElevTo
	}
	return w, nil
}

// through takes the admissible root.
func (in *curveIn) through(h profile.Hung, p profile.Point, out *curveOut, is, name string) (v profile.Vertical, fault *Fault) {
	roots, found := []curveRoot{}, false
	for _, r := range h.Through(p) {
		c := curveRoot{Length: wire.Fine(r.Length), Admissible: r.Admissible}
		if r.Reason != "" {
			c.Reason = &r.Reason
		}
		if r.Admissible {
			v, found = h.With(r.Length), true
		}
		roots = append(roots, c)
	}
	if !found {
		return v, impossible(name, "no length leads the curve through %v at level %v: the point lies on the wrong side of the tangents", float64(p.At), p.Elev)
	}
	out.Roots, out.LengthIs = &roots, &is
	return v, nil
}
