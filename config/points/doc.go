// Package points reads surveys written as text: points with coordinates, and
// lines surveyed square to the road.
//
// In come the bytes of a file and the order of its columns as the project
// declares it; columns are never guessed. Each reader
//
//  1. holds the declared order against the columns that it knows (order.go);
//  2. cuts the file into rows, one a line, and rows into cells at their commas;
//     blank lines and lines that begin with # are passed over, a cell in
//     double quotes may hold commas (text.go);
//  3. takes the first row for a header if its elevation is no number; a header
//     must fit the order (order.go);
//  4. reads the numbers of every row, in metres (number.go, points.go,
//     sections.go);
//  5. looks at the rows together: ids at two places, levels that stand for
//     nothing known (voids.go, nearest.go).
//
// Out go points or section lines in SI with the line on which they stand, and
// every problem found, each with line and column; of a code the first ten are
// kept and the rest counted. All problems are errors: where there is one, there
// is no ground.
//
// A decimal comma, a byte order mark, and what a spreadsheet makes of numbers,
// stations and ids (dates, 9.5E+06) are U14, with the way to mend them. A file
// with a byte order mark is read on behind it, so that the rest is told too.
//
// Offsets are left negative; stations are labels of the project, or bare
// numbers of label units from its start.
package points
