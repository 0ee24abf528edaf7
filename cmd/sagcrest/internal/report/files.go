package report

import (
	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/cmd/sagcrest/internal/table"
	"sagcrest/cmd/sagcrest/internal/wire"
)

// File is one file of the output folder.
type File struct {
	Name string
	Data []byte
}

// Files makes the output folder of a run: report, results, and a CSV for every
// table that has rows.
func Files(o *study.Outcome, r *wire.Results) ([]File, error) {
	s := newSheets(o, r)
	page, err := s.page()
	if err != nil {
		return nil, err
	}
	results, err := wire.Encode(r)
	if err != nil {
		return nil, err
	}
	out := []File{{"report.html", page}, {"results.json", results}}
	for _, t := range s.tables() {
		if len(t.Rows) > 0 {
			out = append(out, File{t.Name + ".csv", t.CSV()})
		}
	}
	return out, nil
}

// tables lists every table in the order of the report.
func (s *sheets) tables() []*table.Table {
	out := []*table.Table{
		s.findingsTable(), s.elementsTable(), s.pisTable(), s.curvesTable(), s.turningsTable(), s.clearancesTable(),
		s.sectionsTable(), s.volumesTable(), s.methodsTable(), s.materialsTable(), s.topsoilTable(), s.massTable(),
		s.landTable(), s.culvertsTable(),
	}
	for i := range s.r.Result.Drainage.Culverts {
		out = append(out, s.coverTable(i))
	}
	return append(out, s.costTable())
}
