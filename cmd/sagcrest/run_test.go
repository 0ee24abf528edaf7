package main

import (
	"bytes"
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// startRoad lays the starter project into a new folder, with something
// replaced in its project file.
func startRoad(t *testing.T, oldNew ...string) string {
	dir := filepath.Join(t.TempDir(), "road")
	for _, f := range starterFiles() {
		text := string(f.Data)
		if f.Name == "road.toml" {
			for i := 0; i < len(oldNew); i += 2 {
				require.Contains(t, text, oldNew[i])
			}
			text = strings.NewReplacer(oldNew...).Replace(text)
		}
		require.NoError(t, writeSynced(filepath.Join(dir, f.Name), []byte(text)))
	}
	return dir
}

// thinCover makes the starter's culvert want more cover than there is (D04, E).
var thinCover = []string{`cover_rule = "reinforced concrete"`, "cover = \"9 m\"\ncover_datum = \"subgrade\""}

// tightLimit moves the right of way into the works (A09, W).
var tightLimit = []string{"offset = 18.0", "offset = 5.0"}

// full is a disk without room.
type full struct{}

func (full) Write([]byte) (int, error) { return 0, syscall.ENOSPC }

// Text that cannot be written is a file system that refused, in every form of
// the output; what counted against the run does not hide it.
func TestFullDisk(t *testing.T) {
	for _, dir := range []string{startRoad(t), startRoad(t, thinCover...)} {
		for _, args := range []string{"check " + dir, "run " + dir, "check " + dir + " --json", "check " + dir + " --plain", "compare " + dir, "explain", "schema"} {
			var errw bytes.Buffer
			env := Env{Context: t.Context(), Var: func(string) string { return "" }}
			assert.Equal(t, exitFiles, run(strings.Fields(args), strings.NewReader(""), full{}, &errw, env), args)
			assert.Contains(t, errw.String(), "standard output", args)
		}
	}
}

func TestExitCodes(t *testing.T) {
	sound, short, tight := startRoad(t), startRoad(t, thinCover...), startRoad(t, tightLimit...)
	broken := startRoad(t, `units = "metric"`, `units = "metrik"`)
	file := filepath.Join(sound, "road.toml")
	for _, c := range []struct {
		args string
		code int
	}{
		{"help", exitDone}, {"--help", exitDone}, {"--version", exitDone}, {"help run", exitDone},
		{"explain", exitDone}, {"explain d04", exitDone}, {"schema", exitDone}, {"completion bash", exitDone},
		{"check " + sound, exitDone}, {"check " + file, exitDone}, {"run " + sound, exitDone}, {"compare " + sound, exitDone},
		{"check " + sound + " --strict --max-warnings 0", exitDone},
		{"check " + tight, exitDone}, {"check " + tight + " --max-warnings 99", exitDone}, {"run " + tight, exitDone},
		{"check " + tight + " --strict", exitFindings}, {"run " + tight + " --max-warnings 0", exitFindings},
		{"check " + short, exitFindings}, {"run " + short, exitFindings}, {"compare " + short, exitDone},
		{"", exitUsage}, {"grade x", exitUsage}, {"calc", exitUsage}, {"serve", exitUsage}, {"run", exitUsage}, {"run a b", exitUsage},
		{"run " + sound + " --nothing", exitUsage}, {"check " + sound + " --max-warnings few", exitUsage},
		{"explain X99", exitUsage}, {"schema nothing", exitUsage}, {"compare", exitUsage}, {"compare a b c", exitUsage},
		{"help nothing", exitUsage}, {"run " + sound + " --json --plain", exitUsage},
		{"check " + broken, exitInput}, {"run " + broken, exitInput}, {"compare " + broken, exitInput},
		{"check nowhere", exitInput}, {"check " + t.TempDir(), exitInput}, {"run " + sound + " --alternative none", exitInput},
		{"compare nowhere " + sound, exitInput},
		{"run " + sound + " --out " + file, exitFiles}, {"run " + sound + " --out " + file + "/x", exitFiles},
		{"run " + sound + " --out " + sound + " --force", exitFiles}, {"new " + sound, exitFiles},
	} {
		got := call(t, strings.Fields(c.args)...)
		assert.Equal(t, c.code, got.code, "%s\n%s", c.args, got)
		if got.code >= exitUsage {
			assert.Empty(t, got.out, "%s: messages belong on stderr", c.args)
			assert.NotEmpty(t, got.errw, c.args)
		}
	}
}

func TestFaultEndsWithFive(t *testing.T) {
	env := Env{Var: func(string) string { panic("nobody expects this") }}
	got := callIn(t, env, "", "check", "x", "--json")
	assert.Equal(t, exitFault, got.code)
	assert.Contains(t, got.errw, "nobody expects this")
	assert.NotContains(t, got.errw, "goroutine", "a person is told, not shown a stack")
	assert.Equal(t, "sagcrest/error", document(t, got.out)["schema"])
}

// document demands that text is exactly one JSON document.
func document(t *testing.T, text string) map[string]any {
	t.Helper()
	d := json.NewDecoder(strings.NewReader(text))
	var doc map[string]any
	require.NoError(t, d.Decode(&doc), text)
	assert.False(t, d.More(), "one document and nothing else")
	assert.EqualValues(t, 1, doc["schema_version"])
	return doc
}

func TestJSONIsOneDocument(t *testing.T) {
	sound, short := startRoad(t), startRoad(t, thinCover...)
	broken := startRoad(t, `units = "metric"`, `units = "metrik"`)
	for _, c := range []struct{ args, schema string }{
		{"check " + sound, "sagcrest/check"},
		{"check " + short, "sagcrest/check"},
		{"run " + sound, "sagcrest/results"},
		{"run " + short, "sagcrest/results"},
		{"run " + sound + " --dry-run", "sagcrest/results"},
		{"compare " + sound, "sagcrest/compare"},
		{"compare " + sound + " " + short, "sagcrest/compare"},
		{"explain D04", "sagcrest/explain"},
		{"new " + filepath.Join(t.TempDir(), "x"), "sagcrest/new"},
		{"check " + broken, "sagcrest/error"},
		{"run nowhere", "sagcrest/error"},
		{"compare nowhere", "sagcrest/error"},
		{"run " + sound + " --out " + filepath.Join(sound, "road.toml"), "sagcrest/error"},
	} {
		got := call(t, append(strings.Fields(c.args), "--json")...)
		doc := document(t, got.out)
		assert.Equal(t, c.schema, doc["schema"], c.args)
		if c.schema == "sagcrest/error" {
			assert.NotEmpty(t, doc["findings"], c.args)
			assert.NotContains(t, doc, "result", c.args)
		} else {
			assert.Contains(t, doc, "tool", c.args)
		}
	}
	assert.Empty(t, call(t, "run", "--json").out, "wrong usage has no document")
}

// run --json prints what results.json holds, and a dry run prints the same.
func TestRunPrintsItsResults(t *testing.T) {
	dir := startRoad(t)
	dry := call(t, "run", dir, "--json", "--dry-run")
	_, err := os.Stat(filepath.Join(dir, "out"))
	assert.True(t, os.IsNotExist(err), "a dry run writes nothing")
	wet := call(t, "run", dir, "--json")
	held, err := os.ReadFile(filepath.Join(dir, "out", resultsName))
	require.NoError(t, err)
	assert.Equal(t, string(held), wet.out)
	assert.Equal(t, wet.out, dry.out)
}

// The same plan is shown before and carried out after; a second run changes
// nothing.
func TestDryRunTellsTheTruth(t *testing.T) {
	dir := startRoad(t)
	dry := call(t, "run", dir, "--dry-run", "--plain")
	wet := call(t, "run", dir, "--plain")
	assert.Equal(t, fileLines(dry.out), fileLines(wet.out))
	assert.Contains(t, dry.out, "file\tcreate\t")
	before := read(t, filepath.Join(dir, "out"))
	again := call(t, "run", dir, "--dry-run", "--plain")
	assert.NotContains(t, again.out, "file\tcreate\t")
	assert.NotContains(t, again.out, "file\toverwrite\t")
	assert.Equal(t, exitDone, call(t, "run", dir).code)
	assert.Equal(t, before, read(t, filepath.Join(dir, "out")), "the same input gives the same bytes")
}

func fileLines(text string) (out []string) {
	for line := range strings.Lines(text) {
		if strings.HasPrefix(line, "file\t") {
			out = append(out, line)
		}
	}
	return out
}

func TestRunUnderAnotherFolderGivesTheSameBytes(t *testing.T) {
	one, two := startRoad(t, tightLimit...), startRoad(t, tightLimit...)
	t.Setenv("TZ", "Pacific/Auckland")
	require.Equal(t, exitDone, call(t, "run", one).code)
	t.Chdir(two)
	require.Equal(t, exitDone, call(t, "run", ".", "--out", "elsewhere/deep").code)
	assert.Equal(t, read(t, filepath.Join(one, "out")), read(t, filepath.Join(two, "elsewhere", "deep")))
}

func TestOutputFolderRules(t *testing.T) {
	dir := startRoad(t)
	foreign := filepath.Join(t.TempDir(), "thesis")
	require.NoError(t, writeSynced(filepath.Join(foreign, "thesis.txt"), []byte("years of work")))
	got := call(t, "run", dir, "--out", foreign)
	assert.Equal(t, exitFiles, got.code)
	assert.Contains(t, got.errw, "F10")
	assert.Equal(t, map[string]string{"thesis.txt": "years of work"}, read(t, foreign))

	got = call(t, "run", dir, "--out", foreign, "--force", "--dry-run")
	assert.Equal(t, exitDone, got.code)
	assert.Equal(t, map[string]string{"thesis.txt": "years of work"}, read(t, foreign), "a dry run outranks --force")

	got = call(t, "run", dir, "--out", foreign, "--force")
	assert.Equal(t, exitDone, got.code)
	assert.Contains(t, read(t, foreign), resultsName)
	assert.Contains(t, got.out, foreign+".before")
	assert.Equal(t, map[string]string{"thesis.txt": "years of work"}, read(t, foreign+".before"))
}

func TestAlternativeHasItsOwnFolder(t *testing.T) {
	dir := startRoad(t)
	require.Equal(t, exitDone, call(t, "run", dir, "--alternative", "higher").code)
	assert.FileExists(t, filepath.Join(dir, "out-higher", resultsName))
	assert.NoDirExists(t, filepath.Join(dir, "out"))
}

func TestInterruptedRunWritesNothing(t *testing.T) {
	dir := startRoad(t)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	got := callIn(t, Env{Context: ctx}, "", "run", dir)
	assert.Equal(t, exitInterrupted, got.code)
	assert.NoDirExists(t, filepath.Join(dir, "out"))
}

func TestPlainLettersWhereNobodyWatches(t *testing.T) {
	dir := startRoad(t, tightLimit...)
	vars := func(pairs map[string]string) func(string) string {
		return func(n string) string { return pairs[n] }
	}
	for name, c := range map[string]struct {
		env  Env
		args []string
		bold bool
	}{
		"a terminal":      {Env{OutTerminal: true, ErrTerminal: true}, nil, true},
		"a pipe":          {Env{ErrTerminal: true}, nil, false},
		"NO_COLOR":        {Env{OutTerminal: true, ErrTerminal: true, Var: vars(map[string]string{"NO_COLOR": "1"})}, nil, false},
		"TERM=dumb":       {Env{OutTerminal: true, ErrTerminal: true, Var: vars(map[string]string{"TERM": "dumb"})}, nil, false},
		"--no-color":      {Env{OutTerminal: true, ErrTerminal: true}, []string{"--no-color"}, false},
		"SAGCREST_ other": {Env{OutTerminal: true, ErrTerminal: true, Var: vars(map[string]string{"SAGCREST_NO_COLOR": "1"})}, nil, false},
	} {
		got := callIn(t, c.env, "", append([]string{"check", dir}, c.args...)...)
		assert.Equal(t, c.bold, strings.Contains(got.out, "\x1b["), name)
	}
}

func TestQuietSaysOnlyFindings(t *testing.T) {
	got := call(t, "run", startRoad(t), "--quiet")
	assert.Equal(t, outcome{}, got)
	got = call(t, "run", startRoad(t, tightLimit...), "--quiet")
	assert.Contains(t, got.out, "W A09")
	assert.NotContains(t, got.out, "next:")
}

func TestProjectOnStandardInput(t *testing.T) {
	dir := startRoad(t)
	text, err := os.ReadFile(filepath.Join(dir, "road.toml"))
	require.NoError(t, err)
	t.Chdir(dir)
	got := callIn(t, Env{}, string(text), "check", "-")
	assert.Equal(t, exitDone, got.code, got.String())
	got = callIn(t, Env{}, strings.Replace(string(text), "units", "unist", 1), "check", "-")
	assert.Equal(t, exitInput, got.code)
	assert.Contains(t, got.errw, fromStdin+":4:1", "its lines are counted too")
}

// What was meant is said for commands, flags, codes, documents and alternatives.
func TestSlipsOfThePenAreNamed(t *testing.T) {
	dir := startRoad(t)
	for args, meant := range map[string]string{
		"chekc road":                             "sagcrest check road",
		"run road --strcit":                      "--strict",
		"explain D4":                             "D04",
		"schema result":                          "results",
		"check " + dir + " --alternative hihger": "higher",
	} {
		got := call(t, strings.Fields(args)...)
		assert.GreaterOrEqual(t, got.code, exitUsage)
		assert.Contains(t, got.errw, meant, args)
	}
}
