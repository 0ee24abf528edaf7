package table

import (
	"html/template"
	"strings"
)

// HTML writes the table for paper: a caption, a head that repeats on every
// page, numbers set right, and a column for the checker's tick if wanted.
func (t *Table) HTML() template.HTML {
	var b strings.Builder
	esc := template.HTMLEscapeString
	b.WriteString(`<table id="t-` + esc(t.Name) + `"` + t.class() + `><caption>` + esc(t.Title) + "</caption>\n<thead><tr>")
	for _, c := range t.Columns {
		b.WriteString(`<th scope="col"` + c.class() + `>` + esc(c.Title))
		if c.Unit != "" {
			b.WriteString(`<br><span class="unit">` + esc(c.Unit) + `</span>`)
		}
		b.WriteString("</th>")
	}
	if t.Tick {
		b.WriteString(`<th scope="col" class="tick">checked</th>`)
	}
	b.WriteString("</tr></thead>\n<tbody>\n")
	for _, r := range t.Rows {
		b.WriteString("<tr>")
		for i, cell := range r {
			b.WriteString("<td" + cell.anchor() + t.Columns[i].class() + ">" + cell.html() + "</td>")
		}
		if t.Tick {
			b.WriteString(`<td class="tick"></td>`)
		}
		b.WriteString("</tr>\n")
	}
	b.WriteString("</tbody></table>\n")
	if t.Note != "" {
		b.WriteString(`<p class="note">` + esc(t.Note) + "</p>\n")
	}
	return template.HTML(b.String())
}

// fewRows is how many rows a table has at most to be kept on one sheet of paper:
// more do not fit below a heading on the smallest page, A4 landscape.
const fewRows = 15

// class marks a table that paper must not cut, which would leave its caption
// alone at the foot of a page.
func (t *Table) class() string {
	if len(t.Rows) > fewRows {
		return ""
	}
	return ` class="short"`
}

// html writes what a reader sees in a cell; a cell without words is no link.
func (c Cell) html() string {
	text := template.HTMLEscapeString(c.Paper)
	if c.Strong {
		text = "<strong>" + text + "</strong>"
	}
	if c.Link != "" && c.Paper != "" {
		text = `<a href="#` + template.HTMLEscapeString(c.Link) + `">` + text + "</a>"
	}
	return text
}

func (c Cell) anchor() string {
	if c.ID == "" {
		return ""
	}
	return ` id="` + template.HTMLEscapeString(c.ID) + `"`
}

func (c Column) class() string {
	if c.Kind == Number {
		return ` class="n"`
	}
	return ""
}
