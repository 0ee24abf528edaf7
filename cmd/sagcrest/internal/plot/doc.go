// Package plot draws.
//
// In come plain figures in metres, and for every axis a Scale that says in which
// unit people count along it, so that a road in feet has marks at round feet and
// at round numbers of its own labels; every function returns one drawing as SVG
// with its text as text, a title and a description, ready to stand inside a
// page. Nothing is fetched and nothing depends on the order of a map.
//
// Drawings are made to be read in black and white: lines differ by dash and
// weight and carry their names beside them; cut is dotted, fill has level
// lines. Colours only decorate (a palette that colour-blind readers tell
// apart). Scales are stated, and where heights are exaggerated the figure says
// by how much. Names that are called out keep clear of each other; figures of
// curves stand in a band below the long profile, where no line runs.
package plot
