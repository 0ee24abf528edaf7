package config

import (
	"fmt"

	"sagcrest/drainage"
	"sagcrest/profile/station"
)

// A crossing. Nothing here sets an invert but the two inverts themselves: cover
// is measured against the ground that the barrel follows.
//
// Skew ends below 80 degrees, where a barrel runs nearly along the road and its
// length (1/cos of the skew) passes six times the width; common practice stops
// at 45.
type fileCulvert struct {
	ID           string     `json:"id" jsonschema:"required"`
	Station      place      `json:"station" range:"[-10000000,10000000]" jsonschema_description:"where its axis meets the reference line; or between"`
	Between      []place    `json:"between" range:"[-10000000,10000000]" jsonschema_description:"two stations: at the lowest ground between them"`
	Skew         angle      `json:"skew" range:"[0,80)" jsonschema_description:"degrees from the normal; absent: 0"`
	SkewSide     string     `json:"skew_side" jsonschema:"enum=right_ahead,enum=left_ahead" jsonschema_description:"the end that lies ahead; required where skew > 0"`
	InletSide    string     `json:"inlet_side" jsonschema:"enum=left,enum=right" jsonschema_description:"the upstream end; absent: the end of higher ground"`
	Shape        string     `json:"shape" jsonschema:"required,enum=circular,enum=box"`
	Diameter     length     `json:"diameter" range:"(0,100]" jsonschema_description:"inside, of a circular barrel"`
	Span         length     `json:"span" range:"(0,100]" jsonschema_description:"inside, of a box"`
	Rise         length     `json:"rise" range:"(0,100]" jsonschema_description:"inside, of a box"`
	Wall         length     `json:"wall" jsonschema:"required" range:"[0,10]" jsonschema_description:"of a box: its top slab"`
	Barrels      count      `json:"barrels" range:"[1,100]" jsonschema_description:"absent: 1"`
	Spacing      length     `json:"spacing" range:"[0,100]" jsonschema_description:"clear distance; absent: one outside diameter or span"`
	CoverRule    string     `json:"cover_rule" jsonschema_description:"name of a published rule; or cover with cover_datum"`
	Cover        length     `json:"cover" range:"[0,1000]" jsonschema_description:"the project's own figure"`
	CoverDatum   string     `json:"cover_datum" jsonschema:"enum=subgrade,enum=pavement_underside,enum=surface" jsonschema_description:"surface to which cover is measured"`
	InletInvert  coordinate `json:"inlet_invert" range:"[-1000,10000]" jsonschema_description:"both inverts or neither"`
	OutletInvert coordinate `json:"outlet_invert" range:"[-1000,10000]" jsonschema_description:"both inverts or neither"`
}

// culverts reads the crossings and checks what their keys say together. Where
// the crossing lies and whether its cover suffices needs the ground.
func (r *reading) culverts(files []fileCulvert) []drainage.Culvert {
	var all []drainage.Culvert
	seen := map[string]bool{}
	for i := range files {
		f, key := &files[i], fmt.Sprintf("culvert[%d]", i)
		r.unique(seen, f.ID, key+".id")
		c := drainage.Culvert{
			ID: f.ID, Skew: f.Skew.or(0), RightAhead: f.SkewSide == "right_ahead", InletSide: side(f.InletSide),
			Shape: drainage.Shape(f.Shape), Wall: f.Wall.si, Barrels: int(f.Barrels.or(1)), Spacing: f.Spacing.pointer(),
			Rule: f.CoverRule, Cover: f.Cover.pointer(), CoverDatum: drainage.Datum(f.CoverDatum),
			InletInvert: f.InletInvert.pointer(), OutletInvert: f.OutletInvert.pointer(),
		}
		if c.Skew == 0 {
			c.RightAhead = false // a square barrel has no end ahead
		} else if !r.has(key + ".skew_side") {
			r.complain("F05", key+".skew_side", key+".skew_side is missing: a skew says which end lies ahead", `give "right_ahead" or "left_ahead"`)
		}
		r.crossing(f, &c, key)
		r.size(f, &c, key)
		r.cover(f, key)
		r.inverts(key)
		all = append(all, c)
	}
	return all
}

