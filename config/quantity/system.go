package quantity

// System tells what the bare numbers of a file mean.
type System string

// The systems of the project file. FeetUnsaid is a bare "ft": which foot is
// unsaid. On a local grid that is harmless (over 100 m the two feet differ by
// 0.2 mm), and the international foot, the only legal one since 2023, is
// taken; on map coordinates, hundreds of kilometres from their origin, the two
// lie metres apart, and a reader has to refuse it (U01).
const (
	Metric            System = "metric"
	InternationalFeet System = "international feet"
	USSurveyFeet      System = "us survey feet"
	FeetUnsaid        System = "ft"
)

// Systems returns all systems in the order in which a message lists them.
func Systems() []System {
	return []System{Metric, InternationalFeet, USSurveyFeet, FeetUnsaid}
}

// ParseSystem reads the value of a `units` key.
func ParseSystem(text string) (System, bool) {
	for _, s := range Systems() {
		if string(s) == text {
			return s, true
		}
	}
	return "", false
}

// Metres returns the length in metres of one unit of a bare number.
func (s System) Metres() float64 {
	switch s {
	case InternationalFeet, FeetUnsaid:
		return InternationalFoot
	case USSurveyFeet:
		return USSurveyFoot
	}
	return 1
}

// Feet reports whether bare numbers are feet, of either kind.
func (s System) Feet() bool { return s.Metres() != 1 }

// MapCoordinate is the size (in the file's own units) above which a northing
// or easting is taken for a map coordinate and not for a local grid: local
// grids are chosen small, projected systems have false origins of 10⁵ and more.
const MapCoordinate = 1e5
