// Package criteria holds published rules of road geometry as data and formulas:
// sight distances, lengths of vertical curves, side rules that follow from them.
//
// Numbers go in and out in the units of the rule: a System says whether lengths
// are metres and speeds km/h, or feet and mile/h, because the handbooks print
// one coefficient for each. Grades are ratios; A, the change of grade, is in
// percent where the handbooks have it so.
//
//  1. Standards lists the rule sets with the constants each of them prints
//     (standard.go);
//  2. Stopping gives the stopping sight distance (sight.go);
//  3. Crest, Headlight and Underpass give the length of curve a sight distance
//     needs, by whichever of the two branches applies (length.go);
//  4. Table makes the design controls of a rule set (table.go).
//
// References: AASHTO, A Policy on Geometric Design of Highways and Streets
// (2011 and 2018 editions), ch. 3; IRC:SP:23 (Indian Roads Congress); constants
// of others as the published cases state them. What is from memory says so.
package criteria
