package criteria

import "math"

// Branch names the relation of sight distance S and length of curve L.
type Branch string

// The two branches of every sight-distance formula.
const (
	Within Branch = "S<=L"
	Beyond Branch = "S>L"
)

// Needed is the length of vertical curve that a sight distance needs. A curve is
// not needed where Length is 0; Lengths keeps both branches as computed, also
// negative.
type Needed struct {
	Constant float64 // C of L = A·S²/C and L = 2S − C/A, A in percent
	Lengths  [2]float64
	Branch   Branch
	Length   float64
	K        float64
}

// need applies the two branches: S <= L where its length is at least S; on
// equality it is the one named.
func need(constant, s, aPct float64) Needed {
	n := Needed{Constant: constant, Lengths: [2]float64{aPct * s * s / constant, 2*s - constant/aPct}}
	n.Branch, n.Length = Beyond, math.Max(n.Lengths[1], 0)
	if n.Lengths[0] >= s {
		n.Branch, n.Length = Within, n.Lengths[0]
	}
	n.K = n.Length / aPct
	return n
}

// Crest returns the length of crest over which an eye sees an object:
// C = 100(√(2h1) + √(2h2))² (AASHTO, ch. 3, crest vertical curves).
func Crest(s, eye, object, aPct float64) Needed {
	root := math.Sqrt(2*eye) + math.Sqrt(2*object)
	return need(100*root*root, s, aPct)
}

// Headlight returns the length of sag that a headlight of height h lights: the
// printed C = 200h + 3.5S (120, 150, 400 + 3.5S), or 200(h + S·tan β) with a
// beam of β radians (AASHTO, ch. 3, sag vertical curves).
func Headlight(s, h float64, beam *float64, aPct float64) Needed {
	c := 200*h + 3.5*s
	if beam != nil {
		c = 200 * (h + s*math.Tan(*beam))
	}
	return need(c, s, aPct)
}

// Underpass returns the length of sag through which an eye sees an object under
// a structure with clearance c: C = 800(c − (h1 + h2)/2) (AASHTO, ch. 3, sight
// distance at undercrossings).
func Underpass(s, c, eye, object, aPct float64) Needed {
	return need(800*(c-(eye+object)/2), s, aPct)
}
