package config

import (
	"fmt"
	"math"

	"sagcrest/config/quantity"
	"sagcrest/earthwork"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// A soil or rock. Shrinkage lies between −1 (a material that doubles) and 1 (one
// that vanishes), both excluded: the mass diagram divides by 1 − s.
type fileMaterial struct {
	Name       string `json:"name" jsonschema:"required"`
	Shrinkage  ratio  `json:"shrinkage" range:"(-1,1)" jsonschema_description:"compacted = bank × (1 − s); negative = net gain"`
	Swell      ratio  `json:"swell" range:"[0,3]" jsonschema_description:"loose = bank × (1 + swell)"`
	Unsuitable bool   `json:"unsuitable" jsonschema_description:"adds nothing to the mass ordinates"`
}

// What is paid and how. Pay stations closer than 0.1 m would make a hundred
// thousand sections out of a road and no better volume.
type fileEarthwork struct {
	PayMethod   string `json:"pay_method" jsonschema:"enum=end_area,enum=pyramid" jsonschema_description:"absent: end_area"`
	PayStations length `json:"pay_stations" range:"[0.1,10000]" jsonschema_description:"an interval of the printed label; absent: 20 m"`
	KeyPoints   *bool  `json:"key_points" jsonschema_description:"pay stations at key points as well; absent: true"`
	MassState   string `json:"mass_state" jsonschema:"enum=compacted,enum=bank" jsonschema_description:"absent: compacted"`
	StripDepth  length `json:"strip_depth" range:"[0,10]" jsonschema_description:"absent: no strip"`
	StripBasis  string `json:"strip_basis" jsonschema:"enum=separate,enum=in_cut" jsonschema_description:"absent: separate"`
	StripMargin length `json:"strip_margin" range:"[0,1000]" jsonschema_description:"horizontal, outside each catch point"`
}

// A stretch that is measured elsewhere, such as a bridge. The reason is for the
// reviewer and may be left out.
type fileExclude struct {
	From   place  `json:"from" jsonschema:"required" range:"[-10000000,10000000]"`
	To     place  `json:"to" jsonschema:"required" range:"[-10000000,10000000]"`
	Reason string `json:"reason"`
}

// A quantity entered by hand, at one place or spread evenly over a stretch.
type fileExtra struct {
	Item     string `json:"item" jsonschema:"required"`
	Quantity amount `json:"quantity" jsonschema:"required" jsonschema_description:"text with its unit, or a bare count"`
	At       place  `json:"at" range:"[-10000000,10000000]" jsonschema_description:"one place; or from and to"`
	From     place  `json:"from" range:"[-10000000,10000000]" jsonschema_description:"with to: spread evenly"`
	To       place  `json:"to" range:"[-10000000,10000000]"`
	Note     string `json:"note"`
}

// materials keeps nil apart from zero: nobody stated a shrinkage, or it is none.
func (r *reading) materials(files []fileMaterial) []earthwork.Material {
	var all []earthwork.Material
	seen := map[string]bool{}
	for i, f := range files {
		r.unique(seen, f.Name, fmt.Sprintf("material[%d].name", i))
		all = append(all, earthwork.Material{
			ID: section.MaterialID(f.Name), Shrinkage: f.Shrinkage.pointer(), Swell: f.Swell.pointer(), Unsuitable: f.Unsuitable,
		})
	}
	return all
}

// material complains of a name that no [[material]] carries. No name at all is
// legal: cut without a material is one without shrinkage (Q01).
func (r *reading) material(name, key string) {
	if name == "" {
		return
	}
	var known []string
	if list := r.root.get("material"); list != nil {
		for _, item := range list.items {
			known = append(known, item.get("name").string())
		}
	}
	r.named(name, key, "material", known)
}

// named complains of a name that nothing carries.
func (r *reading) named(name, key, what string, known []string) {
	for _, k := range known {
		if k == name {
			return
		}
	}
	help := suggest(name, known)
	if len(known) == 0 {
		help = "the project names none"
	}
	r.complain("F03", key, fmt.Sprintf("%s names the %s %q, which is not defined", key, what, name), help)
}

// Defaults of the project file: by end areas every 20 m of label with key
// points, mass in compacted volumes.
const defaultPayStations = 20 // metres

// request fills in the defaults; everything that decides a volume is then said.
func (r *reading) request(f *fileEarthwork, p *Project) earthwork.Request {
	if f == nil {
		f = &fileEarthwork{}
	}
	q := earthwork.Request{
		Method: earthwork.EndArea, MassState: earthwork.InCompacted, Labels: r.labels, KeyPoints: f.KeyPoints == nil || *f.KeyPoints,
		Stripping: section.Stripping{Depth: f.StripDepth.or(0), Margin: f.StripMargin.or(0)},
	}
	if f.PayMethod != "" {
		q.Method = earthwork.Method(f.PayMethod)
	}
	if f.MassState != "" {
		q.MassState = earthwork.MassState(f.MassState)
	}
	// The label's own interval: 100 ft are 100 label units, not 99.99…
	q.PayStep = math.Round(f.PayStations.or(defaultPayStations)/r.labels.Unit()*1e9) / 1e9
	p.StripBasis = StripSeparate
	if f.StripBasis != "" {
		p.StripBasis = StripBasis(f.StripBasis)
	}
	return q
}

// exclusions may overlap here: that is a finding (A11), not a contradiction.
func (r *reading) exclusions(files []fileExclude) []earthwork.Exclusion {
	var all []earthwork.Exclusion
	for i, f := range files {
		over := r.interval(stretch{f.From, f.To, fmt.Sprintf("exclude[%d]", i)}, false)
		all = append(all, earthwork.Exclusion{Over: over, Reason: f.Reason})
	}
	return all
}

// extras brings hand quantities to SI and keeps which kind of unit they had, since
// a rate per metre does not price a volume.
func (r *reading) extras(files []fileExtra) []earthwork.Extra {
	var all []earthwork.Extra
	for i, f := range files {
		key := fmt.Sprintf("extra_quantity[%d]", i)
		e := earthwork.Extra{Item: section.ItemID(f.Item), Quantity: f.Quantity.si, Unit: unitOf(f.Quantity.value), Note: f.Note}
		r.extraUnit(e.Item, f.Quantity, key+".quantity")
		at, from, to := r.has(key+".at"), r.has(key+".from"), r.has(key+".to")
		switch {
		case at && (from || to):
			r.complain("F08", key+".at", key+" has both at and from, to", "keep one")
		case at:
			e.Point, e.Over = true, station.At(station.Station(f.At.si))
		case from && to:
			e.Over = r.interval(stretch{f.From, f.To, key}, false)
		default:
			r.complain("F05", key, key+" has no place", "give at, or from and to")
		}
		all = append(all, e)
	}
	return all
}

// extraUnit holds excavation and embankment to volumes: they go into the mass.
// Everything else is counted in a length, an area, a volume or pieces.
func (r *reading) extraUnit(item section.ItemID, a amount, key string) {
	if !a.ok {
		return
	}
	volume := a.unit.Kind == quantity.Volume
	switch {
	case (item == section.Excavation || item == section.Embankment) && !volume:
		r.complain("F04", key, fmt.Sprintf("%s of %s is no volume", key, item), `write it with m3 or yd3`)
	case a.unit.Kind == quantity.Speed || a.unit.Kind == quantity.Angle || a.unit.Kind == quantity.Ratio:
		r.complain("F04", key, fmt.Sprintf("%s measures %s", key, a.unit.Kind), "write a length, an area, a volume or a bare count")
	}
}

// unitOf returns the SI unit of an amount, "" for a count.
func unitOf(v value) string {
	if v.unit.Token == "" {
		return ""
	}
	return v.unit.Kind.SI()
}
