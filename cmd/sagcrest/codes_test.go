package main

import (
	"go/ast"
	"go/token"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"sagcrest/cmd/sagcrest/internal/study"
)

// Every code that is raised anywhere has a page, and every page a place that
// raises it: explain never has to say "unknown" about a printed code.
func TestEveryCodeHasAPageAndEveryPageACode(t *testing.T) {
	raised := raisedCodes(t)
	var pages []string
	for _, r := range study.Catalogue() {
		pages = append(pages, string(r.Code))
		for name, text := range map[string]string{
			"title": r.Title, "message": r.Message, "formula": r.Formula,
			"source": r.Source, "effect": r.Effect, "mend": r.Mend,
		} {
			assert.NotEmpty(t, strings.TrimSpace(text), "%s has no %s", r.Code, name)
		}
		assert.Contains(t, "EWN", r.Default.String(), "severity of %s", r.Code)
	}
	for code, where := range raised {
		assert.Contains(t, pages, code, "raised in %s", where)
	}
	for _, code := range pages {
		assert.Contains(t, raised, code, "has a page, but nothing raises it")
	}
	assert.True(t, slices.IsSorted(pages))
}

// Every page has a bad project that shows it, with its near miss: a code that
// nobody can trigger cannot be trusted.
func TestEveryCodeHasABadProjectAndANearMiss(t *testing.T) {
	for _, r := range study.Catalogue() {
		dir := filepath.Join(root, "testdata", "bad", string(r.Code))
		assert.FileExists(t, filepath.Join(dir, "road.toml"))
		assert.FileExists(t, filepath.Join(dir, "near", "road.toml"))
	}
}

// raisedCodes collects the codes in the sources outside of functions called
// Rules or fatal: the first are the pages, the second only asks.
func raisedCodes(t *testing.T) map[string]string {
	form := regexp.MustCompile(`^[FUAPSQD]\d\d$`)
	raised := map[string]string{}
	for _, s := range sources(t) {
		if s.test {
			continue
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			switch v := n.(type) {
			case *ast.FuncDecl:
				return v.Name.Name != "Rules" && v.Name.Name != "fatal" && v.Name.Name != "silent" && v.Name.Name != "covers"
			case *ast.BasicLit:
				if text, err := strconv.Unquote(v.Value); v.Kind == token.STRING && err == nil && form.MatchString(text) {
					raised[text] = s.set.Position(v.Pos()).String()
				}
			}
			return true
		})
	}
	return raised
}
