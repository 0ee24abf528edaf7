package section

import (
	"math"

	"sagcrest/profile/station"
)

// MaterialID names a material of the project; empty means that none is named.
type MaterialID string

// ItemID names a kind of work that is measured and paid.
type ItemID string

// The items that sections measure.
const (
	Excavation ItemID = "excavation"
	Embankment ItemID = "embankment"
	Strip      ItemID = "strip"
)

// Band is a strip of the finished surface along the road. Width is horizontal,
// in metres; Crossfall is the rise per metre to the right, a ratio, on both
// sides of the road (a normal crown is positive on the left).
type Band struct{ Width, Crossfall float64 }

// Side is one half of the carriageway: a lane and, unless its width is 0, a
// shoulder. The hinge is the shoulder's outer edge, else the lane's.
type Side struct{ Lane, Shoulder Band }

// Hinge returns the distance of the hinge from the reference line, in metres.
func (s Side) Hinge() float64 { return s.Lane.Width + s.Shoulder.Width }

// Ditch stands in cut only. Depth is measured from the finished hinge to the
// finished bottom (m); slopes are horizontal per vertical; Bottom 0 is a V
// ditch. BackSlope 0 means that the cut slope starts at the bottom; otherwise
// the back slope rises to hinge level first.
type Ditch struct{ Depth, ForeSlope, Bottom, BackSlope float64 }

// Layer is one course of the pavement, from the top. Thickness in metres.
type Layer struct {
	Name      string
	Thickness float64
	Bound     bool
}

// Typical is a typical section and the stretch it covers. CutSlope and
// FillSlope are horizontal per vertical; Pavement is the thickness of all
// layers and Bound that of the bound ones (a section given by one thickness has
// both equal); Dressing is the vertical thickness of the topsoil laid on
// everything outside the hinges. All lengths in metres.
type Typical struct {
	Name                      string
	Over                      station.Interval
	Left, Right               Side
	Ditch                     *Ditch
	CutSlope, FillSlope       float64
	Layers                    []Layer
	Pavement, Bound, Dressing float64
	Material                  MaterialID
}

// Side returns the half on the given side: −1 left, +1 right.
func (t *Typical) Side(side int) Side {
	if side < 0 {
		return t.Left
	}
	return t.Right
}

// Rise returns the height of the finished surface above the reference line at
// offset o, in metres; beyond a hinge it is the hinge's.
func (t *Typical) Rise(o float64) float64 {
	half := t.Left
	if o > 0 {
		half = t.Right
	}
	lane := math.Min(math.Abs(o), half.Lane.Width)
	shoulder := math.Min(math.Max(math.Abs(o)-half.Lane.Width, 0), half.Shoulder.Width)
	rise := lane*half.Lane.Crossfall + shoulder*half.Shoulder.Crossfall
	return math.Copysign(1, o) * rise
}

// Stratum is a body of material whose top lies Top metres below the stripped
// ground, measured vertically, over a stretch of the road.
type Stratum struct {
	Material MaterialID
	Over     station.Interval
	Top      float64
}

// Stripping is the topsoil taken off first: Depth is vertical, Margin the
// horizontal strip outside each catch point, both in metres.
type Stripping struct{ Depth, Margin float64 }
