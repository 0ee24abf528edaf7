package wire

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"
	"strconv"

	"github.com/invopop/jsonschema"
)

// Fine is a length, area, ratio, moment, percentage or angle: written to 1e-9.
type Fine float64

// Volume is a volume in m³ or an amount of money: written to 1e-6.
type Volume float64

// MarshalJSON writes the number with up to nine decimals.
func (f Fine) MarshalJSON() ([]byte, error) { return decimal(float64(f), 9) }

// MarshalJSON writes the number with up to six decimals.
func (v Volume) MarshalJSON() ([]byte, error) { return decimal(float64(v), 6) }

// JSONSchema says that the type is a number.
func (Fine) JSONSchema() *jsonschema.Schema { return &jsonschema.Schema{Type: "number"} }

// JSONSchema says that the type is a number.
func (Volume) JSONSchema() *jsonschema.Schema { return &jsonschema.Schema{Type: "number"} }

// decimal writes v without exponent, trailing zeros and negative zero. A number
// that is none is a mistake of the program.
func decimal(v float64, places int) ([]byte, error) {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil, fmt.Errorf("a result is not a number: %v", v)
	}
	text := strconv.AppendFloat(nil, v, 'f', places, 64)
	text = bytes.TrimRight(text, "0")
	text = bytes.TrimSuffix(text, []byte("."))
	if len(text) == 0 || string(text) == "-0" || string(text) == "-" {
		text = []byte("0")
	}
	return text, nil
}

// fine and volume make nullable numbers.
func fine(v float64) *Fine {
	f := Fine(v)
	return &f
}

func volume(v float64) *Volume {
	f := Volume(v)
	return &f
}

// fineIf returns nil unless known.
func fineIf(known bool, v float64) *Fine {
	if !known {
		return nil
	}
	return fine(v)
}

func volumeIf(known bool, v float64) *Volume {
	if !known {
		return nil
	}
	return volume(v)
}

// Encode writes a document as text: two spaces of indent, a line feed at the
// end, signs as they are.
func Encode(doc any) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(doc); err != nil {
		return nil, err
	}
	return b.Bytes(), nil
}
