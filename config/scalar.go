package config

import (
	"math"
	"reflect"

	"github.com/invopop/jsonschema"

	"sagcrest/config/quantity"
)

// value is a number of the project file on its way in: first as written, then
// in SI. given says that the key is there; ok that si may be used.
type value struct {
	given, ok bool
	bare      bool    // a number without unit
	text      string  // as written
	number    float64 // of a bare one
	si        float64
	unit      quantity.Unit // of an amount
}

// pointer returns nil for a value that is absent or unusable.
func (v value) pointer() *float64 {
	if !v.ok {
		return nil
	}
	si := v.si
	return &si
}

// or returns the value, or another where it is absent or unusable.
func (v value) or(other float64) float64 {
	if !v.ok {
		return other
	}
	return v.si
}

// cell gives the generic passes their hold on every type that embeds value.
func (v *value) cell() *value { return v }

// The types of number that keys of the project file have. They differ in what
// a bare number means and in which units text may carry.
type (
	length     struct{ value } // "0.40 m"; a bare number is F04
	coordinate struct{ value } // coordinates, levels, offsets: bare in the project's units
	place      struct{ value } // a station: "1+250.5", or bare from the start
	ratio      struct{ value } // 0.025 or "2.5 %"
	slope      struct{ value } // of a side slope: bare, horizontal per vertical
	angle      struct{ value } // bare degrees or "20 deg"
	speed      struct{ value } // "80 km/h"
	count      struct{ value } // a whole number
	perPercent struct{ value } // K: bare, project's unit of length per percent
	rate       struct{ value } // bare money
	amount     struct{ value } // "120 m3", "40 m", or a bare count
)

// form tells how a type of number is read and how its range is written.
type form struct {
	what   string        // what to write, for messages
	bare   bool          // a bare number is legal …
	local  bool          // … and counts in the project's unit of length
	quoted bool          // text is legal
	kind   quantity.Kind // the kind of unit that text carries, "" for none
	shown  string        // unit in which a range stands and messages print it
	size   float64       // SI size of that unit
}

// A length without unit might be millimetres: F04.
func (length) form() form {
	return form{what: "text with a unit of length", quoted: true, kind: quantity.Length, shown: " m", size: 1}
}

// Levels and coordinates come in columns, where a unit in each cell is noise.
func (coordinate) form() form {
	const what = "a number in the project's units, or text with a unit of length"
	return form{what: what, bare: true, local: true, quoted: true, kind: quantity.Length, shown: " m", size: 1}
}

// A bare station is a distance from the start and not a label: with a first
// label of 0+100, 0 and "0+100" are one place.
func (place) form() form {
	const what = `a station such as "1+250.0", or a number counted from the start`
	return form{what: what, bare: true, local: true, quoted: true, shown: " m", size: 1}
}

// A ratio and a percentage are told apart by the sign for percent alone, which is
// why ranges are narrow.
func (ratio) form() form {
	return form{what: "a ratio such as 0.025, or text in percent", bare: true, quoted: true, kind: quantity.Ratio, size: 1}
}

// A side slope has no unit; percent would turn it round (vertical per horizontal).
func (slope) form() form {
	return form{what: "a bare number, horizontal per vertical", bare: true, size: 1}
}

// Degrees are bare in the project file, radians inside.
func (angle) form() form {
	return form{what: "a number of degrees", bare: true, quoted: true, kind: quantity.Angle, shown: " deg", size: math.Pi / 180}
}

// A speed without unit might be in either of two: F04.
func (speed) form() form {
	return form{what: "text with a unit of speed", quoted: true, kind: quantity.Speed, shown: " km/h", size: 1 / 3.6}
}

// A count is whole; number checks that.
func (count) form() form { return form{what: "a whole number", bare: true, size: 1} }

// K counts in the unit of the levels, so no unit of its own can be written.
func (perPercent) form() form {
	const what = "a bare number: length in the project's units per percent"
	return form{what: what, bare: true, local: true, shown: " m per %", size: 1}
}

// A rate has its unit in the key beside it.
func (rate) form() form { return form{what: "a bare number", bare: true, size: 1} }

// An amount takes the kind of its unit along; without one it is a count.
func (amount) form() form {
	return form{what: "text with its unit, or a bare count", bare: true, quoted: true, size: 1}
}

// numeric is what all these types have in common.
type numeric interface {
	cell() *value
	form() form
}

// asNumeric returns the numeric that v holds, if v is one.
func asNumeric(v reflect.Value) (numeric, bool) {
	if !v.CanAddr() {
		return nil, false
	}
	n, ok := v.Addr().Interface().(numeric)
	return n, ok
}

// isNumeric reports whether t is one of the types above.
func isNumeric(t reflect.Type) bool {
	return reflect.PointerTo(t).Implements(reflect.TypeFor[numeric]())
}

// textHook turns the texts and numbers of a decoded file into values as
// written. What they mean is settled afterwards, when units and labels of the
// project are known.
func textHook(from, to reflect.Type, data any) (any, error) {
	if !isNumeric(to) {
		return data, nil
	}
	out := reflect.New(to)
	cell := out.Interface().(numeric).cell()
	cell.given = true
	switch d := data.(type) {
	case string:
		cell.text = d
	case float64:
		cell.bare, cell.number = true, d
	}
	return out.Elem().Interface(), nil
}

// schema returns the JSON Schema of a number of this form.
func (f form) schema() *jsonschema.Schema {
	s := &jsonschema.Schema{Type: "string"}
	if f.bare {
		s = &jsonschema.Schema{Type: "number"}
	}
	if f.bare && f.quoted {
		s = &jsonschema.Schema{AnyOf: []*jsonschema.Schema{{Type: "number"}, {Type: "string"}}}
	}
	s.Comments = f.what
	return s
}
