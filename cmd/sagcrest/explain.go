package main

import (
	"fmt"
	"io"
	"strings"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/profile/finding"
)

// explainCommand prints the page of a code.
func (a *app) explainCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "explain CODE",
		Short: "what a finding means, its formula, its source, how to mend it",
		Example: `  sagcrest explain D04
  sagcrest explain cover
  sagcrest explain`,
		Long: "Prints the page of a code. A word instead of a code lists the codes whose title\nholds it; without either, every code is listed.",
		Args: cobra.MaximumNArgs(1),
		RunE: func(_ *cobra.Command, args []string) error {
			word := ""
			if len(args) == 1 {
				word = args[0]
			}
			found, whole, err := lookUp(study.Catalogue(), word)
			if err != nil {
				return err
			}
			return a.tellRules(found, whole)
		},
	}
}

// lookUp finds the page of a code, or every page whose title holds a word;
// whole says that it is the one that was asked for.
func lookUp(all []finding.Rule, word string) (found []finding.Rule, whole bool, err error) {
	for _, r := range all {
		if strings.EqualFold(string(r.Code), word) {
			return []finding.Rule{r}, true, nil
		}
		if strings.Contains(strings.ToLower(r.Title), strings.ToLower(word)) {
			found = append(found, r)
		}
	}
	if len(found) == 0 {
		return nil, false, unknownCode(all, word)
	}
	return found, false, nil
}

// unknownCode lists the codes of the same letter: with so few signs in a code,
// the nearest one would be a guess.
func unknownCode(all []finding.Rule, word string) error {
	var same []string
	for _, r := range all {
		if strings.EqualFold(string(r.Code[:1]), word[:1]) {
			same = append(same, string(r.Code))
		}
	}
	hint := "sagcrest explain lists every code"
	if len(same) > 0 {
		hint = "codes of this letter: " + strings.Join(same, ", ")
	}
	return &usageError{fmt.Sprintf("no page for %q", word), hint}
}

func (a *app) tellRules(rules []finding.Rule, whole bool) error {
	switch {
	case a.opt.JSON:
		return a.rulesDocument(rules)
	case a.opt.Plain || !whole:
		for _, r := range rules {
			between := "  "
			if a.opt.Plain {
				between = "\t"
			}
			fmt.Fprintln(a.out, strings.Join([]string{string(r.Code), r.Default.String(), r.Title}, between))
		}
		return nil
	}
	writePage(a.out, rules[0])
	return nil
}

// severityWords says what a severity does to a run.
func severityWords(s finding.Severity) string {
	switch s {
	case finding.Error:
		return "E, an error: it may withhold results, marks every sheet, and ends a run with 1 (with 3 where no geometry follows)"
	case finding.Warning:
		return "W, a warning: listed; it counts against a run under --strict; a project may accept it with a reason"
	}
	return "N, a note: it only informs"
}

// writePage prints one rule. Its message stands with "…" for each figure.
func writePage(w io.Writer, r finding.Rule) {
	fmt.Fprintf(w, "%s  %s\n\n", r.Code, r.Title)
	for _, row := range [][2]string{
		{"Severity", severityWords(r.Default)},
		{"Reads as", strings.ReplaceAll(r.Message, "%v", "…")},
		{"Found by", r.Formula},
		{"Source", r.Source},
		{"Effect", r.Effect},
		{"Mend", r.Mend},
	} {
		fmt.Fprintf(w, "%-10s%s\n", row[0], strings.Join(wrap(row[1], 78), "\n          "))
	}
}

// wrap breaks text at spaces into lines of at most width letters; a longer word
// has a line of its own.
func wrap(text string, width int) (lines []string) {
	line := ""
	for _, word := range strings.Fields(text) {
		if line != "" && len([]rune(line))+1+len([]rune(word)) > width {
			lines = append(lines, line)
			line = ""
		}
		if line != "" {
			line += " "
		}
		line += word
	}
	return append(lines, line)
}

// rulesDocument prints pages as JSON.
func (a *app) rulesDocument(rules []finding.Rule) error {
	d := wire.ExplainDoc{Head: wire.HeadOf("explain"), Codes: []wire.RulePage{}}
	for _, r := range rules {
		d.Codes = append(d.Codes, wire.RulePage{
			Code: string(r.Code), Severity: r.Default.String(), Title: r.Title, Message: strings.ReplaceAll(r.Message, "%v", "…"),
			Formula: r.Formula, Source: r.Source, Effect: r.Effect, Mend: r.Mend,
		})
	}
	return a.print(d)
}
