package main

import (
	"context"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"sagcrest/cmd/sagcrest/internal/study"
	"sagcrest/config"
	"sagcrest/config/diag"
)

// projectNames are the names under which a folder may hold its project file.
var projectNames = [...]string{"road.toml", "road.yaml", "road.yml", "road.json"}

// fromStdin is the name under which a project that comes on standard input is
// known in messages; its ending says that it is TOML.
const fromStdin = "stdin.toml"

// project is where a project is read from.
type project struct {
	files config.Files
	path  string
	shown string // as the person named it
}

// find turns the argument PROJECT into a project file: a file, the folder that
// holds it, or "-".
func (a *app) find(arg string) (project, error) {
	p := project{files: config.Disk(), path: arg, shown: arg}
	if arg == "-" {
		text, err := io.ReadAll(a.in)
		if err != nil {
			return p, noProject("-", "standard input cannot be read: "+reason(err))
		}
		p.path, p.files = fromStdin, withStdin(text)
		return p, nil
	}
	info, err := os.Stat(arg)
	if err != nil {
		return p, noProject(arg, reason(err))
	}
	if !info.IsDir() {
		return p, nil
	}
	var held []string
	for _, name := range projectNames {
		if _, err := os.Stat(filepath.Join(arg, name)); err == nil {
			held = append(held, name)
		}
	}
	switch len(held) {
	case 0:
		return p, noProject(arg, "the folder holds none of "+strings.Join(projectNames[:], ", "))
	case 1:
		p.path = filepath.Join(arg, held[0])
		return p, nil
	}
	return p, badInput([]diag.Problem{{
		Code: "F08", Severity: 'E', File: arg,
		Message: "the folder holds more than one project file: " + strings.Join(held, ", "),
		Help:    "name the file that is meant, such as " + quoted(filepath.Join(arg, held[0])),
	}})
}

// noProject says that there is no project file where one was named (F01).
func noProject(path, why string) error {
	return badInput([]diag.Problem{{
		Code: "F01", Severity: 'E', File: path,
		Message: "no project can be read: " + why,
		Help:    "name a project file or its folder; a new one: sagcrest new DIR",
	}})
}

// withStdin serves the text of standard input under its name and every other
// file from disk.
func withStdin(text []byte) config.Files {
	disk := config.Disk()
	return func(path string) ([]byte, error) {
		if path == fromStdin {
			return text, nil
		}
		return disk(path)
	}
}

// open reads a project with its survey for one alternative. That an
// alternative stands on another basis (Q21) concerns only a comparison.
func (a *app) open(p project, alternative string) (*study.Opened, error) {
	o, problems := study.Open(p.files, p.path, alternative)
	if o == nil || diag.Worst(withoutBasis(problems)) {
		return nil, badInput(problems)
	}
	if problems := otherRoads(o); len(problems) > 0 {
		return nil, badInput(problems)
	}
	return o, nil
}

// otherRoads returns what makes a road of the document unreadable that is not
// the one in hand: a project file is read as a whole, or it waits until somebody
// compares.
func otherRoads(o *study.Opened) (all []diag.Problem) {
	for _, name := range o.Doc.Alternatives() {
		if name != o.Project.Alternative {
			_, problems := o.Doc.Project(name)
			all = append(all, withoutBasis(problems)...)
		}
	}
	return all
}

func withoutBasis(problems []diag.Problem) []diag.Problem {
	return slices.DeleteFunc(slices.Clone(problems), func(p diag.Problem) bool { return p.Code == "Q21" })
}

// compute runs the chain and shows how far it has come.
func (a *app) compute(ctx context.Context, o *study.Opened) (*study.Outcome, error) {
	show := newProgress(a.errw, a.env.ErrTerminal, a.opt.Quiet)
	out, problems := study.Run(ctx, o, show.step)
	show.stop()
	switch {
	case ctx.Err() != nil:
		return nil, ctx.Err()
	case out == nil:
		return nil, badInput(problems)
	}
	return out, nil
}

// inputs returns the paths of every file that a project was read from.
func inputs(o *study.Opened) (paths []string) {
	for _, in := range o.Inputs {
		paths = append(paths, filepath.Join(filepath.Dir(o.Project.File()), filepath.FromSlash(in.Path)))
	}
	return paths
}

// quoted writes an argument as a shell takes it.
func quoted(arg string) string {
	if arg != "" && !strings.ContainsAny(arg, " \t\n\"'$&|;<>()*?[]#~=%\\`!{}") {
		return arg
	}
	return "'" + strings.ReplaceAll(arg, "'", `'\''`) + "'"
}
