package quantity_test

import (
	"errors"
	"fmt"
	"math"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
)

func TestParse(t *testing.T) {
	tests := []struct {
		text string
		kind quantity.Kind
		want float64
	}{
		{"0.40 m", quantity.Length, 0.4},
		{"260m", quantity.Length, 260},
		{" 70 mm ", quantity.Length, 0.07},
		{"1.5e3 mm", quantity.Length, 1.5},
		{"-3 cm", quantity.Length, -0.03},
		{"100 ft", quantity.Length, 30.48},         // 0.3048 m, exactly
		{"3937 us_ft", quantity.Length, 1200},      // 1200/3937 m
		{"10 in", quantity.Length, 0.254},          // 25.4 mm, exactly
		{"1 yd", quantity.Length, 0.9144},          // exactly
		{"1 acre", quantity.Area, 4046.8564224},    // NIST SP 811, B.6: 4840 international square yards
		{"2 ha", quantity.Area, 20000},             //
		{"1 yd3", quantity.Volume, 0.764554857984}, // NIST SP 811, B.8
		{"36 km/h", quantity.Speed, 10},            //
		{"60 mile/h", quantity.Speed, 26.8224},     // NIST SP 811, B.8: 0.44704 m/s each
		{"180 deg", quantity.Angle, math.Pi},       //
		{"2.5 %", quantity.Ratio, 0.025},           //
	}
	for _, tt := range tests {
		got, err := quantity.Parse(tt.text, tt.kind)
		assert.NoError(t, err, tt.text)
		assert.InEpsilon(t, tt.want, got, 1e-15, tt.text)
	}
}

func TestParseTellsWhatIsWrong(t *testing.T) {
	tests := []struct {
		text  string
		kind  quantity.Kind
		fault error
		help  string
	}{
		{"0.40", quantity.Length, quantity.ErrMissing, `"0.40 m"`},
		{"30", quantity.Speed, quantity.ErrMissing, `"30 mile/h"`},
		{"20", quantity.Angle, quantity.ErrMissing, `write "20 deg"`},
		{"0.40 metres", quantity.Length, quantity.ErrForeign, "write m"},
		{"12 furlong", quantity.Length, quantity.ErrForeign, "us_ft"},
		{"50 mph", quantity.Speed, quantity.ErrForeign, "mile/h"},
		{"5 m2", quantity.Length, quantity.ErrKind, "measures area"},
		{"0,40 m", quantity.Length, quantity.ErrComma, "0.40"},
		{"-1,5 %", quantity.Ratio, quantity.ErrComma, "-1.5"},
		{"", quantity.Length, quantity.ErrNumber, "digits"},
		{"m", quantity.Length, quantity.ErrNumber, "digits"},
		{"nan m", quantity.Length, quantity.ErrNumber, "digits"},
		{"inf m", quantity.Length, quantity.ErrNumber, "digits"},
		{"0x10 m", quantity.Length, quantity.ErrForeign, "x10 m"},
		{"1.2.3 m", quantity.Length, quantity.ErrNumber, "digits"},
		{"1e999 m", quantity.Length, quantity.ErrNumber, "digits"},
		{"1e308 km", quantity.Length, quantity.ErrNumber, "range"},
		{"1,2,3 m", quantity.Length, quantity.ErrNumber, "digits"},
	}
	for _, tt := range tests {
		_, err := quantity.Parse(tt.text, tt.kind)
		var e *quantity.Error
		if !assert.ErrorAs(t, err, &e, tt.text) {
			continue
		}
		assert.ErrorIs(t, err, tt.fault, tt.text)
		assert.Equal(t, tt.text, e.Text)
		assert.Contains(t, e.Help, tt.help, tt.text)
	}
}

// A number written in any unit and read again is the number.
func TestRoundTripThroughText(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		unit := rapid.SampledFrom(quantity.Units()).Draw(t, "unit")
		v := rapid.Float64Range(-1e9, 1e9).Draw(t, "v")
		got, err := quantity.Parse(fmt.Sprintf("%v %s", v, unit.Token), unit.Kind)
		if err != nil {
			t.Fatal(err)
		}
		if got != unit.In(v) || math.Abs(got/unit.SI-v) > 1e-14*math.Abs(v) {
			t.Fatalf("%v %s is read as %v", v, unit.Token, got)
		}
	})
}

func TestEveryUnitHasItsKind(t *testing.T) {
	for _, u := range quantity.Units() {
		found, ok := quantity.Find(u.Token)
		assert.True(t, ok)
		assert.Equal(t, u, found)
		assert.Contains(t, quantity.Tokens(u.Kind), u.Token)
		assert.InEpsilon(t, u.SI, u.In(1), 1e-15)
	}
	_, ok := quantity.Find("ft3")
	assert.False(t, ok)
}

