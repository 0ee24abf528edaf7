// Package raster reads ground that is given as a grid of levels: plain ASCII
// grids and GeoTIFF.
//
// In come the bytes of a file and the length in metres of the unit of its
// numbers. Read
//
//  1. tells the two formats apart by their first bytes (read.go);
//  2. of an ASCII grid reads the header, keys in any case and order, and then
//     exactly the levels that it promises (ascii.go);
//  3. of a GeoTIFF reads the first full picture: its tags (tiff.go), how its
//     levels are stored (layout.go) and where it lies (geo.go), then strips or
//     tiles (chunks.go), with the differences taken out that some are stored
//     as (predict.go);
//  4. turns the marked no-data value and NaN into voids, and finds levels that
//     stand for nothing known although nothing marks them (voids.go).
//
// Out goes a terrain.Raster in metres, its first level at the centre of the
// north-west cell, voids as NaN, and what a reader of the report wants to see
// of the file. Names of software in the file are never looked at.
//
// The figures of a header are promises: each is held against the size of the
// file before memory is taken for it, so that a file of n bytes costs at most
// some 1500·n bytes of levels and never more than the largest raster that is
// read. What is not read is refused by name (F09), never half read: other
// compressions, several bands, scaled levels, masks, turned rasters.
//
// A cell of a GeoTIFF is an area unless the file says that it is a point; then
// the place that the file gives is the centre of the cell and not its corner.
//
// References: TIFF 6.0 (1992) with the technical notes on deflate and on
// floating-point differencing; OGC 19-008r4, GeoTIFF 1.1; the no-data tag 42113
// and the header of the ASCII grid are common practice.
package raster
