// Package earthwork turns slices of a road into volumes and balances them.
//
// In come pay stations with the slices cut there (package section), the
// project's materials, and what is asked: the rule that pays, exceptions, hand
// quantities. Then
//
//  1. PayStations says where the road is cut (stations.go);
//  2. Measure makes volumes between neighbouring stations by average end areas
//     and by the pyramid rule, cut by material, strip, re-spread and land
//     (volumes.go, quantities.go);
//  3. the mass diagram sums what the cut makes against what the fill needs, in
//     a stated state, with the hand quantities in it (mass.go).
//
// Out go Quantities and findings. Package bill prices them.
//
// Signs, units and states: m, m², m³; cut and fill are two non-negative figures.
// Cut is Bank (as it lies in the ground), fill is Compacted, a truck carries
// Loose; only a Material converts (shrinkage s: compacted = bank × (1 − s)).
// Topsoil has its own ledger, stripped less re-spread, and never enters the
// balance. Mass ordinates rise in cut. End areas never use the curvature of the
// alignment.
//
// References: W. L. Webb, Railroad Construction (end areas, pyramids); ISO
// 16739-1 (the three states of a volume).
package earthwork
