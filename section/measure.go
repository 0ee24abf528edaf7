package section

import (
	"cmp"
	"slices"
)

// measure fills areas, moments, parts, strip and re-spread of a slice whose
// flanks are laid.
func (r *Road) measure(t *Typical, s *Slice) {
	s.OK = s.GroundKnown && s.Left.State == Caught && s.Right.State == Caught
	if !s.OK {
		return
	}
	bodies := r.bodies(t, s)
	var fill Area
	cuts := make([]Area, len(bodies))
	for _, side := range []int{-1, 1} {
		r.eachSidePiece(t, s, side, func(p piece) {
			for i := range bodies {
				a, m := p.above(bodies[i].top)
				cuts[i].add(a, float64(side)*m)
			}
			a, m := p.below()
			fill.add(a, float64(side)*m)
		})
	}
	s.Cut, s.Fill = cuts[0], fill
	for i, b := range bodies {
		c := cuts[i]
		if i+1 < len(bodies) {
			c.Area -= cuts[i+1].Area
			c.Moment -= cuts[i+1].Moment
		}
		if c.Area > 0 {
			s.Parts = append(s.Parts, Part{Item: Excavation, Material: b.material, Cut: c})
		}
	}
	if fill.Area > 0 {
		s.Parts = append(s.Parts, Part{Item: Embankment, Fill: fill})
	}
	s.StripWidth = s.Left.StripWidth + s.Right.StripWidth
	s.StripArea = s.StripWidth * r.strip.Depth
	s.RespreadArea = (s.Left.DressedOver + s.Right.DressedOver) * t.Dressing
}

func (a *Area) add(area, moment float64) {
	a.Area += area
	a.Moment += moment
}

// eachSidePiece calls f for every linear piece of stripped ground − earthwork
// line on one side, from the reference line to the catch point.
func (r *Road) eachSidePiece(t *Typical, s *Slice, side int, f func(piece)) {
	half, flank := t.Left, s.Left
	if side > 0 {
		half, flank = t.Right, s.Right
	}
	ground, _ := outward(s, nil, side)
	h := half.Hinge()
	deck := run{pts: t.deck(nil, side, s.Finished)}
	eachPiece(ground, deck, t.Pavement-r.strip.Depth, 0, h, f)
	outside := t.outside(nil, Point{h, flank.Hinge.Z}, flank.Cut)
	eachPiece(ground, outside, t.Dressing-r.strip.Depth, h, float64(side)*flank.Catch.O, f)
}

// body is a material with the depth of its top below the stripped ground.
type body struct {
	material MaterialID
	top      float64
}

// bodies returns the materials met from the stripped ground down at a slice,
// the first with top 0. Below its top the deepest stratum holds. Where strata
// end, a slice belongs to the stretch its typical section belongs to: the
// interval that ends there is cut with what ends there.
func (r *Road) bodies(t *Typical, s *Slice) []body {
	out := []body{{t.Material, 0}}
	for _, st := range r.strata {
		if !r.holds(st.Over, s.At, s.Before) {
			continue
		}
		if st.Top <= 0 {
			out[0].material = st.Material
			continue
		}
		out = append(out, body{st.Material, st.Top})
	}
	slices.SortStableFunc(out, func(a, b body) int { return cmp.Compare(a.top, b.top) })
	return out
}
