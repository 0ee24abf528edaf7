package main

import (
	"context"
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config"
	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// compareCommand ranks roads on one basis.
func (a *app) compareCommand() *cobra.Command {
	c := &cobra.Command{
		Use:   "compare PROJECT | compare A B",
		Short: "rank every alternative of a project, or set two runs side by side",
		Long: `With one project: the base road and every alternative, on the same ground, in the
same units, at the same prices, best first. With two names: two runs (an output
folder or its results.json) or two projects, and every figure that differs.

Nothing is written unless --out DIR names a folder: it then holds compare.html,
with the grade lines drawn over each other, and compare.json. Exit code 1 says that the basis differs (Q21); findings of
a road stand in its counts.`,
		Example: `  sagcrest compare testdata/roads/quillmere
  sagcrest compare testdata/roads/quillmere --out comparison
  sagcrest compare testdata/roads/quillmere/out testdata/roads/quillmere/out-first-draft`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) == 2 {
				return nil
			}
			return exactly("PROJECT")(c, args)
		},
		RunE: func(c *cobra.Command, args []string) error {
			roads, basis, err := a.contenders(c.Context(), args)
			if err != nil {
				return err
			}
			doc := rank(roads, basis)
			done, aside, err := a.writeComparison(c.Context(), doc, roads)
			if err != nil {
				return err
			}
			if err := a.tellComparison(doc, roads, args); err != nil {
				return err
			}
			if done != nil && !a.opt.JSON {
				a.tellComparisonFolder(done, aside)
			}
			if len(doc.Findings) > 0 {
				return errFindings
			}
			return nil
		},
	}
	outputFlags(c.Flags())
	c.Flags().Lookup("out").Usage = "write compare.html and compare.json into `DIR`"
	return c
}

// contenders runs or reads what is compared, and says what is not common to
// all of it.
func (a *app) contenders(ctx context.Context, args []string) ([]contender, []wire.Finding, error) {
	if len(args) == 1 {
		return a.alternatives(ctx, args[0])
	}
	if realPath(args[0]) == realPath(args[1]) {
		return nil, nil, usagef("%s and %s are the same", args[0], args[1])
	}
	var sides []contender
	for _, arg := range args {
		c, err := a.side(ctx, arg)
		if err != nil {
			return nil, nil, err
		}
		c.name = filepath.ToSlash(filepath.Clean(arg))
		sides = append(sides, c)
	}
	return sides, basisOf(sides[0], sides[1]), nil
}

// alternatives runs the base road and every alternative of a project.
func (a *app) alternatives(ctx context.Context, arg string) ([]contender, []wire.Finding, error) {
	p, err := a.find(arg)
	if err != nil {
		return nil, nil, err
	}
	doc, problems := config.Read(p.files, p.path)
	if doc == nil || diag.Worst(problems) {
		return nil, nil, badInput(problems)
	}
	var roads []contender
	var basis []diag.Problem
	for _, name := range append([]string{"base"}, doc.Alternatives()...) {
		opened, problems := study.OpenDocument(p.files, doc, name)
		if opened == nil || diag.Worst(withoutBasis(problems)) {
			return nil, nil, badInput(problems)
		}
		basis = append(basis, onlyBasis(problems)...)
		o, err := a.compute(ctx, opened)
		if err != nil {
			return nil, nil, err
		}
		roads = append(roads, contender{name, wire.Build(o), o})
	}
	return roads, wire.Failed(basis).Findings, nil
}

// side is one of two things to compare: the results of an earlier run, or a
// project, whose base road is run.
func (a *app) side(ctx context.Context, arg string) (c contender, err error) {
	file := arg
	if info, err := os.Stat(arg); err == nil && info.IsDir() {
		file = filepath.Join(arg, resultsName)
	}
	if filepath.Base(file) == resultsName {
		if data, err := os.ReadFile(file); err == nil {
			c.results, err = readResults(file, data)
			return c, err
		}
	}
	p, err := a.find(arg)
	if err != nil {
		return c, err
	}
	opened, err := a.open(p, "base")
	if err != nil {
		return c, err
	}
	o, err := a.compute(ctx, opened)
	if err != nil {
		return c, err
	}
	return contender{results: wire.Build(o), outcome: o}, nil
}

// readResults reads the results of an earlier run. Keys that a later version
// added are left out, as the contract of the document asks.
func readResults(file string, data []byte) (*wire.Results, error) {
	r := &wire.Results{}
	refuse := func(code, message string) error {
		return badInput([]diag.Problem{{Code: finding.Code(code), Severity: 'E', File: file, Message: message,
			Help: "name an output folder of this program, or run the project again"}})
	}
	if err := json.Unmarshal(data, r); err != nil {
		return nil, refuse("F02", "the results cannot be read: "+err.Error())
	}
	if r.Schema != resultsSchema || r.SchemaVersion != wire.Version {
		return nil, refuse("F09", fmt.Sprintf("the document is %q, version %d; %s, version %d is read", r.Schema, r.SchemaVersion, resultsSchema, wire.Version))
	}
	return r, nil
}

func onlyBasis(problems []diag.Problem) (out []diag.Problem) {
	for _, p := range problems {
		if p.Code == "Q21" {
			out = append(out, p)
		}
	}
	return out
}
