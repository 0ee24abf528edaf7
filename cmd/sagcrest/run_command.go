package main

import (
	"context"
	"fmt"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/report"
	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
)

// runCommand is the main job: everything computed, everything written.
func (a *app) runCommand() *cobra.Command {
	c := &cobra.Command{
		Use:   "run PROJECT",
		Short: "compute the road and write its report, tables and results",
		Example: `  sagcrest run testdata/roads/quillmere
  sagcrest run testdata/roads/quillmere --alternative "first draft"
  sagcrest run testdata/roads/quillmere --dry-run`,
		Args: exactly("PROJECT"),
		RunE: func(c *cobra.Command, args []string) error {
			return a.runProject(c.Context(), args[0])
		},
	}
	alternativeFlag(c.Flags())
	outputFlags(c.Flags())
	return c
}

func (a *app) runProject(ctx context.Context, arg string) error {
	p, err := a.find(arg)
	if err != nil {
		return err
	}
	opened, err := a.open(p, a.opt.Alternative)
	if err != nil {
		return err
	}
	// A folder that would be refused is refused before the work is done.
	dir := a.folderFor(p, opened.Project.Alternative)
	if _, err := planFolder(dir, ofRun(), nil, inputs(opened), a.opt.Force); err != nil {
		return err
	}
	o, err := a.compute(ctx, opened)
	if err != nil {
		return err
	}
	results := wire.Build(o)
	files, err := outputFiles(o, results)
	if err != nil {
		return err
	}
	done, aside, err := a.writeFolder(ctx, dir, ofRun(), files, inputs(opened))
	if err != nil {
		return err
	}
	if a.opt.JSON {
		if err := a.print(results); err != nil {
			return err
		}
	} else {
		a.tellRun(o, done, aside, arg)
	}
	return a.verdict(o)
}

// folderFor returns the folder to write: the one asked for, or the one that
// belongs to the alternative.
func (a *app) folderFor(p project, alternative string) string {
	if a.opt.Out != "" {
		return a.opt.Out
	}
	return outputFolder(p.path, alternative)
}

// outputFiles makes everything that stands in an output folder.
func outputFiles(o *study.Outcome, r *wire.Results) (out []outputFile, err error) {
	made, err := report.Files(o, r)
	if err != nil {
		return nil, faultError{fmt.Errorf("the report could not be made: %w", err)}
	}
	for _, f := range made {
		out = append(out, outputFile(f))
	}
	return out, nil
}

// writeFolder plans and, unless this is a dry run, writes an output folder.
func (a *app) writeFolder(ctx context.Context, dir string, ours mark, files []outputFile, inputs []string) (p *plan, aside string, err error) {
	if p, err = planFolder(dir, ours, files, inputs, a.opt.Force); err != nil || a.opt.DryRun {
		return p, "", err
	}
	aside, err = p.write(ctx)
	return p, aside, err
}
