package config_test

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config"
	"sagcrest/config/diag"
	"sagcrest/profile/finding"
	"sagcrest/section/terrain"
)

// ground reads the full project with an edited survey table and one survey file.
func ground(t *testing.T, survey, path, content string) (config.Ground, []diag.Problem) {
	t.Helper()
	text := fullText(t)
	from, to := strings.Index(text, "[survey]"), strings.Index(text, "[alignment]")
	text = text[:from] + "[survey]\nvertical_datum = \"local\"\n" + survey + "\n" + text[to:]
	files := memory(map[string]string{"roads/a/road.toml": text, path: content})
	d, problems := config.Read(files, "roads/a/road.toml")
	require.Empty(t, problems)
	p, problems := d.Project("base")
	require.Empty(t, problems)
	return config.LoadGround(files, p)
}

const threePoints = "1,0,0,10\n2,100,0,11\n3,0,100,12\n"

func TestPointsAreReadBesideTheProject(t *testing.T) {
	g, problems := ground(t, "points = \"../b/p.csv\"\norder = \"id, northing,easting,elevation\"", "roads/b/p.csv", threePoints)
	require.Empty(t, problems)
	require.Len(t, g.Points, 3)
	assert.Equal(t, terrain.Point{E: 0, N: 100, Z: 11, Row: 2}, g.Points[1])
	require.Len(t, g.Inputs, 1)
	assert.Equal(t, "../b/p.csv", g.Inputs[0].Path, "as the project writes it")
	assert.Equal(t, len(threePoints), g.Inputs[0].Bytes)
}

func TestSurveyInItsOwnUnits(t *testing.T) {
	g, problems := ground(t, "points = \"p.csv\"\nunits = \"international feet\"\norder = \"id,northing,easting,elevation\"", "roads/a/p.csv", threePoints)
	require.Empty(t, problems)
	assert.InDelta(t, 11*0.3048, g.Points[1].Z, 1e-12)
}

func TestSectionLinesUseTheLabelsOfTheProject(t *testing.T) {
	g, problems := ground(t, "sections = \"s.csv\"\norder = \"station,offset,elevation\"", "roads/a/s.csv",
		"0+100,-10,5\n0+100,10,6\n0+200,-10,7\n0+200,10,8\n")
	require.Empty(t, problems)
	require.Len(t, g.Lines, 2)
	assert.EqualValues(t, 0, g.Lines[0].At, "labels start at 0+100")
	assert.EqualValues(t, 100, g.Lines[1].At)
}

func TestGridIsReadWithWhatItSaysOfItself(t *testing.T) {
	const asc = "ncols 2\nnrows 2\nxllcorner 0\nyllcorner 0\ncellsize 10\nNODATA_value -9999\n5 6\n7 8\n"
	g, problems := ground(t, "grid = \"g.asc\"", "roads/a/g.asc", asc)
	require.Empty(t, problems)
	require.NotNil(t, g.Raster)
	assert.Equal(t, 2, g.Raster.Cols)
	assert.Equal(t, []float64{5, 6, 7, 8}, g.Raster.Z)
	assert.Same(t, &g.Grid.Levels, g.Raster)
	assert.Equal(t, "ASCII grid", g.Grid.Format)

	_, problems = ground(t, "grid = \"g.asc\"\nunits = \"ft\"", "roads/a/g.asc", strings.Replace(asc, "xllcorner 0", "xllcorner 500000", 1))
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("U01"), problems[0].Code)
}

func TestMissingSurveyPointsAtItsKey(t *testing.T) {
	g, problems := ground(t, "points = \"gone.csv\"\norder = \"id,northing,easting,elevation\"", "roads/a/p.csv", "")
	assert.Empty(t, g.Inputs)
	require.Len(t, problems, 1)
	p := problems[0]
	assert.Equal(t, finding.Code("F01"), p.Code)
	assert.Equal(t, "survey.points", p.Key)
	assert.Equal(t, "roads/a/road.toml", p.File)
	assert.Equal(t, `points = "gone.csv"`, p.Excerpt)
}

func TestFaultsOfTheSurveyStandInItsFile(t *testing.T) {
	_, problems := ground(t, "points = \"p.csv\"\norder = \"id,northing,easting,elevation\"", "roads/a/p.csv", "1,0,0,10\n2,x,0,11\n")
	require.NotEmpty(t, problems)
	assert.Equal(t, "roads/a/p.csv", problems[0].File)
	assert.Equal(t, 2, problems[0].Line)
}

func TestWhichFootOfASurvey(t *testing.T) {
	survey := "points = \"p.csv\"\nunits = \"ft\"\norder = \"id,northing,easting,elevation\""
	_, problems := ground(t, survey, "roads/a/p.csv", threePoints)
	assert.Empty(t, problems, "a local grid")
	_, problems = ground(t, survey, "roads/a/p.csv", strings.Replace(threePoints, "100,0,11", "100001,0,11", 1))
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("U01"), problems[0].Code)
	assert.Equal(t, `units = "ft"`, problems[0].Excerpt)
}
