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
	b.WriteString(`<table id="t-` + esc(t.Name) + `"><caption>` + esc(t.Title) + "</caption>\n<thead><tr>")
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
			text := esc(cell.Paper)
			if cell.Strong {
				text = "<strong>" + text + "</strong>"
			}
			b.WriteString("<td" + t.Columns[i].class() + ">" + text + "</td>")
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

func (c Column) class() string {
	if c.Kind == Number {
		return ` class="n"`
	}
	return ""
}
