package config

import (
	"fmt"
	"math"

	"sagcrest/profile/station"
	"sagcrest/section"
)

// A typical section. Slopes are horizontal per vertical; zero would be a wall,
// whose volume depends on nothing but its place, and is refused.
type fileTypical struct {
	Name      string        `json:"name"`
	From      place         `json:"from" range:"[-10000000,10000000]" jsonschema_description:"absent: from the start of the road"`
	To        place         `json:"to" range:"[-10000000,10000000]" jsonschema_description:"absent: to its end"`
	Material  string        `json:"material" jsonschema_description:"what cut is made of where no stratum says otherwise"`
	Lanes     *fileLanes    `json:"lanes" jsonschema:"required"`
	Shoulders *fileShoulder `json:"shoulders" jsonschema_description:"absent: the hinge is the edge of the lane"`
	Ditch     *fileDitch    `json:"ditch" jsonschema_description:"stands in cut only; absent: none"`
	CutSlope  slope         `json:"cut_slope" jsonschema:"required" range:"(0,100]" jsonschema_description:"horizontal per vertical"`
	FillSlope slope         `json:"fill_slope" jsonschema:"required" range:"(0,100]" jsonschema_description:"horizontal per vertical"`
	Pavement  length        `json:"pavement" range:"[0,10]" jsonschema_description:"thickness of all layers together; or layers"`
	Layers    []fileLayer   `json:"layers" jsonschema_description:"from the top; or pavement"`
	Dressing  length        `json:"dressing" range:"[0,10]" jsonschema_description:"topsoil laid on everything outside the hinges; absent: none"`
}

// Both lanes are needed: a road without one side has a lane of its own there.
type fileLanes struct {
	Left  *fileBand `json:"left" jsonschema:"required"`
	Right *fileBand `json:"right" jsonschema:"required"`
}

// Shoulders may stand on one side only.
type fileShoulder struct {
	Left  *fileBand `json:"left"`
	Right *fileBand `json:"right"`
}

// A strip along the road. Crossfall beyond 0.5 is a percentage without its sign,
// not a road: the steepest published superelevation is 0.12.
type fileBand struct {
	Width     length `json:"width" jsonschema:"required" range:"[0,100]" jsonschema_description:"horizontal"`
	Crossfall ratio  `json:"crossfall" jsonschema:"required" range:"[-0.5,0.5]" jsonschema_description:"rise per metre to the right, on both sides"`
}

// A ditch, which stands in cut only.
type fileDitch struct {
	Depth     length `json:"depth" jsonschema:"required" range:"(0,100]" jsonschema_description:"from the finished hinge to the finished bottom"`
	ForeSlope slope  `json:"fore_slope" jsonschema:"required" range:"(0,100]" jsonschema_description:"horizontal per vertical"`
	Bottom    length `json:"bottom" range:"[0,100]" jsonschema_description:"width; absent: V-shaped"`
	BackSlope slope  `json:"back_slope" range:"(0,100]" jsonschema_description:"horizontal per vertical, up to the level of the hinge; absent: the cut slope starts at the bottom"`
}

// A course of the pavement. bound has no default: cover is measured to the
// underside of the bound ones.
type fileLayer struct {
	Name      string `json:"name" jsonschema:"required"`
	Thickness length `json:"thickness" jsonschema:"required" range:"(0,10]"`
	Bound     bool   `json:"bound" jsonschema:"required" jsonschema_description:"bound by bitumen or cement"`
}

// A row of the superelevation table; every key is needed, for an absent one might
// mean level or the section's own.
type fileCrossfalls struct {
	At            place `json:"at" jsonschema:"required" range:"[-10000000,10000000]"`
	LeftLane      ratio `json:"left_lane" jsonschema:"required" range:"[-0.5,0.5]" jsonschema_description:"rise per metre to the right, as all four"`
	RightLane     ratio `json:"right_lane" jsonschema:"required" range:"[-0.5,0.5]"`
	LeftShoulder  ratio `json:"left_shoulder" jsonschema:"required" range:"[-0.5,0.5]"`
	RightShoulder ratio `json:"right_shoulder" jsonschema:"required" range:"[-0.5,0.5]"`
}

// crossfalls copies the table. Whether it fits the road shows only against its
// length and sections.
func crossfalls(rows []fileCrossfalls) (out []section.Crossfalls) {
	for _, f := range rows {
		out = append(out, section.Crossfalls{At: station.Station(f.At.si), LeftLane: f.LeftLane.si, RightLane: f.RightLane.si,
			LeftShoulder: f.LeftShoulder.si, RightShoulder: f.RightShoulder.si})
	}
	return out
}

