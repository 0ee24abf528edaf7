// Package terrain is the ground in easting, northing and level: surfaces made
// of triangles, and the lines that vertical planes cut out of them. It knows no
// stations and no files.
//
// What comes in: surveyed points, or a raster of levels. What goes out: a
// Surface, which gives the level at a place, the break points of a straight cut
// and its triangles, and carries the accuracy that was stated. Metres
// throughout; [0] is easting, [1] northing; triangles run anticlockwise.
//
// A Triangulation is made in five steps:
//
//  1. Points whose coordinates round to the same millimetre become one, at the
//     mean of their levels, summed in order of level; levels more than 20 mm
//     apart are finding U08 (points.go).
//  2. Coordinates become millimetres from an origin near the survey, so that
//     map coordinates near 5e6 lose nothing and surveys written in decimals
//     become whole numbers, whose ties are exact (frame, points.go).
//  3. The points are sorted along a Hilbert curve (hilbert.go) and inserted one
//     by one: the triangles whose circle holds the new point give way to a fan
//     about it (delaunay.go). Sides and circles are decided exactly, in floats
//     where their error bound allows and in expansions where not
//     (predicates.go, expansion.go).
//  4. Where four points or more lie on one circle, the polygon between them is
//     filled from its westernmost corner, of several the southernmost
//     (fans.go). So the surface depends on the points, never on their order.
//  5. The convex hull bounds the surface; what lies outside is a gap.
//
// A Grid needs no searching: each square between four centres is split by its
// north-west to south-east diagonal, a square with a void corner is a gap, and
// the surface ends at the outermost centres (grid.go).
//
// A cut (cut.go, rim.go for triangulations, gridcut.go, gridwalk.go for grids)
// returns the places where the line passes from one triangle to the next, with
// D in metres from its start, to 1e-9 m. Between two break points the ground is
// straight. Where nothing is known, a Gap says from where to where, and whether
// anything known lies further out on that side: a gap is data, never a guess.
// A line that only touches the ground in a corner has a single vertex there,
// between two gaps.
//
// Tolerances: a place counts as on the edge of the ground within 2e-8 m
// (onEdge), and break points within 1e-9 m of each other are one (sameBreak).
//
// References: Shewchuk 1997 for the exact tests; the Delaunay triangulation by
// insertion is due to Bowyer and to Watson, Computer Journal 24 (1981), 162–172
// (from memory).
package terrain
