package calc

import (
	"fmt"
	"math"
	"strconv"
)

// Step is one line of a working. Substituted is the formula with the numbers put
// in; it evaluates to Value (angles of sin, cos and tan in degrees).
type Step struct {
	Symbol, Formula, Substituted string
	Value                        float64
	Unit, Source                 string
}

// working gathers the steps of a calculation in its units.
type working struct {
	system System
	steps  []Step
}

// step adds a line.
func (w *working) step(symbol, formula, substituted string, value float64, unit, source string) {
	w.steps = append(w.steps, Step{symbol, formula, substituted, value, unit, source})
}

// length and k name the units of the call.
func (w *working) length() string { return w.pick("m", "ft") }
func (w *working) k() string      { return w.pick("m/%", "ft/%") }

func (w *working) pick(metric, us string) string {
	if w.system == "us" {
		return us
	}
	return metric
}

// put writes numbers into a formula: every %v takes one, in parentheses when it
// is negative, with as many digits as a reader can check.
func put(format string, numbers ...float64) string {
	args := make([]any, len(numbers))
	for i, v := range numbers {
		args[i] = figure(v)
	}
	return fmt.Sprintf(format, args...)
}

func figure(v float64) string {
	text := strconv.FormatFloat(v, 'g', 12, 64)
	if v < 0 || math.Signbit(v) {
		return "(" + text + ")"
	}
	return text
}
