package main

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
)

// write carries the plan out. The files are written into a new folder beside
// the old one and put to disk; then the two change places by renaming. An
// interrupt or a full disk before that leaves the old folder as it was, and
// nobody ever sees half a run. It returns where an earlier, foreign folder
// was put aside, "" where there was none.
func (p *plan) write(ctx context.Context) (aside string, err error) {
	parent := filepath.Dir(p.target())
	if err := os.MkdirAll(parent, 0o755); err != nil {
		return "", p.refused(err)
	}
	staged, err := os.MkdirTemp(parent, ".sagcrest-new-*")
	if err != nil {
		return "", p.refused(err)
	}
	defer os.RemoveAll(staged) // gone already once it has changed places
	if err := p.stage(ctx, staged); err != nil {
		return "", err
	}
	return p.swap(staged)
}

// target is the folder to replace; behind a link, the folder that it names.
func (p *plan) target() string { return realPath(p.dir) }

// stage writes every file into the new folder.
func (p *plan) stage(ctx context.Context, dir string) error {
	// A temporary folder is private; the output is for whoever may read the
	// project.
	if err := os.Chmod(dir, 0o755); err != nil {
		return p.refused(err)
	}
	for _, f := range p.files {
		if err := ctx.Err(); err != nil {
			return err
		}
		if err := writeSynced(filepath.Join(dir, filepath.FromSlash(f.Name)), f.Data); err != nil {
			return p.refused(err)
		}
	}
	return nil
}

// swap puts the staged folder in the place of the old one. Should the second
// rename fail, the first is taken back.
func (p *plan) swap(staged string) (aside string, err error) {
	target := p.target()
	if _, err := os.Lstat(target); errors.Is(err, fs.ErrNotExist) {
		return "", p.refused(os.Rename(staged, target))
	}
	if inside, err := os.ReadDir(target); err == nil && len(inside) == 0 {
		return "", p.refused(fill(staged, target))
	}
	old, err := freeName(target)
	if err != nil {
		return "", p.refused(err)
	}
	if err := os.Rename(target, old); err != nil {
		return "", p.refused(err)
	}
	if err := os.Rename(staged, target); err != nil {
		return "", p.refused(errors.Join(err, os.Rename(old, target)))
	}
	if p.keep {
		return old, nil
	}
	return "", p.refused(os.RemoveAll(old))
}

// fill moves what is staged into an empty folder, which stays the same folder
// for whoever stands in it. What was moved goes back when one move fails.
func fill(staged, target string) error {
	entries, err := os.ReadDir(staged)
	if err != nil {
		return err
	}
	for i, e := range entries {
		if err := os.Rename(filepath.Join(staged, e.Name()), filepath.Join(target, e.Name())); err != nil {
			for _, back := range entries[:i] {
				err = errors.Join(err, os.Rename(filepath.Join(target, back.Name()), filepath.Join(staged, back.Name())))
			}
			return err
		}
	}
	return nil
}

// freeName returns the first of "DIR.before", "DIR.before-2", … that nothing
// carries.
func freeName(target string) (string, error) {
	name := target + ".before"
	for n := 2; ; n++ {
		_, err := os.Lstat(name)
		if errors.Is(err, fs.ErrNotExist) {
			return name, nil
		}
		if err != nil {
			return "", err
		}
		name = fmt.Sprintf("%s.before-%d", target, n)
	}
}

// refused turns a refusal of the file system into F10; nil stays nil.
func (p *plan) refused(err error) error {
	if err == nil {
		return nil
	}
	return fileTrouble(p.dir, "the output folder cannot be written: "+reason(err), "choose another folder with --out")
}

// writeSynced writes a new file, with its folders, and puts it to disk.
func writeSynced(path string, data []byte) (err error) {
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		return err
	}
	f, err := os.OpenFile(path, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
	if err != nil {
		return err
	}
	defer func() { err = errors.Join(err, f.Close()) }()
	if _, err := f.Write(data); err != nil {
		return err
	}
	return f.Sync()
}
