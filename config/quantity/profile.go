package quantity

import (
	"fmt"
	"math"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Profile is an owner's rounding policy: in which units, and to which place, a
// figure is posted. It acts on print only. Places are the two columns of the
// trade's tables: metric 0.001 m for stations, levels and inverts, 0.01 m for
// cover, 0.01 % for grades, 0.01 m² and 1 m³; US 0.01 ft, 0.1 ft, 0.01 %,
// 0.1 ft² and 1 yd³. The zero value is the metric column.
type Profile struct {
	foot      float64 // metres per foot; 0: metric
	separator string
}

// Names of the two columns.
const (
	MetricColumn = "m-0.001"
	FeetColumn   = "ft-0.01"
)

// NewProfile returns the column of the given name, or, for an empty name, the
// one that goes with the units of the project. Feet in a metric project are
// international. ok is false for an unknown name.
//
// Digits are grouped by a narrow space in the metric column (ISO 80000-1,
// 7.3.1) and by a comma in the other (common practice in US plans).
func NewProfile(name string, system System) (p Profile, ok bool) {
	if name == "" {
		name = MetricColumn
		if system.Feet() {
			name = FeetColumn
		}
	}
	switch name {
	case MetricColumn:
		return Profile{separator: "\u202f"}, true
	case FeetColumn:
		foot := InternationalFoot
		if system == USSurveyFeet {
			foot = USSurveyFoot
		}
		return Profile{foot: foot, separator: ","}, true
	}
	return Profile{}, false
}

// Feet reports whether figures are posted in feet.
func (p Profile) Feet() bool { return p.foot != 0 }

// LengthUnit returns "m" or "ft".
func (p Profile) LengthUnit() string { return p.pick("m", "ft") }

// AreaUnit returns "m²" or "ft²".
func (p Profile) AreaUnit() string { return p.pick("m²", "ft²") }

// VolumeUnit returns "m³" or "yd³".
func (p Profile) VolumeUnit() string { return p.pick("m³", "yd³") }

// SizeUnit returns the unit of pipe sizes: "mm" or "in".
func (p Profile) SizeUnit() string { return p.pick("mm", "in") }

// SpeedUnit returns "km/h" or "mile/h".
func (p Profile) SpeedUnit() string { return p.pick("km/h", "mile/h") }

// Elevation prints a level given in metres, without unit.
func (p Profile) Elevation(m float64) string { return p.Length(m) }

// Offset prints an offset given in metres, left negative.
func (p Profile) Offset(o station.Offset) string { return p.Length(float64(o)) }

// Length prints a length given in metres.
func (p Profile) Length(m float64) string { return p.scaled(m, 1, 3, p.foot, 2) }

// Cover prints a cover or gap given in metres.
func (p Profile) Cover(m float64) string { return p.scaled(m, 1, 2, p.foot, 1) }

// K prints the length of vertical curve per percent, given in metres.
func (p Profile) K(m float64) string { return p.scaled(m, 1, 2, p.foot, 2) }

// Size prints a pipe size or thickness given in metres.
func (p Profile) Size(m float64) string { return p.scaled(m, 1e-3, 0, p.foot/12, 1) }

// Area prints the area of a section, given in m².
func (p Profile) Area(m2 float64) string { return p.scaled(m2, 1, 2, p.foot*p.foot, 1) }

// Land prints a plan area, given in m².
func (p Profile) Land(m2 float64) string { return p.scaled(m2, 1, 0, p.foot*p.foot, 0) }

// Volume prints a volume given in m³.
func (p Profile) Volume(m3 float64) string { return p.scaled(m3, 1, 0, 27*p.foot*p.foot*p.foot, 0) }

// Speed prints a speed given in m/s.
func (p Profile) Speed(ms float64) string { return p.scaled(ms, 1/3.6, 0, 5280*p.foot/3600, 0) }

// Grade prints a ratio as percent, without the sign for percent.
func (p Profile) Grade(ratio float64) string { return Decimal(100*ratio, 2) }

// Slope prints a ratio to four places.
func (p Profile) Slope(ratio float64) string { return Decimal(ratio, 4) }

// Degrees prints an angle given in radians, in degrees to two places.
func (p Profile) Degrees(rad float64) string { return Decimal(rad*180/math.Pi, 2) }

// Money prints an amount to two places. Currencies are not converted.
func (p Profile) Money(amount float64) string { return Group(Decimal(amount, 2), p.separator) }

// Count prints a number of things: whole when it is whole, else two places.
func (p Profile) Count(n float64) string {
	if n == math.Trunc(n) {
		return Group(Decimal(n, 0), p.separator)
	}
	return Group(Decimal(n, 2), p.separator)
}

// Measure prints the figure of a finding with its unit. Lengths have the
// places of levels here, since some limits are millimetres. An unknown measure
// prints as "–".
func (p Profile) Measure(m finding.Measure) string {
	if !m.Known {
		return "–"
	}
	switch m.Unit {
	case "m":
		return p.Length(m.Value) + " " + p.LengthUnit()
	case "m2":
		return p.Area(m.Value) + " " + p.AreaUnit()
	case "m3":
		return p.Volume(m.Value) + " " + p.VolumeUnit()
	case "m/s":
		return p.Speed(m.Value) + " " + p.SpeedUnit()
	case "rad":
		return p.Degrees(m.Value) + " deg"
	case "ratio":
		return p.Slope(m.Value)
	case "":
		return p.Count(m.Value)
	}
	return fmt.Sprintf("%s %s", Decimal(m.Value, 2), m.Unit)
}

// scaled prints v in units of metric (SI size of one unit), or of feet where
// the profile posts feet, each with its own number of places.
func (p Profile) scaled(v, metric float64, metricPlaces int, feet float64, feetPlaces int) string {
	if p.Feet() {
		return Group(Decimal(v/feet, feetPlaces), p.separator)
	}
	return Group(Decimal(v/metric, metricPlaces), p.separator)
}

// pick chooses by column.
func (p Profile) pick(metric, feet string) string {
	if p.Feet() {
		return feet
	}
	return metric
}
