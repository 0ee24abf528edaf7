// Package finding holds what a check has to say: a code of the catalogue, how
// grave it is, the place, the figure measured and its limit, and which results
// must be withheld because of it.
//
// Domain packages return findings beside their results; they never print. Each
// package that raises findings lists the texts of its codes in a Rules
// function. Only the rim turns a finding into words: it puts Args into the
// rule's Message, writes stations as labels, and finds file, line and column
// from Place.Key.
package finding
