package config

import (
	"fmt"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// Something that the road passes under or over.
type fileClearance struct {
	Name     string     `json:"name" jsonschema:"required"`
	Side     string     `json:"side" jsonschema:"required,enum=under,enum=over" jsonschema_description:"the road passes under or over it"`
	From     place      `json:"from" jsonschema:"required" range:"[-10000000,10000000]"`
	To       place      `json:"to" jsonschema:"required" range:"[-10000000,10000000]"`
	Elev     coordinate `json:"elev" range:"[-1000,10000]" jsonschema_description:"for both ends; or elev_from and elev_to"`
	ElevFrom coordinate `json:"elev_from" range:"[-1000,10000]" jsonschema_description:"soffit (under) or top (over) at from"`
	ElevTo   coordinate `json:"elev_to" range:"[-1000,10000]" jsonschema_description:"the same at to; linear between"`
	Gap      length     `json:"gap" jsonschema:"required" range:"[0,100]" jsonschema_description:"the least wanted"`
	Left     coordinate `json:"left" range:"[-1000,1000]" jsonschema_description:"offset of its left end; absent: the hinge"`
	Right    coordinate `json:"right" range:"[-1000,1000]" jsonschema_description:"offset of its right end; absent: the hinge"`
}

// obstacles reads the clearances. From and to may be one place: a wire has no
// width along the road.
func (r *reading) obstacles(files []fileClearance) []section.Obstacle {
	var all []section.Obstacle
	seen := map[string]bool{}
	for i := range files {
		f, key := &files[i], fmt.Sprintf("clearance[%d]", i)
		r.unique(seen, f.Name, key+".name")
		o := section.Obstacle{
			Name: f.Name, Under: f.Side == "under", Over: r.interval(stretch{f.From, f.To, key}, true),
			Gap: f.Gap.si, Left: offsetPointer(f.Left), Right: offsetPointer(f.Right),
		}
		o.ElevFrom, o.ElevTo = r.levels(f, key)
		if o.Left != nil && o.Right != nil && *o.Left > *o.Right {
			r.complain("F06", key+".right", fmt.Sprintf("%s reaches from offset %s m to %s m", key, shortest(f.Left.si), shortest(f.Right.si)), "left comes first; left of the road is negative")
		}
		all = append(all, o)
	}
	return all
}

// levels reads elev for both ends, or elev_from and elev_to.
func (r *reading) levels(f *fileClearance, key string) (from, to float64) {
	one, first, last := r.has(key+".elev"), r.has(key+".elev_from"), r.has(key+".elev_to")
	switch {
	case one && (first || last):
		r.complain("F08", key+".elev", key+" has both elev and elev_from, elev_to", "keep one")
	case one:
		return f.Elev.si, f.Elev.si
	case !first && !last:
		r.complain("F05", key, key+" has no level", "give elev, or elev_from and elev_to")
	case !first:
		r.complain("F05", key+".elev_from", key+".elev_from is missing", "give both, or elev")
	case !last:
		r.complain("F05", key+".elev_to", key+".elev_to is missing", "give both, or elev")
	}
	return f.ElevFrom.si, f.ElevTo.si
}

// The land that the road may use, as one line on each side; either may be left
// out, and then nothing is checked there.
type fileRightOfWay struct {
	Left  []fileCorner `json:"left" jsonschema_description:"corners of the line on the left; linear between"`
	Right []fileCorner `json:"right" jsonschema_description:"corners of the line on the right; linear between"`
}

// A corner of such a line.
type fileCorner struct {
	Station place      `json:"station" jsonschema:"required" range:"[-10000000,10000000]"`
	Offset  coordinate `json:"offset" jsonschema:"required" range:"[-10000,10000]" jsonschema_description:"left of the road is negative"`
}

// rightOfWay reads both lines. Where they end, no land is known: linear between
// corners, nothing before the first or after the last.
func (r *reading) rightOfWay(f *fileRightOfWay) section.RightOfWay {
	if f == nil {
		return section.RightOfWay{}
	}
	return section.RightOfWay{
		Left:  r.limits(f.Left, "right_of_way.left", -1),
		Right: r.limits(f.Right, "right_of_way.right", 1),
	}
}

// limits reads one line. It must lie on its own side of the reference line and
// its stations must increase.
func (r *reading) limits(files []fileCorner, key string, side float64) []section.Limit {
	if len(files) == 1 {
		r.complain("F05", key, key+" has one corner; a line needs two", "give the corner at its other end")
	}
	var all []section.Limit
	for i, f := range files {
		l := section.Limit{At: station.Station(f.Station.si), Offset: station.Offset(f.Offset.si)}
		if i > 0 && f.Station.ok && files[i-1].Station.ok && l.At <= all[i-1].At {
			r.complain("A01", fmt.Sprintf("%s[%d].station", key, i), fmt.Sprintf("%s[%d] lies at %s, not beyond %s", key, i, r.labels.Format(l.At), r.labels.Format(all[i-1].At)),
				"stations increase along the road")
		}
		if f.Offset.ok && f.Offset.si*side < 0 {
			r.complain("F06", fmt.Sprintf("%s[%d].offset", key, i), fmt.Sprintf("%s[%d] has offset %s m, on the other side of the road", key, i, shortest(f.Offset.si)),
				"offsets are negative on the left, positive on the right")
		}
		all = append(all, l)
	}
	return all
}
