// Package diag reports what is wrong with an input, at its place.
//
// In come the faults that a reader finds; each becomes a Problem: the code of
// the catalogue, file, line and column, the raw line, both numbers with their
// units where there are two, and how to mend it.
//
//  1. A reader gathers the problems of a file in a List, all at once: it keeps
//     the first of each code and counts the rest, so that a column of bad
//     numbers does not bury what else is wrong (list.go).
//  2. A misspelt name gets the nearest known one beside it (nearest.go).
//  3. Problem.String puts place, message, raw line, a caret under the column
//     and the mend into words for a terminal (problem.go).
//
// Rules holds the pages of the codes that files and their values raise
// (rules.go).
//
// Lines and columns count from 1, columns in bytes of the raw line; column 0
// means the whole line, line 0 the whole file.
//
// Reference for the distance of words: F. J. Damerau, "A technique for computer
// detection and correction of spelling errors", Communications of the ACM 7
// (1964).
package diag
