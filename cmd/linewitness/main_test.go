package main

import (
	"errors"
	"flag"
	"os/exec"
	"strconv"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

var update = flag.Bool("update", false, "rewrite the expectations in the scripts")

// TestMain puts the program itself on the PATH of the scripts.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"linewitness": main})
}

func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir: "testdata/script",
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"exits":  exits,
			"like":   like,
			"detach": detach, "swap": swap, "forge": forge,
		},
		UpdateScripts:       *update,
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
	})
}

// exits CODE PROGRAM ARG... runs a program and checks its exit status.
func exits(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: exits CODE PROGRAM ARG...")
	}
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	got := 0
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		var exit *exec.ExitError
		if !errors.As(err, &exit) {
			ts.Fatalf("%v", err)
		}
		got = exit.ExitCode()
	}
	if got != want {
		ts.Fatalf("exit status %d, want %d", got, want)
	}
}

// like GOT WANT compares two files line by line; "..." in a line of WANT
// stands for any text.
func like(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: like GOT WANT")
	}
	if diff := differs(ts.ReadFile(args[1]), ts.ReadFile(args[0])); diff != "" {
		ts.Fatalf("%s", diff)
	}
}
