package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/config/diag"
)

// checkCommand reads a project, runs every check and writes nothing.
func (a *app) checkCommand() *cobra.Command {
	c := &cobra.Command{
		Use:   "check PROJECT",
		Short: "read and validate everything, run every check, write nothing",
		Example: `  sagcrest check testdata/roads/quillmere
  sagcrest check testdata/roads/quillmere --alternative "first draft"
  sagcrest check testdata/roads/quillmere --json`,
		Args: exactly("PROJECT"),
		RunE: func(c *cobra.Command, args []string) error {
			o, err := a.outcomeOf(c, args[0])
			if err != nil {
				return err
			}
			if err := a.tellCheck(o, args[0]); err != nil {
				return err
			}
			return a.verdict(o)
		},
	}
	alternativeFlag(c.Flags())
	return c
}

// outcomeOf reads a project and runs its chosen alternative.
func (a *app) outcomeOf(c *cobra.Command, arg string) (*study.Outcome, error) {
	p, err := a.find(arg)
	if err != nil {
		return nil, err
	}
	o, err := a.open(p, a.opt.Alternative)
	if err != nil {
		return nil, err
	}
	return a.compute(c.Context(), o)
}

// verdict turns the findings that nobody accepted into the exit code.
func (a *app) verdict(o *study.Outcome) error {
	tooMany := a.opt.MaxWarnings >= 0 && o.Warnings() > a.opt.MaxWarnings
	if o.Errors() > 0 || a.opt.Strict && o.Warnings() > 0 || tooMany {
		return errFindings
	}
	return nil
}

func (a *app) tellCheck(o *study.Outcome, arg string) error {
	if a.opt.JSON {
		return a.checkDocument(o)
	}
	a.tellProblems(a.out, problemsOf(o))
	if a.opt.Plain {
		fmt.Fprintf(a.out, "counts\t%d\t%d\t%d\n", o.Errors(), o.Warnings(), notes(o))
		return nil
	}
	a.tellAccepted(o)
	if a.opt.Quiet {
		return nil
	}
	fmt.Fprintf(a.out, "%s, %s: %s\n", o.Project.Title, roadName(o.Project.Alternative), countWords(o))
	if len(o.Silent) > 0 {
		var codes []string
		for _, c := range o.Silent {
			codes = append(codes, string(c))
		}
		fmt.Fprintf(a.out, "nothing to look at for: %s\n", strings.Join(codes, ", "))
	}
	if o.Errors() > 0 {
		a.next("sagcrest explain " + worst(o))
	} else {
		a.next("sagcrest run " + quoted(arg) + alternativeWords(o.Project.Alternative))
	}
	return nil
}

// problemsOf returns what is open: findings that nobody accepted, gravest
// first.
func problemsOf(o *study.Outcome) (out []diag.Problem) {
	for i, f := range o.Findings {
		if o.Accepted[i] == nil {
			out = append(out, o.Problem(f))
		}
	}
	return out
}

// tellAccepted names who answers for what, and the acceptances that no finding
// needs any more.
func (a *app) tellAccepted(o *study.Outcome) {
	for i, f := range o.Findings {
		if by := o.Accepted[i]; by != nil {
			fmt.Fprintf(a.out, "accepted by %s on %s: %s %s %s\n   reason: %s\n",
				by.By, by.Date, f.Severity, f.Code, o.Message(f), by.Reason)
		}
	}
	for _, idle := range o.Idle() {
		fmt.Fprintf(a.out, "no finding needs the acceptance of %s at %s: mended, or its figure has changed\n", idle.Code, idle.At)
	}
}

func notes(o *study.Outcome) (n int) {
	for i, f := range o.Findings {
		if f.Severity == 'N' && o.Accepted[i] == nil {
			n++
		}
	}
	return n
}

// countWords says how many findings of each severity are open.
func countWords(o *study.Outcome) string {
	count := func(n int, one, many string) string {
		if n == 1 {
			return "1 " + one
		}
		return fmt.Sprintf("%d %s", n, many)
	}
	return strings.Join([]string{
		count(o.Errors(), "error", "errors"),
		count(o.Warnings(), "warning", "warnings"),
		count(notes(o), "note", "notes"),
	}, ", ")
}

// roadName calls the base road and an alternative by their names.
func roadName(alternative string) string {
	if alternative == "base" {
		return "base road"
	}
	return fmt.Sprintf("alternative %q", alternative)
}

// alternativeWords returns the option that chooses an alternative again.
func alternativeWords(alternative string) string {
	if alternative == "base" {
		return ""
	}
	return " --alternative " + quoted(alternative)
}
