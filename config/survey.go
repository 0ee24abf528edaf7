package config

import (
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/section/terrain"
)

// The one ground. Four kinds exist; point clouds are known by name and refused
// until they can be read.
type fileSurvey struct {
	Points        string        `json:"points" jsonschema_description:"path of a points file, relative to the project file"`
	Sections      string        `json:"sections" jsonschema_description:"path of surveyed section lines"`
	Grid          string        `json:"grid" jsonschema_description:"path of a grid: plain ASCII grid or GeoTIFF"`
	Order         string        `json:"order" jsonschema_description:"columns of points and sections, such as id,northing,easting,elevation; - skips one"`
	Units         string        `json:"units" jsonschema:"enum=metric,enum=international feet,enum=us survey feet,enum=ft" jsonschema_description:"of the numbers in the survey file; absent: the project's"`
	VerticalDatum string        `json:"vertical_datum" jsonschema_description:"any text that names the vertical datum"`
	CRS           string        `json:"crs" jsonschema_description:"any text that names the coordinate system"`
	Accuracy      *fileAccuracy `json:"accuracy" jsonschema_description:"of the survey, one standard deviation each"`
}

// How good the survey is, kept for the error bars of volumes. It has no effect
// yet but must be sound: a wrong figure would be believed later.
type fileAccuracy struct {
	Independent length `json:"independent" range:"[0,100]" jsonschema_description:"error of each point on its own"`
	Correlated  length `json:"correlated" range:"[0,100]" jsonschema_description:"error shared by points closer than range"`
	Range       length `json:"range" range:"(0,1000000]" jsonschema_description:"distance over which errors are shared"`
	Bias        length `json:"bias" range:"[0,100]" jsonschema_description:"error shared by all points"`
}

// survey names the one ground. What its numbers mean is never guessed: order
// and vertical datum have no default.
func (r *reading) survey(f *fileSurvey) Survey {
	if f == nil && !r.has("survey") { // its absence is complained of already
		return Survey{}
	}
	if f == nil { // an empty table
		f = &fileSurvey{}
	}
	s := Survey{VerticalDatum: f.VerticalDatum, CRS: f.CRS, Units: r.units}
	if units, ok := quantity.ParseSystem(f.Units); ok {
		s.Units = units
	}
	r.surveyFile(f, &s)
	if strings.TrimSpace(f.VerticalDatum) == "" {
		r.complain("U04", "survey.vertical_datum", "the survey names no vertical datum",
			`add vertical_datum = "…" to [survey]; any text that the surveyor would recognise`)
	}
	for _, column := range strings.Split(f.Order, ",") {
		if column = strings.TrimSpace(column); column != "" {
			s.Order = append(s.Order, column)
		}
	}
	switch {
	case s.Kind == SurveyGrid && f.Order != "":
		r.complain("F08", "survey.order", "a grid has no columns, yet survey.order names some", "leave order out")
	case (s.Kind == SurveyPoints || s.Kind == SurveySections) && len(s.Order) == 0:
		r.complain("F05", "survey.order", "survey.order is missing: columns are never guessed", `such as order = "`+exampleOrder(s.Kind)+`"`)
	}
	if a := f.Accuracy; a != nil {
		s.Accuracy = terrain.Accuracy{
			Independent: a.Independent.or(0), Correlated: a.Correlated.or(0),
			Range: a.Range.or(0), Bias: a.Bias.or(0),
		}
		if a.Correlated.or(0) > 0 && !r.has("survey.accuracy.range") {
			r.complain("F05", "survey.accuracy.range", "survey.accuracy.range is missing", "say over which distance the correlated error is shared")
		}
	}
	return s
}

// surveyFile chooses the file; two grounds contradict each other.
func (r *reading) surveyFile(f *fileSurvey, s *Survey) {
	files := []struct {
		kind SurveyKind
		path string
	}{{SurveyPoints, f.Points}, {SurveyGrid, f.Grid}, {SurveySections, f.Sections}}
	for _, file := range files {
		key := "survey." + string(file.kind)
		switch {
		case !r.has(key):
		case s.Kind != "":
			r.complain("F08", key, "there are two grounds: survey."+string(s.Kind)+" and "+key, "keep one")
		case file.path == "":
			s.Kind = file.kind
			r.complain("F05", key, key+" is empty", "write the path of the file")
		default:
			s.Kind, s.Path = file.kind, file.path
		}
	}
	if s.Kind == "" && !r.has("survey.lidar") {
		r.complain("F05", "survey", "the survey names no ground", "give one of points, grid or sections")
	}
}

// exampleOrder shows an order that fits the kind of survey.
func exampleOrder(kind SurveyKind) string {
	if kind == SurveySections {
		return "station,offset,elevation"
	}
	return "id,northing,easting,elevation"
}
