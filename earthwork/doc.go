// Package earthwork turns slices of a road into volumes and balances them.
//
// In come pay stations with the slices cut there (package section), the
// project's materials, and what is asked: the rule that pays, exceptions, hand
// quantities. Then
//
//  1. PayStations says where the road is cut (stations.go), with exceptions in
//     it (exceptions.go);
//  2. Measure makes volumes between neighbouring stations by average end areas
//     and by the pyramid rule (areas.go), cut by material, strip, re-spread and
//     land (volumes.go), and sums them (quantities.go, book.go);
//  3. hand quantities are placed (extras.go), and the mass diagram sums what the
//     cut makes against what the fill needs, in a stated state (mass.go).
//
// Out go Quantities, which carry every intermediate, and findings. FromAreas
// does step 2 for areas that somebody measured on paper. Package bill prices
// the result.
//
// Signs, units and states: m, m², m³; cut and fill are two non-negative figures.
// Cut is Bank (as it lies in the ground), fill is Compacted, a truck carries
// Loose; only a Material converts (shrinkage s: compacted = bank × (1 − s),
// swell: loose = bank × (1 + swell)). Topsoil has its own ledger, stripped less
// re-spread, and never enters the balance. Mass ordinates rise in cut. End areas
// never use the curvature of the alignment.
//
// What is unknown: an interval with a slice without areas is not Known, and then
// the totals are not; cut of a material without shrinkage leaves the volumes
// alone and takes the mass diagram away. An exception counts in nothing.
//
// References: W. L. Webb, Railroad Construction: Theory and Practice (end areas,
// pyramids, mass diagram); Fundamentals of Transportation (Wikibooks), sec. 7;
// ISO 16739-1 (undisturbed, loose and compacted volume).
package earthwork
