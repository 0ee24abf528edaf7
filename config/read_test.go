package config_test

import (
	"path/filepath"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/config"
)

// full reads the project in which every key stands once.
func full(t *testing.T, ext, alternative string) *config.Project {
	t.Helper()
	d, problems := config.Read(config.Disk(), filepath.Join("testdata", "full"+ext))
	require.Empty(t, problems)
	p, problems := d.Project(alternative)
	require.Empty(t, problems)
	return p
}

func TestThreeFormatsAreOneProject(t *testing.T) {
	for _, alternative := range []string{"base", "first draft", "low"} {
		toml := full(t, ".toml", alternative)
		for _, ext := range []string{".yaml", ".json"} {
			diff := cmp.Diff(toml, full(t, ext, alternative), cmpopts.IgnoreUnexported(config.Project{}))
			assert.Empty(t, diff, "%s, %s", ext, alternative)
		}
	}
}
