package main

import (
	"context"
	"errors"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

const oursJSON = `{"schema":"sagcrest/results","schema_version":1}`

func TestOutputFolder(t *testing.T) {
	for alternative, want := range map[string]string{
		"": "p/out", "base": "p/out", "first draft": "p/out-first-draft",
		"a -- b": "p/out-a-b", "Größe 2": "p/out-Größe-2", "../x": "p/out--x",
	} {
		assert.Equal(t, filepath.FromSlash(want), outputFolder(filepath.FromSlash("p/road.toml"), alternative))
	}
}

// No name of an alternative leads out of the project's folder.
func TestOutputFolderStaysBeside(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		name := rapid.String().Draw(t, "name")
		assert.Equal(t, "p", filepath.Dir(outputFolder(filepath.FromSlash("p/road.toml"), name)))
	})
}

func files(pairs ...string) (out []outputFile) {
	for i := 0; i < len(pairs); i += 2 {
		out = append(out, outputFile{pairs[i], []byte(pairs[i+1])})
	}
	return out
}

// lay writes files into a new folder inside another new one.
func lay(t *testing.T, fs []outputFile) (dir string) {
	dir = filepath.Join(t.TempDir(), "out")
	require.NoError(t, os.MkdirAll(dir, 0o755))
	for _, f := range fs {
		require.NoError(t, writeSynced(filepath.Join(dir, f.Name), f.Data))
	}
	return dir
}

// read returns what a folder holds, by slash path.
func read(t *testing.T, dir string) map[string]string {
	names, err := listFolder(dir)
	require.NoError(t, err)
	held := map[string]string{}
	for _, n := range names {
		data, err := os.ReadFile(filepath.Join(dir, n))
		require.NoError(t, err)
		held[n] = string(data)
	}
	return held
}

// beside lists what else stands in the folder that holds dir.
func beside(t *testing.T, dir string) (names []string) {
	entries, err := os.ReadDir(filepath.Dir(dir))
	require.NoError(t, err)
	for _, e := range entries {
		if e.Name() != filepath.Base(dir) {
			names = append(names, e.Name())
		}
	}
	return names
}

func refusedWith(t *testing.T, err error, code int, text string) {
	t.Helper()
	var r *refusal
	require.ErrorAs(t, err, &r)
	assert.Equal(t, code, r.code)
	assert.EqualValues(t, "F10", r.problems[0].Code)
	assert.Contains(t, r.problems[0].Message, text)
}

func TestOurFolderIsReplacedWhole(t *testing.T) {
	dir := lay(t, files(resultsName, oursJSON, "same.csv", "1", "old.csv", "2", "sub/older.csv", "3"))
	p, err := planFolder(dir, ofRun(), files(resultsName, oursJSON+" ", "same.csv", "1", "new.csv", "4"), nil, false)
	require.NoError(t, err)
	assert.Equal(t, []step{
		{create, "new.csv"}, {remove, "old.csv"}, {overwrite, resultsName}, {unchanged, "same.csv"}, {remove, "sub/older.csv"},
	}, p.steps)
	before := read(t, dir)
	assert.Len(t, before, 4, "planning writes nothing")

	aside, err := p.write(context.Background())
	require.NoError(t, err)
	assert.Empty(t, aside)
	assert.Equal(t, map[string]string{resultsName: oursJSON + " ", "same.csv": "1", "new.csv": "4"}, read(t, dir))
	assert.Empty(t, beside(t, dir), "nothing is left beside it")
}

func TestForeignFolderIsRefusedAndKeptByForce(t *testing.T) {
	for _, foreign := range [][]outputFile{
		files("thesis.txt", "years of work"),
		files(resultsName, `{"schema":"other/results"}`, "thesis.txt", "years of work"),
		files(resultsName, "no json", "thesis.txt", "years of work"),
	} {
		dir := lay(t, foreign)
		_, err := planFolder(dir, ofRun(), files(resultsName, oursJSON), nil, false)
		refusedWith(t, err, exitFiles, "not empty")

		p, err := planFolder(dir, ofRun(), files(resultsName, oursJSON), nil, true)
		require.NoError(t, err)
		aside, err := p.write(context.Background())
		require.NoError(t, err)
		assert.Equal(t, map[string]string{resultsName: oursJSON}, read(t, dir))
		assert.Equal(t, "years of work", read(t, aside)["thesis.txt"], "force keeps what it moves")
	}
}

