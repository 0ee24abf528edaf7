package earthwork

import "sagcrest/section"

// The three states of a volume of soil, all in m³: as it lies in the ground,
// as it lies on a truck, and as it lies in an embankment. They are types of
// their own because a mix-up is cheap to make and dear to pay; only a Material
// converts one into another.
type (
	Bank      float64
	Loose     float64
	Compacted float64
)

// Material tells how a soil or rock changes its volume. Shrinkage s gives
// compacted = bank × (1 − s); it is negative where the material gains. Swell
// gives loose = bank × (1 + swell). nil means that nobody stated it. An
// Unsuitable material adds nothing to the balance.
type Material struct {
	ID               section.MaterialID
	Shrinkage, Swell *float64
	Unsuitable       bool
}

// Compact returns what b makes in an embankment; ok is false when the
// shrinkage is unknown or the material is unsuitable.
func (m Material) Compact(b Bank) (c Compacted, ok bool) {
	if m.Shrinkage == nil || m.Unsuitable {
		return 0, false
	}
	return Compacted(float64(b) * (1 - *m.Shrinkage)), true
}

// Loosen returns what b makes on a truck; ok is false when the swell is
// unknown.
func (m Material) Loosen(b Bank) (l Loose, ok bool) {
	if m.Swell == nil {
		return 0, false
	}
	return Loose(float64(b) * (1 + *m.Swell)), true
}