func TestOtherSpellingsNameTheUnit(t *testing.T) {
	for spelling, token := range map[string]string{
		"feet": "ft", "inches": "in", "usft": "us_ft", "MM": "mm", "m²": "m2", "cum": "m3", "sqft": "ft2",
		"cy": "yd3", "kph": "km/h", "mph": "mile/h", "°": "deg", "percent": "%", "acres": "acre", "hectares": "ha",
	} {
		_, _, err := quantity.ParseAny("3 " + spelling)
		var e *quantity.Error
		if assert.ErrorAs(t, err, &e, spelling) {
			assert.Contains(t, e.Help, "write "+token, spelling)
		}
	}
	assert.Equal(t, []string{"m", "m2", "m3", "m/s", "rad", "ratio"}, []string{
		quantity.Length.SI(), quantity.Area.SI(), quantity.Volume.SI(), quantity.Speed.SI(), quantity.Angle.SI(), quantity.Ratio.SI(),
	})
}

func FuzzParse(f *testing.F) {
	for _, seed := range []string{"0.40 m", "1e+5mm", "-,5", "3 e", "١ m", "1 \u202fm", "+", "1e m", "5 us ft"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		for _, u := range quantity.Units() {
			v, err := quantity.Parse(text, u.Kind)
			if err == nil && (math.IsNaN(v) || math.IsInf(v, 0)) {
				t.Fatalf("%q is read as %v", text, v)
			}
			var e *quantity.Error
			if err != nil && !errors.As(err, &e) {
				t.Fatalf("%q: %T", text, err)
			}
		}
	})
}

func TestDecimal(t *testing.T) {
	tests := []struct {
		v      float64
		places int
		want   string
	}{
		{2.675, 2, "2.68"}, // binary 2.67499…
		{-2.675, 2, "-2.68"},
		{1.005, 2, "1.01"},
		{0.5, 0, "1"},
		{-0.5, 0, "-1"},
		{0.49999999, 0, "0"},
		{-0.004, 2, "0.00"},
		{math.Copysign(0, -1), 2, "0.00"},
		{9.999, 2, "10.00"},
		{999.5, 0, "1000"},
		{0.0996, 3, "0.100"},
		{0.05, 1, "0.1"},
		{0.0004, 3, "0.000"},
		{0.00051, 3, "0.001"},
		{1e-300, 3, "0.000"},
		{123456789, 3, "123456789.000"},
		{1e22, 1, "10000000000000000000000.0"},
		{0.1 + 0.2, 1, "0.3"},
		{1.1*1.1*100 - 121, 3, "0.000"},
		{2.0 / 3, 4, "0.6667"},
		{math.NaN(), 2, "–"},
		{math.Inf(1), 2, "–"},
	}
	for _, tt := range tests {
		assert.Equal(t, tt.want, quantity.Decimal(tt.v, tt.places), "%v to %d", tt.v, tt.places)
	}
}

// What is printed lies within half a unit of the last place, and within one of
// what the language's own binary rounding prints.
func TestDecimalIsTheNearest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e7, 1e7).Draw(t, "v")
		places := rapid.IntRange(0, 6).Draw(t, "places")
		text := quantity.Decimal(v, places)
		printed, ok := new(big.Float).SetPrec(200).SetString(text)
		if !ok {
			t.Fatalf("%q is no number", text)
		}
		off, _ := printed.Sub(printed, new(big.Float).SetPrec(200).SetFloat64(v)).Float64()
		half := 0.5 * math.Pow10(-places)
		if math.Abs(off) > half+1e-14*math.Abs(v)+1e-20 {
			t.Fatalf("%v to %d places prints %s", v, places, text)
		}
		if strings.HasPrefix(text, "-") && strings.Trim(text, "-0.") == "" {
			t.Fatalf("%v prints %s", v, text)
		}
	})
}

func TestGroup(t *testing.T) {
	assert.Equal(t, "1,234,567.891", quantity.Group("1234567.891", ","))
	assert.Equal(t, "-123", quantity.Group("-123", ","))
	assert.Equal(t, "-1,234", quantity.Group("-1234", ","))
	assert.Equal(t, "1234", quantity.Group("1234", ""))
}

