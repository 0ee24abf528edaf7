// Package config is the way in: it turns a project file and its survey into
// inputs of the domain, in SI, or into complaints that say where, what and how
// to mend.
//
// What comes in: the path of a project file (TOML, YAML or JSON, one tree of
// keys in three notations) and a function that reads files. What goes out: a
// Project, an open struct of the domain's own input types, and a Ground.
//
//  1. Read reads the bytes once into a tree of nodes, each with line and
//     column of its key and value. The tree is never changed afterwards.
//     Faults of form end here (F02), as do keys given twice (F08).
//  2. The tree is held against the file types (fileProject and below), the one
//     table of known keys. Unknown keys name the nearest known one (F03); keys
//     that belong to a part not built yet are named as such (F09), never
//     ignored; a table where a number is meant is F06.
//  3. Document.Project lays an alternative over the base, node by node: a
//     table merges by key, a list replaces the old list whole. Every value
//     keeps the place where it was typed; key paths are those of the merged
//     road.
//  4. What is required and missing is F05. The rest goes through viper into
//     the file types. Neither environment nor flags reach it: the same bytes
//     in give the same bytes out.
//  5. Every number is brought to SI in one pass: unit (F04), decimal comma
//     (U14), form and range (F06) by the tags of its field.
//  6. One function a stage (survey, alignment, profile, section, earthwork,
//     drainage, prices, accept) checks what keys say together (F05, F08, F03
//     for names that nothing carries, A01, U01, U04) and fills the Project.
//  7. LoadGround reads the survey that the project names.
//
// All complaints of a step are returned at once; the later steps go on with
// what is left, so that one run of check shows them together. Project is nil
// as soon as one of them ends the run.
//
// Key paths count from 0: "culvert[2].outlet_invert". Project.Locate leads from
// such a path, which findings of the domain carry as well, back to line and
// column; columns count bytes, as compilers do.
//
// # Units
//
// Bare numbers are legal for coordinates, levels, stations and offsets (in the
// project's units), ratios, degrees, counts, K (length per percent) and rates.
// Every other number is text with its unit. Where a bare number is legal, text
// with a fitting unit is legal too. A bare "ft" is refused on map coordinates
// (beyond 10⁵): there the two feet lie metres apart. On a local grid it is read
// as the international foot, and Project.Units keeps saying that nobody named
// it.
//
// # What is left to others
//
// Whatever needs the length of the road or its ground: gaps between typical
// sections (Q11), places off the road (A03), overlapping curves (P01, A16),
// stations of the grade line that go back (A01), whether all cut has one
// shrinkage where mass_state is "bank" (F08).
//
// References: TOML 1.0; YAML 1.2 without anchors, aliases and tags; RFC 8259;
// JSON Schema draft 2020-12 for Schema.
package config
