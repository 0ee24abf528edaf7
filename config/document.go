package config

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io/fs"
	"path/filepath"
	"reflect"
	"slices"

	"github.com/go-viper/mapstructure/v2"
	"github.com/spf13/viper"

	"sagcrest/config/diag"
	"sagcrest/config/quantity"
	"sagcrest/profile/finding"
)

// Document is a project file that was read: the base road and its
// alternatives, with the place of every key. It is never changed.
type Document struct {
	*source
	root *node
}

// Input names a file that was read.
type Input struct {
	Path   string // relative to the folder of the project
	SHA256 string // hexadecimal
	Bytes  int
}

// newInput hashes the bytes as they were read, line ends included: another
// checker must find the same hash with any tool.
func newInput(path string, data []byte) Input {
	sum := sha256.Sum256(data)
	return Input{Path: path, SHA256: hex.EncodeToString(sum[:]), Bytes: len(data)}
}

// Input returns path, hash and size of the project file itself.
func (d *Document) Input() Input { return newInput(filepath.Base(d.path), d.data) }

// Read reads a project file once. The problems are all that can be said
// without knowing which road is asked for: form, unknown keys, values that are
// no number, text or table where one is meant. The document is nil only when
// the file cannot be read at all; otherwise Project may be called for the rest
// of the complaints, yet no run may follow from a document with problems.
func Read(files Files, path string) (*Document, []diag.Problem) {
	data, err := files(path)
	if err != nil {
		return nil, []diag.Problem{missing(path, "", err)}
	}
	d := &Document{source: newSource(path, data)}
	var problems []diag.Problem
	d.root, problems = grow(d.source)
	if d.root == nil {
		return nil, problems
	}
	in := &inspector{source: d.source}
	in.inspect(d.root, reflect.TypeFor[fileProject](), "")
	d.nameAlternatives(in)
	return d, append(problems, in.problems...)
}

// missing says that a file cannot be opened (F01).
func missing(path, key string, err error) diag.Problem {
	message := fmt.Sprintf("%s: %v", path, reason(err))
	return diag.Problem{Code: "F01", Severity: finding.Error, File: path, Key: key, Message: message, Help: "check the name and the rights of the file"}
}

// reason takes the path out of the file system's message, which is printed
// beside it anyway.
func reason(err error) error {
	var e *fs.PathError
	if errors.As(err, &e) {
		return e.Err
	}
	return err
}

// Project returns one road of the document: "base" or the name of an
// alternative. The problems are those of the road as a whole: missing keys,
// units, ranges, contradictions, names that nothing carries. The project is
// nil when one of them ends the run; a project may come with Q21, which does
// not.
func (d *Document) Project(alternative string) (*Project, []diag.Problem) {
	base := d.root.without("alternative")
	merged := base
	if alternative != baseName {
		over, problem := d.find(alternative)
		if problem != nil {
			return nil, []diag.Problem{*problem}
		}
		merged = merge(base, over.without("name"))
	}
	r := &reading{source: d.source, root: merged, things: things(d.root)}
	p := r.project()
	p.Alternative, p.document, p.root = alternative, d, merged
	r.differing(base)
	if ends(r.problems) {
		return nil, r.problems
	}
	return p, r.problems
}

// ends reports whether a problem leaves no geometry or no meaning. Of what this
// package says only Q21 does not: it concerns a comparison.
func ends(problems []diag.Problem) bool {
	return slices.ContainsFunc(problems, func(p diag.Problem) bool { return p.Code != "Q21" })
}

// find returns the table of an alternative.
func (d *Document) find(name string) (*node, *diag.Problem) {
	for _, n := range d.alternatives() {
		if n.get("name").string() == name && name != "" {
			return n, nil
		}
	}
	known := append([]string{baseName}, d.Alternatives()...)
	p := d.problem("F03", position{1, 1}, "alternative", fmt.Sprintf("the project has no alternative %q", name), suggest(name, known))
	if e := d.root.entry("alternative"); e != nil {
		p = d.problem("F03", e.at, "alternative", p.Message, p.Help)
	}
	return nil, &p
}

// project decodes the merged tree and converts it, stage by stage. Bare
// numbers and labels need the units and the first label, so these come first.
func (r *reading) project() *Project {
	t := reflect.TypeFor[fileProject]()
	in := &inspector{source: r.source}
	in.demand(r.root, t, "")
	r.problems = append(r.problems, in.problems...)
	r.units = quantity.Metric
	if units, ok := quantity.ParseSystem(r.root.get("units").string()); ok {
		r.units = units
	}
	f := r.decode(t)
	r.startLabel(f.Alignment)
	r.settle(reflect.ValueOf(f).Elem(), "", field{})
	p := &Project{
		Title: f.Title, Date: f.Date, Revision: f.Revision, Originator: f.Originator, Checker: f.Checker,
		Rounding: f.Rounding, Units: r.units, Labels: r.labels,
		Survey: r.survey(f.Survey), Alignment: r.alignment(f.Alignment),
		PVI: r.profile(f.Profile), CurveTable: r.curveTable(f.Profile), TieIns: r.tieIns(f.TieIn),
		Obstacles: r.obstacles(f.Clearance), Typicals: r.typicals(f.TypicalSection), Strata: r.strata(f.Stratum),
		Superelevation: crossfalls(f.Superelevation),
		Materials:      r.materials(f.Material), Prices: r.prices(f.Prices), HasPrices: f.Prices != nil,
		Culverts: r.culverts(f.Culvert), RightOfWay: r.rightOfWay(f.RightOfWay), Accepts: r.accepts(f.Accept),
	}
	if f.Profile != nil {
		p.DesignSpeed, p.Criteria = f.Profile.DesignSpeed.or(0), f.Profile.Criteria
	}
	if f.Prices != nil {
		p.Prices.Respread = r.plainRate(f.Prices.Respread, "prices.respread", quantity.Volume)
	}
	p.Request = r.request(f.Earthwork, p)
	p.Request.Exclusions, p.Request.Extras = r.exclusions(f.Exclude), r.extras(f.ExtraQuantity)
	return p
}

// decode feeds what is left of the tree after inspection to viper and takes
// the typed file out of it. Environment and flags never reach it: the same
// bytes in give the same bytes out. Keys are ours and lower case, so viper's
// folding of case changes nothing; names of the user stand in values only.
func (r *reading) decode(t reflect.Type) *fileProject {
	in := &inspector{source: r.source} // its complaints were made when the file was read
	clean := in.inspect(r.root, t, "")
	var f fileProject
	v := viper.New()
	err := v.MergeConfigMap(clean.plain().(map[string]any))
	if err == nil {
		err = v.UnmarshalExact(&f, viper.DecodeHook(mapstructure.DecodeHookFuncType(textHook)), func(c *mapstructure.DecoderConfig) {
			c.TagName, c.WeaklyTypedInput = "json", false
		})
	}
	if err != nil { // the inspected tree fits the types by construction
		panic("config: " + err.Error())
	}
	return &f
}
