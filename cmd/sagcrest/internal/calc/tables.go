package calc

import (
	"fmt"
	"slices"
	"strings"

	"sagcrest/drainage"
	"sagcrest/profile/criteria"
)

// tableIn is a table's name under "name", and columns that choose rows.
type tableIn map[string]any

type tableOut struct {
	Tables     []string         `json:"tables,omitempty"`
	Rows       []map[string]any `json:"rows,omitempty"`
	Source     string           `json:"source,omitempty"`
	FromMemory *bool            `json:"from_memory,omitempty"`
}

// carried is a table of coefficients.
type carried struct {
	name, source string
	columns      []string
	fromMemory   bool
	rows         []map[string]any
}

// tables lists every table of coefficients that the program carries.
func tables() []carried {
	out := []carried{coverRules()}
	for _, s := range []System{criteria.Metric, criteria.US} {
		for _, c := range criteria.Criteria() {
			out = append(out, controls(s, c))
		}
	}
	return out
}

func coverRules() carried {
	t := carried{name: "cover_rules", source: "see the column source", columns: []string{"id", "datum", "rule", "fraction", "of", "floor_m", "status", "source"}}
	for _, r := range drainage.CoverRules() {
		status := "VERIFIED"
		if r.FromMemory {
			status = "FROM MEMORY"
			t.fromMemory = true
		}
		row := map[string]any{"id": r.ID, "datum": string(r.Datum), "rule": r.Formula, "fraction": nil, "of": nil, "floor_m": nil, "status": status, "source": r.Source}
		if r.HasNumber {
			row["fraction"], row["of"], row["floor_m"] = r.Fraction, string(r.Of), r.Floor
		}
		t.rows = append(t.rows, row)
	}
	return t
}

func controls(s System, criterion string) carried {
	t := carried{name: fmt.Sprintf("aashto_k_%s_%s", criterion, s), columns: []string{"speed", "sight", "k"}, fromMemory: criterion == "passing",
		source: "AASHTO, A Policy on Geometric Design of Highways and Streets (2011), design controls for " + criterion + " sight distance"}
	rows, _ := criteria.Table(s, criterion)
	for _, r := range rows {
		t.rows = append(t.rows, map[string]any{"speed": r.Speed, "sight": r.Sight, "k": r.K})
	}
	return t
}

// tableTopic lists the tables, or rows of one of them. A column named among the
// inputs keeps the rows in which it has that value.
func tableTopic(in tableIn, _ *working) (out tableOut, fault *Fault) {
	all := tables()
	var names []string
	for _, t := range all {
		names = append(names, t.name)
	}
	wanted, ok := in["name"].(string)
	if !ok {
		if len(in) > 0 {
			return out, missing("name", "name is one of "+strings.Join(names, ", "))
		}
		return tableOut{Tables: names}, nil
	}
	i := slices.Index(names, wanted)
	if i < 0 {
		return out, &Fault{"F03", "name", fmt.Sprintf("there is no table %q", wanted), "known: " + strings.Join(names, ", "), names}
	}
	t := all[i]
	out.Source, out.FromMemory = t.source, &t.fromMemory
	out.Rows, fault = t.choose(in)
	return out, fault
}

func (t *carried) choose(in tableIn) ([]map[string]any, *Fault) {
	rows := []map[string]any{}
	for key := range in {
		if key != "name" && !slices.Contains(t.columns, key) {
			return nil, unknownName(key, t.columns)
		}
	}
	for _, r := range t.rows {
		keep := true
		for key, want := range in {
			keep = keep && (key == "name" || fmt.Sprint(r[key]) == fmt.Sprint(want))
		}
		if keep {
			rows = append(rows, r)
		}
	}
	return rows, nil
}
