package terrain

// settle breaks the ties of the Delaunay rule. Triangles that share one circle
// form a convex polygon, which any of its triangulations would fill as well:
// gridded and rounded surveys are full of them. Each is filled with the fan of
// its westernmost corner (of several the southernmost): for four points that is
// the diagonal through that corner. What is left depends on no order.
func (b *builder) settle() {
	flat := make([]bool, len(b.org))
	for h := range int32(len(b.org)) {
		if g := b.twin[h]; h < g && b.onOneCircle(h, g) {
			flat[h], flat[g] = true, true
		}
	}
	for h := range int32(len(b.org)) {
		if flat[h] {
			b.gather(h/3, flat)
			b.fan()
		}
	}
}

// onOneCircle reports whether the two triangles of an edge have one circle.
func (b *builder) onOneCircle(h, g int32) bool {
	if b.isGhost(h/3) || b.isGhost(g/3) {
		return false
	}
	u, v := b.ends(h)
	return incircle(u, v, b.pts[b.org[prev(h)]], b.pts[b.org[prev(g)]]) == 0
}

// gather collects the polygon around a triangle, as dig does, and clears its
// marks.
func (b *builder) gather(t int32, flat []bool) {
	b.cavity = append(b.cavity[:0], t)
	b.border = b.border[:0]
	b.stack = append(b.stack[:0], 3*t+2, 3*t+1, 3*t)
	for len(b.stack) > 0 {
		h := b.stack[len(b.stack)-1]
		b.stack = b.stack[:len(b.stack)-1]
		outer := b.twin[h]
		if !flat[h] {
			b.border = append(b.border, outer)
			continue
		}
		flat[h], flat[outer] = false, false
		b.cavity = append(b.cavity, outer/3)
		b.stack = append(b.stack, prev(outer), next(outer))
	}
}

// fan refills the gathered polygon from its westernmost corner.
func (b *builder) fan() {
	n := len(b.border)
	first := 0
	corner := func(i int) int32 { return b.org[next(b.border[i%n])] }
	for i := range n {
		p, q := b.pts[corner(i)], b.pts[corner(first)]
		if p.x < q.x || p.x == q.x && p.y < q.y {
			first = i
		}
	}
	apex := corner(first)
	for i, t := range b.cavity {
		h, side := 3*t, b.border[(first+1+i)%n]
		b.org[h], b.org[h+1], b.org[h+2] = apex, b.org[next(side)], b.org[side]
		b.link(h+1, side)
		if i > 0 {
			b.link(h, 3*b.cavity[i-1]+2)
		}
	}
	b.link(3*b.cavity[0], b.border[first])
	b.link(3*b.cavity[len(b.cavity)-1]+2, b.border[(first+n-1)%n])
}
