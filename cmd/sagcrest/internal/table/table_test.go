package table_test

import (
	"encoding/csv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

func sample() *table.Table {
	t := &table.Table{Name: "areas", Title: "Areas & volumes", Tick: true, Columns: []table.Column{
		{Key: "station", Title: "station", Kind: table.Station},
		{Key: "cut", SI: "m2", Title: "cut", Unit: "m²", Kind: table.Number},
		{Key: "note", Title: "note"}}}
	t.Add(table.At(wire.Place{Distance: 20, Station: "0+020.000"}), table.Figure(2.675, "2.68"), table.Words(`a "b", <c>`))
	t.Add(table.At(wire.Place{Distance: 40.5, Station: "0+040.500"}), table.None("withheld: A06"), table.Words(""))
	return t
}

// The CSV reads back as numbers and text, with the unit in the head and the
// distance beside the label; what is withheld is empty, never zero.
func TestCSVReadsBack(t *testing.T) {
	rows, err := csv.NewReader(strings.NewReader(string(sample().CSV()))).ReadAll()
	require.NoError(t, err)
	assert.Equal(t, [][]string{
		{"station", "station_distance [m]", "cut [m2]", "note"},
		{"0+020.000", "20", "2.675", `a "b", <c>`},
		{"0+040.500", "40.5", "", ""},
	}, rows)
}

// Paper shows rounded figures, says what is withheld, and escapes text.
func TestHTML(t *testing.T) {
	text := string(sample().HTML())
	for _, want := range []string{"<thead>", "2.68", "withheld: A06", "&lt;c&gt;", `class="tick"`, "Areas &amp; volumes"} {
		assert.Contains(t, text, want)
	}
	assert.NotContains(t, text, "2.675")
}

// A cell can be pointed at and point elsewhere; the CSV holds neither, and
// nothing that a project writes can leave its attribute.
func TestLinks(t *testing.T) {
	tab := &table.Table{Name: "places", Columns: []table.Column{{Key: "a", Title: "a"}, {Key: "b", Title: "b"}}}
	from, to := table.Words("0+020"), table.Words("D04")
	from.ID, to.Link = "section-1", `x"><script>`
	tab.Add(from, to)
	text := string(tab.HTML())
	assert.Contains(t, text, `<td id="section-1">0+020</td>`)
	assert.Contains(t, text, `<a href="#x&#34;&gt;&lt;script&gt;">D04</a>`)
	assert.Equal(t, "a,b\n0+020,D04\n", string(tab.CSV()))

	empty := table.Words("")
	empty.Link = "section-1"
	tab.Rows = nil
	tab.Add(from, empty)
	assert.NotContains(t, string(tab.HTML()), "<a ", "nothing to click on")
}

// Short tables stay whole on paper, long ones may be cut between their rows.
func TestShortTablesStayWhole(t *testing.T) {
	tab := &table.Table{Name: "long", Columns: []table.Column{{Key: "a", Title: "a"}}}
	for range 15 {
		tab.Add(table.Words("x"))
	}
	assert.Contains(t, string(tab.HTML()), `class="short"`)
	tab.Add(table.Words("x"))
	assert.NotContains(t, string(tab.HTML()), `class="short"`)
}

// A row that does not fit is a mistake of the program.
func TestRowsMustFit(t *testing.T) {
	assert.Panics(t, func() { sample().Add(table.Words("one")) })
}
