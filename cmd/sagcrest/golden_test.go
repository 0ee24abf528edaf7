package main

import (
	"bytes"
	"flag"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

var update = flag.Bool("update", false, "write the golden files anew")

// outcome is what a call left behind.
type outcome struct {
	code      int
	out, errw string
}

// call runs the program in this process, as a script would see it: no terminal,
// an empty environment.
func call(t *testing.T, args ...string) outcome {
	return callIn(t, Env{}, "", args...)
}

// callIn is call with an environment of its own and something on standard
// input.
func callIn(t *testing.T, env Env, in string, args ...string) outcome {
	t.Helper()
	if env.Context == nil {
		env.Context = t.Context()
	}
	if env.Var == nil {
		env.Var = func(string) string { return "" }
	}
	var out, errw bytes.Buffer
	code := run(args, strings.NewReader(in), &out, &errw, env)
	return outcome{code, out.String(), errw.String()}
}

func (o outcome) String() string {
	return fmt.Sprintf("exit %d\n--- stdout\n%s--- stderr\n%s", o.code, o.out, o.errw)
}

// golden compares text with a file, or writes the file under -update.
func golden(t *testing.T, file, got string) {
	t.Helper()
	if *update {
		require.NoError(t, os.MkdirAll(filepath.Dir(file), 0o755))
		require.NoError(t, os.WriteFile(file, []byte(got), 0o644))
		return
	}
	want, err := os.ReadFile(file)
	require.NoError(t, err, "run with -update to write it")
	assert.Equal(t, string(want), got, file)
}

// copyTree copies a folder of the module into a new one and returns the copy,
// so that no test writes beside the sources.
func copyTree(t *testing.T, from string) string {
	to := filepath.Join(t.TempDir(), filepath.Base(from))
	require.NoError(t, os.CopyFS(to, os.DirFS(from)))
	return to
}

// What the program says when it is called in the usual ways. The starter
// project stands for every project here, so that its figures are held too.
func TestGoldenCommands(t *testing.T) {
	t.Chdir(t.TempDir())
	for _, c := range []struct{ name, args string }{
		{"help", "help"},
		{"flag-help", "--help"},
		{"run-help", "run --help"},
		{"no-command", ""},
		{"unknown-command", "chekc road"},
		{"unknown-flag", "check road --strcit"},
		{"explain", "explain D04"},
		{"explain-word", "explain cover"},
		{"explain-unknown", "explain D99"},
		{"schema-unknown", "schema result"},
		{"new", "new road"},
		{"new-again", "new road"},
		{"check", "check road"},
		{"check-plain", "check road --plain"},
		{"run-dry", "run road --dry-run"},
		{"run", "run road"},
		{"run-again", "run road"},
		{"run-alternative", "run road/road.toml --alternative higher"},
		{"run-plain", "run road --plain"},
		{"compare", "compare road"},
		{"compare-plain", "compare road --plain"},
		{"compare-two", "compare road/out road/out-higher"},
		{"no-project", "run nowhere"},
		{"no-alternative", "check road --alternative hihger"},
	} {
		golden(t, filepath.Join(here, "testdata", c.name+".golden"), call(t, strings.Fields(c.args)...).String())
	}
}

// here is this package's folder; tests that change the working folder still
// find their goldens.
var here, _ = filepath.Abs(".")

// Every bad project raises its code and says so in the same words as ever; its
// near miss does not raise it.
func TestGoldenBad(t *testing.T) {
	form := regexp.MustCompile(`^([A-Z]\d\d)(-.*)?$`)
	entries, err := os.ReadDir(filepath.Join(root, "testdata", "bad"))
	require.NoError(t, err)
	for _, e := range entries {
		m := form.FindStringSubmatch(e.Name())
		require.NotNil(t, m, "testdata/bad/%s is not named for a code", e.Name())
		t.Run(e.Name(), func(t *testing.T) {
			dir := filepath.Join(here, root, "testdata", "bad", e.Name())
			t.Chdir(copyTree(t, dir))
			args := []string{"check", "."}
			if text, err := os.ReadFile("args.txt"); err == nil {
				args = strings.Fields(string(text))
			}
			got := call(t, args...)
			golden(t, filepath.Join(dir, "golden.txt"), got.String())
			assert.Contains(t, got.out+got.errw, m[1])
			if _, err := os.Stat("near"); err != nil {
				return
			}
			t.Chdir("near")
			got = call(t, args...)
			assert.NotContains(t, got.out+got.errw, " "+m[1]+" ", "the near miss raises it too")
			assert.NotEqual(t, exitFault, got.code)
		})
	}
}

// No refused project leaves anything behind.
func TestRefusedRunsWriteNothing(t *testing.T) {
	bad := filepath.Join(root, "testdata", "bad")
	entries, err := os.ReadDir(bad)
	require.NoError(t, err)
	for _, e := range entries {
		dir := copyTree(t, filepath.Join(bad, e.Name()))
		before := listed(t, dir)
		if got := call(t, "run", dir); got.code >= exitUsage {
			assert.Equal(t, before, listed(t, dir), "%s: exit %d", e.Name(), got.code)
		}
	}
}

func listed(t *testing.T, dir string) (names []string) {
	require.NoError(t, filepath.WalkDir(dir, func(path string, _ fs.DirEntry, err error) error {
		names = append(names, path)
		return err
	}))
	return names
}
