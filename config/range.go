package config

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
)

// within checks a value against limits such as "(0,100]": a bracket belongs to
// the range, a parenthesis does not, an empty side is open.
func (r *reading) within(v *value, path string, f form, limits string) {
	low, high, lowIn, highIn := parseLimits(limits)
	shown := v.si / f.size
	if f.kind == quantity.Angle && v.bare {
		shown = v.number // 80 deg stays 80, whatever the conversion there and back makes of it
	}
	tooLow := shown < low || shown == low && !lowIn
	tooHigh := shown > high || shown == high && !highIn
	if !tooLow && !tooHigh {
		return
	}
	v.ok = false
	limit := low
	if tooHigh {
		limit = high
	}
	p := r.complain("F06", path, fmt.Sprintf("%s is %s%s; it is %s", path, shortest(shown), f.shown, f.rangeText(limits)), rangeHelp(f))
	p.Measured = finding.Of(v.si, f.si())
	p.Limit = finding.Of(limit*f.size, f.si())
}

// si returns the unit of the value as findings carry it.
func (f form) si() string {
	switch {
	case f.kind != "":
		return f.kind.SI()
	case f.shown != "":
		return "m"
	}
	return ""
}

// rangeHelp reminds of the slip that puts a number out of its range most often.
func rangeHelp(f form) string {
	switch {
	case f.kind == quantity.Ratio:
		return `a ratio is meant: 2.5 % is 0.025, or "2.5 %" in quotes`
	case f.shown == "":
		return "check the number"
	}
	return "check the number and its unit"
}

// rangeText says a range in words, with its unit on both ends.
func (f form) rangeText(limits string) string {
	low, high, lowIn, highIn := parseLimits(limits)
	var parts []string
	switch {
	case math.IsInf(low, 0):
	case lowIn:
		parts = append(parts, "at least "+shortest(low)+f.shown)
	default:
		parts = append(parts, "more than "+shortest(low)+f.shown)
	}
	switch {
	case math.IsInf(high, 0):
	case highIn:
		parts = append(parts, "at most "+shortest(high)+f.shown)
	default:
		parts = append(parts, "less than "+shortest(high)+f.shown)
	}
	return strings.Join(parts, " and ")
}

// parseLimits reads a range tag; a malformed one is a mistake of this package.
func parseLimits(s string) (low, high float64, lowIn, highIn bool) {
	inner := s[1 : len(s)-1]
	a, b, found := strings.Cut(inner, ",")
	low, high = math.Inf(-1), math.Inf(1)
	var errA, errB error
	if a != "" {
		low, errA = strconv.ParseFloat(a, 64)
	}
	if b != "" {
		high, errB = strconv.ParseFloat(b, 64)
	}
	if !found || errA != nil || errB != nil {
		panic("config: malformed range " + s)
	}
	return low, high, s[0] == '[', s[len(s)-1] == ']'
}
