package report_test

import (
	"context"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/cmd/sagcrest/internal/report"
	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config"
)

// files runs a project of testdata and returns its output folder by name.
func files(t *testing.T, alternative string, parts ...string) map[string]string {
	path := filepath.Join(append([]string{"..", "..", "..", "..", "testdata"}, parts...)...)
	opened, problems := study.Open(config.Disk(), filepath.Join(path, "road.toml"), alternative)
	require.Empty(t, problems)
	o, problems := study.Run(context.Background(), opened, nil)
	require.Empty(t, problems)
	made, err := report.Files(o, wire.Build(o))
	require.NoError(t, err)
	out := map[string]string{}
	for _, f := range made {
		out[f.Name] = string(f.Data)
	}
	return out
}

// The page tells bad news first and keeps the order in which a reviewer reads;
// tables repeat their heads and have a column to tick; every culvert has its
// working.
func TestPageOrder(t *testing.T) {
	page := files(t, "first draft", "roads", "quillmere")["report.html"]
	last := 0
	for _, id := range []string{"<h1>", "1 open error, 1 open warning", "D04 culvert", "NOT FOR CONSTRUCTION", `id="findings"`, `id="definitions"`,
		`id="inputs"`, `id="alignment"`, `id="grade-line"`, `id="sections"`, `id="earthwork"`, `id="drainage"`, `id="cost"`, `id="cautions"`} {
		at := strings.Index(page[last:], id)
		require.GreaterOrEqual(t, at, 0, id)
		last += at
	}
	assert.GreaterOrEqual(t, strings.Count(page, "NOT FOR CONSTRUCTION"), 10, "every sheet is marked")
	assert.Equal(t, 3, strings.Count(page, `class="working"`))
	for _, want := range []string{"D04", "NOT OK, short by 0.203 m", "max(OD/8, 0.300 m)", "AASHTO LRFD", "No superelevation is given", "bank", "compacted", "licensed engineer",
		"local levelling", "thead", `class="tick"`, "size: A3 landscape"} {
		assert.Contains(t, page, want)
	}
}

// A sound road is not marked, and says which checks had nothing to look at.
func TestSoundRoad(t *testing.T) {
	page := files(t, "base", "roads", "quillmere")["report.html"]
	assert.NotContains(t, page, "NOT FOR CONSTRUCTION")
	assert.Contains(t, page, "No check found anything.")
	page = files(t, "base", "roads", "volcano")["report.html"]
	assert.Contains(t, page, "nothing to look at")
	assert.Contains(t, page, "A09")
}

// What a finding withholds says so by its code, on paper and as an empty cell
// in the tables; everything else stands.
func TestWithheld(t *testing.T) {
	out := files(t, "base", "bad", "A06")
	assert.Contains(t, out["report.html"], "withheld: A06")
	assert.Contains(t, out["totals.csv"], "end")
	for line := range strings.Lines(out["totals.csv"]) {
		if strings.HasPrefix(line, "average end areas") {
			assert.Equal(t, "average end areas,,,,,paid\n", line)
		}
	}
	assert.NotContains(t, out["sections.csv"], "NaN")
}

// Every table of the page is a CSV beside it, with units in its head.
func TestTables(t *testing.T) {
	out := files(t, "base", "roads", "quillmere")
	for name, head := range map[string]string{
		"sections.csv": "station,station_distance [m],why,ground [m],finished [m],subgrade [m],cut [m2],fill [m2],strip_width [m]",
		"volumes.csv":  "from,from_distance [m],to,to_distance [m],distance [m],cut [m3 bank],fill [m3 compacted]",
		"mass.csv":     "station,station_distance [m],cut [m3 compacted]",
		"culverts.csv": "id,station,station_distance [m],skew,size,length [m]",
		"cost.csv":     "item,quantity,unit,rate,amount",
	} {
		assert.True(t, strings.HasPrefix(out[name], head), "%s: %s", name, strings.SplitN(out[name], "\n", 2)[0])
	}
}
