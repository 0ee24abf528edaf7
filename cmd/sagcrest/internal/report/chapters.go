package report

import (
	"fmt"
	"html/template"
	"strings"

	"sagcrest/cmd/sagcrest/internal/table"
)

// chapters builds the page in the order in which a reviewer reads.
func (s *sheets) chapters() ([]chapter, error) {
	grade, err := s.gradeFigure()
	if err != nil {
		return nil, err
	}
	plan, err := s.planFigure()
	if err != nil {
		return nil, err
	}
	cross, err := s.sectionFigures()
	if err != nil {
		return nil, err
	}
	barrels, err := s.barrelFigures()
	if err != nil {
		return nil, err
	}
	out := []chapter{
		{ID: "findings", Title: "Findings", Tables: show(s.findingsTable()), Words: s.findingWords()},
		{ID: "definitions", Title: "Definitions and signs", Words: definitions()},
		{ID: "inputs", Title: "Inputs as they were read", Tables: show(s.echoTables()...), Words: s.echoWords()},
		{ID: "alignment", Title: "Alignment", Tables: show(s.pisTable(), s.elementsTable()), Figures: plan},
		{ID: "grade-line", Title: "Grade line", Tables: show(s.curvesTable(), s.turningsTable(), s.clearancesTable()), Figures: grade},
		{ID: "sections", Title: "Sections", Tables: show(s.sectionsTable()), Figures: cross},
		{ID: "earthwork", Title: "Earthwork", Tables: show(s.volumesTable(), s.methodsTable(), s.materialsTable(), s.topsoilTable(), s.massTable(), s.landTable())},
	}
	drains := chapter{ID: "drainage", Title: "Culverts", Tables: show(s.culvertsTable()), Figures: barrels}
	for i := range s.r.Result.Drainage.Culverts {
		drains.Tables = append(drains.Tables, show(s.coverTable(i))...)
		drains.Workings = append(drains.Workings, s.coverWorking(i))
	}
	out = append(out, drains)
	if s.r.Result.Cost != nil {
		out = append(out, chapter{ID: "cost", Title: "Cost", Tables: show(s.costTable())})
	}
	return append(out, chapter{ID: "cautions", Title: "Cautions", Words: cautions()}), nil
}

// show renders tables, leaving out those without rows.
func show(ts ...*table.Table) (out []template.HTML) {
	for _, t := range ts {
		if len(t.Rows) > 0 {
			out = append(out, t.HTML())
		}
	}
	return out
}

// findingWords says what was not looked at and which acceptances are idle.
func (s *sheets) findingWords() (out []string) {
	if len(s.r.Findings) == 0 {
		out = append(out, "No check found anything.")
	}
	if len(s.o.Silent) > 0 {
		var codes []string
		for _, c := range s.o.Silent {
			codes = append(codes, string(c))
		}
		out = append(out, "Checks that had nothing to look at, because their input is not given: "+strings.Join(codes, ", ")+".")
	}
	for _, a := range s.o.Idle() {
		out = append(out, fmt.Sprintf("The acceptance of %s at %s (%s) applies to nothing: the figure changed, the fault is mended, or an error cannot be accepted.", a.Code, a.At, a.Value))
	}
	if len(s.o.Road.Superelevation()) == 0 {
		out = append(out, "No superelevation is given: every section has the crossfalls of its typical section, in curves too.")
	} else {
		out = append(out, "Superelevation is taken from the project's table; whether it suits speed and radius, and whether water runs off its transitions, is not checked by this version.")
	}
	return append(out, "Haul, hydraulics and the volumes between changes of geometry are not computed by this version.")
}

func definitions() []string {
	return []string{
		"Station: length along the horizontal alignment from its start, printed as its label. Offset: square to the alignment, right positive looking up-station.",
		"Grades are positive uphill with growing stations. Crossfall is the rise per metre to the right on both sides. Side slopes are horizontal per vertical.",
		"Cut and fill are two figures, never one with a sign. Depth of cut is ground minus design.",
		"The earthwork line is the underside of the pavement from hinge to hinge, vertical at the hinge, and outside it the finished surface less the topsoil dressing. Ground is the surveyed ground less the strip depth, which is a separate ledger.",
		"Bank: as it lies in the ground. Compacted: as it lies in the embankment. Loose: as it lies on a truck. Cut is bank, fill is compacted.",
		"Mass ordinates rise in cut; their state is named beside them.",
		"Catch point: where the earthwork line first meets the stripped ground, going outward from the hinge; its level is the original ground's.",
		"Cover: vertical, from the outside of the barrel's crown to the datum of its rule, judged from hinge to hinge.",
		"– means that a figure does not exist; \"withheld: CODE\" that a finding makes it unknown. Figures are rounded for print only; sums are of unrounded numbers, so rounded rows may differ from a total in the last place.",
	}
}

func cautions() []string {
	return []string{
		"These quantities and checks support a licensed engineer's judgement and do not replace it. Local codes and the owner's manuals govern.",
		"Excavations, trenches and slopes can collapse; traffic, overhead and buried utilities can kill. Locate utilities and plan support, access and traffic before any work.",
		"Culverts change where flood water goes. Capacity, headwater, outlet protection and the risk downstream must be shown separately before anything is built.",
		"Values marked as assumptions or from memory must be replaced by project data.",
	}
}