// A body of material below the stripped ground.
type fileStratum struct {
	Material string `json:"material" jsonschema:"required"`
	From     place  `json:"from" range:"[-10000000,10000000]"`
	To       place  `json:"to" range:"[-10000000,10000000]"`
	Top      length `json:"top" range:"[0,1000]" jsonschema_description:"vertical, below the stripped ground; absent: 0"`
}

// typicals reads the sections. Gaps and overlaps between them (Q11) show only
// against the length of the road.
func (r *reading) typicals(files []fileTypical) []section.Typical {
	if len(files) == 0 && r.has("typical_section") {
		r.complain("F05", "typical_section", "typical_section is empty", "a road has a section everywhere")
	}
	var all []section.Typical
	for i := range files {
		all = append(all, r.typical(&files[i], fmt.Sprintf("typical_section[%d]", i)))
	}
	return all
}

// typical reads one section.
func (r *reading) typical(f *fileTypical, key string) section.Typical {
	t := section.Typical{
		Name: f.Name, Over: r.interval(stretch{f.From, f.To, key}, false),
		CutSlope: f.CutSlope.si, FillSlope: f.FillSlope.si,
		Dressing: f.Dressing.or(0), Material: section.MaterialID(f.Material),
	}
	r.material(f.Material, key+".material")
	if l := f.Lanes; l != nil {
		t.Left.Lane, t.Right.Lane = band(l.Left), band(l.Right)
		r.someWidth(l.Left, key+".lanes.left.width")
		r.someWidth(l.Right, key+".lanes.right.width")
	}
	if s := f.Shoulders; s != nil {
		t.Left.Shoulder, t.Right.Shoulder = band(s.Left), band(s.Right)
	}
	if d := f.Ditch; d != nil {
		t.Ditch = &section.Ditch{Depth: d.Depth.si, ForeSlope: d.ForeSlope.si, Bottom: d.Bottom.or(0), BackSlope: d.BackSlope.or(0)}
	}
	r.pavement(f, &t, key)
	return t
}

// band returns a strip of no width for one that is left out.
func band(f *fileBand) section.Band {
	if f == nil {
		return section.Band{}
	}
	return section.Band{Width: f.Width.si, Crossfall: f.Crossfall.si}
}

// someWidth refuses a lane of no width; a shoulder may have none.
func (r *reading) someWidth(f *fileBand, key string) {
	if f != nil && f.Width.ok && f.Width.si == 0 {
		r.complain("F06", key, key+" is 0 m; it is more than 0 m", "a road has a lane on each side of its reference line")
	}
}

// pavement takes one thickness, whose underside counts both as that of all
// layers and of the bound ones, or the layers.
func (r *reading) pavement(f *fileTypical, t *section.Typical, key string) {
	one, many := r.has(key+".pavement"), r.has(key+".layers")
	switch {
	case one && many:
		r.complain("F08", key+".layers", key+" has both pavement and layers", "keep one")
	case one:
		t.Pavement, t.Bound = f.Pavement.si, f.Pavement.si
	case many:
		for _, l := range f.Layers {
			t.Layers = append(t.Layers, section.Layer{Name: l.Name, Thickness: l.Thickness.si, Bound: l.Bound})
			t.Pavement += l.Thickness.si
		}
		t.Bound = bound(t.Layers)
	default:
		r.complain("F05", key, key+" has neither pavement nor layers", `give pavement = "…", or layers`)
	}
}

// bound returns the depth of the underside of the lowest bound layer. A loose
// course between bound ones counts: cover is measured to one underside.
func bound(layers []section.Layer) (depth float64) {
	total := 0.0
	for _, l := range layers {
		total += l.Thickness
		if l.Bound {
			depth = total
		}
	}
	return depth
}

// sameTop is the difference in metres below which two tops are equal: far
// below anything that a borehole tells, far above rounding.
const sameTop = 1e-6

// strata compares each new stratum with the earlier ones: below its top the
// deepest top holds, which equal tops leave open.
func (r *reading) strata(files []fileStratum) []section.Stratum {
	var all []section.Stratum
	for i, f := range files {
		key := fmt.Sprintf("stratum[%d]", i)
		s := section.Stratum{
			Material: section.MaterialID(f.Material), Over: r.interval(stretch{f.From, f.To, key}, false), Top: f.Top.or(0),
		}
		r.material(f.Material, key+".material")
		for j, other := range all {
			if math.Abs(other.Top-s.Top) < sameTop && !other.Over.Intersect(s.Over).Empty() {
				r.complain("F08", key+".top", fmt.Sprintf("%s and stratum[%d] have the same top, %s m below the ground, on a common stretch", key, j, shortest(s.Top)),
					"the deeper top holds below it: equal ones contradict")
			}
		}
		all = append(all, s)
	}
	return all
}
