package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/diag"
)

// app is one call of the program: its streams, surroundings and options.
type app struct {
	in        io.Reader
	out, errw io.Writer
	env       Env
	opt       options
	asked     bool // whether --json stands among the arguments, however the call fails
}

// run carries out one command line and returns the exit code. It depends on
// nothing but its arguments and the file system, and changes nothing but the
// file system and the two streams: results go to out, messages to errw.
func run(args []string, in io.Reader, stdout, errw io.Writer, env Env) (code int) {
	out := &remembering{to: stdout}
	a := &app{in: in, out: out, errw: errw, env: env, asked: wantsJSON(args)}
	defer func() {
		if r := recover(); r != nil {
			code = a.fault(r)
		}
	}()
	root := a.commands()
	root.SetArgs(args)
	err := root.ExecuteContext(env.Context)
	if out.failed != nil && (err == nil || errors.Is(err, errFindings) || errors.Is(err, out.failed)) {
		err = fileTrouble("standard output", reason(out.failed), "")
	}
	return a.leave(err)
}

// remembering is a stream that keeps its first failure, so that no line of text
// is lost unsaid: half a table is worse than none.
type remembering struct {
	to     io.Writer
	failed error
}

func (r *remembering) Write(p []byte) (int, error) {
	if r.failed != nil {
		return 0, r.failed
	}
	n, err := r.to.Write(p)
	r.failed = err
	return n, err
}

// commands builds the tree of commands.
func (a *app) commands() *cobra.Command {
	root := &cobra.Command{
		Use:           "sagcrest",
		Short:         "earthwork and drainage of a road around its sag and crest curves",
		Example:       examples,
		SilenceErrors: true, SilenceUsage: true,
		Version: wire.Release,
		Args:    cobra.ArbitraryArgs,
		RunE:    a.noCommand,
	}
	root.SetIn(a.in)
	root.SetOut(a.out)
	root.SetErr(a.errw)
	root.SetVersionTemplate("sagcrest {{.Version}}\n")
	root.SetUsageTemplate(usageTemplate)
	root.SetHelpTemplate(helpTemplate)
	root.SetFlagErrorFunc(flagError)
	commonFlags(root.PersistentFlags())
	root.PersistentPreRunE = func(c *cobra.Command, _ []string) (err error) {
		a.opt, err = readOptions(c.Flags(), a.env)
		return err
	}
	root.AddCommand(a.newCommand(), a.checkCommand(), a.runCommand(), a.compareCommand(),
		a.calcCommand(), a.explainCommand(), a.schemaCommand(), completionCommand())
	root.CompletionOptions.DisableDefaultCmd = true
	root.SetHelpCommand(manualCommand())
	return root
}

// noCommand answers a call without a command or with one that does not exist.
func (a *app) noCommand(c *cobra.Command, args []string) error {
	if len(args) == 0 {
		c.SetOut(a.errw)
		return errors.Join(c.Help(), usagef("no command given"))
	}
	e := &usageError{message: fmt.Sprintf("unknown command %q", args[0])}
	var names []string
	for _, k := range c.Commands() {
		if k.IsAvailableCommand() {
			names = append(names, k.Name())
		}
	}
	if n := diag.Nearest(args[0], names); n != "" {
		e.hint = "did you mean: sagcrest " + strings.Join(append([]string{n}, args[1:]...), " ")
	} else {
		e.hint = "commands: " + strings.Join(names, ", ")
	}
	return e
}

// flagError names the nearest flag beside one that does not exist.
func flagError(c *cobra.Command, err error) error {
	e := &usageError{message: err.Error(), hint: "see: " + c.CommandPath() + " --help"}
	var missing *pflag.NotExistError
	if errors.As(err, &missing) {
		var names []string
		c.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, f.Name) })
		if n := diag.Nearest(missing.GetSpecifiedName(), names); n != "" {
			e.hint = "did you mean: --" + n
		}
	}
	return e
}

// exactly is the rule for the number of arguments, with words for what is
// missing.
func exactly(names ...string) cobra.PositionalArgs {
	return func(c *cobra.Command, args []string) error {
		switch {
		case len(args) < len(names):
			return &usageError{"missing " + names[len(args)], "see: " + c.CommandPath() + " --help"}
		case len(args) > len(names):
			return &usageError{fmt.Sprintf("unexpected %q after %s", args[len(names)], strings.Join(names, " ")),
				"see: " + c.CommandPath() + " --help"}
		}
		return nil
	}
}

// leave tells what ended the command and returns its exit code.
func (a *app) leave(err error) int {
	var usage *usageError
	var refused *refusal
	var wrong faultError
	switch {
	case err == nil:
		return exitDone
	case errors.Is(err, errFindings):
		return exitFindings
	case errors.Is(err, context.Canceled):
		fmt.Fprintln(a.errw, "sagcrest: interrupted; nothing was written")
		return exitInterrupted
	case errors.As(err, &refused):
		return a.refuse(refused)
	case errors.As(err, &wrong):
		return a.fault(wrong)
	case errors.As(err, &usage):
		fmt.Fprintln(a.errw, "sagcrest:", usage.message)
		if usage.hint != "" {
			fmt.Fprintln(a.errw, usage.hint)
		}
		return exitUsage
	}
	// What is left are cobra's own complaints about the command line.
	fmt.Fprintln(a.errw, "sagcrest:", err)
	return exitUsage
}

// fault reports a mistake of the program itself.
func (a *app) fault(r any) int {
	fmt.Fprintln(a.errw, "sagcrest: a fault of the program, not of your project:", r)
	fmt.Fprintln(a.errw, "please report it with the project file and this line")
	if a.asked {
		a.errorDocument(nil)
	}
	return exitFault
}

// wantsJSON looks for --json before the flags are read, since a call that
// fails early must keep the promise of --json as well.
func wantsJSON(args []string) bool {
	for _, arg := range args {
		if arg == "--" {
			return false
		}
		if arg == "--json" || arg == "--json=true" {
			return true
		}
	}
	return false
}
