package terrain

import (
	"cmp"
	"math"
	"slices"
)

// hilbertOrder sorts sites along a Hilbert curve over their bounding square, so
// that each is near the one before it: the walk to a new point is then short,
// and triangles that are neighbours lie close in memory.
func hilbertOrder(sites []site) {
	west, south, east, north := math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)
	for _, s := range sites {
		west, east = math.Min(west, s.x), math.Max(east, s.x)
		south, north = math.Min(south, s.y), math.Max(north, s.y)
	}
	side := math.Max(math.Max(east-west, north-south), 1)
	type keyed struct {
		key uint64
		site
	}
	all := make([]keyed, len(sites))
	for i, s := range sites {
		all[i] = keyed{hilbert((s.x-west)/side, (s.y-south)/side), s}
	}
	slices.SortFunc(all, func(a, b keyed) int {
		return cmp.Or(cmp.Compare(a.key, b.key), cmp.Compare(a.x, b.x), cmp.Compare(a.y, b.y))
	})
	for i := range all {
		sites[i] = all[i].site
	}
}

// hilbertBits is the depth of the curve: 2^20 steps a side part 10^6 points far
// enough.
const hilbertBits = 20

// hilbert returns the place along the curve of a point of the unit square.
// Going down the quadrants, the curve inside is turned or mirrored so that it
// starts and ends beside its neighbours.
func hilbert(x, y float64) uint64 {
	u := uint64(x * (1<<hilbertBits - 1))
	v := uint64(y * (1<<hilbertBits - 1))
	var d uint64
	for bit := hilbertBits - 1; bit >= 0; bit-- {
		a, b := u>>bit&1, v>>bit&1
		d = d<<2 | (3*a ^ b)
		if b == 0 {
			if a == 1 {
				u, v = ^u, ^v
			}
			u, v = v, u
		}
	}
	return d
}
