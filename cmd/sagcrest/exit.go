package main

import (
	"errors"
	"fmt"

	"sagcrest/config/diag"
)

// The exit codes of the contract. Scripts rely on them.
const (
	exitDone     = 0 // done, warnings allowed
	exitFindings = 1 // done, with findings that count
	exitUsage    = 2 // wrong usage
	exitInput    = 3 // input from which nothing follows; nothing is written
	exitFiles    = 4 // the file system refused
	exitFault    = 5 // a fault of the program

	// exitInterrupted is what a shell shows for a program ended by Ctrl-C; it
	// is no code of our own.
	exitInterrupted = 130
)

// usageError is a mistake in the command line. hint, where there is one, says
// what was probably meant.
type usageError struct{ message, hint string }

func (e *usageError) Error() string { return e.message }

func usagef(format string, args ...any) error {
	return &usageError{message: fmt.Sprintf(format, args...)}
}

// refusal ends a command with located problems: of the input (exit 3) or of
// the file system (exit 4).
type refusal struct {
	code     int
	problems []diag.Problem
}

func (e *refusal) Error() string { return fmt.Sprintf("%d problems", len(e.problems)) }

// badInput refuses a project from which no geometry follows.
func badInput(problems []diag.Problem) error { return &refusal{exitInput, problems} }

// fileTrouble wraps what the file system said into finding F10 at a path.
func fileTrouble(path, message, help string) error {
	return &refusal{exitFiles, []diag.Problem{{
		Code: "F10", Severity: 'E', File: path, Message: message, Help: help,
	}}}
}

// faultError is a mistake of the program that came back as an error.
type faultError struct{ error }

// errFindings says that everything was written, but that findings count against
// the run (exit 1). The findings themselves are already told.
var errFindings = errors.New("findings count against this run")
