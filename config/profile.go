package config

import (
	"fmt"

	"sagcrest/profile"
	"sagcrest/profile/station"
)

// The grade line, and what its checks will need later: design speed and criteria
// are read, checked for form and handed on without effect.
type fileProfile struct {
	DesignSpeed speed       `json:"design_speed" range:"(0,300]" jsonschema_description:"kept without effect until its checks are built"`
	Criteria    string      `json:"criteria" jsonschema:"enum=aashto-metric,enum=aashto-us,enum=irc,enum=rhd" jsonschema_description:"set of published rules; kept without effect until its checks are built"`
	PVI         []filePVI   `json:"pvi" jsonschema:"required" jsonschema_description:"points of vertical intersection; the first and the last are the ends"`
	CurveTable  []fileCurve `json:"curve_table" jsonschema_description:"the table of another hand, for checking only (P02)"`
}

// A point of vertical intersection. Levels range from −1000 m (deeper than any
// dry land) to 10,000 m; a level outside is in another unit.
type filePVI struct {
	Station place      `json:"station" jsonschema:"required" range:"[-10000000,10000000]"`
	Elev    coordinate `json:"elev" jsonschema:"required" range:"[-1000,10000]" jsonschema_description:"level of the intersection"`
	Length  length     `json:"length" range:"(0,100000]" jsonschema_description:"of the vertical curve; one of length, k, radius, or none for a break"`
	K       perPercent `json:"k" range:"(0,10000]" jsonschema_description:"length per percent of change of grade"`
	Radius  length     `json:"radius" range:"(0,1000000]" jsonschema_description:"at the turning point of the parabola"`
}

// A row of the curve table of another hand. It never defines anything: a row that
// disagrees is P02, not a contradiction of the project.
type fileCurve struct {
	PVI    place      `json:"pvi" jsonschema:"required" range:"[-10000000,10000000]"`
	Length length     `json:"length" range:"[0,100000]"`
	K      perPercent `json:"k" range:"[0,10000]"`
	PVC    place      `json:"pvc" range:"[-10000000,10000000]"`
	PVT    place      `json:"pvt" range:"[-10000000,10000000]"`
}

// The level, and perhaps the grade, that the road meets at one of its ends.
type fileTieIn struct {
	Name  string     `json:"name"`
	End   string     `json:"end" jsonschema:"required,enum=start,enum=end" jsonschema_description:"which end of the road"`
	Elev  coordinate `json:"elev" jsonschema:"required" range:"[-1000,10000]"`
	Grade ratio      `json:"grade" range:"[-1,1]" jsonschema_description:"uphill positive"`
}

// profile reads the points. Order of stations (A01) and room for the curves (P01)
// are judged where the curves are laid.
func (r *reading) profile(f *fileProfile) []profile.PVI {
	if f == nil {
		return nil
	}
	if n := len(f.PVI); n < 2 && r.has("profile.pvi") {
		r.complain("F05", "profile.pvi", fmt.Sprintf("a grade line needs two points or more, this has %d", n), "give both ends")
	}
	var all []profile.PVI
	for i, p := range f.PVI {
		key := fmt.Sprintf("profile.pvi[%d]", i)
		sizes := 0
		for _, size := range []string{"length", "k", "radius"} {
			if !r.has(key + "." + size) {
				continue
			}
			if sizes++; sizes > 1 {
				r.complain("F08", key+"."+size, key+" has more than one size", "keep one of length, k and radius")
			}
		}
		all = append(all, profile.PVI{
			At: station.Station(p.Station.si), Elev: p.Elev.si,
			Length: p.Length.or(0), K: p.K.or(0), Radius: p.Radius.or(0),
		})
	}
	return all
}

// curveTable keeps absent and zero apart: only what is claimed is checked.
func (r *reading) curveTable(f *fileProfile) []profile.CurveClaim {
	if f == nil {
		return nil
	}
	var all []profile.CurveClaim
	for i, c := range f.CurveTable {
		if !c.Length.given && !c.K.given && !c.PVC.given && !c.PVT.given {
			key := fmt.Sprintf("profile.curve_table[%d]", i)
			r.complain("F05", key, key+" claims nothing", "give any of length, k, pvc, pvt")
		}
		all = append(all, profile.CurveClaim{
			PVI: station.Station(c.PVI.si), Length: c.Length.pointer(), K: c.K.pointer(),
			PVC: stationPointer(c.PVC), PVT: stationPointer(c.PVT),
		})
	}
	return all
}

// tieIns allows one for each end: two would ask for two levels at one place.
func (r *reading) tieIns(files []fileTieIn) []profile.TieIn {
	var all []profile.TieIn
	seen := map[string]bool{}
	for i, f := range files {
		if seen[f.End] && f.End != "" {
			r.complain("F08", fmt.Sprintf("tie_in[%d].end", i), "the "+f.End+" of the road has two tie-ins", "keep one")
		}
		seen[f.End] = true
		all = append(all, profile.TieIn{Name: f.Name, AtEnd: f.End == "end", Elev: f.Elev.si, Grade: f.Grade.pointer()})
	}
	return all
}
