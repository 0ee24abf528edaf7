package drainage

import (
	"fmt"
	"math"

	"sagcrest/section"
)

// MendKind names a way to mend a shortage of cover.
type MendKind string

// The ways that are tried, in this order.
const (
	RaiseGradeLine MendKind = "raise_grade_line"
	LowerInvert    MendKind = "lower_invert"
	SmallerBarrel  MendKind = "smaller_barrel"
	MoreBarrels    MendKind = "more_barrels"
)

// Mend is one way with its figure.
type Mend struct {
	Kind  MendKind
	Value float64
	Unit  string // "m", "mm", "" for a count
	Text  string
}

// nominal lists the inside sizes in metres that pipes are made in: the metric
// sizes that correspond to 12 to 72 in of ASTM C76M (from memory).
func nominal() []float64 {
	return []float64{0.3, 0.375, 0.45, 0.525, 0.6, 0.675, 0.75, 0.9, 1.05, 1.2, 1.35, 1.5, 1.65, 1.8}
}

// mends lists what would give the cover that is missing. Raising the grade line
// and lowering the inverts help by their own amount; a smaller barrel is
// measured again, on the same inverts and with the same wall.
func (l *Laid) mends(r *section.Road) []Mend {
	short := l.Required - l.Least.Cover()
	out := []Mend{
		{RaiseGradeLine, short, "m", fmt.Sprintf("raise the grade line by at least %.3f m there; the barrel gets longer with the fill, so measure again", short)},
		{LowerInvert, short, "m", fmt.Sprintf("lower both inverts by at least %.3f m, if inlet and outlet channels can be dug that deep", short)},
	}
	size, ok := l.smaller(r)
	if !ok {
		return out
	}
	n := l.sameArea(size)
	what := fmt.Sprintf("%.0f mm pipe", size*1000)
	if l.Culvert.Shape == Box {
		what = fmt.Sprintf("box with a rise of %.0f mm", size*1000)
	}
	out = append(out, Mend{SmallerBarrel, size * 1000, "mm",
		fmt.Sprintf("a %s with the same wall on the same inverts has enough cover; its capacity must be checked", what)})
	if n > max(l.Culvert.Barrels, 1) {
		out = append(out, Mend{MoreBarrels, float64(n), "",
			fmt.Sprintf("%d barrels, each a %s, have at least the same area and enough cover", n, what)})
	}
	return out
}

// smaller returns the largest smaller size whose cover is enough over every
// barrel. Boxes go down by 50 mm of rise.
func (l *Laid) smaller(r *section.Road) (float64, bool) {
	sizes := nominal()
	if l.Culvert.Shape == Box {
		sizes = nil
		for h := 0.3; h < l.Culvert.Rise; h += 0.05 {
			sizes = append(sizes, h)
		}
	}
	for i := len(sizes) - 1; i >= 0; i-- {
		if sizes[i] >= l.Culvert.Height() {
			continue
		}
		try := *l
		if try.Culvert.Shape == Box {
			try.Culvert.Rise = sizes[i]
		} else {
			try.Culvert.Diameter = sizes[i]
		}
		try.rule()
		if _, _, ok := try.leastOver(r); ok && try.Least.Cover() >= try.Required-coverTouch {
			return sizes[i], true
		}
	}
	return 0, false
}

// sameArea returns how many barrels of the smaller size have at least the full
// area of those planned.
func (l *Laid) sameArea(size float64) int {
	n := float64(max(l.Culvert.Barrels, 1))
	ratio := l.Culvert.Height() / size
	if l.Culvert.Shape == Circular {
		ratio *= ratio
	}
	// A hair below a whole number is that number: sizes are decimal.
	return int(math.Ceil(n*ratio - 1e-9))
}
