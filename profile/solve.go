package profile

import (
	"errors"
	"fmt"
	"math"
	"slices"
)

// Hung is a symmetrical parabola of which one point and both grades are known,
// and its length is sought.
type Hung struct {
	Fix    Fix
	At     Point
	G1, G2 float64
}

// With returns the curve of one length.
func (h Hung) With(length float64) Vertical {
	return NewVertical(h.Fix, h.At, h.G1, h.G2, length/2, length/2)
}

// Root is a length for which the parabola, run on beyond its ends, meets a
// point. It is admissible when the point lies between PVC and PVT; Reason says
// why it is not.
type Root struct {
	Length     float64
	Admissible bool
	Reason     string
}

// Through returns every positive length for which the parabola meets a point,
// increasing. With d the distance of the point beyond the PVI and e its height
// above the first tangent, A(d + L/2)² = 2eL; hung on the PVC it is A·x² = 2eL
// with x from the PVC, and likewise backwards from the PVT.
func (h Hung) Through(p Point) []Root {
	a := h.G2 - h.G1
	d := float64(p.At - h.At.At)
	var lengths []float64
	switch h.Fix {
	case AtPVC:
		lengths = []float64{a * d * d / (2 * (p.Elev - h.At.Elev - h.G1*d))}
	case AtPVT:
		lengths = []float64{a * d * d / (2 * (p.Elev - h.At.Elev - h.G2*d))}
	default:
		e := p.Elev - h.At.Elev - h.G1*d
		lengths = quadratic(a/4, a*d-2*e, a*d*d)
	}
	slices.Sort(lengths)
	var out []Root
	for _, l := range slices.Compact(lengths) {
		if !(l > 0) || math.IsInf(l, 0) {
			continue
		}
		out = append(out, h.root(l, p))
	}
	return out
}

// root judges one length.
func (h Hung) root(l float64, p Point) Root {
	v, r := h.With(l), Root{Length: l, Admissible: true}
	// A point on an end belongs to the curve, give or take its rounding.
	hair := 1e-9 * math.Max(1, math.Abs(float64(p.At)))
	if out := float64(v.PVC.At - p.At); out > hair {
		r.Admissible, r.Reason = false, fmt.Sprintf("the point lies %.3f before the PVC", out)
	}
	if out := float64(p.At - v.PVT.At); out > hair {
		r.Admissible, r.Reason = false, fmt.Sprintf("the point lies %.3f beyond the PVT", out)
	}
	return r
}

// quadratic returns the real roots of ax² + bx + c, computed without
// cancellation.
func quadratic(a, b, c float64) []float64 {
	if a == 0 {
		return []float64{-c / b}
	}
	d := b*b - 4*a*c
	if d < 0 {
		// Touching is a double root; rounding must not lose it.
		if d < -1e-12*b*b {
			return nil
		}
		d = 0
	}
	q := -(b + math.Copysign(math.Sqrt(d), b)) / 2
	if q == 0 {
		return []float64{0}
	}
	return []float64{q / a, c / q}
}

// Window is something to stay clear of between two places: its level runs
// straight from ElevFrom to ElevTo, and the line stays at least Gap below it
// (Under) or above it.
type Window struct {
	From, To         float64
	ElevFrom, ElevTo float64
	Gap              float64
	Under            bool
}

// limit returns the level that the line may just reach.
func (w Window) limit(s float64) float64 {
	z := w.ElevFrom
	if w.To > w.From {
		z += (w.ElevTo - w.ElevFrom) * (s - w.From) / (w.To - w.From)
	}
	if w.Under {
		return z - w.Gap
	}
	return z + w.Gap
}

// Spare returns the least room that a curve leaves beyond the gap, negative when
// it comes too near, and where. Between ends of the curve the room is one
// quadratic of the place, so it is least at one of them, at an edge, or where
// its slope vanishes.
func (w Window) Spare(v Vertical) (room, at float64) {
	room = math.Inf(1)
	spare := func(s float64) float64 {
		z, _ := v.At(s)
		if w.Under {
			return w.limit(s) - z
		}
		return z - w.limit(s)
	}
	marks := []float64{w.From, w.To}
	for _, s := range []float64{float64(v.PVC.At), float64(v.PVI.At), float64(v.PVT.At)} {
		if w.From < s && s < w.To {
			marks = append(marks, s)
		}
	}
	slices.Sort(marks)
	for i, a := range marks {
		places := []float64{a}
		if i+1 < len(marks) {
			places = append(places, vertex(spare, a, marks[i+1]))
		}
		for _, s := range places {
			if r := spare(s); r < room {
				room, at = r, s
			}
		}
	}
	return room, at
}

// vertex returns where a quadratic has its extreme, kept between a and b.
func vertex(f func(float64) float64, a, b float64) float64 {
	m := (a + b) / 2
	fa, fm, fb := f(a), f(m), f(b)
	curve := fa - 2*fm + fb
	if math.Abs(curve) < 1e-13 {
		return a
	}
	return math.Min(math.Max(m+(b-a)/2*(fa-fb)/(2*curve), a), b)
}

// Why a window solves for no length.
var (
	ErrAlways = errors.New("every length keeps the gap")
	ErrNever  = errors.New("no length keeps the gap")
)

// longest bounds the search: beyond it a curve is straight for any purpose.
const longest = 1e7

// Clear returns the length at which the gap is just kept, and whether longer
// curves keep it too ("minimum") or shorter ones ("maximum"). At every place the
// level is monotone in the length, so there is one such length at most.
func (h Hung) Clear(w Window) (length float64, minimum bool, err error) {
	f := func(l float64) float64 { r, _ := w.Spare(h.With(l)); return r }
	short, long := 1e-9, longest
	fs, fl := f(short), f(long)
	switch {
	case fs >= 0 && fl >= 0:
		return 0, false, ErrAlways
	case fs < 0 && fl < 0:
		return 0, false, ErrNever
	}
	minimum = fl >= 0
	for range 200 {
		m := math.Sqrt(short * long)
		if long/short < 1.5 {
			m = (short + long) / 2
		}
		if m <= short || m >= long {
			break
		}
		if (f(m) >= 0) == minimum {
			long = m
		} else {
			short = m
		}
	}
	if minimum {
		return long, true, nil
	}
	return short, false, nil
}
