package main

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

// The import rules are read in this process: a subprocess would be served from
// the test cache and miss a violation.

// root is the module's folder, seen from this package.
const root = "../.."

const module = "sagcrest/"

// domain lists every package of the domain, one row each, with what it may
// import of ours beside profile/station and profile/finding, which all may.
// Rows of packages that do not exist yet stand here so that the first file of
// each is already held.
func domain() map[string][]string {
	return map[string][]string{
		"profile/station":     {},
		"profile/finding":     {},
		"profile":             {},
		"profile/alignment":   {},
		"profile/criteria":    {"profile", "profile/alignment"},
		"section/terrain":     {},
		"section":             {"profile", "profile/alignment", "profile/criteria", "section/terrain"},
		"drainage/hydraulics": {},
		"drainage/hydrology":  {},
		"drainage/catchment":  {"section/terrain"},
		"drainage":            {"profile", "profile/alignment", "section/terrain", "section", "drainage/hydraulics", "drainage/hydrology", "drainage/catchment"},
		"earthwork":           {"profile", "profile/alignment", "section/terrain", "section"},
		"earthwork/haul":      {"earthwork"},
		"earthwork/gradeline": {"profile", "section", "earthwork", "earthwork/haul"},
		"earthwork/bill":      {"section"},
	}
}

// rim lists the packages that read the project and write its results. "domain"
// stands for every package above, "config/*" for the sub-packages of config.
func rim() map[string][]string {
	const in = "cmd/sagcrest/internal/"
	return map[string][]string{
		"config":          {"domain", "config/*"},
		"config/diag":     {"domain", "config/quantity"},
		"config/quantity": {"domain", "config/diag"},
		"config/*":        {"domain", "config/diag", "config/quantity"},
		in + "study":      {"domain", "config", "config/*"},
		in + "wire":       {"domain", in + "study"},
		in + "table":      {"domain", in + "study", in + "wire", "config/quantity"},
		in + "plot":       {"domain", in + "study", in + "wire", "config/quantity"},
		in + "calc":       {"domain", in + "table", in + "wire", "config/quantity"},
		in + "report":     {"domain", in + "calc", in + "table", in + "plot", in + "study", in + "wire", "config/quantity"},
		in + "web":        {"domain", in + "calc", in + "table", in + "plot", in + "study", in + "wire", "config/quantity"},
		"cmd/sagcrest":    {"domain", "config", "config/*", in + "*"},
	}
}

// forbidden is what no package of the domain imports: files, clocks, flags,
// JSON, HTTP and logs belong to the rim.
var forbidden = []string{"os", "os/", "io/fs", "time", "flag", "encoding/json", "net", "net/", "log", "log/",
	"github.com/spf13/", "github.com/pelletier/"}

// source is one Go file of the module.
type source struct {
	path, dir string // slash paths from the module's root
	test      bool
	file      *ast.File
	set       *token.FileSet
}

func TestImportsFlowOneWay(t *testing.T) {
	for _, s := range sources(t) {
		if s.test && strings.HasSuffix(s.file.Name.Name, "_test") {
			continue // external test packages may import anything
		}
		for _, imp := range imports(t, s) {
			ours, isOurs := strings.CutPrefix(imp, module)
			switch {
			case isOurs && !allowed(s.dir, ours):
				t.Errorf("%s imports %s: not in its row of the import rules", s.path, ours)
			case !isOurs && !s.test && isDomain(s.dir) && matches(forbidden, imp):
				t.Errorf("%s imports %s: only config and cmd touch the outside", s.path, imp)
			}
		}
	}
}

// The rules themselves are tried on what they must refuse, so that a slip in
// them is seen.
func TestImportRulesRefuse(t *testing.T) {
	for _, c := range []struct {
		from, to string
		ok       bool
	}{
		{"profile", "profile/finding", true},
		{"profile", "section", false},
		{"section", "earthwork", false},
		{"earthwork", "drainage", false},
		{"earthwork", "earthwork/bill", false},
		{"section/terrain", "profile/alignment", false},
		{"drainage", "config/diag", false},
		{"config", "cmd/sagcrest/internal/study", false},
		{"config/points", "config", false},
		{"config/points", "config/diag", true},
		{"cmd/sagcrest/internal/table", "cmd/sagcrest/internal/plot", false},
		{"cmd/sagcrest/internal/report", "cmd/sagcrest/internal/table", true},
		{"cmd/sagcrest", "cmd/sagcrest/internal/report", true},
		{"anything/new", "profile", false},
	} {
		if allowed(c.from, c.to) != c.ok {
			t.Errorf("%s importing %s: allowed %v, want %v", c.from, c.to, !c.ok, c.ok)
		}
	}
	require.True(t, matches(forbidden, "os/signal"))
	require.False(t, matches(forbidden, "errors"))
}

