package points_test

import (
	"math"
	"strings"
	"testing"

	"sagcrest/config/diag"
	"sagcrest/config/points"
)

func checkProblems(t *testing.T, problems []diag.Problem) {
	for _, p := range problems {
		if p.Code == "" || p.Message == "" || p.String() == "" || p.Column > 0 && p.Line == 0 {
			t.Fatalf("half a problem: %+v", p)
		}
		if p.Column > 0 && p.Excerpt != "" && p.Column > len(p.Excerpt)+1 {
			t.Fatalf("column %d of %q", p.Column, p.Excerpt)
		}
	}
}

// FuzzRead: no text and no order make the reader panic; points are finite and
// their rows increase.
func FuzzRead(f *testing.F) {
	f.Add("id,northing,easting,elevation", "id,northing,easting,elevation\n1,2,3,4\n")
	f.Add("northing,easting,elevation,kind,-", "1,2,0,point,\n9,9,100,line,x\n")
	for _, b := range blunders() {
		f.Add("id,northing,easting,elevation", b.text)
	}
	f.Fuzz(func(t *testing.T, order, text string) {
		got, problems := points.Read("p.csv", []byte(text), points.Options{Order: strings.Split(order, ","), Unit: 0.3048})
		checkProblems(t, problems)
		row := 0
		for _, p := range got {
			if p.Row <= row || math.Abs(p.E) > 1e8 || math.Abs(p.N) > 1e8 || math.Abs(p.Z) > 1e8 || math.IsNaN(p.E+p.N+p.Z) {
				t.Fatalf("point %+v after row %d", p, row)
			}
			row = p.Row
		}
		if len(got) == 0 && len(problems) == 0 {
			t.Fatal("neither points nor a problem")
		}
	})
}
