// Command pastload turns the tables of a ground investigation into a stress
// history: effective stress, preconsolidation stress and overconsolidation
// ratio with depth, the results that cannot be right, drawings and a report.
//
// Each command is in its own file; none of them knows any engineering.
package main

import (
	"io"
	"os"
)

func main() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) }

// run executes one command line and returns its exit status.
func run(args []string, in io.Reader, out, errw io.Writer) int {
	root := newRootCommand()
	root.SetArgs(args)
	root.SetIn(in)
	root.SetOut(out)
	root.SetErr(errw)
	return exitStatus(root.Execute(), errw)
}
