package finding

import (
	"cmp"
	"slices"

	"sagcrest/profile/station"
)

// Code names a row of the catalogue of checks, such as "D04".
type Code string

// Severity tells how grave a finding is.
type Severity byte

// The three severities. An Error may withhold results, a Warning never does,
// a Note only informs.
const (
	Error   Severity = 'E'
	Warning Severity = 'W'
	Note    Severity = 'N'
)

// String returns the letter.
func (s Severity) String() string { return string(rune(s)) }

// rank orders severities, gravest first.
func (s Severity) rank() int {
	switch s {
	case Error:
		return 0
	case Warning:
		return 1
	}
	return 2
}

// Measure is a figure with its unit; Known false means that there is none.
type Measure struct {
	Value float64
	Unit  string // "m", "m2", "m3", "ratio", "%", "deg", "" for a count
	Known bool
}

// Of returns a known measure.
func Of(value float64, unit string) Measure { return Measure{value, unit, true} }

// Place tells where a finding lies. Key is the path of the input it concerns,
// such as "culvert[2].outlet_invert"; ID names the thing ("C-3", a clearance's
// name). On says that At holds a stretch or a single place of the road, Beside
// that Off holds an offset.
type Place struct {
	Key, ID    string
	At         station.Interval
	On, Beside bool
	Off        station.Offset
}

// On returns a place at one station.
func On(s station.Station) Place { return Place{At: station.At(s), On: true} }

// Between returns a place that is a stretch.
func Between(from, to station.Station) Place {
	return Place{At: station.Interval{From: from, To: to}, On: true}
}

// Under returns the place with the path of the input it concerns.
func (p Place) Under(key string) Place { p.Key = key; return p }

// Named returns the place with the name of the thing.
func (p Place) Named(id string) Place { p.ID = id; return p }

// Aside returns the place with an offset.
func (p Place) Aside(o station.Offset) Place { p.Off, p.Beside = o, true; return p }

// Finding is one doubt about the project. Args fill the rule's Message in
// order: station.Station, station.Offset, Measure, string and int are written
// by the rim. Stops lists the result paths (from "result") that are withheld.
type Finding struct {
	Code            Code
	Severity        Severity
	At              Place
	Measured, Limit Measure
	Args            []any
	Stops           []string
	Source          string // of this very limit; empty: that of the rule
}

// Rule is the catalogue's page of a code. Message is a format string with one
// %v for each of a finding's Args.
type Rule struct {
	Code                            Code
	Default                         Severity
	Title, Message, Formula, Source string
	Effect                          string // what the blunder changes
	Mend                            string // the smallest fix
}

// Sort orders findings by severity, then station, then code, then key; equal
// ones keep their order.
func Sort(fs []Finding) {
	slices.SortStableFunc(fs, func(a, b Finding) int {
		return cmp.Or(
			cmp.Compare(a.Severity.rank(), b.Severity.rank()),
			cmp.Compare(a.At.At.From, b.At.At.From),
			cmp.Compare(a.Code, b.Code),
			cmp.Compare(a.At.Key, b.At.Key),
		)
	})
}
