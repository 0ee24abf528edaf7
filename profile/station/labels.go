package station

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Labels prints and reads stations the way a project writes them.
// The zero value is metric and starts at 0+000.
type Labels struct {
	// Start is the label, in metres or feet, of the first point.
	Start float64
	// Foot is the length of the label's unit in metres: 0 or 1 for metric
	// labels, 0.3048 or 1200/3937 for hundreds of feet.
	Foot float64
}

// US reports whether labels are counted in hundreds of feet.
func (l Labels) US() bool { return l.Foot != 0 && l.Foot != 1 }

// Unit returns the length in metres of one label unit.
func (l Labels) Unit() float64 {
	if l.Foot == 0 {
		return 1
	}
	return l.Foot
}

// Value returns the label of s as a plain number of label units.
func (l Labels) Value(s Station) float64 { return l.Start + float64(s)/l.Unit() }

// Of returns the station whose label is the plain number v.
func (l Labels) Of(v float64) Station { return Station((v - l.Start) * l.Unit()) }

// Format prints s as k+mmm.mmm, or s+ff.ff in feet, rounded half away from
// zero. Labels below zero carry one minus sign in front.
func (l Labels) Format(s Station) string {
	group, digits, decimals := 1000.0, 3, 3
	if l.US() {
		group, digits, decimals = 100, 2, 2
	}
	v := l.Value(s)
	scale := math.Pow10(decimals)
	// 1e-9 label units are far below anything surveyed: they only undo the
	// binary tail of numbers such as 1250.0005.
	n := math.Floor(math.Abs(v)*scale + 0.5 + 1e-6)
	sign := ""
	if v < 0 && n > 0 {
		sign = "-"
	}
	whole := math.Floor(n / (group * scale))
	rest := (n - whole*group*scale) / scale
	return fmt.Sprintf("%s%.0f+%0*.*f", sign, whole, digits+1+decimals, decimals, rest)
}

// errForm says what a station looks like; Parse wraps it with the numbers.
var errForm = errors.New("a station is written k+mmm with three digits before the decimal point (s+ff with two in feet)")

// Parse reads a label such as "1+250.5". It fails when the form is not exact,
// since "1+25" may mean 1025 or 1250.
func (l Labels) Parse(text string) (Station, error) {
	v, err := l.ParseLabel(text)
	if err != nil {
		return 0, err
	}
	return l.Of(v), nil
}

// ParseLabel reads a label as a plain number of label units, without taking
// the start off.
func (l Labels) ParseLabel(text string) (float64, error) {
	digits, group := 3, 1000.0
	if l.US() {
		digits, group = 2, 100
	}
	t, negative := strings.CutPrefix(strings.TrimSpace(text), "-")
	head, tail, found := strings.Cut(t, "+")
	whole, _, _ := strings.Cut(tail, ".")
	if !found || !allDigits(head) || !allDigits(whole) || len(whole) != digits {
		return 0, fmt.Errorf("%q: %w", text, errForm)
	}
	k, errK := strconv.ParseFloat(head, 64)
	m, errM := strconv.ParseFloat(tail, 64)
	if errK != nil || errM != nil || strings.ContainsAny(tail, "eExX_") {
		return 0, fmt.Errorf("%q: %w", text, errForm)
	}
	v := k*group + m
	if negative {
		v = -v
	}
	return v, nil
}

func allDigits(s string) bool {
	if s == "" {
		return false
	}
	for _, r := range s {
		if r < '0' || r > '9' {
			return false
		}
	}
	return true
}
