package report

import (
	"bytes"
	"embed"
	"html/template"

	"sagcrest/cmd/sagcrest/internal/wire"
)

//go:embed page.tmpl page.css
var assets embed.FS

// figureOf is a drawing with the words under it.
type figureOf struct {
	Title string
	SVG   template.HTML
	Note  string
}

// chapter is one part of the page: words, tables, drawings.
type chapter struct {
	ID, Title string
	Words     []string
	Tables    []template.HTML
	Figures   []figureOf
	Workings  []working
}

// pageData is what the template shows.
type pageData struct {
	Title, Alternative, Revision, Date, Originator, Checker string
	Tool                                                    wire.Tool
	Inputs                                                  []wire.Input
	Open                                                    string
	Errors                                                  []string // the open errors, in words
	Mark                                                    string   // set on every sheet while errors are open
	Style                                                   template.CSS
	Chapters                                                []chapter
}

// page writes report.html.
func (s *sheets) page() ([]byte, error) {
	t, err := template.ParseFS(assets, "page.tmpl")
	if err != nil {
		return nil, err
	}
	css, err := assets.ReadFile("page.css")
	if err != nil {
		return nil, err
	}
	p := s.o.Project
	d := pageData{Title: p.Title, Alternative: p.Alternative, Revision: p.Revision, Date: p.Date, Originator: p.Originator, Checker: p.Checker,
		Tool: s.r.Tool, Inputs: s.r.Inputs, Open: s.openWords(), Errors: s.openErrors(), Style: template.CSS(css)}
	if d.Title == "" {
		d.Title = "Road without a title"
	}
	if n := s.o.Errors(); n > 0 {
		d.Mark = "NOT FOR CONSTRUCTION – " + s.openWords()
	}
	if d.Chapters, err = s.chapters(); err != nil {
		return nil, err
	}
	var b bytes.Buffer
	if err := t.Execute(&b, d); err != nil {
		return nil, err
	}
	return b.Bytes(), nil
}