func TestTwoColumns(t *testing.T) {
	metric, ok := quantity.NewProfile("", quantity.Metric)
	assert.True(t, ok)
	feet, ok := quantity.NewProfile("ft-0.01", quantity.Metric)
	assert.True(t, ok)
	tests := []struct {
		name         string
		print        func(quantity.Profile) string
		metric, feet string
	}{
		{"elevation", func(p quantity.Profile) string { return p.Elevation(30.48) }, "30.480", "100.00"},
		{"offset", func(p quantity.Profile) string { return p.Offset(-3.048) }, "-3.048", "-10.00"},
		{"cover", func(p quantity.Profile) string { return p.Cover(0.3048) }, "0.30", "1.0"},
		{"grade", func(p quantity.Profile) string { return p.Grade(-0.0325) }, "-3.25", "-3.25"},
		{"area", func(p quantity.Profile) string { return p.Area(9.290304) }, "9.29", "100.0"},
		{"land", func(p quantity.Profile) string { return p.Land(929.0304) }, "929", "10,000"},
		{"volume", func(p quantity.Profile) string { return p.Volume(764.554857984) }, "765", "1,000"},
		{"large volume", func(p quantity.Profile) string { return p.Volume(12345.5) }, "12\u202f346", "16,147"},
		{"size", func(p quantity.Profile) string { return p.Size(0.6096) }, "610", "24.0"},
		{"speed", func(p quantity.Profile) string { return p.Speed(80 / 3.6) }, "80", "50"},
		{"k", func(p quantity.Profile) string { return p.K(30.48) }, "30.48", "100.00"},
		{"slope", func(p quantity.Profile) string { return p.Slope(0.025) }, "0.0250", "0.0250"},
		{"degrees", func(p quantity.Profile) string { return p.Degrees(math.Pi / 9) }, "20.00", "20.00"},
		{"money", func(p quantity.Profile) string { return p.Money(-1234.005) }, "-1\u202f234.01", "-1,234.01"},
		{"count", func(p quantity.Profile) string { return p.Count(3) }, "3", "3"},
		{"measure", func(p quantity.Profile) string { return p.Measure(finding.Of(0.3048, "m")) }, "0.305 m", "1.00 ft"},
		{"measure of area", func(p quantity.Profile) string { return p.Measure(finding.Of(9.290304, "m2")) }, "9.29 m²", "100.0 ft²"},
		{"measure of volume", func(p quantity.Profile) string { return p.Measure(finding.Of(0.764554857984, "m3")) }, "1 m³", "1 yd³"},
		{"measure in percent", func(p quantity.Profile) string { return p.Measure(finding.Of(2.5, "%")) }, "2.50 %", "2.50 %"},
		{"measure of speed", func(p quantity.Profile) string { return p.Measure(finding.Of(80/3.6, "m/s")) }, "80 km/h", "50 mile/h"},
		{"measure of an angle", func(p quantity.Profile) string { return p.Measure(finding.Of(math.Pi/9, "rad")) }, "20.00 deg", "20.00 deg"},
		{"ratio", func(p quantity.Profile) string { return p.Measure(finding.Of(0.025, "ratio")) }, "0.0250", "0.0250"},
		{"count in halves", func(p quantity.Profile) string { return p.Measure(finding.Of(2.5, "")) }, "2.50", "2.50"},
		{"no measure", func(p quantity.Profile) string { return p.Measure(finding.Measure{}) }, "–", "–"},
	}
	for _, tt := range tests {
		assert.Equal(t, tt.metric, tt.print(metric), tt.name)
		assert.Equal(t, tt.feet, tt.print(feet), tt.name)
	}
	assert.Equal(t, []string{"m", "m²", "m³", "mm", "km/h"},
		[]string{metric.LengthUnit(), metric.AreaUnit(), metric.VolumeUnit(), metric.SizeUnit(), metric.SpeedUnit()})
	assert.Equal(t, []string{"ft", "ft²", "yd³", "in", "mile/h"},
		[]string{feet.LengthUnit(), feet.AreaUnit(), feet.VolumeUnit(), feet.SizeUnit(), feet.SpeedUnit()})
}

func TestProfileFollowsTheProjectsUnits(t *testing.T) {
	survey, ok := quantity.NewProfile("", quantity.USSurveyFeet)
	assert.True(t, ok)
	assert.Equal(t, "3,937,000.00", survey.Length(1200e3), "survey feet")
	_, ok = quantity.NewProfile("m-0.01", quantity.Metric)
	assert.False(t, ok)
}

func TestSystems(t *testing.T) {
	for _, s := range quantity.Systems() {
		got, ok := quantity.ParseSystem(string(s))
		assert.True(t, ok)
		assert.Equal(t, s, got)
		assert.Equal(t, s != quantity.Metric, s.Feet())
	}
	_, ok := quantity.ParseSystem("feet")
	assert.False(t, ok)
	assert.Equal(t, 0.3048, quantity.FeetUnsaid.Metres())
}
