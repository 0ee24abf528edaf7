// Package plot draws.
//
// In come plain figures in metres; every function returns one drawing as SVG
// with its text as text, a title and a description, ready to stand inside a
// page. Nothing is fetched and nothing depends on the order of a map.
//
// Drawings are made to be read in black and white: lines differ by dash and
// weight and carry their names beside them; cut is dotted, fill has level
// lines. Colours only decorate (a palette that colour-blind readers tell
// apart). Scales are stated, and where heights are exaggerated the figure says
// by how much.
package plot
