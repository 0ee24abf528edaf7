package quantity

import (
	"math"
	"strconv"
	"strings"
)

// significant is the number of decimal digits that every float64 keeps
// through a round trip (IEEE 754: 15.95). Digits beyond are the binary tail of
// an arithmetic result, not part of the number that a person would round.
const significant = 15

// Decimal prints v with the given number of places, rounded half away from
// zero in decimal: 2.675 becomes "2.68" though its binary value lies below.
// A result of zero has no sign. Infinities and NaN print as "–": there is
// nothing to post.
func Decimal(v float64, places int) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	mantissa, exponent := digits(math.Abs(v))
	// point counts the digits before the decimal point; keep those wanted.
	point := exponent + 1
	keep := point + places
	up := keep >= 0 && keep < len(mantissa) && mantissa[keep] >= '5'
	switch {
	case keep < 0:
		mantissa, keep = "", 0
	case keep < len(mantissa):
		mantissa = mantissa[:keep]
	default:
		mantissa += strings.Repeat("0", keep-len(mantissa))
	}
	if up {
		mantissa = increment(mantissa)
		point += len(mantissa) - keep
	}
	text := place(mantissa, point, places)
	if v < 0 && strings.Trim(text, "0.") != "" {
		return "-" + text
	}
	return text
}

// digits returns the significant digits of v >= 0 and its decimal exponent:
// v = d.ddd × 10^exponent.
func digits(v float64) (mantissa string, exponent int) {
	text := strconv.FormatFloat(v, 'e', significant-1, 64)
	head, tail, _ := strings.Cut(text, "e")
	exponent, _ = strconv.Atoi(tail) // FormatFloat always writes an integer there
	return strings.Replace(head, ".", "", 1), exponent
}

// increment adds one to the last digit of a decimal string.
func increment(s string) string {
	b := []byte(s)
	for i := len(b) - 1; i >= 0; i-- {
		if b[i] != '9' {
			b[i]++
			return string(b)
		}
		b[i] = '0'
	}
	return "1" + string(b)
}

// place puts the decimal point after the first point digits and fills both
// sides with zeros.
func place(mantissa string, point, places int) string {
	if point <= 0 {
		mantissa = strings.Repeat("0", 1-point) + mantissa
		point = 1
	}
	whole, rest := mantissa[:point], mantissa[point:]
	whole = strings.TrimLeft(whole, "0")
	if whole == "" {
		whole = "0"
	}
	if places <= 0 {
		return whole
	}
	return whole + "." + rest[:places]
}

// Group puts a separator between every three digits before the decimal point.
func Group(number, separator string) string {
	sign := ""
	if strings.HasPrefix(number, "-") {
		sign, number = "-", number[1:]
	}
	whole, rest, found := strings.Cut(number, ".")
	var b strings.Builder
	for i := range len(whole) {
		if i > 0 && (len(whole)-i)%3 == 0 {
			b.WriteString(separator)
		}
		b.WriteByte(whole[i])
	}
	if found {
		b.WriteString("." + rest)
	}
	return sign + b.String()
}