func TestFolderThatHoldsAnInputIsNeverReplaced(t *testing.T) {
	dir := lay(t, files(resultsName, oursJSON, "road.toml", "title", "survey/points.csv", "1"))
	link := filepath.Join(t.TempDir(), "link")
	require.NoError(t, os.Symlink(dir, link))
	for _, out := range []string{dir, link, filepath.Join(dir, "x", ".."), filepath.Join(dir, "survey")} {
		_, err := planFolder(out, ofRun(), files(resultsName, "x"), []string{filepath.Join(dir, "survey", "points.csv")}, true)
		refusedWith(t, err, exitFiles, "holds an input")
	}
	_, err := planFolder(filepath.Join(dir, "out"), ofRun(), files(resultsName, "x"), []string{filepath.Join(dir, "road.toml")}, false)
	assert.NoError(t, err, "a folder beside the inputs is fine")
}

func TestUnwritableFolderIsRefused(t *testing.T) {
	// A folder cannot lie below a plain file, whoever runs the test.
	dir := lay(t, files("plain", "x"))
	_, err := planFolder(filepath.Join(dir, "plain"), ofRun(), nil, nil, true)
	refusedWith(t, err, exitFiles, "is a file")
	_, err = planFolder(filepath.Join(dir, "plain", "out"), ofRun(), nil, nil, true)
	refusedWith(t, err, exitFiles, "cannot")
}

func TestEmptyFolderStaysTheSameFolder(t *testing.T) {
	dir := lay(t, nil)
	before, err := os.Stat(dir)
	require.NoError(t, err)
	p, err := planFolder(dir, ofRun(), files("a", "1", "sub/b", "2"), nil, false)
	require.NoError(t, err)
	_, err = p.write(context.Background())
	require.NoError(t, err)
	after, err := os.Stat(dir)
	require.NoError(t, err)
	assert.True(t, os.SameFile(before, after), "who stands in it sees the files")
	assert.Equal(t, map[string]string{"a": "1", "sub/b": "2"}, read(t, dir))
	assert.Empty(t, beside(t, dir))
}

func TestInterruptLeavesTheOldFolder(t *testing.T) {
	dir := lay(t, files(resultsName, oursJSON))
	p, err := planFolder(dir, ofRun(), files(resultsName, "new", "b.csv", "2"), nil, false)
	require.NoError(t, err)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, err = p.write(ctx)
	assert.True(t, errors.Is(err, context.Canceled))
	assert.Equal(t, map[string]string{resultsName: oursJSON}, read(t, dir))
	assert.Empty(t, beside(t, dir))
}

func TestFailureHalfwayLeavesTheOldFolder(t *testing.T) {
	dir := lay(t, files(resultsName, oursJSON))
	// The second file needs a folder where the first one lies.
	p, err := planFolder(dir, ofRun(), files("a", "1", "a/b", "2"), nil, false)
	require.NoError(t, err)
	_, err = p.write(context.Background())
	refusedWith(t, err, exitFiles, "cannot be written")
	assert.Equal(t, map[string]string{resultsName: oursJSON}, read(t, dir))
	assert.Empty(t, beside(t, dir))
}

func TestLinkedFolderIsReplacedBehindTheLink(t *testing.T) {
	dir := lay(t, files(resultsName, oursJSON))
	link := filepath.Join(t.TempDir(), "link")
	require.NoError(t, os.Symlink(dir, link))
	p, err := planFolder(link, ofRun(), files("a", "1"), nil, false)
	require.NoError(t, err)
	_, err = p.write(context.Background())
	require.NoError(t, err)
	assert.Equal(t, map[string]string{"a": "1"}, read(t, dir))
	info, err := os.Lstat(link)
	require.NoError(t, err)
	assert.NotZero(t, info.Mode()&os.ModeSymlink, "the link is still one")
}
