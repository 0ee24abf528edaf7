package calc

import (
	"reflect"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/profile/criteria"
)

// System is the system of units of a call.
type System = criteria.System

// Topic is one desk calculation.
type Topic struct {
	Name, Title, Chapter string
	inputs               reflect.Type
	run                  func(raw map[string]any, s System) (any, []Step, *Fault)
}

// topic makes a Topic from a function of an input struct.
func topic[I, O any](name, chapter, title string, f func(in I, w *working) (O, *Fault)) Topic {
	return Topic{Name: name, Title: title, Chapter: chapter, inputs: reflect.TypeFor[I](),
		run: func(raw map[string]any, s System) (any, []Step, *Fault) {
			var in I
			if m, ok := any(&in).(*tableIn); ok {
				*m = raw // its names are columns of the table asked for
			} else if fault := decode(raw, &in, s); fault != nil {
				return nil, nil, fault
			}
			w := &working{system: s}
			out, fault := f(in, w)
			return out, w.steps, fault
		}}
}

// Topics lists the desk calculations by chapter.
func Topics() []Topic {
	return []Topic{
		topic("curve", "Vertical alignment", "vertical curve: parabola, two parabolas or circle, solved from what is known", curve),
		topic("sight", "Sight distance", "stopping distance, lengths and K that sight asks for, clearance inside a curve", sight),
		topic("arc", "Horizontal alignment", "circular arc from any two of its figures", arc),
		topic("spiral", "Horizontal alignment", "clothoid, and the curve between two of them", spiral),
		topic("superelevation", "Horizontal alignment", "least radius, superelevation, run-off and run-out", superelevation),
		topic("slope_stake", "Setting out", "where a side slope meets the ground", slopeStake),
		topic("table", "Tables", "every table of coefficients that the program carries", tableTopic),
	}
}

// Find returns a topic by name.
func Find(name string) (Topic, bool) {
	for _, t := range Topics() {
		if t.Name == name {
			return t, true
		}
	}
	return Topic{}, false
}

// Names lists the names of all topics.
func Names() (out []string) {
	for _, t := range Topics() {
		out = append(out, t.Name)
	}
	return out
}

// Input is one input of a topic, for help.
type Input struct {
	Name string `json:"name"`
	Unit string `json:"unit"`
	Doc  string `json:"doc"`
}

// Inputs lists what a topic takes.
func (t Topic) Inputs() (out []Input) {
	if t.inputs.Kind() == reflect.Map {
		return []Input{{"name", "", "the table; without it, the list"}, {"COLUMN", "", "rows in which the column has this value"}}
	}
	for i := range t.inputs.NumField() {
		f := t.inputs.Field(i)
		out = append(out, Input{jsonName(f), f.Tag.Get("unit"), f.Tag.Get("doc")})
	}
	return out
}

// Run does the calculation.
func (t Topic) Run(raw map[string]any, s System) (result any, steps []Step, fault *Fault) {
	return t.run(raw, s)
}

func jsonName(f reflect.StructField) string {
	name, _, _ := strings.Cut(f.Tag.Get("json"), ",")
	return name
}

// foot is the foot of bare US lengths.
const foot = quantity.InternationalFoot
