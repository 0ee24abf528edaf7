package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"
)

// main hands arguments, streams and surroundings to run and leaves with its
// exit code. It is the only place that ends the process.
func main() {
	os.Exit(inSurroundings())
}

// inSurroundings lives apart from main so that the signal handler is taken
// off before the process ends.
func inSurroundings() int {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	return run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr, systemEnv(ctx))
}
