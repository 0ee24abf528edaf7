package main

import (
	"context"
	"os"

	"github.com/mattn/go-isatty"
)

// Env is what run sees of its surroundings beside arguments and streams, so
// that a test can set each of them.
type Env struct {
	// Context ends when somebody interrupts the program.
	Context context.Context
	// Var looks up an environment variable; "" means that it is not set.
	Var func(name string) string
	// OutTerminal and ErrTerminal tell whether a person watches the streams.
	OutTerminal, ErrTerminal bool
}

// systemEnv describes the process itself.
func systemEnv(ctx context.Context) Env {
	return Env{
		Context:     ctx,
		Var:         os.Getenv,
		OutTerminal: isatty.IsTerminal(os.Stdout.Fd()),
		ErrTerminal: isatty.IsTerminal(os.Stderr.Fd()),
	}
}
