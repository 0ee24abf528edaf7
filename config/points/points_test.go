package points_test

import (
	"fmt"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/config/diag"
	"sagcrest/config/points"
	"sagcrest/profile/finding"
	"sagcrest/section/terrain"
)

// read reads points in the usual order of columns.
func read(text string) ([]terrain.Point, []diag.Problem) {
	return points.Read("p.csv", []byte(text), points.Options{Order: strings.Split("id,northing,easting,elevation", ",")})
}

func TestPointsInAnyOrder(t *testing.T) {
	want := []terrain.Point{{E: 200, N: 100, Z: 50.5, Row: 1}, {E: 210, N: 110, Z: -3, Row: 2}}
	for _, c := range []struct{ order, text string }{
		{"id,northing,easting,elevation", "a,100,200,50.5\nb,110,210,-3\n"},
		{"easting,northing,elevation", "200,100,50.5\n210,110,-3\n"},
		{"-,elevation,code,northing,-,easting", "x,50.5,wall,100,y,200\nx,-3,,110,y,210\n"},
		{"seq,line,kind,id,northing,easting,elevation", "1,,point,a,100,200,50.5\n2,L,POINT,b,110,210,-3"},
		{"id,northing,easting,elevation", " a ,\t100, 200 ,+50.5\r\n\"b, c\",\"110\",210 ,-3.\r\n"},
		{"id,northing,easting,elevation", "a,1.000000e+02,2.000E+2,50.5\nb,110,210,-.3e1"},
	} {
		got, problems := points.Read("p.csv", []byte(c.text), points.Options{Order: strings.Split(c.order, ",")})
		require.Empty(t, problems, c.text)
		assert.Equal(t, want, got, c.text)
	}
}

func TestWhatIsPassedOver(t *testing.T) {
	got, problems := read("# made by hand\n\nPoint,N,E,Elev\n  # a remark\n1,2,3,4\n\n,,,\n5,6,7,8")
	require.Empty(t, problems)
	assert.Equal(t, []terrain.Point{{E: 3, N: 2, Z: 4, Row: 5}, {E: 7, N: 6, Z: 8, Row: 8}}, got)
}

// blunder is a file and the first complaint it must raise.
type blunder struct {
	name, text   string
	code         finding.Code
	line, column int
	says         string
}

