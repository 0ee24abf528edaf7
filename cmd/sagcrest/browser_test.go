package main

import (
	"bytes"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// browser runs a headless browser without network on a page, or skips; under CI
// it must exist.
func browser(t *testing.T, args ...string) []byte {
	path, err := exec.LookPath("chromium")
	if err != nil {
		if os.Getenv("CI") == "true" {
			t.Fatal("chromium is missing")
		}
		t.Skip("chromium is missing: the page is not rendered")
	}
	common := []string{"--headless", "--no-sandbox", "--disable-gpu", "--no-first-run", "--disable-background-networking",
		"--disable-component-update", "--disable-sync", "--host-resolver-rules=MAP * ~NOTFOUND", "--user-data-dir=" + t.TempDir()}
	c := exec.CommandContext(t.Context(), path, append(common, args...)...)
	c.WaitDelay = 10 * time.Second
	var out bytes.Buffer
	c.Stdout = &out
	require.NoError(t, c.Run())
	return out.Bytes()
}

// The report opens from a file without network: every chapter, drawing and table
// is there after loading, and it prints on paper.
func TestReportOpensOffline(t *testing.T) {
	dir, _, _ := demo(t, "first draft")
	page := "file://" + filepath.Join(dir, "report.html")
	dom := string(browser(t, "--dump-dom", page))
	assert.Contains(t, dom, "Quillmere link")
	text, err := os.ReadFile(filepath.Join(dir, "report.html"))
	require.NoError(t, err)
	for _, tag := range []string{"<svg", "<table", "<section", "<figure"} {
		assert.Equal(t, strings.Count(string(text), tag), strings.Count(dom, tag), tag)
	}

	pdf := filepath.Join(t.TempDir(), "report.pdf")
	browser(t, "--print-to-pdf="+pdf, "--no-pdf-header-footer", page)
	printed, err := os.ReadFile(pdf)
	require.NoError(t, err)
	assert.True(t, bytes.HasPrefix(printed, []byte("%PDF")))
	assert.Greater(t, bytes.Count(printed, []byte("/Type /Page\n"))+bytes.Count(printed, []byte("/Type /Page/")), 0)
}
