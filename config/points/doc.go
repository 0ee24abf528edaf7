// Package points reads surveys written as text: points with coordinates, and
// lines surveyed square to the road.
//
// In come the bytes of a file and the column order that the project declares;
// columns are never guessed. Each reader
//
//  1. looks at the file as a whole: byte order mark, separators, broken text
//     (rows.go);
//  2. takes the first line for a header if its elevation is no number, and then
//     the header must fit the order;
//  3. reads every row, in metres (points.go, sections.go);
//  4. looks at the rows together: ids that repeat, levels that mean "nothing
//     here" (checks.go).
//
// Out go points or section lines in SI with the line they stand on, and every
// problem found, each with line and column. Separators are commas; a decimal
// comma, a byte order mark and the marks a spreadsheet leaves in ids and
// stations are U14, with the way to mend them.
package points
