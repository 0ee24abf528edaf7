package wire

// HeadOf makes the head of a document of the command line itself.
func HeadOf(name string) Head { return head(name) }

// NewDoc says what `new` does to each file of a folder.
type NewDoc struct {
	Head
	Folder string `json:"folder"`
	DryRun bool   `json:"dry_run"`
	Files  []Fate `json:"files"`
}

// Fate is what happens to a file.
type Fate struct {
	Path string `json:"path"`
	Fate string `json:"fate"`
}

// ExplainDoc is a part of the catalogue of findings.
type ExplainDoc struct {
	Head
	Codes []RulePage `json:"codes"`
}

// RulePage is a page of the catalogue.
type RulePage struct {
	Code     string `json:"code"`
	Severity string `json:"severity" jsonschema:"enum=E,enum=W,enum=N"`
	Title    string `json:"title"`
	Message  string `json:"message"`
	Formula  string `json:"formula"`
	Source   string `json:"source"`
	Effect   string `json:"effect"`
	Mend     string `json:"mend"`
}