func TestOnlyMainEndsTheProcessAndNothingComputedPrints(t *testing.T) {
	for _, s := range sources(t) {
		if s.test {
			continue
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			call, ok := n.(*ast.SelectorExpr)
			if !ok {
				return true
			}
			pkg, ok := call.X.(*ast.Ident)
			if !ok {
				return true
			}
			name := pkg.Name + "." + call.Sel.Name
			switch {
			case name == "os.Exit" && s.path != "cmd/sagcrest/main.go",
				name == "fmt.Print", name == "fmt.Printf", name == "fmt.Println",
				name == "os.Stdout" && s.dir != "cmd/sagcrest", name == "os.Stderr" && s.dir != "cmd/sagcrest":
				t.Errorf("%s uses %s", s.set.Position(call.Pos()), name)
			}
			return true
		})
	}
}

func TestDomainCarriesNoWireTags(t *testing.T) {
	for _, s := range sources(t) {
		if s.test || !isDomain(s.dir) {
			continue
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			if f, ok := n.(*ast.Field); ok && f.Tag != nil {
				t.Errorf("%s: a field of the domain carries the tag %s", s.set.Position(f.Pos()), f.Tag.Value)
			}
			return true
		})
	}
}

func TestTopLevelIsFixed(t *testing.T) {
	entries, err := os.ReadDir(root)
	require.NoError(t, err)
	known := []string{"cmd", "profile", "section", "earthwork", "drainage", "config", "testdata",
		"go.mod", "go.sum", "README.md", "DEVELOPERS.md", "LICENSE"}
	for _, e := range entries {
		if !strings.HasPrefix(e.Name(), ".") && !slices.Contains(known, e.Name()) {
			t.Errorf("%s does not belong at the top", e.Name())
		}
	}
}

func TestMainIsShort(t *testing.T) {
	data, err := os.ReadFile("main.go")
	require.NoError(t, err)
	require.LessOrEqual(t, strings.Count(string(data), "\n"), 40)
}

// allowed reports whether a package may import another of ours.
func allowed(from, to string) bool {
	if from == to {
		return true // a test file of the package itself, seen from outside
	}
	if to == "profile/station" || to == "profile/finding" {
		return from != "profile/station"
	}
	if row, ok := domain()[from]; ok {
		return slices.Contains(row, to)
	}
	row, ok := rim()[from]
	if !ok && strings.HasPrefix(from, "config/") {
		row = rim()["config/*"]
	}
	_, isDomain := domain()[to]
	for _, r := range row {
		dir, below := strings.CutSuffix(r, "/*")
		if r == to || r == "domain" && isDomain || below && path.Dir(to) == dir {
			return true
		}
	}
	return false
}

func isDomain(dir string) bool {
	_, ok := domain()[dir]
	return ok
}

// matches reports whether a path is one of the list, or below one that ends
// with a slash.
func matches(list []string, imp string) bool {
	for _, f := range list {
		if imp == f || strings.HasSuffix(f, "/") && strings.HasPrefix(imp, f) {
			return true
		}
	}
	return false
}

func imports(t *testing.T, s source) (out []string) {
	for _, spec := range s.file.Imports {
		p, err := strconv.Unquote(spec.Path.Value)
		require.NoError(t, err)
		out = append(out, p)
	}
	return out
}

// sources parses every Go file of the module.
func sources(t *testing.T) (all []source) {
	err := filepath.WalkDir(root, func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && name != root && (strings.HasPrefix(d.Name(), ".") || d.Name() == "testdata") {
			return filepath.SkipDir
		}
		if d.IsDir() || filepath.Ext(name) != ".go" {
			return nil
		}
		rel, err := filepath.Rel(root, name)
		if err != nil {
			return err
		}
		set := token.NewFileSet()
		file, err := parser.ParseFile(set, name, nil, parser.SkipObjectResolution)
		if err != nil {
			return err
		}
		rel = filepath.ToSlash(rel)
		all = append(all, source{rel, path.Dir(rel), strings.HasSuffix(rel, "_test.go"), file, set})
		return nil
	})
	require.NoError(t, err)
	require.NotEmpty(t, all)
	return all
}