func blunders() []blunder {
	const head = "id,northing,easting,elevation\n"
	return []blunder{
		// F02: no text, or nothing in it.
		{"empty", "", "F02", 0, 0, "no rows"},
		{"remarks only", "# nothing\n\n", "F02", 0, 0, "no rows"},
		{"header only", head, "F02", 0, 0, "a header and no rows"},
		{"zero byte", "1,2,3,4\n1,\x002,3,4\n", "F02", 2, 3, "no text"},
		{"other code page", "1,2,3,4\nB\xf6,2,3,4\n", "F02", 2, 2, "no text"},
		{"long line", "1,2,3,4\n" + strings.Repeat("5", 5000), "F02", 2, 0, "longer than 4096"},
		{"open quote", "1,2,3,4\n\"5,6,7,8\n", "F02", 2, 1, "does not close"},
		{"quote within", "1,2,3,4\n5,\"6\"x,7,8\n", "F02", 2, 3, "does not close"},
		// F06: numbers.
		{"no number", "1,2,3,4\n5,6,x,8\n", "F06", 2, 5, `the easting "x" is not a number`},
		{"not a number", "1,2,3,4\n5,6,7,NaN\n", "F06", 2, 7, `"NaN"`},
		{"not a number in the first row", "1,2,3,nan\n", "F06", 1, 7, `"nan"`},
		{"infinite", "1,2,3,4\n5,6,-Inf,8\n", "F06", 2, 5, `"-Inf"`},
		{"hexadecimal", "1,2,3,4\n5,0x1p3,7,8\n", "F06", 2, 3, `"0x1p3"`},
		{"thousands parted", "1,2,3,4\n5,5 455 500,7,8\n", "F06", 2, 3, "5 455 500"},
		{"empty cell", "1,2,3,4\n5,6,,8\n", "F06", 2, 5, "the easting is empty"},
		{"empty first elevation", "1,2,3,\n", "F06", 1, 7, "the elevation is empty"},
		{"beyond the earth", "1,2,3,4\n5,600000000,7,8\n", "F06", 2, 3, "outside"},
		// F07: columns.
		{"header in another order", "id,easting,northing,elevation\n1,2,3,4\n", "F07", 1, 4, `the header has "easting", "northing" where survey.order says northing, easting`},
		{"short header in another order", "P,E,N,Z\n1,2,3,4\n", "F07", 1, 3, `"E", "N"`},
		{"header with more columns", "id,northing,easting,elevation,code\n1,2,3,4,5\n", "F07", 1, 0, "5 columns"},
		{"first elevation is text", "1,2,3,wall\n5,6,7,8\n", "F07", 1, 7, `"wall" of the first row is no number`},
		{"too few columns", "1,2,3,4\n5,6,7\n", "F07", 2, 0, "3 columns, expected 4: id,northing,easting,elevation"},
		{"too many columns", "1,2,3,4\n5,6.5,7,8,9\n", "F07", 2, 11, "5 columns, expected 4"},
		{"semicolons", head + "1;2.5;3.5;4.5\n", "F07", 2, 2, "parted by semicolons"},
		{"tabs", "1\t2.5\t3.5\t4.5\n", "F07", 1, 2, "parted by tabs"},
		{"blanks", "1,2,3,4\n1 2.5 3.5 4.5\n", "F07", 2, 1, "parted by blanks"},
		// U07, U09.
		{"one id, two places", "a,2,3,4\nb,2,3,4\na,2,3.001,4\n", "U07", 3, 1, "here and at N 2.000 E 3.000 level 4.000 m on line 1"},
		{"one id, two levels", "a,2,3,4\na,2,3,4.01\n", "U07", 2, 1, `id "a"`},
		{"no-data", "1,2,3,4\n5,6,7,-9999.00\n", "U09", 2, 7, "-9999.00 stands for nothing known"},
		{"zero in a hill", "1,0,0,105\n2,0,5,0.00\n3,0,9,1\n4,0,0.1,5\n5,0,4.9,5.01\n", "U09", 2, 7, "differs by 5.01 m from the nearest level, which stands on line 5; limit 5 m"},
		// U14.
		{"byte order mark", "\ufeff1,2,3,4\n", "U14", 1, 1, "byte order mark"},
		{"two-byte text", "\xff\xfe1\x00,\x00", "U14", 1, 1, "UTF-16"},
		{"decimal commas and semicolons", "1;2,5;3,5;4,5\n", "U14", 1, 4, `"2,5", and columns parted by semicolons`},
		{"decimal commas, semicolons and a header", "id;northing;easting;elevation\n1;2,5;3,5;4,5\n", "U14", 2, 4, "semicolons"},
		{"decimal commas and tabs", "1\t2,5\t3\t4\n", "U14", 1, 4, "tabs"},
		{"decimal commas in quotes", "1,\"2,5\",3,4\n", "U14", 1, 3, `decimal comma in the northing "2,5"`},
		{"decimal commas in quotes and semicolons", "\"1\";\"2,5\";\"3\";\"4\"\n", "U14", 1, 7, `"2,5"`},
		{"decimal commas alone", "1,2,5,3,5,4,5\n", "U14", 1, 4, "decimal commas: 7 cells"},
		{"date for a level", "1,2,3,4\n5,6,7,04-Mar\n", "U14", 2, 7, `"04-Mar"`},
		{"pair for a level", "1,2,3,4\n5,6,7,3-4\n", "U14", 2, 7, `"3-4"`},
		{"id for a number", "1,2,3,4\n5,950E2862,7,8\n", "U14", 2, 3, `"950E2862"`},
		{"digits cut off", "1,2,3,4\n5,5.46E+06,7,8\n", "U14", 2, 3, `"5.46E+06"`},
		{"date for an id", "1,2,3,4\nMar-04,6,7,8\n", "U14", 2, 1, `the id "Mar-04"`},
		{"number for an id", "1,2,3,4\n9.5E+286,6,7,8\n", "U14", 2, 1, `the id "9.5E+286"`},
	}
}

func TestBlunders(t *testing.T) {
	for _, b := range blunders() {
		t.Run(b.name, func(t *testing.T) {
			_, problems := read(b.text)
			require.NotEmpty(t, problems)
			p := problems[0]
			assert.Equal(t, b.code, p.Code, "%v", p)
			assert.Equal(t, [2]int{b.line, b.column}, [2]int{p.Line, p.Column}, "%v", p)
			assert.Contains(t, p.Message, b.says)
			assert.Equal(t, "p.csv", p.File)
			assert.Equal(t, finding.Error, p.Severity)
			assert.NotEmpty(t, p.Help)
			for _, more := range problems {
				assert.Equal(t, b.code, more.Code, "one fault, one code: %v", more)
			}
		})
	}
}

// Near misses of the blunders.
func TestSoundFiles(t *testing.T) {
	for name, text := range map[string]string{
		"a point told twice":       "a,2,3,4\na,2,3,4\n",
		"ids that differ in form":  "1,2,3,4\n01,6,7,8\n",
		"no ids":                   ",2,3,4\n,6,7,8\n",
		"ids with a dash":          "3-4,2,3,4\n950E2862,6,7,8\n2-Mary,9,9,9\n",
		"zero on a coast":          "1,0,0,5\n2,0,1,0.00\n3,0,9,100\n",
		"zeros alone":              "1,0,0,0\n2,0,1,0\n",
		"a neighbour as near":      "1,0,0,100\n2,0,1,0\n3,0,2,4\n",
		"below the sea":            "1,0,0,-12\n2,0,1,-999.9\n",
		"a code with a semicolon":  "\"a;b\",2,3,4\n",
		"exponents of a program":   "1,5.455500e+06,4.83700000E+05,6.829e+01\n",
		"an elevation in a header": "ID,Northing,Easting,Elevation\n1,2,3,4\n",
	} {
		_, problems := read(text)
		assert.Empty(t, problems, name)
	}
}

