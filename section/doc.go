// Package section lays typical sections on a grade line and cuts the road.
//
// In come an alignment, a grade line, the surveyed ground (a surface seen
// through the alignment, or surveyed lines), typical sections with the stretch
// each covers, strata, and the stripping. Then
//
//  1. NewRoad finds where the road runs and whether every station has exactly
//     one typical section (road.go);
//  2. Slice cuts the road square at a station: ground (ground.go, surveyed.go),
//     side slopes and catch points (cut.go, template.go), areas and moments of
//     cut and fill by material, strip and re-spread (measure.go, areas.go);
//  3. Turnings and Ends follow the lines of the section (centre, pavement edges,
//     hinges) to all their low and high points (lines.go, turning.go);
//  4. Clear measures the gap under or over an obstacle (clearance.go);
//  5. Inspect and RightOfWay.Outside look for what a reviewer sends back
//     (inspect.go).
//
// Out go slices, turning points, clearances and findings.
//
// Signs and units: metres throughout; offsets are right positive; crossfall is
// the rise per metre to the right on both sides; side slopes are horizontal per
// vertical; cut and fill are two areas, never one signed one; the depth of cut
// is ground minus earthwork line.
//
// The earthwork line is the underside of the pavement from hinge to hinge,
// vertical at the hinge, and outside it the finished surface less the topsoil
// dressing. Ground is the original ground less the strip depth. A side is in
// cut where that ground lies above the earthwork line just outside the hinge;
// the ditch exists only there, so areas jump where a side changes.
//
// Going outward from the hinge the first meeting of earthwork line and ground
// is the catch point, also on the ditch. Volumes are made from slices by
// package earthwork.
//
// The vocabulary is that of the road agencies' design manuals; linear
// referencing follows ISO 19148.
package section
