package main

import (
	"strings"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config"
	"sagcrest/config/diag"
)

// schemaCommand prints the JSON Schema of the project file or of a document.
func (a *app) schemaCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "schema [DOCUMENT]",
		Short: "JSON Schema of the project file, or of any document",
		Example: `  sagcrest schema
  sagcrest schema results > results.schema.json`,
		Args: cobra.MaximumNArgs(1),
		RunE: func(_ *cobra.Command, args []string) error {
			name := "project"
			if len(args) == 1 {
				name = args[0]
			}
			text, ok := wire.Schema(name)
			switch {
			case name == "project":
				text = config.Schema()
			case !ok:
				return unknown("document", name, append([]string{"project"}, wire.Documents()...))
			}
			_, err := a.out.Write(text)
			return err
		},
	}
}

// unknown refuses a name of a fixed list and names the nearest one.
func unknown(kind, name string, known []string) error {
	e := &usageError{message: "unknown " + kind + " \"" + name + "\"", hint: "known: " + strings.Join(known, ", ")}
	if n := diag.Nearest(name, known); n != "" {
		e.hint = "did you mean: " + n
	}
	return e
}
