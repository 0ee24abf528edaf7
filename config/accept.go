package config

import (
	"errors"
	"fmt"
	"regexp"
	"strings"

	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
)

// A finding that somebody answers for. Three keys are there so that the name on
// paper is never blank: reason, by and date.
type fileAccept struct {
	Code   string `json:"code" jsonschema:"required" jsonschema_description:"of the finding"`
	At     place  `json:"at" jsonschema:"required" jsonschema_description:"a station, or the id or name of the thing"`
	Value  figure `json:"value" jsonschema_description:"what the report printed; another figure ends the acceptance"`
	Reason string `json:"reason" jsonschema:"required"`
	By     string `json:"by" jsonschema:"required"`
	Date   string `json:"date" jsonschema:"required"`
}

// families lists the catalogue of checks: a letter and how many numbers it
// has. acceptable are the codes that are no errors, and D01 for relief
// barrels; D03 and S05 come as warnings too.
func families() []struct {
	letter string
	count  int
} {
	return []struct {
		letter string
		count  int
	}{{"F", 10}, {"U", 14}, {"A", 16}, {"P", 15}, {"S", 6}, {"Q", 24}, {"D", 30}}
}

// acceptable lists what may be answered for. D03 and S05 stand in it because
// they come as warnings too; an error of theirs stays one. The list is of codes
// and not of families, since a family mixes errors and warnings.
const acceptable = "U05 U08 U10 U11 U12 A04 A05 A07 A08 A09 A11 A12 A13 A15 " +
	"P03 P06 P07 P08 P09 P10 P11 S02 S03 S04 S05 " +
	"Q07 Q08 Q09 Q10 Q14 Q16 Q17 Q18 Q20 Q22 Q24 " +
	"D01 D02 D03 D06 D08 D10 D12 D13 D14 D15 D17 D18 D20 D21 D23 D28 D29"

// codes returns every code of the catalogue.
func codes() []string {
	var all []string
	for _, f := range families() {
		for i := range f.count {
			all = append(all, fmt.Sprintf("%s%02d", f.letter, i+1))
		}
	}
	return all
}

// accepts reads the acceptances. Whether one still fits is decided when the
// findings are known: a figure that changed ends it.
func (r *reading) accepts(files []fileAccept) []Accept {
	var all []Accept
	for i := range files {
		f, key := &files[i], fmt.Sprintf("accept[%d]", i)
		a := Accept{
			Code: finding.Code(f.Code), At: f.At.text, Value: f.Value.text,
			Reason: f.Reason, By: f.By, Date: f.Date, Key: key,
		}
		r.acceptCode(f.Code, key+".code")
		for _, blank := range []struct{ key, text string }{{"reason", f.Reason}, {"by", f.By}, {"date", f.Date}} {
			if r.has(key+"."+blank.key) && strings.TrimSpace(blank.text) == "" {
				r.complain("F05", key+"."+blank.key, key+"."+blank.key+" is empty", "somebody answers for an acceptance")
			}
		}
		r.acceptPlace(f, &a, key)
		if f.Value.ok {
			a.Measured = finding.Of(f.Value.si, unitOf(f.Value.value))
			if f.Value.bare {
				a.Value = shortest(f.Value.number)
			}
		}
		all = append(all, a)
	}
	return all
}

// acceptCode complains of a code that is not in the catalogue, and of an error:
// to accept it would withhold nothing and mark no sheet.
func (r *reading) acceptCode(code, key string) {
	if code == "" {
		return
	}
	known := false
	for _, c := range codes() {
		known = known || c == code
	}
	switch {
	case !known:
		r.named(code, key, "code", codes())
	case !strings.Contains(acceptable, code):
		r.complain("F06", key, fmt.Sprintf("%s is %s, an error: it cannot be accepted", key, code), "only warnings, notes and D01 can be; mend it")
	}
}

// acceptPlace reads a station, or a name that something in the project or in
// one of its alternatives carries.
func (r *reading) acceptPlace(f *fileAccept, a *Accept, key string) {
	if !f.At.given {
		return
	}
	if f.At.ok { // a bare number was settled already
		a.Station = stationPointer(f.At)
		a.At = r.labels.Format(*a.Station)
		return
	}
	if s, err := r.labels.Parse(f.At.text); err == nil {
		a.Station = &s
		return
	}
	for _, name := range r.things {
		if name == f.At.text {
			return
		}
	}
	r.complain("F03", key+".at", fmt.Sprintf("%s.at is %q: no station, and nothing has that id or name", key, f.At.text), suggest(f.At.text, r.things))
}

// figure is a number as the report prints it: grouped digits and raised
// exponents included.
type figure struct{ value }

// A printed figure may be bare, since counts and ratios are printed bare.
func (figure) form() form {
	return form{what: `the printed figure in quotes, such as "0.42 m"`, bare: true, quoted: true, size: 1}
}

// parseFigure undoes the typography of the report.
func parseFigure(text string) (float64, quantity.Unit, error) {
	plain := strings.NewReplacer("\u202f", "", "²", "2", "³", "3").Replace(text)
	if v, unit, err := quantity.ParseAny(plain); err == nil || !errors.Is(err, quantity.ErrNumber) && !grouped.MatchString(plain) {
		return v, unit, err
	}
	return quantity.ParseAny(strings.ReplaceAll(plain, ",", ""))
}

// grouped matches digits in groups of three, which are no decimal comma.
var grouped = regexp.MustCompile(`^-?\d{1,3}(,\d{3})+(\D|$)`)

// things lists every id and name that an acceptance may refer to, of the base
// and of all alternatives, since acceptances hold for each of them.
func things(root *node) []string {
	var all []string
	collect := func(n *node) {
		for _, name := range []struct{ table, key string }{
			{"culvert", "id"}, {"clearance", "name"}, {"tie_in", "name"}, {"typical_section", "name"}, {"material", "name"}, {"extra_quantity", "item"},
		} {
			if list := n.get(name.table); list != nil {
				for _, item := range list.items {
					if s := item.get(name.key).string(); s != "" {
						all = append(all, s)
					}
				}
			}
		}
	}
	collect(root)
	if list := root.get("alternative"); list != nil {
		for _, item := range list.items {
			collect(item)
		}
	}
	return all
}
