// Package profile is the grade line of a road: its level at every station.
//
// In comes a table of points of vertical intersection (PVI) with the size of
// each curve, by length, K or radius. Then
//
//  1. every curve is solved: grades, ends, K, turning point (curve.go);
//  2. the line is cut into pieces on which the level is one quadratic of the
//     station, and curves that overlap or leave the line are findings P01
//     (grade.go, checks.go);
//  3. At and GradeBefore read level and grade anywhere; CheckTable and
//     CheckTieIns hold the line against what somebody printed or built.
//
// Signs and units: metres; grades are ratios, positive uphill with growing
// stations; A = g2 − g1; K is metres of curve per percent of A; the radius of a
// parabola is that of its vertex, L = R·|A|.
//
// Reference: AASHTO, A Policy on Geometric Design of Highways and Streets,
// chapter 3, vertical alignment.
package profile
