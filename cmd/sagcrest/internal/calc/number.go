package calc

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/profile/station"
)

// Kinds of numbers, the values of the tag `unit`.
const (
	aLength  = "length"
	aStation = "station"
	aSpeed   = "speed"
	aPercent = "percent"
	aRatio   = "ratio"
	anAngle  = "angle"
	aK       = "k"
	aTime    = "seconds"
	aCount   = "count"
)

// number turns a value of a call into a number in the units of the call. A bare
// number is taken as it is; a text may carry its unit, be a station label, or an
// angle in degrees, minutes and seconds.
func number(v any, kind string, s System) (float64, error) {
	text, isText := v.(string)
	if !isText {
		f, ok := v.(float64)
		if !ok {
			return 0, errors.New("a number is wanted")
		}
		return finite(f)
	}
	text = strings.TrimSpace(text)
	if f, err := strconv.ParseFloat(text, 64); err == nil {
		return finite(f)
	}
	switch {
	case kind == aStation && strings.Contains(text, "+"):
		labels := station.Labels{}
		if s == "us" {
			labels.Foot = foot
		}
		return labels.ParseLabel(text)
	case kind == anAngle && strings.Count(text, "-") >= 1 && !strings.HasPrefix(text, "-"):
		return sexagesimal(text)
	case kind == aTime:
		return finite2(strconv.ParseFloat(strings.TrimSpace(strings.TrimSuffix(text, "s")), 64))
	}
	return withUnit(text, kind, s)
}

func finite(f float64) (float64, error) {
	if math.IsNaN(f) || math.IsInf(f, 0) {
		return 0, errors.New("a finite number is wanted")
	}
	return f, nil
}

func finite2(f float64, err error) (float64, error) {
	if err != nil {
		return 0, errors.New("a number of seconds is wanted")
	}
	return finite(f)
}

// withUnit reads a number with its unit and brings it to the units of the call.
func withUnit(text, kind string, s System) (float64, error) {
	want := map[string]quantity.Kind{aLength: quantity.Length, aStation: quantity.Length, aSpeed: quantity.Speed,
		aPercent: quantity.Ratio, aRatio: quantity.Ratio, anAngle: quantity.Angle}[kind]
	if want == "" {
		return 0, fmt.Errorf("%q is no number", text)
	}
	si, err := quantity.Parse(text, want)
	if err != nil {
		return 0, err
	}
	switch kind {
	case aPercent:
		return 100 * si, nil
	case anAngle:
		return si * 180 / math.Pi, nil
	case aSpeed:
		if s == "us" {
			return si * 3600 / (5280 * foot), nil
		}
		return si * 3.6, nil
	case aLength, aStation:
		if s == "us" {
			return si / foot, nil
		}
	}
	return si, nil
}

// sexagesimal reads "d-m-s" or "d-m"; seconds may have decimals.
func sexagesimal(text string) (float64, error) {
	parts := strings.Split(text, "-")
	if len(parts) > 3 {
		return 0, fmt.Errorf("%q is no angle: degrees-minutes-seconds", text)
	}
	sum, scale := 0.0, 1.0
	for i, p := range parts {
		v, err := strconv.ParseFloat(strings.TrimSpace(p), 64)
		if err != nil || v < 0 || i > 0 && v >= 60 {
			return 0, fmt.Errorf("%q is no angle: degrees-minutes-seconds, minutes and seconds below 60", text)
		}
		sum += v / scale
		scale *= 60
	}
	return sum, nil
}
