// Package station is the common tongue for places along a road.
//
// A Station is a length in metres along the horizontal alignment, counted from
// its first point (the linear referencing of ISO 19148). What the trade writes
// on paper, "1+250.000", is a label: Labels turns one into the other. An
// Offset is a length in metres square to the alignment, positive to the right
// of somebody who looks up-station. An Interval is the half-open stretch
// [From, To).
//
// Labels are metric (kilometres and metres, three digits before the decimal
// point) or counted in hundreds of feet (two digits); the foot is one of the
// two that exist and is always named by the caller.
package station
