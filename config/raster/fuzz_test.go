package raster_test

import (
	"encoding/binary"
	"math"
	"os"
	"path/filepath"
	"testing"

	"sagcrest/config/raster"
)

// FuzzRead: no file makes the reader panic, and what it returns is whole.
func FuzzRead(f *testing.F) {
	names, err := filepath.Glob("testdata/*.*")
	if err != nil || len(names) == 0 {
		f.Fatal("no seeds")
	}
	for _, name := range names {
		data, err := os.ReadFile(name)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
	for _, c := range badTIFFs() {
		f.Add(small(c.change).bytes())
	}
	f.Add(small(func(p *picture) { p.big, p.order = true, binary.BigEndian }).bytes())
	f.Add([]byte(soundGrid))
	f.Fuzz(func(t *testing.T, data []byte) {
		r, problems := raster.Read("x", data, raster.Options{})
		if (r == nil) != (len(problems) > 0) {
			t.Fatalf("raster %v with problems %v", r, problems)
		}
		for _, p := range problems {
			if p.Code == "" || p.Message == "" || p.File != "x" || p.String() == "" {
				t.Fatalf("empty problem %+v", p)
			}
		}
		if r == nil {
			return
		}
		if l := r.Levels; len(l.Z) != l.Cols*l.Rows || l.Cols < 2 || l.Rows < 2 {
			t.Fatalf("%d levels, %d × %d", len(l.Z), l.Cols, l.Rows)
		}
		for _, z := range r.Levels.Z {
			if math.Abs(z) > 1e8 {
				t.Fatalf("level %v", z)
			}
		}
	})
}
