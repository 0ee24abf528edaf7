package main

import (
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// README's console blocks are run as they stand, in order, in a folder that
// holds a copy of the roads. A line that is only "…" stands for any lines; a
// command that does not end with 0 says so: "# exit 1".
func TestReadmeBlocksRunAsTheyStand(t *testing.T) {
	text, err := os.ReadFile(filepath.Join(root, "README.md"))
	require.NoError(t, err)
	dir := t.TempDir()
	require.NoError(t, os.CopyFS(filepath.Join(dir, "testdata"), os.DirFS(filepath.Join(root, "testdata"))))
	t.Chdir(dir)
	calls := readmeCalls(string(text))
	require.NotEmpty(t, calls)
	for _, c := range calls {
		got := call(t, c.args...)
		assert.Equal(t, c.exit, got.code, "%s\n%s", c.line, got)
		if c.want != "" {
			assert.True(t, likeText(c.want, got.out+got.errw), "%s\nwant\n%s\ngot\n%s", c.line, c.want, got)
		}
	}
}

// The examples of every help text run as they stand too.
func TestExamplesOfTheHelpRun(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, os.CopyFS(filepath.Join(dir, "testdata"), os.DirFS(filepath.Join(root, "testdata"))))
	t.Chdir(dir)
	for line := range strings.Lines(examples) {
		args := words(strings.TrimSpace(line))
		require.Equal(t, "sagcrest", args[0])
		got := call(t, args[1:]...)
		assert.Equal(t, exitDone, got.code, "%s\n%s", line, got)
	}
	assert.True(t, strings.HasPrefix(call(t, "--help").out, "Examples\n"+examples), "help opens with them")
}

// readmeCall is one "$ sagcrest …" line with the output printed below it.
type readmeCall struct {
	line, want string
	args       []string
	exit       int
}

func readmeCalls(text string) (calls []readmeCall) {
	block := regexp.MustCompile("(?ms)^```console\n(.*?)^```$")
	exit := regexp.MustCompile(`\s+# exit (\d)$`)
	for _, b := range block.FindAllStringSubmatch(text, -1) {
		for line := range strings.Lines(b[1]) {
			command, ok := strings.CutPrefix(strings.TrimRight(line, "\n"), "$ sagcrest")
			if !ok {
				calls[len(calls)-1].want += line
				continue
			}
			c := readmeCall{line: line}
			if m := exit.FindStringSubmatch(command); m != nil {
				c.exit = int(m[1][0] - '0')
				command = strings.TrimSuffix(command, m[0])
			}
			c.args = words(command)
			calls = append(calls, c)
		}
	}
	return calls
}

// words splits a command line at spaces, as a shell does: quotes of either kind
// hold a word together.
func words(line string) (out []string) {
	word, quote, open := "", rune(0), false
	for _, r := range line + " " {
		switch {
		case quote != 0 && r == quote:
			quote = 0
		case quote == 0 && (r == '"' || r == '\''):
			quote, open = r, true
		case quote == 0 && r == ' ':
			if open || word != "" {
				out = append(out, word)
			}
			word, open = "", false
		default:
			word += string(r)
		}
	}
	return out
}

// likeText compares line by line, with "…" for any number of lines.
func likeText(want, got string) bool {
	pattern := "^"
	for line := range strings.Lines(strings.TrimRight(want, "\n") + "\n") {
		if strings.TrimSpace(line) == "…" {
			pattern += "(?s:.*)"
			continue
		}
		pattern += regexp.QuoteMeta(line)
	}
	return regexp.MustCompile(pattern + "$").MatchString(got)
}

func TestReadmeReader(t *testing.T) {
	calls := readmeCalls("x\n```console\n$ sagcrest run \"a b\" --out c   # exit 1\none\n…\n$ sagcrest\n```\n")
	require.Len(t, calls, 2)
	assert.Equal(t, []string{"run", "a b", "--out", "c"}, calls[0].args)
	assert.Equal(t, 1, calls[0].exit)
	assert.True(t, likeText(calls[0].want, "one\ntwo\nthree\n"))
	assert.False(t, likeText(calls[0].want, "two\n"))
	assert.False(t, likeText("one\n", "one\ntwo\n"))
}
