package wire

// CalcDoc is the document of one desk calculation.
type CalcDoc struct {
	Head
	Topic    string         `json:"topic"`
	Units    string         `json:"units" jsonschema:"enum=metric,enum=us"`
	Inputs   map[string]any `json:"inputs"`
	Result   any            `json:"result"`
	Steps    []CalcStep     `json:"steps"`
	Findings []Finding      `json:"findings"`
}

// CalcStep is one line of a working; Substituted evaluates to Value, with the
// angles of sin, cos and tan in degrees.
type CalcStep struct {
	Symbol      string `json:"symbol"`
	Formula     string `json:"formula"`
	Substituted string `json:"substituted"`
	Value       Fine   `json:"value"`
	Unit        string `json:"unit"`
	Source      string `json:"source"`
}

// NewCalc makes the document of a calculation without steps yet.
func NewCalc(topic, units string, inputs map[string]any, result any) *CalcDoc {
	return &CalcDoc{Head: head("calc"), Topic: topic, Units: units, Inputs: inputs, Result: result, Steps: []CalcStep{}, Findings: []Finding{}}
}
