// Package diag reports what is wrong with an input, at its place.
//
// A Problem names the code of the catalogue, file, line and column, the raw
// line, both numbers with their units where there are two, and how to mend it.
// Readers of the project file and of survey files return all problems of a file
// at once; List keeps the first of each code and counts the rest, so that a
// column of bad numbers does not bury what else is wrong.
//
// Lines and columns count from 1; column 0 means the whole line, line 0 the
// whole file.
package diag
