package diag

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"

	"sagcrest/profile/finding"
)

// Problem is one fault of an input. Key is the path of the project's key that
// it concerns, ID the name of the thing; Excerpt is the raw line.
type Problem struct {
	Code            finding.Code
	Severity        finding.Severity
	File            string
	Line, Column    int
	Key, ID         string
	Message, Help   string
	Excerpt         string
	Measured, Limit finding.Measure
}

// Place returns "file:line:column" as far as it is known.
func (p Problem) Place() string {
	switch {
	case p.File == "":
		return ""
	case p.Line == 0:
		return p.File
	case p.Column == 0:
		return fmt.Sprintf("%s:%d", p.File, p.Line)
	}
	return fmt.Sprintf("%s:%d:%d", p.File, p.Line, p.Column)
}

// String returns the problem as text of up to four lines without the last line
// feed: the message with its place, the raw line, a caret under the column, and
// the way to mend it.
func (p Problem) String() string {
	var b strings.Builder
	if place := p.Place(); place != "" {
		b.WriteString(place + ": ")
	}
	fmt.Fprintf(&b, "%s %s %s", p.Severity, p.Code, p.Message)
	if p.Excerpt != "" {
		text, caret := excerpt(p.Excerpt, p.Column)
		fmt.Fprintf(&b, "\n    %s", text)
		if p.Column > 0 {
			fmt.Fprintf(&b, "\n    %s^", strings.Repeat(" ", caret))
		}
	}
	if p.Help != "" {
		fmt.Fprintf(&b, "\n  help: %s", p.Help)
	}
	return b.String()
}

// widest is how many signs of a raw line are shown: a line of a terminal; of a
// longer one the part around the column.
const widest = 100

// excerpt returns what is shown of a line, and how many signs stand before the
// column. Tabs become one space, so that the caret stands right; what cannot be
// printed, such as the controls of a terminal, becomes a replacement sign.
func excerpt(line string, column int) (text string, before int) {
	if column > 0 {
		before = len(signs(line[:min(column-1, len(line))]))
	}
	all := signs(strings.TrimRight(line, " \t\r"))
	from := 0
	if before > widest*4/5 {
		from = min(before-widest/2, len(all))
	}
	shown := all[from:min(from+widest, len(all))]
	text = string(shown)
	if from > 0 {
		text, before = "… "+text, before+2
	}
	if from+len(shown) < len(all) {
		text += " …"
	}
	return text, before - from
}

// signs returns the printable signs that stand for a text, one each.
func signs(text string) []rune {
	out := make([]rune, 0, len(text))
	for _, r := range text { // each broken byte is one replacement sign
		switch {
		case r == '\t':
			r = ' '
		case !unicode.IsPrint(r):
			r = utf8.RuneError
		}
		out = append(out, r)
	}
	return out
}

// Worst reports whether the worst of the problems is an error.
func Worst(ps []Problem) (isError bool) {
	for _, p := range ps {
		if p.Severity == finding.Error {
			return true
		}
	}
	return false
}
