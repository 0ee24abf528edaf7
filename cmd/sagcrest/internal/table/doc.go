// Package table is the one model behind every table: built once, written as
// CSV for other programs and as HTML for paper.
//
// A Table has columns with a key, a title and a unit, and rows of cells. A cell
// carries both what paper shows (rounded by the project's profile) and what the
// CSV holds (SI, as on the wire). Stations take two columns in a CSV: the label
// as text and the distance in metres as a number, so that no spreadsheet can
// turn "1+250" into something else. On paper a cell may be pointed at, or point
// to another place of the page; short tables are never cut by a page break.
package table
