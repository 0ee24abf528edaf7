package main

import (
	"embed"
	"fmt"
	"io"
	"io/fs"
	"path"
	"path/filepath"

	"github.com/spf13/cobra"
)

//go:embed starter
var starter embed.FS

// newCommand writes the starter project.
func (a *app) newCommand() *cobra.Command {
	c := &cobra.Command{
		Use:   "new DIR",
		Short: "write a commented starter project into an empty folder",
		Example: `  sagcrest new my-road
  sagcrest check my-road
  sagcrest run my-road`,
		Args: exactly("DIR"),
		RunE: func(c *cobra.Command, args []string) error {
			return a.writeStarter(c, args[0])
		},
	}
	c.Flags().Bool("dry-run", false, "write nothing, list what would be written")
	return c
}

func (a *app) writeStarter(c *cobra.Command, dir string) error {
	p := &plan{dir: dir, files: starterFiles()}
	there, err := listFolder(dir)
	if err != nil {
		return err
	}
	if len(there) > 0 {
		return fileTrouble(dir, "the folder is not empty", "name a new or an empty folder")
	}
	p.steps = p.fates(nil)
	if !a.opt.DryRun {
		if _, err := p.write(c.Context()); err != nil {
			return err
		}
	}
	if a.opt.JSON {
		return a.planDocument("new", p)
	}
	a.tellSteps(a.out, p)
	a.next("sagcrest check " + quoted(dir))
	return nil
}

// starterFiles returns the files of the starter project by their path inside
// the new folder.
func starterFiles() (files []outputFile) {
	root, err := fs.Sub(starter, "starter")
	if err != nil {
		panic(err) // the folder is built in
	}
	err = fs.WalkDir(root, ".", func(name string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		data, err := fs.ReadFile(root, name)
		files = append(files, outputFile{path.Clean(name), data})
		return err
	})
	if err != nil {
		panic(err)
	}
	return files
}

// tellSteps lists the files of a plan with what happens, or would happen, to
// each.
func (a *app) tellSteps(w io.Writer, p *plan) {
	if a.opt.Quiet {
		return
	}
	for _, s := range p.steps {
		if a.opt.Plain {
			fmt.Fprintf(w, "file\t%s\t%s\n", s.fate, filepath.Join(p.dir, s.name))
			continue
		}
		fmt.Fprintf(w, "  %-9s %s\n", s.fate, filepath.Join(p.dir, s.name))
	}
}
