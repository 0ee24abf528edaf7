package config

import (
	"sagcrest/config/quantity"
	"sagcrest/drainage"
	"sagcrest/earthwork"
	"sagcrest/earthwork/bill"
	"sagcrest/profile"
	"sagcrest/profile/alignment"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
	"sagcrest/section/terrain"
)

// Project is one road, the base or an alternative, as inputs of the domain in
// SI. It is an open struct; only what finds a key's place in the file is
// hidden.
type Project struct {
	// For paper only.
	Title, Date, Revision, Originator, Checker string
	// Rounding names the column in which figures are posted, "" for the one
	// of Units; see Paper.
	Rounding string

	Units  quantity.System
	Labels station.Labels

	Survey    Survey
	Alignment []alignment.PI

	// DesignSpeed is in m/s, 0 when unsaid; Criteria names a set of rules or
	// is empty.
	DesignSpeed float64
	Criteria    string
	PVI         []profile.PVI
	CurveTable  []profile.CurveClaim
	TieIns      []profile.TieIn
	Obstacles   []section.Obstacle

	Typicals []section.Typical
	Strata   []section.Stratum
	// Superelevation is the table, in the order of the file.
	Superelevation []section.Crossfalls

	Materials []earthwork.Material
	// Request lacks CulvertStations, which follow from the ground.
	Request    earthwork.Request
	StripBasis StripBasis

	Prices    bill.Prices
	HasPrices bool

	Culverts   []drainage.Culvert
	RightOfWay section.RightOfWay
	Accepts    []Accept

	// Alternative is "base" or the name of the alternative.
	Alternative string

	document *Document
	root     *node
}

// SurveyKind tells what kind of file holds the ground.
type SurveyKind string

// The kinds of ground that can be read.
const (
	SurveyPoints   SurveyKind = "points"
	SurveyGrid     SurveyKind = "grid"
	SurveySections SurveyKind = "sections"
)

// Survey names the ground: the file and what its numbers mean.
type Survey struct {
	Kind SurveyKind
	// Path is as the project writes it, relative to the project file.
	Path string
	// Order lists the columns of points and sections.
	Order []string
	// Units are those of the numbers in the survey file.
	Units              quantity.System
	VerticalDatum, CRS string
	Accuracy           terrain.Accuracy // metres
}

// StripBasis tells under which item stripping is billed.
type StripBasis string

// The two ways to bill stripping.
const (
	StripSeparate StripBasis = "separate"
	StripInCut    StripBasis = "in_cut"
)

// Accept is a finding that somebody answers for.
type Accept struct {
	Code finding.Code
	// At is as written: a station, or the id or name of the thing; Station is
	// set in the first case.
	At      string
	Station *station.Station
	// Value is the figure as written, as the report printed it; Measured is
	// the same in SI, unknown when no figure was given.
	Value            string
	Measured         finding.Measure
	Reason, By, Date string
	Key              string // "accept[0]"
}

// Paper returns the rounding profile in which the project posts figures.
func (p *Project) Paper() quantity.Profile {
	// The name was checked when the file was read.
	paper, _ := quantity.NewProfile(p.Rounding, p.Units)
	return paper
}

// File returns the path of the project file.
func (p *Project) File() string { return p.document.path }

// Locate returns line and column of a key path such as
// "culvert[0].outlet_invert", counted from 1. When the key is absent it is the
// place of its nearest ancestor; ok is false when not even its first part is
// there.
func (p *Project) Locate(key string) (line, col int, ok bool) {
	found, depth := p.root.locate(key)
	if depth == 0 {
		return 0, 0, false
	}
	return found.at.line, found.at.column, true
}
