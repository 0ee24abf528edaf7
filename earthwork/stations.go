package earthwork

import (
	"cmp"
	"math"
	"slices"

	"sagcrest/profile/station"
)

// Reason tells why a station is a pay station.
type Reason string

// The reasons, in the order in which they win over one another when two
// stations lie closer than a centimetre.
const (
	RoadStart Reason = "start"
	RoadEnd   Reason = "end"
	ByExcept  Reason = "exception"
	BySection Reason = "typical section"
	ByStratum Reason = "material"
	ByStep    Reason = "interval"
	ByCurve   Reason = "vertical curve"
	ByElement Reason = "horizontal element"
	ByRow     Reason = "superelevation"
	ByTurning Reason = "turning point"
	ByCulvert Reason = "culvert"
)

// PayStation is a place where the road is cut for payment. Changes tells that a
// typical section or a stratum ends or begins there: the interval before ends
// with the old, the next begins with the new. Paid is false strictly inside an
// exception.
type PayStation struct {
	At            station.Station
	Why           Reason
	Changes, Paid bool
}

// KeyPlaces are the stations that geometry gives.
type KeyPlaces struct {
	Over                   station.Interval // the road
	Sections, Strata       []station.Station
	Curves, Elements, Rows []station.Station // Rows: of the superelevation table
	Turnings, Culverts     []station.Station
}

// PayStations returns the stations of the road at which it is cut, increasing:
// start, end, both ends of every exception, of every typical section and
// material length, every whole interval of the printed label, and, unless
// req.KeyPoints is false, the key points. Of two closer than a centimetre the
// one named first stays; what lies off the road is left out.
func PayStations(req Request, key KeyPlaces) []PayStation {
	l := payList{over: key.Over}
	l.add(RoadStart, key.Over.From)
	l.add(RoadEnd, key.Over.To)
	for _, e := range onRoad(req.Exclusions, key.Over) {
		l.add(ByExcept, e.From, e.To)
	}
	l.add(BySection, key.Sections...)
	l.add(ByStratum, key.Strata...)
	l.add(ByStep, wholeSteps(req, key.Over)...)
	if req.KeyPoints {
		l.add(ByCurve, key.Curves...)
		l.add(ByElement, key.Elements...)
		l.add(ByRow, key.Rows...)
		l.add(ByTurning, key.Turnings...)
		l.add(ByCulvert, key.Culverts...)
	}
	closed := closedLengths(req.Exclusions, key.Over)
	for i := range l.stations {
		p := &l.stations[i]
		p.Paid = !strictlyInside(closed, p.At)
		p.Changes = p.At > key.Over.From && p.At < key.Over.To &&
			(anyClose(key.Sections, p.At) || anyClose(key.Strata, p.At))
	}
	return l.stations
}

// payList grows in order of station; no two in it are closer than a centimetre.
type payList struct {
	over     station.Interval
	stations []PayStation
}

func (l *payList) add(why Reason, ss ...station.Station) {
	for _, s := range ss {
		if s < l.over.From || s > l.over.To {
			continue
		}
		i, _ := slices.BinarySearchFunc(l.stations, s, func(p PayStation, s station.Station) int { return cmp.Compare(p.At, s) })
		// Only the neighbours can be closer than a centimetre.
		if i > 0 && isClose(l.stations[i-1].At, s) || i < len(l.stations) && isClose(l.stations[i].At, s) {
			continue
		}
		l.stations = slices.Insert(l.stations, i, PayStation{At: s, Why: why})
	}
}

// tick is far below anything set out and far above the rounding of stations:
// two places exactly a centimetre apart stay two, whatever their last bits.
const tick = 1e-9

// isClose reports whether two stations are closer than a centimetre.
func isClose(a, b station.Station) bool {
	return math.Abs(float64(a-b)) < station.Same-tick
}

// anyClose reports whether a change lies at s. It need not be the same number:
// where an exception ends a few millimetres from a change, one station stays
// for both.
func anyClose(changes []station.Station, s station.Station) bool {
	return slices.ContainsFunc(changes, func(c station.Station) bool { return isClose(c, s) })
}

// wholeSteps returns the stations whose printed label is a whole multiple of
// the pay interval.
func wholeSteps(req Request, over station.Interval) (out []station.Station) {
	if !(req.PayStep > 0) {
		return nil
	}
	// A label that misses a multiple by 1e-9 of a step is one.
	first := math.Ceil(req.Labels.Value(over.From)/req.PayStep - 1e-9)
	last := math.Floor(req.Labels.Value(over.To)/req.PayStep + 1e-9)
	for n := first; n <= last; n++ {
		out = append(out, req.Labels.Of(n*req.PayStep))
	}
	return out
}
