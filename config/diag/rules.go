package diag

import "sagcrest/profile/finding"

// Rules returns the pages of the codes that files and values raise. Their
// Message is filled by the reader that knows the file.
func Rules() []finding.Rule {
	const practice = "common practice"
	page := func(code finding.Code, title, formula, effect, mend string) finding.Rule {
		return finding.Rule{Code: code, Default: finding.Error, Title: title, Message: "%v",
			Formula: formula, Source: practice, Effect: effect, Mend: mend}
	}
	return []finding.Rule{
		page("F01", "Input file missing or unreadable", "the file can be opened and read",
			"Nothing can be computed.", "Correct the path; it counts from the project file's folder."),
		page("F02", "Truncated, malformed, lying or hostile file", "the file holds what its header promises, within the reader's limits",
			"Numbers read past the fault would be wrong.", "Get the file again from its source, or mend the place that is named."),
		page("F03", "Unknown key, table or name", "every key of the project file is one of `sagcrest schema project`; every name is defined",
			"A misspelt key would silently be left out.", "Use the nearest known name, or take the key out."),
		page("F04", "Unit missing, foreign, or of the wrong kind", "a number with its unit: mm cm m km in ft us_ft yd, m2 ft2 ha acre, m3 yd3, km/h mile/h, deg, %",
			"A bare number may mean anything.", "Write the figure with its unit, such as \"0.40 m\"."),
		page("F05", "Required value missing", "every required key stands in the project file",
			"What it decides cannot be guessed.", "Add the key."),
		page("F06", "Not a number, or outside its possible range", "a finite number in the range of its key",
			"Results would be meaningless.", "Correct the figure."),
		page("F07", "Columns do not fit the declared order", "as many columns as survey.order names, a header that agrees with it, numbers where numbers belong",
			"Northings would be read as eastings, or ids as levels.", "Declare the order in which the file is written."),
		page("F08", "Two inputs contradict, or say the same thing twice", "one source for every figure",
			"Which of the two holds cannot be told.", "Take one of the two out."),
		page("F09", "A variant that is not read", "formats and keys that this version builds",
			"Reading it in part would leave something out in silence.", "Convert the file, or take the key out."),
		page("F10", "Output folder not ours, or not writable", "the folder is absent, empty, or holds a results.json of this program",
			"Somebody else's files would be lost.", "Name another folder with --out, or use --force."),
		page("U01", "\"ft\" without saying which foot, on map coordinates", "|N| or |E| > 100,000 with units = \"ft\"",
			"The two feet differ by 2 parts in a million: a metre on a coordinate of 500 km.", "Write \"international feet\" or \"us survey feet\"."),
		page("U04", "Vertical datum missing or differing", "survey.vertical_datum is given",
			"Levels of unknown datum cannot be built from.", "Name the datum, be it \"local levelling\"."),
		page("U07", "Duplicate point id with different coordinates", "one place for each id",
			"One of the two points is wrong.", "Correct or rename one of them."),
		page("U09", "Zero or -9999 elevation taken as ground", "-9999 always (so -32768 and -32767, the lowest values of 16-bit numbers); 0.00 where the nearest level in plan that is not 0.00 differs by more than 5 m",
			"A void would be read as a pit.", "Take the rows out, or mark the no-data value in the file."),
		page("U14", "Decimal comma, byte order mark or spreadsheet date", "decimal points; ids and stations as they were written",
			"Columns shift, or ids change.", "Export the file again as plain text with decimal points."),
	}
}