// side turns a word into the sign of an offset, 0 when unsaid.
func side(word string) int {
	switch word {
	case "left":
		return -1
	case "right":
		return 1
	}
	return 0
}

// crossing reads station, or between for the lowest ground.
func (r *reading) crossing(f *fileCulvert, c *drainage.Culvert, key string) {
	at, between := r.has(key+".station"), r.has(key+".between")
	switch {
	case at && between:
		r.complain("F08", key+".between", key+" has both station and between", "keep one")
	case at:
		c.Station = stationPointer(f.Station)
	case !between:
		r.complain("F05", key, key+" has no place", "give station, or between two stations")
	case len(f.Between) != 2:
		r.complain("F06", key+".between", fmt.Sprintf("%s.between has %d stations", key, len(f.Between)), "give two")
	case f.Between[0].ok && f.Between[1].ok:
		over := station.Interval{From: station.Station(f.Between[0].si), To: station.Station(f.Between[1].si)}
		if over.Empty() {
			r.complain("A01", key+".between", fmt.Sprintf("%s lies between %s and %s", key, r.labels.Format(over.From), r.labels.Format(over.To)), "stations increase along the road")
		}
		c.Between = &over
	}
}

// size asks for the dimensions of the shape and refuses those of the other.
func (r *reading) size(f *fileCulvert, c *drainage.Culvert, key string) {
	c.Diameter, c.Span, c.Rise = f.Diameter.or(0), f.Span.or(0), f.Rise.or(0)
	r.dimensions(f.Shape, key)
}

// dimensions serves culverts and their prices: both are told apart by shape, and
// a size of the other shape is more likely a wrong shape than a spare number.
func (r *reading) dimensions(shape, key string) {
	wanted, foreign := []string{"diameter"}, []string{"span", "rise"}
	switch shape {
	case string(drainage.Circular):
	case string(drainage.Box):
		wanted, foreign = foreign, wanted
	default: // no shape, no dimensions to ask for
		return
	}
	for _, name := range wanted {
		if !r.has(key + "." + name) {
			r.complain("F05", key+"."+name, fmt.Sprintf("%s.%s is missing: its shape is %s", key, name, shape), "give it, measured inside")
		}
	}
	for _, name := range foreign {
		if r.has(key + "." + name) {
			r.complain("F08", key+"."+name, fmt.Sprintf("%s has a %s, yet its shape is %s", key, name, shape), "keep what belongs to the shape")
		}
	}
}

// cover asks for a rule, or a figure with its datum, or a rule that leaves the
// figure to the project together with one.
func (r *reading) cover(f *fileCulvert, key string) {
	named, figure, datum := r.has(key+".cover_rule"), r.has(key+".cover"), r.has(key+".cover_datum")
	if !named {
		switch {
		case !figure:
			r.complain("F05", key, key+" has neither cover_rule nor cover", "name a rule, or give cover and cover_datum")
		case !datum:
			r.complain("F05", key+".cover_datum", key+".cover_datum is missing: a cover says what it is measured to", `give "subgrade", "pavement_underside" or "surface"`)
		}
		return
	}
	var ids []string
	for _, rule := range drainage.CoverRules() {
		ids = append(ids, rule.ID)
	}
	rule, ok := drainage.FindCoverRule(f.CoverRule)
	switch {
	case !ok:
		r.named(f.CoverRule, key+".cover_rule", "rule", ids)
	case rule.HasNumber && figure:
		r.complain("F08", key+".cover", fmt.Sprintf("%s has a cover, yet its rule %q brings its own figure", key, rule.ID), "keep one of cover_rule and cover")
	case !rule.HasNumber && !figure:
		r.complain("F05", key+".cover", fmt.Sprintf("%s.cover is missing: the rule %q has no figure", key, rule.ID), "give the figure of the project")
	}
}

// inverts wants both or neither: one alone would fix the slope by the ground at
// the other end, which nobody asked for.
func (r *reading) inverts(key string) {
	inlet, outlet := r.has(key+".inlet_invert"), r.has(key+".outlet_invert")
	if inlet != outlet {
		missing := "inlet_invert"
		if inlet {
			missing = "outlet_invert"
		}
		r.complain("F05", key+"."+missing, fmt.Sprintf("%s.%s is missing", key, missing), "give both inverts or neither")
	}
}
