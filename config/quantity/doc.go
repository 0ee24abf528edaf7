// Package quantity is the door between numbers on paper and the SI numbers
// that everything else calculates with.
//
// What comes in: texts such as "0.40 m", "62 mile/h" or "2.5 %" out of a
// project or survey file. What goes out: float64 in SI (metres, square metres,
// cubic metres, metres per second, radians, ratios) and, on the way back, text
// for people.
//
//  1. Parse reads one text of a wanted kind. Its errors say which of five
//     things is wrong, so that a reader can choose the code of the complaint.
//  2. System tells what a bare number means: metres or one of the two feet.
//  3. Decimal rounds half away from zero in decimal, as people do: 2.675 with
//     two places is 2.68, and a tiny negative number is "0.00", never "-0.00".
//  4. Profile prints stations, levels, grades, areas, volumes … in the units
//     and to the places that a project asks for ("m-0.001" or "ft-0.01").
//
// Two feet exist: the international foot, exactly 0.3048 m, and the US survey
// foot, 1200/3937 m (US Federal Register notice of 5 October 2020, which
// retires the latter, and NIST SP 811, appendix B.6). ft, in, yd and acre are
// built on the international foot; us_ft is the other one. An acre is 4840
// square yards, a mile 5280 feet, both international here.
//
// Rounding happens on print only. Nothing in this package is ever fed back
// into a calculation.
package quantity
