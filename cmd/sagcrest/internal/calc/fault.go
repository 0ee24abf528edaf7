package calc

import (
	"fmt"
	"strings"

	"sagcrest/profile/finding"
)

// Fault is why a calculation cannot be done: the input that is concerned, what
// is wrong, and how to mend it.
type Fault struct {
	Code          finding.Code // F03 unknown, F04 unit, F05 missing, F06 impossible, F08 contradiction
	Field         string
	Message, Help string
	Known         []string // of F03: what would have been right
}

func (f *Fault) Error() string { return f.Field + ": " + f.Message }

// unknownName carries the names that are known, so that the rim can name the
// nearest.
func unknownName(field string, known []string) *Fault {
	return &Fault{"F03", field, fmt.Sprintf("there is no input %q", field), "known: " + strings.Join(known, ", "), known}
}

func missing(field, help string) *Fault {
	return &Fault{"F05", field, field + " is missing", help, nil}
}

func impossible(field, format string, args ...any) *Fault {
	return &Fault{"F06", field, fmt.Sprintf(format, args...), "correct one of the figures", nil}
}

func contradiction(field, format string, args ...any) *Fault {
	return &Fault{"F08", field, fmt.Sprintf(format, args...), "keep as many figures as the calculation needs", nil}
}
