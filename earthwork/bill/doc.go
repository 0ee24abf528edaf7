// Package bill multiplies quantities by rates.
//
// In come the quantities of a road, in SI, and the project's prices; out goes a
// list of lines with item, quantity, unit, rate and amount, and the total. What
// was measured but has no rate keeps its line with rate and amount unknown, and
// then the total is unknown as well: a price is never taken for zero.
//
// Quantities keep their state: excavation is bank, embankment compacted; borrow
// and waste are the two sides of the last mass ordinate, in its state.
package bill
