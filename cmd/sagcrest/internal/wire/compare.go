package wire

// CompareDoc is the document of the compare command.
type CompareDoc struct {
	Head
	Basis        Basis        `json:"basis"`
	Order        []string     `json:"order"`
	By           string       `json:"by" jsonschema:"enum=cost,enum=volume"`
	Alternatives []Compared   `json:"alternatives"`
	Differences  []Difference `json:"differences"`
	// Findings holds Q21 where the basis differs.
	Findings []Finding `json:"findings"`
}

// Basis is what all alternatives share; null where they differ.
type Basis struct {
	GroundSHA256 *string `json:"ground_sha256"`
	PayMethod    *string `json:"pay_method"`
	Currency     *string `json:"currency"`
}

// Compared is one alternative. Balance is the last mass ordinate, positive for
// surplus; borrow and waste are its two sides.
type Compared struct {
	Name          string  `json:"name"`
	Status        string  `json:"status" jsonschema:"enum=complete,enum=withheld"`
	Length        Fine    `json:"length"`
	CutBank       *Volume `json:"cut_bank"`
	FillCompacted *Volume `json:"fill_compacted"`
	Strip         *Volume `json:"strip"`
	Balance       *Volume `json:"balance"`
	Borrow        *Volume `json:"borrow"`
	Waste         *Volume `json:"waste"`
	Cost          *Volume `json:"cost"`
	Culverts      int     `json:"culverts"`
	Counts        Counts  `json:"counts"`
	Worst         *string `json:"worst"`
}

// Difference is a result that is not the same in all alternatives; a null value
// does not exist or is withheld.
type Difference struct {
	Path   string         `json:"path"`
	Values map[string]any `json:"values"`
}
