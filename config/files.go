package config

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
)

// Files reads a file by the path that a project uses for it: the project
// file's own path, or a path put together from its folder and what the file
// says, "../" allowed. It is a function and not an fs.FS, which cannot leave
// its root.
type Files func(path string) ([]byte, error)

// maxFile bounds what is read into memory: a GeoTIFF of 2³⁰ bytes covers any
// road, and nothing in a project is larger.
const maxFile = 1 << 30

// Disk returns the files of the machine. A folder, a device or a file beyond
// the largest size is an error, so that a hostile path cannot hang a run.
func Disk() Files {
	return func(path string) ([]byte, error) {
		info, err := os.Stat(path)
		if err != nil {
			return nil, err
		}
		if !info.Mode().IsRegular() {
			return nil, &fs.PathError{Op: "read", Path: path, Err: errors.New("not a plain file")}
		}
		if info.Size() > maxFile {
			return nil, &fs.PathError{Op: "read", Path: path, Err: fmt.Errorf("%d bytes, more than %d", info.Size(), maxFile)}
		}
		return os.ReadFile(path)
	}
}
