package diag

import (
	"fmt"
	"strings"
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

// widest is how many signs of a raw line are shown: a line of a terminal.
const widest = 100

// excerpt returns what is shown of a line, and how many signs stand before the
// column. Tabs become one space, so that the caret stands right; other control
// signs and broken text become a replacement sign.
func excerpt(line string, column int) (text string, before int) {
	clean := strings.Map(func(r rune) rune {
		switch {
		case r == '\t':
			return ' '
		case r < ' ' || r == 0x7f || r == utf8.RuneError:
			return utf8.RuneError
		}
		return r
	}, strings.ToValidUTF8(line, string(utf8.RuneError)))
	if column > 0 && column-1 <= len(line) {
		before = utf8.RuneCountInString(strings.ToValidUTF8(line[:column-1], string(utf8.RuneError)))
	}
	runes := []rune(clean)
	from := 0
	if before > widest-20 {
		from = before - widest/2
	}
	runes = runes[min(from, len(runes)):]
	tail := ""
	if len(runes) > widest {
		runes, tail = runes[:widest], " …"
	}
	return strings.TrimRight(string(runes), " ") + tail, min(before-from, len(runes))
}

// Worst reports whether any problem is an error.
func Worst(ps []Problem) (isError bool) {
	for _, p := range ps {
		if p.Severity == finding.Error {
			return true
		}
	}
	return false
}
