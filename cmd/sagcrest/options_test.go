package main

import (
	"testing"

	"github.com/spf13/pflag"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestOptionsFlagsBeatEnvironmentBeatsDefaults(t *testing.T) {
	vars := map[string]string{"SAGCREST_OUT": "from-var", "SAGCREST_STRICT": "true", "SAGCREST_MAX_WARNINGS": "3"}
	for _, c := range []struct {
		args []string
		vars map[string]string
		want options
	}{
		{nil, nil, options{MaxWarnings: -1, Alternative: "base"}},
		{nil, vars, options{MaxWarnings: 3, Out: "from-var", Strict: true, Alternative: "base"}},
		{[]string{"--out", "flag", "--strict=false", "--max-warnings", "0"}, vars, options{Out: "flag", Alternative: "base"}},
		{[]string{"--json"}, map[string]string{"SAGCREST_PLAIN": "1"}, options{JSON: true, MaxWarnings: -1, Alternative: "base"}},
		// Only options of the list are read from the environment.
		{nil, map[string]string{"SAGCREST_ALTERNATIVE": "x", "SAGCREST_DRY_RUN": "1", "SAGCREST_JSON": "1"}, options{MaxWarnings: -1, Alternative: "base"}},
	} {
		got, err := readOptions(parsed(t, c.args), Env{Var: func(n string) string { return c.vars[n] }})
		require.NoError(t, err)
		assert.Equal(t, c.want, got, "%v %v", c.args, c.vars)
	}
}

func TestOptionsRefuse(t *testing.T) {
	for _, vars := range []map[string]string{
		{"SAGCREST_STRICT": "perhaps"}, {"SAGCREST_MAX_WARNINGS": "few"},
	} {
		_, err := readOptions(parsed(t, nil), Env{Var: func(n string) string { return vars[n] }})
		var usage *usageError
		require.ErrorAs(t, err, &usage)
		assert.Contains(t, usage.message, "SAGCREST_")
	}
	for _, args := range [][]string{{"--json", "--plain"}, {"--max-warnings", "-1"}} {
		_, err := readOptions(parsed(t, args), Env{Var: func(string) string { return "" }})
		assert.Error(t, err)
	}
}

func parsed(t *testing.T, args []string) *pflag.FlagSet {
	f := pflag.NewFlagSet("", pflag.ContinueOnError)
	commonFlags(f)
	outputFlags(f)
	alternativeFlag(f)
	require.NoError(t, f.Parse(args))
	return f
}
