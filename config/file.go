package config

// fileProject is the project file as it is written, less what an alternative
// changes. Together with the types below it, it is the table of known keys.
type fileProject struct {
	Title      string `json:"title"`
	Units      string `json:"units" jsonschema:"required,enum=metric,enum=international feet,enum=us survey feet,enum=ft" jsonschema_description:"of coordinates, elevations, stations, offsets and k without unit"`
	Rounding   string `json:"rounding" jsonschema:"enum=m-0.001,enum=ft-0.01" jsonschema_description:"paper only; absent: the one of units"`
	Date       string `json:"date" jsonschema_description:"paper only"`
	Revision   string `json:"revision" jsonschema_description:"paper only"`
	Originator string `json:"originator" jsonschema_description:"paper only"`
	Checker    string `json:"checker" jsonschema_description:"paper only"`

	Survey         *fileSurvey       `json:"survey" jsonschema:"required"`
	Alignment      *fileAlignment    `json:"alignment" jsonschema:"required"`
	Profile        *fileProfile      `json:"profile" jsonschema:"required"`
	TieIn          []fileTieIn       `json:"tie_in"`
	Clearance      []fileClearance   `json:"clearance"`
	TypicalSection []fileTypical     `json:"typical_section" jsonschema:"required"`
	Superelevation []fileCrossfalls  `json:"superelevation" jsonschema_description:"crossfalls by station, linear in between"`
	Stratum        []fileStratum     `json:"stratum"`
	Material       []fileMaterial    `json:"material"`
	Earthwork      *fileEarthwork    `json:"earthwork"`
	Prices         *filePrices       `json:"prices"`
	Culvert        []fileCulvert     `json:"culvert"`
	RightOfWay     *fileRightOfWay   `json:"right_of_way"`
	Exclude        []fileExclude     `json:"exclude"`
	ExtraQuantity  []fileExtra       `json:"extra_quantity"`
	Alternative    []fileAlternative `json:"alternative"`
	Accept         []fileAccept      `json:"accept"`
}
