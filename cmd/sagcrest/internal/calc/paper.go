package calc

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/quantity"
)

// Document is the JSON of one calculation.
func Document(t Topic, s System, raw map[string]any, result any, steps []Step) *wire.CalcDoc {
	d := wire.NewCalc(t.Name, string(s), raw, result)
	for _, x := range steps {
		d.Steps = append(d.Steps, wire.CalcStep{Symbol: x.Symbol, Formula: x.Formula, Substituted: x.Substituted,
			Value: wire.Fine(x.Value), Unit: x.Unit, Source: x.Source})
	}
	return d
}

// Paper writes the calculation as a person hands it in for checking: what went
// in, every step with its numbers, what came out.
func Paper(t Topic, s System, raw map[string]any, result any, steps []Step) (string, error) {
	var b strings.Builder
	fmt.Fprintf(&b, "%s: %s (%s units)\n\ninputs\n", t.Name, t.Title, s)
	given, err := flat(raw)
	if err != nil {
		return "", err
	}
	b.WriteString(given)
	if len(steps) > 0 {
		b.WriteString("\nworking\n")
	}
	source := ""
	for _, x := range steps {
		fmt.Fprintf(&b, "  %-8s = %s\n  %8s = %s\n  %8s = %s %s\n", x.Symbol, x.Formula, "", x.Substituted, "", quantity.Decimal(x.Value, 6), x.Unit)
		if x.Source != source {
			source = x.Source
			fmt.Fprintf(&b, "  %8s   [%s]\n", "", source)
		}
	}
	out, err := flat(result)
	if err != nil {
		return "", err
	}
	b.WriteString("\nresult\n" + out)
	b.WriteString("\nsin, cos and tan take degrees. Check before use: local codes and licensed practice govern.\n")
	return b.String(), nil
}

// flat writes an object line by line, in the order of its keys.
func flat(v any) (string, error) {
	text, err := json.Marshal(v)
	if err != nil {
		return "", err
	}
	d := json.NewDecoder(bytes.NewReader(text))
	d.UseNumber()
	var b strings.Builder
	if err := walk(d, &b, ""); err != nil {
		return "", err
	}
	return b.String(), nil
}

// walk prints every leaf with its path.
func walk(d *json.Decoder, b *strings.Builder, path string) error {
	token, err := d.Token()
	if err != nil {
		return err
	}
	open, ok := token.(json.Delim)
	if !ok {
		if token == nil {
			token = "–"
		}
		fmt.Fprintf(b, "  %-28s %v\n", path, token)
		return nil
	}
	for i := 0; d.More(); i++ {
		next := fmt.Sprintf("%s[%d]", path, i)
		if open == '{' {
			key, err := d.Token()
			if err != nil {
				return err
			}
			next = strings.TrimPrefix(fmt.Sprintf("%s.%v", path, key), ".")
		}
		if err := walk(d, b, next); err != nil {
			return err
		}
	}
	_, err = d.Token()
	return err
}
