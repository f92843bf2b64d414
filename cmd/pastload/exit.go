package main

import (
	"errors"
	"fmt"
	"io"
	"strings"

	"pastload/profile"
	"pastload/profile/intake"
)

// Exit statuses. They are part of the interface.
const (
	exitDone     = 0
	exitFailure  = 1
	exitUsage    = 2
	exitInvalid  = 3
	exitFindings = 4
)

// A usageError is a wrong command line.
type usageError struct{ error }

func usagef(format string, a ...any) error { return usageError{fmt.Errorf(format, a...)} }

// A findingsError says that the work is done and that something was found at or
// above the level that was to fail the run.
type findingsError struct{ error }

// exitStatus prints an error, if there is one, and returns the status for it.
// Problems of the input are printed bare, a line each, so that an editor can
// jump to them.
func exitStatus(err error, errw io.Writer) int {
	if err == nil {
		return exitDone
	}
	var usage usageError
	var findings findingsError
	var invalid intake.Problems
	var unbuilt profile.Problems
	switch {
	case errors.As(err, &invalid), errors.As(err, &unbuilt), isDecisionProblem(err):
		fmt.Fprintln(errw, err)
		n := len(strings.Split(strings.TrimSpace(err.Error()), "\n"))
		fmt.Fprintf(errw, "pastload: %s in the input; nothing was written\n", plural(n, "problem"))
		return exitInvalid
	case errors.As(err, &findings):
		fmt.Fprintln(errw, "pastload:", err)
		return exitFindings
	case errors.As(err, &usage):
		fmt.Fprintln(errw, "pastload:", err)
		fmt.Fprintln(errw, "See 'pastload help' for the commands.")
		return exitUsage
	}
	fmt.Fprintln(errw, "pastload:", err)
	return exitFailure
}

func plural(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}
