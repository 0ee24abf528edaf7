package config

import (
	"bytes"
	"fmt"
	"path/filepath"
	"sort"
	"strings"
	"unicode/utf8"

	"sagcrest/config/diag"
	"sagcrest/profile/finding"
)

// Limits against files that are no project: a project of a hundred kilometres
// has some ten thousand lines of a hundred characters, and no key lies deeper
// than six levels.
const (
	maxProject = 4 << 20 // bytes
	maxDepth   = 64      // tables and lists within each other
	maxKeys    = 256     // keys of one table, which are searched one by one
)

// source is the text of a file with the starts of its lines.
type source struct {
	path   string
	data   []byte
	starts []int
}

// newSource notes where lines start, so that places cost no second reading.
func newSource(path string, data []byte) *source {
	s := &source{path: path, data: data, starts: []int{0}}
	for i, b := range data {
		if b == '\n' {
			s.starts = append(s.starts, i+1)
		}
	}
	return s
}

// position turns a byte offset into line and column.
func (s *source) position(offset int) position {
	offset = min(max(offset, 0), len(s.data))
	line := sort.SearchInts(s.starts, offset+1) - 1
	return position{line + 1, offset - s.starts[line] + 1}
}

// letter is the position of a line and a column counted in letters.
func (s *source) letter(line, column int) position {
	line = min(max(line, 1), len(s.starts))
	offset := s.starts[line-1]
	for ; column > 1 && offset < len(s.data); column-- {
		_, size := utf8.DecodeRune(s.data[offset:])
		offset += size
	}
	return s.position(offset)
}

// line returns the raw text of a line counted from 1, without its end.
func (s *source) line(n int) string {
	if n < 1 || n > len(s.starts) {
		return ""
	}
	end := len(s.data)
	if n < len(s.starts) {
		end = s.starts[n]
	}
	return strings.ToValidUTF8(strings.TrimRight(string(s.data[s.starts[n-1]:end]), "\r\n"), "\uFFFD")
}

// problem makes a complaint of severity E at a place of the file.
func (s *source) problem(code finding.Code, at position, key, message, help string) diag.Problem {
	return diag.Problem{
		Code: code, Severity: finding.Error,
		File: s.path, Line: at.line, Column: at.column, Excerpt: s.line(at.line),
		Key: key, Message: message, Help: help,
	}
}

// tree collects what the three readers have in common: the source and the
// complaints so far.
type tree struct {
	*source
	problems []diag.Problem
}

// complain keeps a complaint at a place.
func (t *tree) complain(code finding.Code, at position, key, message, help string) {
	t.problems = append(t.problems, t.problem(code, at, key, message, help))
}

// grow reads the bytes of a file by the ending of its name and returns the
// tree of its values, nil when they cannot be read.
func grow(s *source) (*node, []diag.Problem) {
	t := &tree{source: s}
	if !t.sound() {
		return nil, t.problems
	}
	var root *node
	switch ext := strings.ToLower(filepath.Ext(s.path)); ext {
	case ".toml":
		root = t.fromTOML()
	case ".yaml", ".yml":
		root = t.fromYAML()
	case ".json":
		root = t.fromJSON()
	default:
		t.complain("F09", position{1, 1}, "", fmt.Sprintf("a project file ends in .toml, .yaml, .yml or .json, this one in %q", ext), "give it the ending of its format")
	}
	return root, t.problems
}

// sound looks at the bytes before any reader does: size, encoding and a depth
// of brackets at which recursive readers would run out of stack.
func (t *tree) sound() bool {
	start := position{1, 1}
	if len(t.data) > maxProject {
		t.complain("F02", start, "", fmt.Sprintf("the file has %d bytes; a project file has at most %d", len(t.data), maxProject), "is this the survey file?")
		return false
	}
	if bytes.HasPrefix(t.data, []byte("\xef\xbb\xbf")) {
		t.complain("U14", start, "", "the file starts with a byte order mark", "save it as UTF-8 without one")
		return false
	}
	if i := invalid(t.data); i >= 0 {
		t.complain("F02", t.position(i), "", fmt.Sprintf("byte 0x%02x is no UTF-8 text", t.data[i]), "save the file as UTF-8")
		return false
	}
	depth := 0
	for i, b := range t.data {
		switch b {
		case '[', '{':
			depth++
		case ']', '}':
			depth--
		}
		if depth > 16*maxDepth { // brackets in texts and comments count as well: be generous
			t.complain("F02", t.position(i), "", fmt.Sprintf("more than %d brackets are open here", 16*maxDepth), "no project is nested like that")
			return false
		}
	}
	return true
}

// invalid returns the offset of the first byte that is no UTF-8 or is a NUL,
// −1 when there is none.
func invalid(data []byte) int {
	for i := 0; i < len(data); {
		r, size := utf8.DecodeRune(data[i:])
		if r == utf8.RuneError && size == 1 || r == 0 {
			return i
		}
		i += size
	}
	return -1
}

// deep complains once a value lies deeper than any key of a project.
func (t *tree) deep(depth int, at position) bool {
	if depth <= maxDepth {
		return false
	}
	t.complain("F02", at, "", fmt.Sprintf("values are nested more than %d deep here", maxDepth), "no project is nested like that")
	return true
}

// add puts a key into a table, or complains that it is there already.
func (t *tree) add(to *node, e entry) {
	if old := to.entry(e.key); old != nil {
		t.twice(e.key, e.at, old.at)
		return
	}
	t.push(to, e)
}

// push puts a key that is not there yet into a table.
func (t *tree) push(to *node, e entry) {
	if len(to.entries) == maxKeys {
		t.complain("F02", e.at, e.key, fmt.Sprintf("more than %d keys stand in one table", maxKeys), "no table of a project has as many")
	}
	if len(to.entries) <= maxKeys {
		to.entries = append(to.entries, e)
	}
}

// twice says where a key stood first: the two lines may be pages apart.
func (t *tree) twice(key string, again, first position) {
	t.complain("F08", again, key, fmt.Sprintf("%s is given twice", key), fmt.Sprintf("it stands in line %d already; keep one", first.line))
}
