package table

import (
	"bytes"
	"encoding/csv"
)

// CSV writes the table for other programs: UTF-8, commas, decimal points, one
// header line with units in brackets.
func (t *Table) CSV() []byte {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	var head []string
	for _, c := range t.Columns {
		name := c.Key
		if c.SI != "" {
			name += " [" + c.SI + "]"
		}
		head = append(head, name)
		if c.Kind == Station {
			head = append(head, c.Key+"_distance [m]")
		}
	}
	// Writing to memory cannot fail.
	_ = w.Write(head)
	for _, r := range t.Rows {
		var line []string
		for i, c := range t.Columns {
			line = append(line, r[i].Data)
			if c.Kind == Station {
				line = append(line, r[i].Distance)
			}
		}
		_ = w.Write(line)
	}
	w.Flush()
	return b.Bytes()
}
