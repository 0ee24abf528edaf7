package diag

import (
	"fmt"

	"sagcrest/profile/finding"
)

// perCode is how many problems of one code a List keeps: enough to see the
// pattern, few enough to read.
const perCode = 10

// List gathers the problems of one file. The zero value is ready.
type List struct {
	kept  []Problem
	count map[finding.Code]int
}

// Full reports whether as many problems of a code are kept as will be, so that
// a reader need not put another one into words; it must Count it instead.
func (l *List) Full(code finding.Code) bool { return l.count[code] >= perCode }

// Count notes a problem of a code without keeping it.
func (l *List) Count(code finding.Code) {
	if l.count == nil {
		l.count = map[finding.Code]int{}
	}
	l.count[code]++
}

// Add appends a problem; beyond the first few of its code only the count
// grows.
func (l *List) Add(p Problem) {
	if !l.Full(p.Code) {
		l.kept = append(l.kept, p)
	}
	l.Count(p.Code)
}

// Any reports whether there is a problem.
func (l *List) Any() bool { return len(l.kept) > 0 }

// Problems returns what was kept, in the order it was added, with a closing
// line for every code that had more.
func (l *List) Problems() []Problem {
	out := append([]Problem(nil), l.kept...)
	seen := map[finding.Code]bool{}
	for _, p := range l.kept {
		if more := l.count[p.Code] - perCode; more > 0 && !seen[p.Code] {
			seen[p.Code] = true
			out = append(out, Problem{
				Code: p.Code, Severity: p.Severity, File: p.File, Key: p.Key,
				Message: fmt.Sprintf("and %d more of the same", more),
			})
		}
	}
	return out
}
