package study

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"sagcrest/config"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

func beyond(measured float64) finding.Finding {
	return finding.Finding{Code: "A09", Severity: finding.Warning, At: finding.Between(600, 640), Measured: finding.Of(measured, "m")}
}

func acceptance(value string, si float64) *config.Accept {
	at := station.Station(620)
	return &config.Accept{Code: "A09", At: "0+620", Station: &at, Value: value, Measured: finding.Of(si, "m")}
}

// An acceptance holds while the figure prints as it was accepted, and ends with
// another one; it needs the same code and place.
func TestAcceptanceEndsWithTheFigure(t *testing.T) {
	a := acceptance("0.42 m", 0.42)
	assert.True(t, covers(a, beyond(0.4151)))
	assert.True(t, covers(a, beyond(0.4249)))
	assert.False(t, covers(a, beyond(0.426)))
	assert.False(t, covers(acceptance("0.420 m", 0.42), beyond(0.4212)))
	assert.True(t, covers(acceptance("420 mm", 0.42), beyond(0.4204)))

	other := beyond(0.42)
	other.Code = "A12"
	assert.False(t, covers(a, other))
	elsewhere := beyond(0.42)
	elsewhere.At = finding.Between(700, 720)
	assert.False(t, covers(a, elsewhere))
	named := beyond(0.42)
	named.At = finding.Place{}.Named("0+620")
	assert.True(t, covers(a, named), "the name of a thing")
}

// No error can be accepted but D01.
func TestErrorsCannotBeAccepted(t *testing.T) {
	f := beyond(0.42)
	f.Severity = finding.Error
	assert.False(t, covers(acceptance("0.42 m", 0.42), f))
	f.Code = "D01"
	a := acceptance("0.42 m", 0.42)
	a.Code = "D01"
	assert.True(t, covers(a, f))
}

// The codes that end a run are those that leave no geometry or no meaning.
func TestFatal(t *testing.T) {
	for code, want := range map[finding.Code]bool{"A16": true, "P01": true, "F08": true, "U04": true, "Q12": true,
		"A06": false, "Q01": false, "Q11": false, "D04": false, "P14": false} {
		assert.Equal(t, want, fatal(finding.Finding{Code: code, Severity: finding.Error}), string(code))
	}
	assert.False(t, fatal(finding.Finding{Code: "U08", Severity: finding.Warning}))
}
