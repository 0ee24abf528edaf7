package main

import (
	"cmp"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"math"
	"slices"
	"strings"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/wire"
)

// contender is one road of a comparison: its name there and what its run found
// out. outcome is nil where only the results of an earlier run were read.
type contender struct {
	name    string
	results *wire.Results
	outcome *study.Outcome
}

// rank puts contenders on one basis and in order, best first: those without an
// open error before the others, then by cost where every one has a complete
// one, else by the volume to be moved. Equal ones keep their order.
func rank(cs []contender, basis []wire.Finding) *wire.CompareDoc {
	d := &wire.CompareDoc{Head: wire.HeadOf("compare"), By: "cost", Order: []string{}, Findings: append([]wire.Finding{}, basis...)}
	for _, c := range cs {
		row := compared(c)
		d.Alternatives = append(d.Alternatives, row)
		if row.Cost == nil {
			d.By = "volume"
		}
	}
	slices.SortStableFunc(d.Alternatives, func(a, b wire.Compared) int {
		return cmp.Or(cmp.Compare(min(a.Counts.E, 1), min(b.Counts.E, 1)), cmp.Compare(size(a, d.By), size(b, d.By)))
	})
	for _, row := range d.Alternatives {
		d.Order = append(d.Order, row.Name)
	}
	d.Basis = wire.Basis{
		GroundSHA256: common(cs, ground),
		PayMethod:    common(cs, func(r *wire.Results) string { return r.Result.Earthwork.Totals.PayMethod }),
		Currency:     common(cs, currency),
	}
	d.Differences = differences(cs)
	return d
}

// compared is a contender's row.
func compared(c contender) wire.Compared {
	r, t := &c.results.Result, &c.results.Result.Earthwork.Totals
	row := wire.Compared{
		Name: c.name, Status: c.results.Status, Length: r.Alignment.Length,
		CutBank: t.CutBank, FillCompacted: t.FillCompacted, Strip: t.Strip,
		Culverts: len(r.Drainage.Culverts),
	}
	if m := r.Earthwork.Mass.Ordinates; m != nil && len(*m) > 0 {
		end := (*m)[len(*m)-1].Value
		borrow, waste := max(0, -end), max(0, end)
		row.Balance, row.Borrow, row.Waste = &end, &borrow, &waste
	}
	if r.Cost != nil {
		row.Cost = r.Cost.Total
	}
	for _, f := range c.results.Findings {
		if f.Accepted != nil {
			continue
		}
		if row.Worst == nil {
			row.Worst = &f.Code // findings stand gravest first
		}
		switch f.Severity {
		case "E":
			row.Counts.E++
		case "W":
			row.Counts.W++
		default:
			row.Counts.N++
		}
	}
	return row
}

// size is what a row is ranked by; withheld figures come last.
func size(c wire.Compared, by string) float64 {
	switch {
	case by == "cost":
		return float64(*c.Cost)
	case c.CutBank == nil || c.FillCompacted == nil:
		return math.Inf(1)
	}
	return float64(*c.CutBank + *c.FillCompacted)
}

// ground names what was surveyed: the hash of the survey file, or of the
// hashes where there are several.
func ground(r *wire.Results) string {
	var hashes []string
	for _, in := range r.Inputs[min(1, len(r.Inputs)):] { // the first is the project file
		hashes = append(hashes, in.SHA256)
	}
	if len(hashes) < 2 {
		return strings.Join(hashes, "")
	}
	sum := sha256.Sum256([]byte(strings.Join(hashes, "\n")))
	return hex.EncodeToString(sum[:])
}

func currency(r *wire.Results) string {
	if r.Result.Cost == nil {
		return ""
	}
	return r.Result.Cost.Currency
}

// common returns what all contenders share, nil where they differ or have
// none.
func common(cs []contender, of func(*wire.Results) string) *string {
	first := of(cs[0].results)
	for _, c := range cs[1:] {
		if of(c.results) != first {
			return nil
		}
	}
	if first == "" {
		return nil
	}
	return &first
}

// basisOf looks for what two runs do not share (Q21): ground, currency, pay
// method, and the rate of an item that both bill.
func basisOf(a, b contender) (found []wire.Finding) {
	differ := func(what, x, y string) {
		found = append(found, otherBasis(fmt.Sprintf("%s: %s in %s, %s in %s", what, orNone(x), a.name, orNone(y), b.name)))
	}
	for _, of := range []struct {
		what string
		get  func(*wire.Results) string
	}{
		{"ground (SHA-256)", ground}, {"currency", currency},
		{"pay method", func(r *wire.Results) string { return r.Result.Earthwork.Totals.PayMethod }},
	} {
		if x, y := of.get(a.results), of.get(b.results); x != y {
			differ(of.what, x, y)
		}
	}
	theirs := rates(b.results)
	for _, l := range lines(a.results) {
		if rate, ok := theirs[l.Item]; ok && l.Rate != nil && rate != *l.Rate {
			differ("rate of "+l.Item, fmt.Sprint(*l.Rate), fmt.Sprint(rate))
		}
	}
	return found
}

func otherBasis(what string) wire.Finding {
	rule, _ := study.Rule("Q21")
	return wire.Finding{Code: "Q21", Severity: "E", Message: "not on one basis, " + what,
		Source: rule.Source, Help: rule.Mend, Stops: []string{}}
}

func orNone(s string) string {
	if s == "" {
		return "none"
	}
	return s
}

func lines(r *wire.Results) []wire.Line {
	if r.Result.Cost == nil {
		return nil
	}
	return r.Result.Cost.Lines
}

// rates returns the known rate of every item.
func rates(r *wire.Results) map[string]wire.Volume {
	out := map[string]wire.Volume{}
	for _, l := range lines(r) {
		if l.Rate != nil {
			out[l.Item] = *l.Rate
		}
	}
	return out
}
