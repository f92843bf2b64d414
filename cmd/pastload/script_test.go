package main

import (
	"os"
	"strconv"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// TestMain lets the scripts run the program itself.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){
		"pastload": func() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) },
	})
}

// TestScripts runs the command line as its user does: one script for each
// behaviour, with its output, its remarks, its exit status and its files.
func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir:                 "../../testdata/script",
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"status": status,
		},
	})
}

// status runs a program and checks its exit status, which exec alone does not
// tell: status 3 pastload profile site.
func status(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: status N program [args...]")
	}
	err := ts.Exec(args[1], args[2:]...)
	got := "0"
	if err != nil {
		type coder interface{ ExitCode() int }
		c, ok := err.(coder)
		if !ok {
			ts.Fatalf("%s: %v", args[1], err)
		}
		got = strconv.Itoa(c.ExitCode())
	}
	if got != args[0] {
		ts.Fatalf("exit status %s, want %s\n%s", got, args[0], ts.ReadFile("stderr"))
	}
}
