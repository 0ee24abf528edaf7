package points_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config/diag"
	"sagcrest/config/points"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

func lines(text string, labels station.Labels) ([]section.SurveyLine, []diag.Problem) {
	return points.ReadLines("s.csv", []byte(text), points.Options{Order: []string{"station", "offset", "elevation"}}, labels)
}

func TestSectionLines(t *testing.T) {
	const text = "station,offset,elevation\n1+020,-10,5\n1+020,0,5.5\n1+020,12.5,6\n40,-9,7\n40,9,8\n"
	got, problems := lines(text, station.Labels{Start: 1000})
	require.Empty(t, problems)
	assert.Equal(t, []section.SurveyLine{
		{At: 20, Points: []section.LinePoint{{Offset: -10, Z: 5}, {Offset: 0, Z: 5.5}, {Offset: 12.5, Z: 6}}},
		{At: 40, Points: []section.LinePoint{{Offset: -9, Z: 7}, {Offset: 9, Z: 8}}},
	}, got, "a label counts from the label of the start, a bare number from the start")
}

func TestSectionLinesInFeet(t *testing.T) {
	const foot = 0.3048
	o := points.Options{Order: strings.Split("code,elevation,station,-,offset", ","), Unit: foot}
	got, problems := points.ReadLines("s.csv", []byte("a,10,1+50.5,x,-20\nb,11,1+50.50,x,20\n"), o, station.Labels{Foot: foot})
	require.Empty(t, problems)
	require.Len(t, got, 1)
	assert.InDelta(t, 150.5*foot, float64(got[0].At), 1e-12)
	assert.InDelta(t, 20*foot, float64(got[0].Points[1].Offset), 1e-12)
	assert.InDelta(t, 10*foot, got[0].Points[0].Z, 1e-12)
}

func TestBlundersOfLines(t *testing.T) {
	for _, b := range []blunder{
		{"station goes back", "0+040,-1,5\n0+040,1,5\n0+020,-1,5\n0+020,1,5\n", "A01", 3, 1, "the line at 0+020.000 does not lie beyond the one before it, at 0+040.000"},
		{"line torn apart", "0+020,-1,5\n0+040,-1,5\n0+020,1,5\n", "A01", 3, 1, "0+020.000"},
		{"offset goes back", "0+020,-1,5\n0+020,3,5\n0+020,2,5\n", "Q12", 3, 7, "the offset 2.000 m does not lie to the right of the one before it, 3.000 m"},
		{"offset twice", "0+020,-1,5\n0+020,-1,5\n", "Q12", 2, 7, "-1.000 m"},
		{"two digits", "0+20,-1,5\n", "F06", 1, 1, "three digits"},
		{"station is text", "0+020,-1,5\nhere,-1,5\n", "F06", 2, 1, `the station "here" is not a number`},
		{"station far away", "999999999+000,-1,5\n", "F06", 1, 1, "outside"},
		{"station as a pair", "0+020,-1,5\n3-4,-1,5\n", "U14", 2, 1, `"3-4"`},
		{"station as a date", "0+020,-1,5\n03-Apr,-1,5\n", "U14", 2, 1, `"03-Apr"`},
		{"decimal comma in a station", "\"0+020,5\",-1,5\n", "U14", 1, 1, `"0+020,5"`},
		{"decimal commas", "0+020,5,-1,5,5,5\n", "U14", 1, 6, "decimal commas: 6 cells"},
		{"decimal commas beside whole stations", "0+020,-1,5,5,5\n", "U14", 1, 9, "decimal commas: 5 cells"},
		{"decimal commas and semicolons", "0+020;-1,5;5,5\n", "U14", 1, 9, "semicolons"},
		{"header of points", "station,northing,elevation\n0+020,-1,5\n", "F07", 1, 9, `"northing"`},
		{"no-data", "0+020,-1,5\n0+020,1,-9999\n", "U09", 2, 9, "-9999"},
		{"zero in a hill", "0+020,-1,50\n0+020,1,0\n0+020,2,51\n", "U09", 2, 9, "51.00 m from the nearest level, which stands on line 3"},
	} {
		t.Run(b.name, func(t *testing.T) {
			_, problems := lines(b.text, station.Labels{})
			require.Len(t, problems, 1)
			p := problems[0]
			assert.Equal(t, b.code, p.Code, "%v", p)
			assert.Equal(t, [2]int{b.line, b.column}, [2]int{p.Line, p.Column}, "%v", p)
			assert.Contains(t, p.Message, b.says)
			assert.NotEmpty(t, p.Help)
			assert.Equal(t, "survey.sections", p.Key)
		})
	}
}

func TestLinesOfOtherKinds(t *testing.T) {
	o := points.Options{Order: strings.Split("station,offset,elevation,kind", ",")}
	_, problems := points.ReadLines("s.csv", []byte("0+020,-1,5,wall\n"), o, station.Labels{})
	require.Len(t, problems, 1)
	assert.Equal(t, finding.Code("F09"), problems[0].Code)
}

// FuzzReadLines: no text makes the reader panic; lines come out in order.
func FuzzReadLines(f *testing.F) {
	f.Add("station,offset,elevation\n1+020,-10,5\n1+020,0,5.5\n40,-9,7\n")
	f.Add("0+020;-1,5;5,5\n\"0+020,5\",-1,5\n3-4,1e3,0\n")
	f.Add("0+020,-1,50\n0+020,1,0\n0+020,2,-9999\n0+010,0,0")
	f.Fuzz(func(t *testing.T, text string) {
		got, problems := lines(text, station.Labels{Start: 100})
		checkProblems(t, problems)
		before := station.Station(math.Inf(-1))
		for _, l := range got {
			if !(l.At > before) || len(l.Points) == 0 {
				t.Fatalf("line at %v after %v with %d points", l.At, before, len(l.Points))
			}
			before = l.At
			for i, p := range l.Points {
				if i > 0 && p.Offset <= l.Points[i-1].Offset || math.Abs(p.Z) > 1e8 {
					t.Fatalf("points %v", l.Points)
				}
			}
		}
	})
}
