package main

import (
	_ "embed"
	"strings"

	"github.com/spf13/cobra"
)

// examples open the help. They run as they stand on the bundled road.
const examples = `  sagcrest check testdata/roads/quillmere
  sagcrest run testdata/roads/quillmere
  sagcrest compare testdata/roads/quillmere`

//go:embed doc.go
var docSource string

// manual returns the text of doc.go without comment signs: one text serves
// the reader of the source and the user of the program.
func manual() string {
	var b strings.Builder
	for line := range strings.Lines(docSource) {
		text, ok := strings.CutPrefix(line, "//")
		if !ok {
			break
		}
		text = strings.TrimPrefix(text, " ")
		if heading, ok := strings.CutPrefix(text, "# "); ok {
			text = strings.ToUpper(heading)
		}
		b.WriteString(strings.ReplaceAll(text, "\t", "  "))
	}
	return b.String()
}

// manualCommand replaces cobra's help command: without a name it prints the
// manual, with one the help of that command.
func manualCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND]",
		Short: "this program's manual, or the help of one command",
		RunE: func(c *cobra.Command, args []string) error {
			root := c.Root()
			if len(args) == 0 {
				_, err := c.OutOrStdout().Write([]byte("Examples\n" + examples + "\n\n" + manual()))
				return err
			}
			named, _, err := root.Find(args)
			if err != nil || named == root {
				return root.RunE(root, args)
			}
			return named.Help()
		},
	}
}

// usageTemplate and helpTemplate put the examples first: most who ask for help
// want a line to copy.
const helpTemplate = `{{if .HasExample}}Examples
{{.Example}}

{{end}}{{if .Long}}{{.Long}}{{else}}{{.Short}}{{end}}

{{.UsageString}}`

const usageTemplate = `Usage
  {{if .HasAvailableSubCommands}}{{.CommandPath}} COMMAND [options]{{else}}{{.UseLine}}{{end}}
{{if .HasAvailableSubCommands}}
Commands
{{range .Commands}}{{if .IsAvailableCommand}}  {{rpad .Name .NamePadding}}  {{.Short}}
{{end}}{{end}}{{end}}{{if .HasAvailableFlags}}
Options
{{.Flags.FlagUsages | trimTrailingWhitespaces}}
{{end}}
Exit codes: 0 done · 1 findings · 2 usage · 3 input · 4 file system · 5 program fault
Whole manual: sagcrest help
`
