package main

import (
	"bytes"
	"context"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
)

// tenKilometres writes a winding road of 10 km over an invented surface of 2 m
// cells, paid every 10 m, with a culvert every kilometre.
func tenKilometres(b *testing.B) string {
	dir := b.TempDir()
	const cols, rows, cell = 5200, 330, 2.0
	var g bytes.Buffer
	fmt.Fprintf(&g, "ncols %d\nnrows %d\nxllcorner -100\nyllcorner -330\ncellsize %v\nNODATA_value -9999\n", cols, rows, cell)
	for j := range rows {
		for i := range cols {
			x, y := float64(i)*cell, float64(j)*cell
			z := 100 + 6*math.Sin(x/310) + 2*math.Sin(x/47+y/90) + y/60
			fmt.Fprintf(&g, "%.3f ", z)
		}
		g.WriteByte('\n')
	}
	var p strings.Builder
	p.WriteString("units = \"metric\"\n[survey]\ngrid = \"ground.asc\"\nvertical_datum = \"local\"\n[alignment]\npi = [\n{ n = 0, e = 0 },\n")
	for k := 1; k < 10; k++ {
		fmt.Fprintf(&p, "{ n = %d, e = %d, radius = \"400 m\", spiral = \"60 m\" },\n", 120-240*(k%2), 1000*k)
	}
	p.WriteString("{ n = 0, e = 10000 } ]\n[profile]\npvi = [ { station = 0, elev = 104 },\n")
	for k := 1; k < 25; k++ {
		fmt.Fprintf(&p, "{ station = %d, elev = %.3f, length = \"200 m\" },\n", 400*k, 105+6*math.Sin(400*float64(k)/310))
	}
	p.WriteString(`{ station = 10000, elev = 105 } ]
[[typical_section]]
name = "two lanes"
material = "till"
lanes = { left = { width = "3.5 m", crossfall = 0.025 }, right = { width = "3.5 m", crossfall = -0.025 } }
shoulders = { left = { width = "1.5 m", crossfall = 0.04 }, right = { width = "1.5 m", crossfall = -0.04 } }
ditch = { depth = "0.6 m", fore_slope = 3.0, bottom = "0.5 m" }
cut_slope = 1.5
fill_slope = 2.0
pavement = "0.40 m"
dressing = "0.15 m"
[[material]]
name = "till"
shrinkage = 0.1
[earthwork]
pay_stations = "10 m"
strip_depth = "0.25 m"
`)
	for file, text := range map[string][]byte{"ground.asc": g.Bytes(), "road.toml": []byte(p.String())} {
		if err := os.WriteFile(filepath.Join(dir, file), text, 0o644); err != nil {
			b.Fatal(err)
		}
	}
	return dir
}

// BenchmarkRunTenKilometres is a full run: reading 1.7 million cells, a slice
// every 10 m, the report with every section, all files written.
func BenchmarkRunTenKilometres(b *testing.B) {
	dir := tenKilometres(b)
	env := Env{Context: context.Background(), Var: func(string) string { return "" }}
	b.ReportAllocs()
	var peak runtime.MemStats
	for b.Loop() {
		var out, errw bytes.Buffer
		if code := run([]string{"run", dir, "--quiet"}, strings.NewReader(""), &out, &errw, env); code > 1 {
			b.Fatal(code, errw.String())
		}
		runtime.ReadMemStats(&peak)
	}
	b.ReportMetric(float64(peak.HeapSys)/1e6, "MB-heap")
}
