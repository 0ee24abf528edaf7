package section

import (
	"fmt"
	"math"
	"slices"
	"sort"

	"sagcrest/profile/finding"
	"sagcrest/profile/station"
)

// Crossfalls is a row of the superelevation table: the crossfall of each lane
// and shoulder at a station, as rise per metre to the right, ratios. Between
// rows they are linear in the station, lane and shoulder separately, about the
// reference line; outside the table the typical section's own hold.
type Crossfalls struct {
	At                          station.Station
	LeftLane, RightLane         float64
	LeftShoulder, RightShoulder float64
}

// sameFall is the difference of two crossfalls below which they are one: figures
// are given to a hundredth of a percent.
const sameFall = 1e-9

// of returns the crossfalls of a typical section.
func (t *Typical) crossfalls(at station.Station) Crossfalls {
	return Crossfalls{at, t.Left.Lane.Crossfall, t.Right.Lane.Crossfall, t.Left.Shoulder.Crossfall, t.Right.Shoulder.Crossfall}
}

// between mixes two rows.
func (c Crossfalls) between(d Crossfalls, s station.Station) Crossfalls {
	u := float64((s - c.At) / (d.At - c.At))
	mix := func(a, b float64) float64 { return a + u*(b-a) }
	return Crossfalls{s, mix(c.LeftLane, d.LeftLane), mix(c.RightLane, d.RightLane),
		mix(c.LeftShoulder, d.LeftShoulder), mix(c.RightShoulder, d.RightShoulder)}
}

// shape returns a typical section with the crossfalls that it has at a station.
func (r *Road) shape(k int, s station.Station) *Typical {
	n := len(r.table)
	if n == 0 || s < r.table[0].At || s > r.table[n-1].At {
		return &r.typicals[k]
	}
	i := sort.Search(n, func(i int) bool { return r.table[i].At >= s })
	c := r.table[i]
	if c.At > s {
		c = r.table[i-1].between(c, s)
	}
	t := r.typicals[k]
	t.Left.Lane.Crossfall, t.Right.Lane.Crossfall = c.LeftLane, c.RightLane
	t.Left.Shoulder.Crossfall, t.Right.Shoulder.Crossfall = c.LeftShoulder, c.RightShoulder
	return &t
}

// Superelevation returns the rows of the table.
func (r *Road) Superelevation() []Crossfalls { return r.table }

// CrossfallsAt returns the crossfalls at a station; ok is false where no single
// typical section holds.
func (r *Road) CrossfallsAt(s station.Station) (c Crossfalls, ok bool) {
	k := r.TypicalAt(s, false)
	if k < 0 {
		return c, false
	}
	return r.shape(k, s).crossfalls(s), true
}

// checkTable finds rows out of order (A01), and end rows inside the road that do
// not repeat the section's own crossfalls (F08): there the surface would jump.
func (r *Road) checkTable() (out []finding.Finding) {
	for i := 1; i < len(r.table); i++ {
		if a, b := r.table[i-1].At, r.table[i].At; !(b > a) {
			out = append(out, finding.Finding{Code: "A01", Severity: finding.Error,
				At:       finding.On(b).Under(fmt.Sprintf("superelevation[%d].at", i)),
				Measured: finding.Of(float64(b), "m"), Limit: finding.Of(float64(a), "m"),
				Args: []any{"superelevation row", b, a}})
		}
	}
	if len(r.table) == 0 || len(out) > 0 {
		return out
	}
	for _, i := range slices.Compact([]int{0, len(r.table) - 1}) {
		out = append(out, r.checkEndRow(i)...)
	}
	return out
}

func (r *Road) checkEndRow(i int) []finding.Finding {
	c := r.table[i]
	if c.At <= r.over.From+station.Same || c.At >= r.over.To-station.Same {
		return nil
	}
	k := r.TypicalAt(c.At, i > 0)
	if k < 0 {
		return nil // Q11 says so already
	}
	own := r.typicals[k].crossfalls(c.At)
	pairs := [4][2]float64{{c.LeftLane, own.LeftLane}, {c.RightLane, own.RightLane}, {c.LeftShoulder, own.LeftShoulder}, {c.RightShoulder, own.RightShoulder}}
	names := [4]string{"left_lane", "right_lane", "left_shoulder", "right_shoulder"}
	widths := [4]float64{1, 1, r.typicals[k].Left.Shoulder.Width, r.typicals[k].Right.Shoulder.Width}
	for j, p := range pairs {
		if widths[j] == 0 || math.Abs(p[0]-p[1]) <= sameFall {
			continue
		}
		return []finding.Finding{{Code: "F08", Severity: finding.Error,
			At:       finding.On(c.At).Under(fmt.Sprintf("superelevation[%d].%s", i, names[j])),
			Measured: finding.Of(p[0], "ratio"), Limit: finding.Of(p[1], "ratio"),
			Args: []any{fmt.Sprintf("the first and last row of the superelevation table repeat the typical section's own crossfalls where they lie inside the road: %s is %.4f, the section has %.4f", names[j], p[0], p[1])}}}
	}
	return nil
}
