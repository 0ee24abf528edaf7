package wire

// Version of every document. Adding keys or enum values keeps it.
const Version = 1

// Tool names the program that wrote a document.
type Tool struct {
	Name    string `json:"name"`
	Version string `json:"version"`
}

// Release is the program's version.
const Release = "0.1.0"

// Head opens every document.
type Head struct {
	Schema        string `json:"schema"`
	SchemaVersion int    `json:"schema_version"`
	Tool          Tool   `json:"tool"`
}

func head(name string) Head {
	return Head{"sagcrest/" + name, Version, Tool{"sagcrest", Release}}
}

// Input is a file that was read; its path is relative to the project.
type Input struct {
	Path   string `json:"path"`
	SHA256 string `json:"sha256"`
	Bytes  int    `json:"bytes"`
}

// Place is a place along the road: metres from its start, and the label.
type Place struct {
	Distance Fine   `json:"distance"`
	Station  string `json:"station"`
}

// Figure is a number with its unit.
type Figure struct {
	Value Fine   `json:"value"`
	Unit  string `json:"unit"`
}

// Where is the place of a finding: in the project file, and along the road in
// metres. What does not exist is null.
type Where struct {
	Key    *string `json:"key"`
	File   *string `json:"file"`
	Line   *int    `json:"line"`
	Column *int    `json:"column"`
	From   *Fine   `json:"from"`
	To     *Fine   `json:"to"`
	Offset *Fine   `json:"offset"`
	ID     *string `json:"id"`
}

// some returns nil for the zero value: a key, line or name that is not there.
func some[T comparable](v T) *T {
	var none T
	if v == none {
		return nil
	}
	return &v
}

// Accepted says who answers for a finding.
type Accepted struct {
	By     string `json:"by"`
	Date   string `json:"date"`
	Reason string `json:"reason"`
}

// Finding is one doubt.
type Finding struct {
	Code     string    `json:"code"`
	Severity string    `json:"severity" jsonschema:"enum=E,enum=W,enum=N"`
	Message  string    `json:"message"`
	Where    Where     `json:"where"`
	Measured *Figure   `json:"measured"`
	Limit    *Figure   `json:"limit"`
	Source   string    `json:"source"`
	Help     string    `json:"help"`
	Stops    []string  `json:"stops"`
	Accepted *Accepted `json:"accepted"`
}

// Counts counts findings that nobody accepted.
type Counts struct {
	E int `json:"E"`
	W int `json:"W"`
	N int `json:"N"`
}

// ErrorDoc is what stdout holds after a run that ended early.
type ErrorDoc struct {
	Head
	Findings []Finding `json:"findings"`
}

// CheckDoc is the document of the check command.
type CheckDoc struct {
	Head
	Inputs      []Input   `json:"inputs"`
	Alternative string    `json:"alternative"`
	Findings    []Finding `json:"findings"`
	Counts      Counts    `json:"counts"`
	// Silent names the checks that had nothing to look at.
	Silent []string `json:"silent"`
}
