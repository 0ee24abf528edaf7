package main

import (
	"fmt"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/diag"
)

// print writes one document to standard output, in one go.
func (a *app) print(doc any) error {
	text, err := wire.Encode(doc)
	if err != nil {
		panic(err) // documents hold nothing that cannot be written
	}
	if _, err := a.out.Write(text); err != nil {
		return fileTrouble("standard output", reason(err), "")
	}
	return nil
}

// errorDocument tells programs what ended the run; it comes last, so that
// nobody can be told of a failure to write it.
func (a *app) errorDocument(problems []diag.Problem) {
	if err := a.print(wire.Failed(problems)); err != nil {
		fmt.Fprintln(a.errw, "sagcrest: the error document could not be written")
	}
}

func (a *app) checkDocument(o *study.Outcome) error { return a.print(wire.Check(o)) }

// planDocument prints what happens to each file of a folder.
func (a *app) planDocument(name string, p *plan) error {
	d := wire.NewDoc{Head: wire.HeadOf(name), Folder: p.dir, DryRun: a.opt.DryRun, Files: []wire.Fate{}}
	for _, s := range p.steps {
		d.Files = append(d.Files, wire.Fate{Path: s.name, Fate: s.fate})
	}
	return a.print(d)
}
