package study

import (
	"sagcrest/config"
	"sagcrest/config/diag"
)

// Opened is a project with its survey, read and converted, before anything is
// computed.
type Opened struct {
	Doc     *config.Document
	Project *config.Project
	Ground  config.Ground
	Inputs  []config.Input
}

// Open reads the project file, picks the alternative ("base" or a name) and
// reads the survey. Problems of severity E mean that there is nothing to run.
func Open(files config.Files, path, alternative string) (*Opened, []diag.Problem) {
	doc, problems := config.Read(files, path)
	if doc == nil {
		return nil, problems
	}
	o, more := OpenDocument(files, doc, alternative)
	return o, append(problems, more...)
}

// OpenDocument picks an alternative of a document that is already read.
func OpenDocument(files config.Files, doc *config.Document, alternative string) (*Opened, []diag.Problem) {
	p, problems := doc.Project(alternative)
	if p == nil {
		return nil, problems
	}
	ground, more := config.LoadGround(files, p)
	problems = append(problems, more...)
	return &Opened{
		Doc: doc, Project: p, Ground: ground,
		Inputs: append([]config.Input{doc.Input()}, ground.Inputs...),
	}, problems
}
