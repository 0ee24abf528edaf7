package criteria

// System tells which units a rule is written in.
type System string

// Metric rules have metres and km/h, US ones feet and mile/h.
const (
	Metric System = "metric"
	US     System = "us"
)

// pick returns the figure of a system.
func (s System) pick(metric, us float64) float64 {
	if s == US {
		return us
	}
	return metric
}

// Standard is a rule set: heights of eye and object on crests, of headlight and
// obstruction in sags. Lengths in the units of the system.
type Standard struct {
	ID, Source            string
	Eye, Object           float64
	Headlight             float64
	UnderEye, UnderObject float64
}

// Standards lists the rule sets that can be named.
func Standards() []string { return []string{"aashto", "irc", "rhd"} }

// Find returns a rule set in the units of a system.
func Find(id string, s System) (Standard, bool) {
	const policy = "AASHTO, A Policy on Geometric Design of Highways and Streets, ch. 3"
	std := Standard{ID: id, Source: policy,
		Eye: s.pick(1.08, 3.5), Object: s.pick(0.60, 2.0), Headlight: s.pick(0.60, 2.0),
		UnderEye: s.pick(2.4, 8.0), UnderObject: s.pick(0.6, 2.0)}
	feet := s.pick(1, 1/0.3048)
	switch id {
	case "aashto":
		return std, true
	case "irc":
		std.Source = "IRC:SP:23, Vertical curves for highways"
		std.Eye, std.Object, std.Headlight = 1.2*feet, 0.15*feet, 0.75*feet
		return std, true
	case "rhd":
		std.Source = "Roads and Highways Department, geometric design standards (as quoted in the published cases)"
		std.Eye, std.Object = 1.2*feet, 0.15*feet
		return std, true
	}
	return Standard{}, false
}
