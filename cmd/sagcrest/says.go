package main

import (
	"fmt"
	"io"
	"strings"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// mostOfACode is how many findings of one code a summary prints before the
// rest is only counted.
const mostOfACode = 5

// fewOfEach keeps the first findings of every code and says how many more
// there are.
func fewOfEach(problems []diag.Problem) (out []diag.Problem) {
	total, told := map[finding.Code]int{}, map[finding.Code]int{}
	for _, p := range problems {
		total[p.Code]++
	}
	for _, p := range problems {
		told[p.Code]++
		switch more := total[p.Code] - mostOfACode; {
		case told[p.Code] <= mostOfACode:
			out = append(out, p)
		case told[p.Code] == mostOfACode+1:
			out = append(out, diag.Problem{Code: p.Code, Severity: p.Severity,
				Message: fmt.Sprintf("and %d more of the same; sagcrest check lists all", more)})
		}
	}
	return out
}

// tellProblems prints located problems, one record each or with their place,
// raw line and mend.
func (a *app) tellProblems(w io.Writer, problems []diag.Problem) {
	for _, p := range problems {
		if a.opt.Plain {
			fmt.Fprintln(w, plainProblem(p))
		} else {
			fmt.Fprintln(w, a.paint(p))
		}
	}
}

// paint prints a problem with its severity and code in bold where a person
// watches.
func (a *app) paint(p diag.Problem) string {
	text := p.String()
	mark := fmt.Sprintf("%s %s", p.Severity, p.Code)
	if !a.bold() {
		return text
	}
	return strings.Replace(text, mark, "\x1b[1m"+mark+"\x1b[0m", 1)
}

// bold reports whether letters may be set in bold: only on a terminal that can,
// and only where nobody asked for plain letters.
func (a *app) bold() bool {
	return a.env.OutTerminal && a.env.ErrTerminal && !a.opt.NoColor &&
		a.env.Var("NO_COLOR") == "" && a.env.Var("TERM") != "dumb"
}

// plainProblem is one line: kind, severity, code, file, line, column, id,
// message, help. Empty fields stay, so that the columns never move.
func plainProblem(p diag.Problem) string {
	place := func(n int) string {
		if n == 0 {
			return ""
		}
		return fmt.Sprint(n)
	}
	fields := []string{"finding", p.Severity.String(), string(p.Code), p.File,
		place(p.Line), place(p.Column), p.ID, p.Message, p.Help}
	for i, f := range fields {
		fields[i] = strings.Join(strings.Fields(f), " ")
	}
	return strings.Join(fields, "\t")
}

// refuse tells why nothing was written: for people on errw, with --json also
// as the error document on stdout.
func (a *app) refuse(r *refusal) int {
	a.tellProblems(a.errw, r.problems)
	if a.asked {
		a.errorDocument(r.problems)
		return r.code
	}
	if len(r.problems) > 0 && !a.opt.Quiet && !a.opt.Plain {
		fmt.Fprintf(a.errw, "nothing was written; more about a code: sagcrest explain %s\n", r.problems[0].Code)
	}
	return r.code
}

// next suggests the command that people mostly want after this one.
func (a *app) next(command string) {
	if !a.opt.Quiet && !a.opt.Plain && !a.opt.JSON {
		fmt.Fprintln(a.out, "\nnext: "+command)
	}
}
