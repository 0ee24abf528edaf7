// Package drainage puts culverts under a road and holds them against their
// cover.
//
// In come a road (package section) and what the project says of each crossing.
// Lay then
//
//  1. finds the crossing, given or at the lowest ground between two stations,
//     and the plan line of the barrel with its skew (axis.go);
//  2. finds both ends: where the finished side slope, cut along the barrel,
//     first meets the original ground, which is the invert there; or where it
//     reaches an invert that the project gives (ends.go);
//  3. names the inlet, the upstream end: the project's word, else higher ground;
//     given inverts never turn it round (lay.go);
//  4. measures the cover from hinge to hinge over every barrel, vertically from
//     the outside of the crown to the datum of the cover rule (cover.go,
//     judge.go). Cover never sets an invert: it is judged, and where it is short
//     the ways to mend it are listed with their figures (mends.go).
//
// Out go laid culverts and findings (pages.go; the texts stand in
// catalogue.go). Published cover rules are data with their source (rules.go).
//
// Signs and units: metres; x along a barrel is positive to the right end; skew
// is measured from the normal to the road, with the end that lies ahead; a
// slope is positive when water runs from inlet to outlet. Every point of a
// barrel sees the section of its own station.
//
// The figures support a licensed engineer's judgement and do not replace it;
// local codes and the owner's manuals govern.
package drainage
