// Sagcrest plans the earthwork and the drainage of a road around its sag and
// crest curves.
//
// A project file names a horizontal alignment, a grade line, typical sections,
// surveyed ground, soils, prices, clearances and culverts. Out come cross
// sections, cut and fill, mass ordinates, culverts with invert and cover
// checked over their whole length, low points that need an inlet, a bill, and
// a report in which every number can be ticked.
//
// # Commands
//
//	sagcrest new DIR            write a commented starter project into an empty folder
//	sagcrest check PROJECT      read and validate everything, run every check, write nothing
//	sagcrest run PROJECT        the main job; writes PROJECT/out
//	sagcrest compare PROJECT    every alternative of a project on one basis, ranked
//	sagcrest compare A B        two runs or projects, line by line
//	sagcrest calc TOPIC …       one desk calculation with its working
//	sagcrest explain CODE       what a finding means and how to mend it
//	sagcrest schema [DOCUMENT]  JSON Schema of the project file or of an output document
//	sagcrest completion SHELL   completion for bash, zsh or fish
//	sagcrest help [COMMAND]     this text, or that of one command
//
// PROJECT is a project file (TOML, YAML or JSON) or the folder that holds it as
// road.toml, road.yaml, road.yml or road.json; "-" reads TOML from standard
// input, and its survey files are then relative to the current folder.
//
// # Options
//
//	--alternative NAME   an alternative of the project instead of its base road (check, run)
//	--out DIR            write into DIR instead of PROJECT/out (run); write a page (compare)
//	--force              take a folder that is not empty and not ours (run, compare)
//	--dry-run            compute everything, write nothing, list what would be written (run, compare, new)
//	--json               exactly one JSON document on standard output
//	--plain              one record a line, fields parted by tabs
//	--quiet              findings and refusals only
//	--strict             warnings count against the run
//	--max-warnings N     more than N warnings count against the run
//	--no-color           no bold letters
//
// The variables SAGCREST_OUT, SAGCREST_PLAIN, SAGCREST_NO_COLOR,
// SAGCREST_STRICT, SAGCREST_MAX_WARNINGS, SAGCREST_QUIET and SAGCREST_FORCE set
// the option of that name where the flag is not given. NO_COLOR, TERM=dumb and
// an output that is no terminal switch bold letters off too. No variable and
// no option changes a number of the project: those stand in its file.
//
// # Desk calculations
//
//	sagcrest calc curve pvc='{"station": 10000, "elev": 1000}' g1=-4 g2=2 length=500
//	sagcrest calc sight kind=crest sight=185m g1=2 g2=-3.75
//	sagcrest calc arc degree=5-37-00 delta=42-15-00 --units us
//	sagcrest calc spiral - < inputs.json
//	sagcrest calc --list
//
// Inputs are name=value, lists and objects as JSON, or one JSON object on
// standard input with "-". Bare numbers are in metres, km/h, percent and
// degrees, under --units us in feet, mile/h, percent and degrees; a text may
// carry its unit. The working prints formula, numbers put in, result and
// source; --json prints the same as steps. What cannot be ends with 3.
//
// # Exit codes
//
//	0  done; warnings are allowed
//	1  done, with findings of severity E, or warnings under --strict or beyond --max-warnings
//	2  wrong usage
//	3  input that cannot be read or from which no geometry follows; nothing is written
//	4  the file system refused
//	5  a fault of the program
//
// After 1 everything is written; sheets are marked and withheld values are null.
// A finding that the project accepts with its reason does not count, but of
// those of severity E only D01 can be accepted. Compare ends with 1 only when
// the alternatives do not stand on one basis (Q21). An interrupt leaves what
// was there and ends with 130, as the shell shows it.
//
// # Output
//
// Results go to standard output, messages to standard error. The text on
// either may change with any version; the documents of --json and the files
// of a run keep their keys (schema_version). After 3 and 4 the document is
// {"schema":"sagcrest/error","schema_version":1,"findings":[…]}.
//
// The output folder is "out" beside the project file, of an alternative
// "out-NAME" with every run of other signs than letters and digits as one "-".
// A folder that holds an earlier run (its results.json says so) is replaced
// whole; so is the folder of an earlier comparison (compare.json) by the next.
// Any other folder that is not empty is refused, unless --force: what
// it holds is then kept beside it as DIR.before. A folder that holds the
// project or its survey is never replaced. The new folder changes places with
// the old one by renaming, so that nobody sees half a run.
//
// # What is safe to rely on, and what is not
//
// Quantities and hydraulics support the judgement of a licensed engineer and do
// not replace it. Local codes and the owner's manuals govern. Mind the hazards
// of excavation, trenches, slopes, traffic and utilities, and the flood risk
// downstream. Values marked as assumptions must be replaced by data of the
// project.
package main