func TestRowsOfLines(t *testing.T) {
	for _, c := range []struct {
		order, text string
		column      int
		says        string
	}{
		{"id,northing,easting,elevation,kind", "1,2,3,4,point\n5,6,7,8,breakline\n", 9, `kind "breakline"`},
		{"id,northing,easting,elevation,kind", "1,2,3,4,point\n5,6,7,8,\n", 9, `kind ""`},
		{"id,northing,easting,elevation,line", "1,2,3,4,\n5,6,7,8,L1\n", 9, `line "L1"`},
	} {
		_, problems := points.Read("p.csv", []byte(c.text), points.Options{Order: strings.Split(c.order, ",")})
		require.Len(t, problems, 1)
		assert.Equal(t, finding.Code("F09"), problems[0].Code)
		assert.Equal(t, [2]int{2, c.column}, [2]int{problems[0].Line, problems[0].Column})
		assert.Contains(t, problems[0].Message, c.says)
	}
}

func TestOrderItself(t *testing.T) {
	for order, says := range map[string]string{
		"id,nothing,easting,elevation":            `unknown column "nothing", perhaps "northing"`,
		"id,northing,easting,northing,elevation":  `names "northing" twice`,
		"id,northing,easting":                     `lacks the column "elevation"`,
		"id,northing,easting,elevation,remark":    `unknown column "remark"`,
		"station,northing,easting,elevation,code": `unknown column "station"`,
	} {
		got, problems := points.Read("p.csv", []byte("1,2,3,4\n"), points.Options{Order: strings.Split(order, ",")})
		assert.Empty(t, got)
		require.NotEmpty(t, problems, order)
		assert.Equal(t, finding.Code("F07"), problems[0].Code)
		assert.Equal(t, "survey.order", problems[0].Key)
		assert.Contains(t, problems[0].Message, says)
	}
}

// All problems are told at once, of each code the first ten.
func TestAllProblemsAtOnce(t *testing.T) {
	text := "\ufeff" + strings.Repeat("1,x,3,4\n", 25) + "a,1,1,1\na,2,2,2\n5,6,7\n"
	_, problems := read(text)
	count := map[finding.Code]int{}
	for _, p := range problems {
		count[p.Code]++
	}
	assert.Equal(t, map[finding.Code]int{"U14": 1, "F06": 11, "U07": 1, "F07": 1}, count)
	assert.Equal(t, "and 15 more of the same", problems[len(problems)-1].Message)
}

// Law: whatever is written is read, in metres, and its order changes nothing
// but the rows.
func TestRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		unit := rapid.SampledFrom([]float64{1, 0.3048, 1200.0 / 3937}).Draw(t, "unit")
		n := rapid.IntRange(1, 20).Draw(t, "n")
		var text strings.Builder
		var want []terrain.Point
		for i := range n {
			p := terrain.Point{
				E: rapid.Float64Range(-1e6, 1e7).Draw(t, "e"), N: rapid.Float64Range(-1e6, 1e7).Draw(t, "n"),
				Z: rapid.Float64Range(1, 4000).Draw(t, "z"), Row: i + 1,
			}
			fmt.Fprintf(&text, "%d,%.17e,%f,%v\n", i, p.N, p.E, p.Z)
			fmt.Sscanf(fmt.Sprintf("%f", p.E), "%g", &p.E)
			p.E, p.N, p.Z = p.E*unit, p.N*unit, p.Z*unit
			want = append(want, p)
		}
		got, problems := points.Read("p.csv", []byte(text.String()), points.Options{Order: []string{"id", "northing", "easting", "elevation"}, Unit: unit})
		require.Empty(t, problems)
		require.Equal(t, want, got)
	})
}

// The published cases of the project: their points are read without problem.
func TestSharedPoints(t *testing.T) {
	const folder = "../../../shared/checks/closed"
	if _, err := os.Stat(folder); err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatal("the folder of published cases is missing beside the checkout")
		}
		t.Skip("the folder of published cases is not beside the checkout")
	}
	names, err := filepath.Glob(folder + "/*.csv")
	require.NoError(t, err)
	require.NotEmpty(t, names)
	for _, name := range names {
		data, err := os.ReadFile(name)
		require.NoError(t, err)
		got, problems := read(string(data))
		require.Empty(t, problems, name)
		assert.Len(t, got, strings.Count(string(data), "\n")-1, name)
	}
}

// A large and hostile survey ends soon: half of it zeros, all on one easting.
func TestManyZeros(t *testing.T) {
	if testing.Short() {
		t.Skip("takes a second")
	}
	var text strings.Builder
	r := rand.New(rand.NewPCG(1, 2))
	for i := range 100_000 {
		fmt.Fprintf(&text, "%d,%d,7,%d\n", i, r.IntN(1_000_000), i%2*100)
	}
	began := time.Now()
	_, problems := read(text.String())
	require.Len(t, problems, 11)
	assert.Equal(t, finding.Code("U09"), problems[0].Code)
	// Comparing each with each takes a minute.
	assert.Less(t, time.Since(began), 20*time.Second)
}
