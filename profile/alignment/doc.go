// Package alignment is the horizontal alignment of a road: what stations are
// counted along.
//
// In comes a table of points of intersection (PI), each with the radius of its
// arc and the lengths of the clothoids before and after it. Then
//
//  1. every PI is solved by itself: deflection, clothoid angles, tangents, arc
//     (pi.go);
//  2. the elements are laid one after another, tangent, clothoid, arc, clothoid
//     (alignment.go, clothoid.go); what does not fit is a finding A16 with the
//     numbers that cannot hold together (checks.go);
//  3. At, Point, Locate and LocateNear go from station and offset to easting and
//     northing and back (locate.go).
//
// Signs and units: metres; azimuths in radians clockwise from grid north;
// curvature and radius positive turning right; offsets right positive. A length
// along offset o is (1 − curvature·o) times that along the alignment.
//
// References: T. F. Hickerson, Route Location and Design, 5th ed. (clothoids and
// unequal tangents); ISO 19148 (stations).
package alignment
