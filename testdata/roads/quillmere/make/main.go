// Command make writes the survey of the demo road: survey/points.csv beside
// this folder. Nobody needs it to run the road. It is kept so that the ground
// can be changed with its reasons in view, and it is run by hand from the
// module's root:
//
//	go run ./testdata/roads/quillmere/make
//
// Quillmere is an invented place. In comes nothing but the tables below. Then
//
//  1. the ground is described as a function of the plan: an upland that follows
//     the road, and three valleys let into it (ground.go);
//  2. points are set out as a survey party would: scattered rows across the
//     road, and lines of points along every bed and its banks (points.go);
//  3. every point takes its level from the ground, to the millimetre, and goes
//     out as id,northing,easting,elevation,code.
//
// The scatter comes from a generator with a fixed seed, so the file is the same
// on every machine. Metres; offsets right positive; azimuths clockwise from
// grid north.
package main

import (
	"bytes"
	"fmt"
	"log"
	"os"

	"sagcrest/profile/alignment"
)

// file is where the survey goes, seen from the module's root.
const file = "testdata/roads/quillmere/survey/points.csv"

// line is the alignment of road.toml: the ground is described by station and
// offset, so both must name the same road.
func line() []alignment.PI {
	return []alignment.PI{
		{E: 500, N: 2000},
		{E: 963.096, N: 2267.369, Radius: 300, SpiralIn: 60, SpiralOut: 60},
		{E: 2329.355, N: 2147.836},
	}
}

func main() {
	road, found := alignment.New(line())
	if road == nil {
		log.Fatalf("the alignment cannot be laid: %v", found)
	}
	g := newGround(road)
	var out bytes.Buffer
	out.WriteString("id,northing,easting,elevation,code\n")
	for i, p := range g.survey() {
		fmt.Fprintf(&out, "%d,%.3f,%.3f,%.3f,%s\n", firstID+i, p.xy[1], p.xy[0], g.level(p.xy), p.code)
	}
	if err := os.WriteFile(file, out.Bytes(), 0o644); err != nil {
		log.Fatal(err)
	}
}

// firstID leaves the ids below to the stations that the party stood on.
const firstID = 1001
