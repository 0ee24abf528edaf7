package finding_test

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"

	"sagcrest/profile/finding"
)

// Gravest first, then by station, then by code, then by key; equals keep their
// order.
func TestSort(t *testing.T) {
	in := []finding.Finding{
		{Code: "Q22", Severity: finding.Note, At: finding.On(1)},
		{Code: "D04", Severity: finding.Error, At: finding.On(30)},
		{Code: "A09", Severity: finding.Warning, At: finding.On(5)},
		{Code: "P14", Severity: finding.Error, At: finding.On(10).Under("b")},
		{Code: "D25", Severity: finding.Error, At: finding.On(10)},
		{Code: "P14", Severity: finding.Error, At: finding.On(10).Under("a")},
	}
	finding.Sort(in)
	var got []string
	for _, x := range in {
		got = append(got, string(x.Code)+x.At.Key)
	}
	assert.Equal(t, []string{"D25", "P14a", "P14b", "D04", "A09", "Q22"}, got)
}

// A finding about a culvert, with its place and both figures.
func ExampleFinding() {
	f := finding.Finding{
		Code: "D04", Severity: finding.Error,
		At:       finding.On(1760).Aside(-5).Under("culvert[2].cover_rule").Named("Dry valley"),
		Measured: finding.Of(0.097, "m"), Limit: finding.Of(0.3, "m"),
	}
	fmt.Println(f.Severity, f.Code, f.At.ID, f.At.Off, f.Measured.Value, f.Limit.Unit)
	// Output: E D04 Dry valley -5 0.097 m
}
