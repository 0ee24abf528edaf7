// Package report writes what a reviewer reads and ticks.
//
// In come a study's outcome and its results document, in which withheld figures
// are null. Files makes everything that stands in an output folder: the results
// document, one CSV for every table, and report.html, one page without any
// outside address that opens from a file and prints on paper.
//
// The page says bad news first: how many findings are open, what they are, what
// hangs on them. Then come definitions and signs, the inputs with a column to
// tick, and stage by stage tables, drawings (package plot) and workings. A
// finding leads to the section or working that it lies in, and a working puts in
// the very numbers that give its result. Figures are rounded here and nowhere
// else, by the project's profile; nothing is computed here.
package report
