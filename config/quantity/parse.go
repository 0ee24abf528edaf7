package quantity

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"
)

// The five things that can be wrong with a number and its unit. An error of
// Parse or Number wraps exactly one of them.
var (
	ErrMissing = errors.New("unit missing")
	ErrForeign = errors.New("unknown unit")
	ErrKind    = errors.New("unit of the wrong kind")
	ErrNumber  = errors.New("not a number")
	ErrComma   = errors.New("decimal comma")
)

// Error tells what is wrong with Text and how to mend it. It wraps one of the
// package's Err values.
type Error struct {
	Fault error
	Text  string // as written
	Help  string // how to mend it
}

// Error returns the text and what is wrong with it.
func (e *Error) Error() string { return fmt.Sprintf("%q: %v", e.Text, e.Fault) }

// Unwrap returns the fault.
func (e *Error) Unwrap() error { return e.Fault }

// Parse reads a number with a unit of the wanted kind, such as "0.40 m" or
// "260m", and returns it in SI. It fails with an *Error; the value is always
// finite.
func Parse(text string, want Kind) (float64, error) {
	v, unit, err := ParseAny(text)
	if err != nil {
		return 0, forKind(err, want)
	}
	if unit.Token == "" {
		return 0, &Error{ErrMissing, text, "write " + example(text, want)}
	}
	if unit.Kind != want {
		help := fmt.Sprintf("%s measures %s; units of %s are %s", unit.Token, unit.Kind, want, strings.Join(Tokens(want), ", "))
		return 0, &Error{ErrKind, text, help}
	}
	return v, nil
}

// ParseAny reads a number with any known unit, or a bare number, whose unit
// comes back empty, and returns it in SI.
func ParseAny(text string) (float64, Unit, error) {
	number, token := split(strings.TrimSpace(text))
	v, err := Number(number)
	if err != nil {
		var e *Error
		if errors.As(err, &e) {
			e.Text = text
		}
		return 0, Unit{}, err
	}
	if token == "" {
		return v, Unit{}, nil
	}
	unit, ok := Find(token)
	if !ok {
		return 0, Unit{}, &Error{ErrForeign, text, foreignHelp(token)}
	}
	v = unit.In(v)
	if math.IsInf(v, 0) {
		return 0, Unit{}, &Error{ErrNumber, text, "the number is beyond every range"}
	}
	return v, unit, nil
}

// Number reads a plain decimal number: digits, one decimal point, an exponent
// if need be. Hexadecimal, underscores, "nan" and "inf" are refused, and so is
// what a spreadsheet of another language makes of a decimal point.
func Number(text string) (float64, error) {
	t := strings.TrimSpace(text)
	if comma(t) {
		return 0, &Error{ErrComma, text, "write a decimal point: " + strings.Replace(t, ",", ".", 1)}
	}
	if t == "" || strings.Trim(t, "0123456789+-.eE") != "" {
		return 0, &Error{ErrNumber, text, "write digits with a decimal point"}
	}
	v, err := strconv.ParseFloat(t, 64)
	if err != nil || math.IsInf(v, 0) {
		return 0, &Error{ErrNumber, text, "write digits with a decimal point"}
	}
	return v, nil
}

// comma reports whether t is a number but for one comma between its digits.
func comma(t string) bool {
	head, tail, found := strings.Cut(t, ",")
	if !found || head == "" || tail == "" {
		return false
	}
	_, errHead := strconv.Atoi(strings.TrimLeft(head, "+-"))
	_, errTail := strconv.ParseUint(tail, 10, 64)
	return errHead == nil && errTail == nil
}

// split parts a text where its number ends. The exponent's letter belongs to
// the number only when digits follow, so that "3 e" has the unit "e".
func split(t string) (number, token string) {
	i := 0
	for i < len(t) {
		c := t[i]
		digit := c >= '0' && c <= '9'
		sign := (c == '+' || c == '-') && (i == 0 || t[i-1] == 'e' || t[i-1] == 'E')
		exponent := (c == 'e' || c == 'E') && i > 0 && i+1 < len(t) && strings.IndexByte("0123456789+-", t[i+1]) >= 0
		if !digit && !sign && !exponent && c != '.' && c != ',' {
			break
		}
		i++
	}
	return t[:i], strings.TrimSpace(t[i:])
}

// foreignHelp names the unit that was probably meant, else all of them.
func foreignHelp(token string) string {
	if m := meant(token); m != "" {
		return fmt.Sprintf("%q is not a unit here; write %s", token, m)
	}
	var all []string
	for _, u := range Units() {
		all = append(all, u.Token)
	}
	return fmt.Sprintf("%q is not a unit here; known are %s", token, strings.Join(all, " "))
}

// forKind makes the help of a foreign unit shorter: only the units of the
// wanted kind would have served.
func forKind(err error, want Kind) error {
	var e *Error
	if errors.As(err, &e) && errors.Is(err, ErrForeign) && !strings.Contains(e.Help, "; write ") {
		head, _, _ := strings.Cut(e.Help, ";")
		e.Help = head + "; units of " + string(want) + " are " + strings.Join(Tokens(want), ", ")
	}
	return err
}

// example shows the number again with the first fitting units.
func example(text string, want Kind) string {
	tokens := Tokens(want)
	if want == Length { // millimetres are rarely what a bare number meant
		tokens = []string{"m", "mm", "ft"}
	}
	for i, token := range tokens {
		tokens[i] = fmt.Sprintf("%q", strings.TrimSpace(text)+" "+token)
	}
	if len(tokens) == 1 {
		return tokens[0]
	}
	return strings.Join(tokens[:len(tokens)-1], ", ") + " or " + tokens[len(tokens)-1]
}
