package study

import (
	"context"

	"sagcrest/earthwork"
	"sagcrest/profile/finding"
	"sagcrest/profile/station"
	"sagcrest/section"
)

// stations says where the road is cut.
func (o *Outcome) stations() (found []finding.Finding) {
	road, req := o.Road, o.Project.Request
	key := earthwork.KeyPlaces{
		Over: road.Over(), Culverts: o.crossings(),
		Curves: road.Grade().Breaks(), Elements: road.Line().Breaks(),
	}
	for _, t := range road.Typicals() {
		key.Sections = append(key.Sections, t.Over.From, t.Over.To)
	}
	for _, c := range road.Superelevation() {
		key.Rows = append(key.Rows, c.At)
	}
	for _, s := range road.Strata() {
		key.Strata = append(key.Strata, s.Over.From, s.Over.To)
	}
	for _, t := range o.Turnings {
		if t.Line == section.Centre {
			key.Turnings = append(key.Turnings, t.At, t.To)
		}
	}
	o.Stations = earthwork.PayStations(req, key)
	found = earthwork.CheckExclusions(req.Exclusions, road.Over())
	return append(found, earthwork.CheckExtras(req.Extras, road.Over())...)
}

// cut slices the road at its pay stations.
func (o *Outcome) cut(ctx context.Context, progress Progress) []finding.Finding {
	var w section.Scratch
	for i, p := range o.Stations {
		if ctx.Err() != nil {
			return nil
		}
		progress("sections", i, len(o.Stations))
		if p.Changes {
			o.slice(&w, p.At, true)
		}
		o.slice(&w, p.At, false)
	}
	found := o.Road.Inspect(o.Slices)
	found = append(found, o.Project.RightOfWay.CheckOnRoad(o.Road)...)
	beyond, more := o.Project.RightOfWay.Outside(o.Slices)
	o.Beyond = beyond
	return append(found, more...)
}

func (o *Outcome) slice(w *section.Scratch, at station.Station, before bool) {
	var s section.Slice
	o.Road.Slice(w, &s, at, before)
	o.Slices = append(o.Slices, s)
}

// cuts pairs the slices with the pay stations.
func (o *Outcome) cuts() earthwork.Cuts {
	c := earthwork.Cuts{Stations: o.Stations}
	next := 0
	for _, p := range o.Stations {
		before := &o.Slices[next]
		if p.Changes {
			next++
		}
		c.Before = append(c.Before, before)
		c.After = append(c.After, &o.Slices[next])
		next++
	}
	return c
}
