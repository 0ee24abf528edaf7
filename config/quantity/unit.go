package quantity

import (
	"math"
	"slices"
)

// Kind is what a unit measures.
type Kind string

// The kinds of quantity that a project file knows. SI units: m, m², m³, m/s,
// rad, 1.
const (
	Length Kind = "length"
	Area   Kind = "area"
	Volume Kind = "volume"
	Speed  Kind = "speed"
	Angle  Kind = "angle"
	Ratio  Kind = "ratio"
)

// The two feet, in metres (see the package comment).
const (
	InternationalFoot = 0.3048
	USSurveyFoot      = 1200.0 / 3937.0
)

// Unit is a token that may follow a number, and the SI size of one of it.
type Unit struct {
	Token string
	Kind  Kind
	SI    float64
	// parts is how many of it make one SI unit, where that is the rounder
	// number: "70 mm" divided by 1000 is the float64 nearest to 0.07, times
	// 0.001 it is not.
	parts float64
}

// In returns v of the unit in SI.
func (u Unit) In(v float64) float64 {
	if u.parts != 0 {
		return v / u.parts
	}
	return v * u.SI
}

// Units returns every token, legal in every project, in the order in which a
// message lists them.
func Units() []Unit {
	const foot, yard, mile = InternationalFoot, 3 * InternationalFoot, 5280 * InternationalFoot
	parts := func(token string, k Kind, n float64) Unit { return Unit{token, k, 1 / n, n} }
	whole := func(token string, k Kind, si float64) Unit { return Unit{token, k, si, 0} }
	return []Unit{
		parts("mm", Length, 1000), parts("cm", Length, 100), whole("m", Length, 1), whole("km", Length, 1000),
		whole("in", Length, foot/12), whole("ft", Length, foot), whole("us_ft", Length, USSurveyFoot), whole("yd", Length, yard),
		whole("m2", Area, 1), whole("ft2", Area, foot*foot), whole("ha", Area, 1e4), whole("acre", Area, 4840*yard*yard),
		whole("m3", Volume, 1), whole("yd3", Volume, yard*yard*yard),
		parts("km/h", Speed, 3.6), whole("mile/h", Speed, mile/3600),
		whole("deg", Angle, math.Pi/180),
		parts("%", Ratio, 100),
	}
}

// Find returns the unit with the given token.
func Find(token string) (Unit, bool) {
	all := Units()
	i := slices.IndexFunc(all, func(u Unit) bool { return u.Token == token })
	if i < 0 {
		return Unit{}, false
	}
	return all[i], true
}

// Tokens returns the tokens of one kind.
func Tokens(k Kind) []string {
	var tokens []string
	for _, u := range Units() {
		if u.Kind == k {
			tokens = append(tokens, u.Token)
		}
	}
	return tokens
}

// SI returns the symbol of the SI unit of k as findings carry it.
func (k Kind) SI() string {
	switch k {
	case Length:
		return "m"
	case Area:
		return "m2"
	case Volume:
		return "m3"
	case Speed:
		return "m/s"
	case Angle:
		return "rad"
	}
	return "ratio"
}

// meant returns the token that somebody who wrote a well-known other spelling
// was after, or "".
func meant(token string) string {
	switch token {
	case "metre", "metres", "meter", "meters", "M":
		return "m"
	case "foot", "feet", "'", "FT", "Ft", "ift":
		return "ft"
	case "inch", "inches", "\"", "''":
		return "in"
	case "usft", "us-ft", "us ft", "sft", "ftUS", "us survey feet":
		return "us_ft"
	case "MM", "millimetre", "millimeter":
		return "mm"
	case "m²", "m^2", "sqm", "sq m":
		return "m2"
	case "m³", "m^3", "cum", "cu m":
		return "m3"
	case "ft²", "ft^2", "sqft", "sq ft":
		return "ft2"
	case "yd³", "yd^3", "cuyd", "cu yd", "cy", "CY":
		return "yd3"
	case "kph", "kmh", "kmph", "km/hr", "KM/H":
		return "km/h"
	case "mph", "mi/h", "MPH", "mile/hr", "miles/h":
		return "mile/h"
	case "°", "degree", "degrees":
		return "deg"
	case "percent", "pct":
		return "%"
	case "ac", "acres":
		return "acre"
	case "hectare", "hectares":
		return "ha"
	}
	return ""
}
