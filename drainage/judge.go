package drainage

import (
	"slices"

	"sagcrest/profile/finding"
	"sagcrest/section"
)

// coverTouch is the shortage in metres that still counts as touching the limit.
const coverTouch = 1e-9

// judge measures the cover over every barrel and holds the least against what
// is required.
func (l *Laid) judge(r *section.Road, p pages) []finding.Finding {
	if d := l.Culvert.CoverDatum; l.Rule.ID != "project" && d != "" && d != l.Rule.Datum {
		// Which of the two is meant is unknown, so nothing is judged.
		return []finding.Finding{p.otherDatum(l)}
	}
	governing, bends, ok := l.leastOver(r)
	if !ok {
		return []finding.Finding{p.offRoad(r, r.Over(), "station")}
	}
	l.Judged = true
	l.Profile = l.rows(governing, bends)
	l.CoverOK = l.Least.Cover() >= l.Required-coverTouch
	if l.InletSide != 0 && l.Drop >= -sameLevel {
		l.Verdict = OK
	}
	if l.CoverOK {
		return nil
	}
	l.Verdict = Short
	l.Mends = l.mends(r)
	return []finding.Finding{p.short(l)}
}

// leastOver finds the least cover over all barrels, and returns the barrel that
// governs with the places where its surface bends.
func (l *Laid) leastOver(r *section.Road) (governing barrelLine, bends []float64, ok bool) {
	n := max(l.Culvert.Barrels, 1)
	for i := range n {
		off := (float64(i) - float64(n-1)/2) * l.Culvert.pitch()
		b := l.barrel(r, off, l.Culvert.Height()+l.Culvert.Wall)
		least, at, fits := b.least()
		if !fits {
			return barrelLine{}, nil, false
		}
		if !ok || lesser(l.Least, least) != l.Least {
			l.Least, governing, bends, ok = least, b, at, true
		}
	}
	return governing, bends, ok
}

// barrel returns the barrel whose axis lies off metres ahead of the middle one.
func (l *Laid) barrel(r *section.Road, off, height float64) barrelLine {
	left, right := l.Ends[0], l.Ends[1]
	return barrelLine{
		axis: newAxis(r, &l.Culvert, l.At, off), datum: l.Rule.Datum,
		left: left.Invert, leftX: left.X,
		fall:   (right.Invert - left.Invert) / (right.X - left.X),
		height: height,
	}
}

// rows lists the governing barrel from inlet to outlet: both ends, every place
// where the surface bends, and the least cover.
func (l *Laid) rows(b barrelLine, bends []float64) (out []CoverPoint) {
	xs := append([]float64{l.Ends[0].X, l.Ends[1].X, l.Least.X}, bends...)
	slices.Sort(xs)
	first, last := bends[0], bends[len(bends)-1]
	for i, x := range xs {
		// One row a place: search results a micrometre apart are the same.
		if i > 0 && x-xs[i-1] < 1e-6 {
			continue
		}
		out = append(out, b.point(x, x >= first-atHinge && x <= last+atHinge))
	}
	if l.InletSide > 0 {
		slices.Reverse(out)
	}
	return out
}

// atHinge is the distance in metres within which a place along the barrel lies
// on the hinge: a row a micrometre outside it is the hinge's.
const atHinge = 1e-6
