package terrain

// mesh is a triangulation in flat arrays. Triangle t has the half-edges 3t,
// 3t+1, 3t+2, anticlockwise; half-edge h runs from org[h] to org[next(h)] with
// its triangle on the left, and twin[h] is the same edge seen from the other
// side, below 0 on the hull.
type mesh struct {
	pts  []point
	org  []int32
	twin []int32
}

// none marks the missing twin of a hull edge until the hull is numbered.
const none int32 = -1

func next(h int32) int32 {
	if h%3 == 2 {
		return h - 2
	}
	return h + 1
}

func prev(h int32) int32 {
	if h%3 == 0 {
		return h + 2
	}
	return h - 1
}

func (m *mesh) at(v int32) point { return m.pts[v] }

// ends returns the places where a half-edge starts and ends.
func (m *mesh) ends(h int32) (a, b point) { return m.pts[m.org[h]], m.pts[m.org[next(h)]] }

// link makes two half-edges twins.
func (m *mesh) link(g, h int32) {
	m.twin[g] = h
	m.twin[h] = g
}

// numberRim returns the half-edges on the hull, anticlockwise, beginning with
// the first of the arrays, and writes the place of each in that list into its
// twin, as the complement: a twin below 0 is a hull edge that knows its
// neighbours.
func (m *mesh) numberRim() []int32 {
	var h int32
	for m.twin[h] != none {
		h++
	}
	var out []int32
	for first := h; len(out) == 0 || h != first; h = m.nextOnRim(h) {
		out = append(out, h)
	}
	for i, h := range out {
		m.twin[h] = ^int32(i)
	}
	return out
}

// nextOnRim turns about the end of a hull edge to the hull edge that starts
// there.
func (m *mesh) nextOnRim(h int32) int32 {
	for h = next(h); m.twin[h] != none; h = next(m.twin[h]) {
	}
	return h
}
