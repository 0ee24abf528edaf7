package diag_test

import (
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

func TestProblemAsText(t *testing.T) {
	base := diag.Problem{Code: "F06", Severity: finding.Error, Message: "no number"}
	for name, c := range map[string]struct {
		change func(p *diag.Problem)
		want   string
	}{
		"nowhere":   {func(p *diag.Problem) {}, "E F06 no number"},
		"file":      {func(p *diag.Problem) { p.File = "a.csv" }, "a.csv: E F06 no number"},
		"line":      {func(p *diag.Problem) { p.File, p.Line, p.Excerpt = "a.csv", 3, "1,x" }, "a.csv:3: E F06 no number\n    1,x"},
		"column":    {func(p *diag.Problem) { p.File, p.Line, p.Column, p.Excerpt = "a.csv", 3, 3, "1,x" }, "a.csv:3:3: E F06 no number\n    1,x\n      ^"},
		"help":      {func(p *diag.Problem) { p.Help = "mend it" }, "E F06 no number\n  help: mend it"},
		"tabs":      {func(p *diag.Problem) { p.Column, p.Excerpt = 3, "1\tx\t" }, "E F06 no number\n    1 x\n      ^"},
		"accents":   {func(p *diag.Problem) { p.Column, p.Excerpt = 4, "é,x" }, "E F06 no number\n    é,x\n      ^"},
		"behind":    {func(p *diag.Problem) { p.Column, p.Excerpt = 4, "1,x" }, "E F06 no number\n    1,x\n       ^"},
		"controls":  {func(p *diag.Problem) { p.Column, p.Excerpt = 5, "\x1b[1mx\u009b\u202e" }, "E F06 no number\n    �[1mx��\n        ^"},
		"broken":    {func(p *diag.Problem) { p.Column, p.Excerpt = 3, "\xff\xfex" }, "E F06 no number\n    ��x\n      ^"},
		"a warning": {func(p *diag.Problem) { p.Severity = finding.Warning }, "W F06 no number"},
	} {
		p := base
		c.change(&p)
		assert.Equal(t, c.want, p.String(), name)
	}
}

// Of a long line the part around the column is shown.
func TestLongLine(t *testing.T) {
	p := diag.Problem{Code: "F06", Severity: finding.Error, Message: "m", Excerpt: strings.Repeat("a", 300) + "X" + strings.Repeat("b", 300), Column: 301}
	lines := strings.Split(p.String(), "\n")
	require.Len(t, lines, 3)
	assert.Equal(t, "    … "+strings.Repeat("a", 50)+"X"+strings.Repeat("b", 49)+" …", lines[1])
	assert.Equal(t, strings.Repeat(" ", 4+2+50)+"^", lines[2])
}

// Law: the caret stands below the sign at the column, whatever the line is.
func TestCaretStandsBelowItsSign(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		before := rapid.StringN(0, 150, -1).Draw(t, "before")
		after := rapid.StringN(0, 150, -1).Draw(t, "after")
		p := diag.Problem{Code: "F06", Message: "m", Excerpt: before + "☂" + after, Column: len(before) + 1}
		lines := strings.Split(p.String(), "\n")
		require.Len(t, lines, 3, "no sign of the line may break it")
		caret := utf8.RuneCountInString(lines[2]) - 1
		shown := []rune(lines[1])
		require.Less(t, caret, len(shown))
		require.Equal(t, '☂', shown[caret])
	})
}

func TestListKeepsTheFirstAndCounts(t *testing.T) {
	var l diag.List
	assert.False(t, l.Any())
	assert.Empty(t, l.Problems())
	l.Add(diag.Problem{Code: "F07", Line: 1})
	for i := range 15 {
		assert.Equal(t, i >= 10, l.Full("F06"), "after %d", i)
		l.Add(diag.Problem{Code: "F06", Severity: finding.Error, File: "a", Line: 2 + i})
	}
	l.Count("F06")
	l.Add(diag.Problem{Code: "F09", Line: 99})
	got := l.Problems()
	require.Len(t, got, 13)
	assert.True(t, l.Any())
	assert.Equal(t, 1, got[0].Line)
	assert.Equal(t, 11, got[10].Line)
	assert.Equal(t, finding.Code("F09"), got[11].Code)
	assert.Equal(t, diag.Problem{Code: "F06", Severity: finding.Error, File: "a", Message: "and 6 more of the same"}, got[12])
	assert.Equal(t, got, l.Problems(), "asking changes nothing")
}

func TestWorst(t *testing.T) {
	assert.False(t, diag.Worst(nil))
	assert.False(t, diag.Worst([]diag.Problem{{Severity: finding.Warning}, {Severity: finding.Note}}))
	assert.True(t, diag.Worst([]diag.Problem{{Severity: finding.Warning}, {Severity: finding.Error}}))
}

func TestNearest(t *testing.T) {
	known := []string{"northing", "easting", "elevation", "id", "code", "kind"}
	for word, want := range map[string]string{
		"nothing": "northing", "nrothing": "northing", "eastings": "easting", "elev": "", "kode": "code",
		"di": "id", "x": "", "": "", "elephant": "", "id": "id", strings.Repeat("northing", 9): "",
	} {
		assert.Equal(t, want, diag.Nearest(word, known), word)
	}
	assert.Equal(t, "ab", diag.Nearest("abc", []string{"ab", "bc"}), "of equal ones the first")
	assert.Empty(t, diag.Nearest("abc", nil))
}

// Law: one slip of the hand is always undone.
func TestOneSlip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		name := rapid.StringMatching(`[a-z]{4,20}`).Draw(t, "name")
		at := rapid.IntRange(0, len(name)-2).Draw(t, "at")
		slip := rapid.SampledFrom([]string{
			name[:at] + name[at+1:], // dropped
			name[:at] + "#" + name[at:],
			name[:at] + "#" + name[at+1:],
			name[:at] + name[at+1:at+2] + name[at:at+1] + name[at+2:], // swapped
		}).Draw(t, "slip")
		require.Equal(t, name, diag.Nearest(slip, []string{strings.Repeat("%", len(name)), name}))
	})
}

// Every code has one whole page; no page is filled by more than one text.
func TestRules(t *testing.T) {
	seen := map[finding.Code]bool{}
	for _, r := range diag.Rules() {
		assert.False(t, seen[r.Code], "%s twice", r.Code)
		seen[r.Code] = true
		for _, text := range []string{r.Title, r.Formula, r.Source, r.Effect, r.Mend} {
			assert.NotEmpty(t, text, r.Code)
		}
		assert.Equal(t, "%v", r.Message)
		assert.Equal(t, finding.Error, r.Default)
	}
	for _, code := range []finding.Code{"F01", "F02", "F03", "F04", "F05", "F06", "F07", "F08", "F09", "F10", "U01", "U04", "U07", "U09", "U14"} {
		assert.True(t, seen[code], code)
	}
	assert.Len(t, seen, 15)
}
