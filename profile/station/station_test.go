package station_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"sagcrest/profile/station"
)

// The zero interval is empty, the end does not belong to it, and what two
// intervals share lies in both.
func TestIntervals(t *testing.T) {
	assert.True(t, station.Interval{}.Empty())
	assert.True(t, station.Interval{From: 2, To: 1}.Empty())
	assert.Zero(t, station.Interval{From: 2, To: 1}.Length())
	i := station.Interval{From: 1, To: 3}
	assert.True(t, i.Contains(1))
	assert.False(t, i.Contains(3))
	assert.True(t, station.Everywhere().Contains(-1e9))
	rapid.Check(t, func(t *rapid.T) {
		f := func(n string) station.Station { return station.Station(rapid.Float64Range(-9, 9).Draw(t, n)) }
		a, b := station.Interval{From: f("a"), To: f("b")}, station.Interval{From: f("c"), To: f("d")}
		s := f("s")
		assert.Equal(t, a.Contains(s) && b.Contains(s), a.Intersect(b).Contains(s))
		assert.InDelta(t, a.Intersect(b).Length(), b.Intersect(a).Length(), 0)
	})
}

func TestFormat(t *testing.T) {
	metric := station.Labels{}
	feet := station.Labels{Foot: 0.3048}
	for _, c := range []struct {
		labels station.Labels
		s      station.Station
		want   string
	}{
		{metric, 0, "0+000.000"},
		{metric, 1250.5, "1+250.500"},
		{metric, 999.9996, "1+000.000"},
		{metric, 12340, "12+340.000"},
		{metric, 0.0005, "0+000.001"}, // half away from zero
		{metric, -12.5, "-0+012.500"},
		{metric, -0.0001, "0+000.000"},
		{station.Labels{Start: 1013}, 7, "1+020.000"},
		{feet, 0.3048 * 5694.118, "56+94.12"},
		{feet, 0.3048 * 100, "1+00.00"},
	} {
		assert.Equal(t, c.want, c.labels.Format(c.s))
	}
}

// Only the exact form is read: "1+25" may mean 1025 or 1250.
func TestParseRefuses(t *testing.T) {
	for _, text := range []string{"", "1+25", "1+2500", "1250", "1+25x", "+250", "1+250.", "1 + 250", "1+2e2", "1+250,5", "--1+250"} {
		if _, err := (station.Labels{}).Parse(text); text == "1+250." {
			assert.NoError(t, err, "no decimals after the point")
		} else {
			assert.Error(t, err, text)
		}
	}
	_, err := station.Labels{Foot: 0.3048}.Parse("12+345")
	assert.Error(t, err, "hundreds of feet have two digits")
}

// Law: what is printed reads back as the same place, to half of what is printed.
func TestRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		l := station.Labels{
			Start: rapid.Float64Range(-5000, 50000).Draw(t, "start"),
			Foot:  rapid.SampledFrom([]float64{0, 0.3048, 1200.0 / 3937}).Draw(t, "foot"),
		}
		s := station.Station(rapid.Float64Range(-1000, 90000).Draw(t, "s"))
		back, err := l.Parse(l.Format(s))
		require.NoError(t, err)
		half := 0.0005
		if l.US() {
			half = 0.005 * l.Unit()
		}
		assert.LessOrEqual(t, math.Abs(float64(back-s)), half*1.01+1e-6)
		assert.InDelta(t, float64(s), float64(l.Of(l.Value(s))), 1e-7)
	})
}

// A road whose first point is labelled 1+013.
func ExampleLabels() {
	l := station.Labels{Start: 1013}
	fmt.Println(l.Format(7.25))
	s, err := l.Parse("1+100")
	fmt.Println(s, err)
	_, err = l.Parse("1+25")
	fmt.Println(err != nil)
	// Output:
	// 1+020.250
	// 87 <nil>
	// true
}
