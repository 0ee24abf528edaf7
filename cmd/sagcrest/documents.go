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

// ownDocument is a document of the command line itself.
type ownDocument struct {
	wire.Head
	Folder string         `json:"folder,omitempty"`
	DryRun *bool          `json:"dry_run,omitempty"`
	Files  []fileDocument `json:"files,omitempty"`
	Codes  []ruleDocument `json:"codes,omitempty"`
}

// fileDocument says what happens to a file.
type fileDocument struct {
	Path string `json:"path"`
	Fate string `json:"fate"`
}

// ruleDocument is a page of the catalogue of findings.
type ruleDocument struct {
	Code     string `json:"code"`
	Severity string `json:"severity"`
	Title    string `json:"title"`
	Message  string `json:"message"`
	Formula  string `json:"formula"`
	Source   string `json:"source"`
	Effect   string `json:"effect"`
	Mend     string `json:"mend"`
}

func ownHead(name string) wire.Head {
	return wire.Head{Schema: "sagcrest/" + name, SchemaVersion: wire.Version, Tool: wire.Tool{Name: "sagcrest", Version: wire.Release}}
}

// planDocument prints what happens to each file of a folder.
func (a *app) planDocument(name string, p *plan) error {
	d := ownDocument{Head: ownHead(name), Folder: p.dir, DryRun: &a.opt.DryRun}
	for _, s := range p.steps {
		d.Files = append(d.Files, fileDocument{s.name, s.fate})
	}
	return a.print(d)
}
