package config

import (
	"fmt"
	"math"

	"sagcrest/config/quantity"
	"sagcrest/profile/alignment"
	"sagcrest/profile/station"
)

// The horizontal alignment as points of intersection. Station equations and
// degrees of curve are known by name and refused until they are built.
type fileAlignment struct {
	Start place    `json:"start" range:"[-10000000,10000000]" jsonschema_description:"label of the first point; absent: 0+000"`
	PI    []filePI `json:"pi" jsonschema:"required" jsonschema_description:"points of intersection; the first and the last are the ends"`
}

// A corner of the alignment. The range of the coordinates, 10⁸ m, is that of
// every projected system on earth and of the ground as well.
type filePI struct {
	N      coordinate `json:"n" jsonschema:"required" range:"[-100000000,100000000]" jsonschema_description:"northing"`
	E      coordinate `json:"e" jsonschema:"required" range:"[-100000000,100000000]" jsonschema_description:"easting"`
	Radius length     `json:"radius" range:"(0,1000000]" jsonschema_description:"of the arc; its side follows from the points"`
	Spiral length     `json:"spiral" range:"[0,100000]" jsonschema_description:"length of the clothoid on both sides"`
}

// startLabel finds the label of the first point before any other station can
// be read. A bare number is metres or feet, like the label itself.
func (r *reading) startLabel(f *fileAlignment) {
	if r.units.Feet() {
		r.labels.Foot = r.units.Metres()
	}
	if f == nil || !f.Start.given {
		return
	}
	if f.Start.bare {
		if !math.IsNaN(f.Start.number) && !math.IsInf(f.Start.number, 0) {
			r.labels.Start = f.Start.number
		}
		return
	}
	if v, err := r.labels.ParseLabel(f.Start.text); err == nil {
		r.labels.Start = v
	} // what is no station is complained of when all are settled
}

// alignment hands the corners on as they are. Whether arcs and spirals fit
// between them (A16) is geometry and not decided here.
func (r *reading) alignment(f *fileAlignment) []alignment.PI {
	if f == nil {
		return nil
	}
	if n := len(f.PI); n < 2 && r.has("alignment.pi") {
		r.complain("F05", "alignment.pi", fmt.Sprintf("an alignment needs two points or more, this has %d", n), "give both ends")
	}
	var all []alignment.PI
	for i, p := range f.PI {
		key := fmt.Sprintf("alignment.pi[%d]", i)
		if (i == 0 || i == len(f.PI)-1) && (p.Radius.given || p.Spiral.given) {
			r.complain("F08", key, key+" is an end of the alignment and has a curve", "leave radius and spiral out, or add the end that lies behind it")
		}
		if p.Spiral.given && !r.has(key+".radius") {
			r.complain("F05", key+".radius", key+".radius is missing: a spiral leads into an arc", "give its radius")
		}
		all = append(all, alignment.PI{
			E: p.E.si, N: p.N.si, Radius: p.Radius.or(0),
			SpiralIn: p.Spiral.or(0), SpiralOut: p.Spiral.or(0),
		})
	}
	r.whichFoot(f)
	return all
}

// whichFoot refuses a bare "ft" on map coordinates (U01): at 500 km from the
// origin the two feet lie a metre apart. On a local grid the international
// foot is taken, and Units keeps saying that nobody named it.
func (r *reading) whichFoot(f *fileAlignment) {
	if r.units != quantity.FeetUnsaid {
		return
	}
	for i, p := range f.PI {
		for _, c := range []struct {
			key string
			v   coordinate
		}{{"n", p.N}, {"e", p.E}} {
			if !c.v.bare || math.Abs(c.v.number) <= quantity.MapCoordinate {
				continue
			}
			r.complain("U01", "units", fmt.Sprintf(`units are "ft" on map coordinates (alignment.pi[%d].%s is %s ft): which foot is unsaid`, i, c.key, shortest(c.v.number)),
				`write "international feet" or "us survey feet"`)
			return
		}
	}
}

// stretch is what many tables have: from and to along the road.
type stretch struct {
	from, to place
	key      string
}

// interval returns the stretch; an absent end is open, since such a table
// holds for the whole road. Ends that do not increase are A01.
func (r *reading) interval(s stretch, touching bool) station.Interval {
	over := station.Everywhere()
	if s.from.ok {
		over.From = station.Station(s.from.si)
	}
	if s.to.ok {
		over.To = station.Station(s.to.si)
	}
	if s.from.ok && s.to.ok && (over.From > over.To || over.From == over.To && !touching) {
		r.complain("A01", s.key+".to", fmt.Sprintf("%s runs from %s to %s", s.key, r.labels.Format(over.From), r.labels.Format(over.To)),
			"stations increase along the road")
	}
	return over
}

// stationPointer returns nil for a station that is absent or unusable.
func stationPointer(p place) *station.Station {
	if !p.ok {
		return nil
	}
	s := station.Station(p.si)
	return &s
}

// offsetPointer returns nil for an offset that is absent or unusable.
func offsetPointer(c coordinate) *station.Offset {
	if !c.ok {
		return nil
	}
	o := station.Offset(c.si)
	return &o
}
