// Package wire holds the JSON documents that other programs read.
//
// In comes the outcome of a study; Build, Check, Compare and Failed copy it into
// structs whose tags are the published keys; Encode writes them. What a finding
// withholds becomes null by its path (withhold.go). Schema describes every
// document (schema.go).
//
// Numbers are SI and rounded on the wire by quantity, so that the same input
// gives the same bytes: lengths, areas, ratios and moments to 1e-9, volumes and
// money to 1e-6. null = does not exist or withheld; an absent key = not
// computed; zero is a number. Keys are only ever added; a key that changed its
// meaning would raise schema_version.
package wire
