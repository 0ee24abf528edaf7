package main

import (
	"strings"

	"github.com/spf13/pflag"
	"github.com/spf13/viper"
)

// options says how a command is run; nothing here changes a number of the
// project.
type options struct {
	JSON        bool
	Plain       bool
	Quiet       bool
	Strict      bool
	NoColor     bool
	MaxWarnings int // below 0: no limit
	Out         string
	Force       bool
	DryRun      bool
	Alternative string
}

// fromEnvironment lists the options that SAGCREST_NAME may set where the flag
// is not given. What belongs to one call only, such as --dry-run, is not here.
var fromEnvironment = [...]string{"out", "plain", "no-color", "strict", "max-warnings", "quiet", "force"}

// environmentName returns the variable that sets a flag.
func environmentName(flag string) string {
	return "SAGCREST_" + strings.ToUpper(strings.ReplaceAll(flag, "-", "_"))
}

// commonFlags declares the flags of every command.
func commonFlags(f *pflag.FlagSet) {
	f.Bool("json", false, "print one JSON document and nothing else on stdout")
	f.Bool("plain", false, "print one record a line, fields parted by tabs")
	f.Bool("quiet", false, "no progress, no hints: only findings and refusals")
	f.Bool("strict", false, "warnings count: exit 1")
	f.Int("max-warnings", -1, "more `N` warnings than this count: exit 1")
	f.Lookup("max-warnings").DefValue = "0" // shown as: no default
	f.Bool("no-color", false, "no bold letters (also NO_COLOR, TERM=dumb)")
}

// outputFlags declares the flags of commands that write a folder.
func outputFlags(f *pflag.FlagSet) {
	f.String("out", "", "write into `DIR` instead of PROJECT/out")
	f.Bool("force", false, "take a folder that is not empty and not ours; what it holds is kept beside it")
	f.Bool("dry-run", false, "compute everything, write nothing, list what would be written")
}

// alternativeFlag declares the choice of an alternative.
func alternativeFlag(f *pflag.FlagSet) {
	f.String("alternative", "base", "the `NAME` of an alternative of the project")
}

// readOptions takes flags first, then the environment, then defaults. A flag
// that the command does not have is at its zero value.
func readOptions(flags *pflag.FlagSet, env Env) (options, error) {
	v := viper.New()
	if err := v.BindPFlags(flags); err != nil {
		return options{}, err
	}
	set := map[string]any{}
	for _, name := range fromEnvironment {
		text := env.Var(environmentName(name))
		if text == "" || flags.Lookup(name) == nil {
			continue
		}
		if err := fits(flags.Lookup(name), text); err != nil {
			return options{}, usagef("%s=%q: %v", environmentName(name), text, err)
		}
		set[name] = text
	}
	if err := v.MergeConfigMap(set); err != nil {
		return options{}, err
	}
	o := options{
		JSON: v.GetBool("json"), Plain: v.GetBool("plain"), Quiet: v.GetBool("quiet"),
		Strict: v.GetBool("strict"), NoColor: v.GetBool("no-color"), MaxWarnings: v.GetInt("max-warnings"),
		Out: v.GetString("out"), Force: v.GetBool("force"), DryRun: v.GetBool("dry-run"),
		Alternative: v.GetString("alternative"),
	}
	_, fromVariable := set["max-warnings"]
	if asked := fromVariable || flags.Changed("max-warnings"); asked && o.MaxWarnings < 0 {
		return options{}, usagef("--max-warnings is %d; give a number of warnings from 0", o.MaxWarnings)
	}
	if o.JSON && o.Plain && flags.Changed("plain") {
		return options{}, usagef("--json and --plain ask for two forms of the same output")
	}
	if o.JSON {
		o.Plain = false
	}
	return o, nil
}

// fits tries the text on a fresh value of the flag's own type, so that a
// variable is as strictly read as a flag.
func fits(flag *pflag.Flag, text string) error {
	probe := pflag.NewFlagSet("", pflag.ContinueOnError)
	switch flag.Value.Type() {
	case "bool":
		probe.Bool("x", false, "")
	case "int":
		probe.Int("x", 0, "")
	default:
		return nil
	}
	return probe.Lookup("x").Value.Set(text)
}
