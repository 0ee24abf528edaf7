package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"unicode"
)

// outputFile is one file of a run, by its name inside the output folder.
type outputFile struct {
	Name string
	Data []byte
}

// The fates of a file in the output folder.
const (
	create    = "create"
	overwrite = "overwrite"
	unchanged = "unchanged"
	remove    = "remove"
)

// step is what happens to one file. A dry run lists the same steps that a
// real one takes.
type step struct{ fate, name string }

// plan is everything that writing an output folder will do.
type plan struct {
	dir   string
	files []outputFile
	steps []step // by name
	// keep says that the folder holds things that are not ours: it is set
	// aside under another name, not removed.
	keep bool
}

// mark is the document by which a folder is known as ours: its name, and the
// schema that must stand in it. A run never takes the folder of a comparison,
// nor the other way round.
type mark struct{ name, schema string }

// resultsName and resultsSchema mark the folder of a run.
const (
	resultsName   = "results.json"
	resultsSchema = "sagcrest/results"
)

func ofRun() mark        { return mark{resultsName, resultsSchema} }
func ofComparison() mark { return mark{"compare.json", "sagcrest/compare"} }

// outputFolder returns the folder of an alternative beside its project file:
// "out" for the base road, else "out-NAME" with every run of other signs than
// letters and digits as one "-".
func outputFolder(projectFile, alternative string) string {
	name := "out"
	if alternative != "" && alternative != "base" {
		name += "-" + plainName(alternative)
	}
	return filepath.Join(filepath.Dir(projectFile), name)
}

func plainName(s string) string {
	var b strings.Builder
	gap := false
	for _, r := range s {
		if unicode.IsLetter(r) || unicode.IsDigit(r) {
			b.WriteRune(r)
			gap = false
		} else if !gap {
			b.WriteByte('-')
			gap = true
		}
	}
	return b.String()
}

// planFolder looks at dir and decides what writing files there will do, without
// touching anything. inputs are the files that the run reads: a folder that
// holds one of them is never replaced.
func planFolder(dir string, ours mark, files []outputFile, inputs []string, force bool) (*plan, error) {
	p := &plan{dir: dir, files: files}
	if err := guardInputs(dir, inputs); err != nil {
		return nil, err
	}
	there, err := listFolder(dir)
	if err != nil {
		return nil, err
	}
	if len(there) > 0 && !ours.marks(dir) {
		if !force {
			return nil, fileTrouble(dir, "the output folder is not empty and was not written by this command",
				"choose another folder with --out, or say --force: what is there now is then kept beside it under another name")
		}
		p.keep = true
	}
	p.steps = p.fates(there)
	return p, nil
}

// fates compares the files to write with those that are there.
func (p *plan) fates(there []string) (steps []step) {
	written := map[string]bool{}
	for _, f := range p.files {
		written[f.Name] = true
		fate := create
		if slices.Contains(there, f.Name) {
			fate = overwrite
			if old, err := os.ReadFile(filepath.Join(p.dir, f.Name)); err == nil && bytes.Equal(old, f.Data) {
				fate = unchanged
			}
		}
		steps = append(steps, step{fate, f.Name})
	}
	for _, name := range there {
		if !written[name] && !p.keep {
			steps = append(steps, step{remove, name})
		}
	}
	slices.SortFunc(steps, func(a, b step) int { return strings.Compare(a.name, b.name) })
	return steps
}

// listFolder returns the files below dir by slash path, sorted; none where dir
// does not exist. Empty folders count by their own name.
func listFolder(dir string) ([]string, error) {
	info, err := os.Stat(dir)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	if err != nil {
		return nil, fileTrouble(dir, "the output folder cannot be looked at: "+reason(err), "choose another folder with --out")
	}
	if !info.IsDir() {
		return nil, fileTrouble(dir, "the output folder is a file", "choose another folder with --out")
	}
	var names []string
	err = filepath.WalkDir(dir, func(path string, d fs.DirEntry, err error) error {
		if err != nil || path == dir {
			return err
		}
		if d.IsDir() {
			inside, err := os.ReadDir(path)
			if err != nil || len(inside) > 0 {
				return err
			}
		}
		rel, err := filepath.Rel(dir, path)
		names = append(names, filepath.ToSlash(rel))
		return err
	})
	if err != nil {
		return nil, fileTrouble(dir, "the output folder cannot be read: "+reason(err), "choose another folder with --out")
	}
	return names, nil
}

// marks reports whether dir was written by an earlier call: whether its
// document says so itself.
func (m mark) marks(dir string) bool {
	data, err := os.ReadFile(filepath.Join(dir, m.name))
	if err != nil {
		return false
	}
	var head struct {
		Schema string `json:"schema"`
	}
	return json.Unmarshal(data, &head) == nil && head.Schema == m.schema
}

// guardInputs refuses a folder that holds the project or its survey, since
// replacing it would take them away.
func guardInputs(dir string, inputs []string) error {
	root := realPath(dir)
	for _, in := range inputs {
		rel, err := filepath.Rel(root, realPath(in))
		if err == nil && rel != ".." && !strings.HasPrefix(rel, ".."+string(filepath.Separator)) {
			return fileTrouble(dir, "the output folder holds an input of this run: "+in,
				"choose a folder with --out that holds neither the project nor its survey")
		}
	}
	return nil
}

// realPath follows links as far as the path exists, so that two spellings of a
// folder compare equal.
func realPath(path string) string {
	abs, err := filepath.Abs(path)
	if err != nil {
		return filepath.Clean(path)
	}
	rest := ""
	for at := abs; ; at = filepath.Dir(at) {
		if real, err := filepath.EvalSymlinks(at); err == nil {
			return filepath.Join(real, rest)
		}
		if at == filepath.Dir(at) {
			return abs
		}
		rest = filepath.Join(filepath.Base(at), rest)
	}
}

// reason returns what the file system said, without the operation and path
// that the message names anyway.
func reason(err error) string {
	var path *fs.PathError
	if errors.As(err, &path) {
		return path.Err.Error()
	}
	var link *os.LinkError
	if errors.As(err, &link) {
		return link.Err.Error()
	}
	return err.Error()
}
