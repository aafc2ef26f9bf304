package main

import (
	"bytes"
	"context"
	"io"
	"os"
	"os/exec"
	"strings"
	"syscall"
	"testing"

	"linewitness/report"
	"linewitness/sim"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// interrupted runs "verify -" in an empty directory with some steps of the
// program replaced, and checks that it ends as interrupted and leaves no file.
func interrupted(t *testing.T, replace func(a *app, cancel context.CancelFunc, forever chan struct{})) {
	t.Helper()
	t.Chdir(t.TempDir())
	ctx, cancel := context.WithCancel(context.Background())
	forever := make(chan struct{})
	defer close(forever)
	var stdout, stderr bytes.Buffer
	a := newApp(bytes.NewReader(design.Starter()), &stdout, &stderr)
	replace(a, cancel, forever)
	if got := a.run(ctx, []string{"verify", "--formats", "pdf,json,csv", "-"}); got != statusInterrupted {
		t.Errorf("status %d, want %d", got, statusInterrupted)
	}
	if stdout.Len() > 0 || stderr.String() != "linewitness: interrupted\n" {
		t.Errorf("stdout %q, stderr %q", &stdout, &stderr)
	}
	noFiles(t, ".")
}

func noFiles(t *testing.T, dir string) {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil || len(entries) > 0 {
		t.Errorf("files left: %v (error %v)", entries, err)
	}
}

// A solver that does not notice the interruption is left to itself.
func TestInterruptSolver(t *testing.T) {
	interrupted(t, func(a *app, cancel context.CancelFunc, forever chan struct{}) {
		a.verify = func(context.Context, *design.File, sim.Options) (*record.Record, error) {
			cancel()
			<-forever
			return sampleRecord(), nil
		}
	})
}

// A writer in the middle of a page is left to itself.
func TestInterruptWriter(t *testing.T) {
	interrupted(t, func(a *app, cancel context.CancelFunc, forever chan struct{}) {
		a.verify = func(context.Context, *design.File, sim.Options) (*record.Record, error) { return sampleRecord(), nil }
		a.writePDF = func(w io.Writer, _ *record.Record, _ report.Options) error {
			io.WriteString(w, "%PDF-")
			cancel()
			<-forever
			return nil
		}
	})
}

// Reading a design that never ends its input can be interrupted too.
func TestInterruptReader(t *testing.T) {
	interrupted(t, func(a *app, cancel context.CancelFunc, forever chan struct{}) {
		a.stdin = readerFunc(func([]byte) (int, error) {
			cancel()
			<-forever
			return 0, io.EOF
		})
	})
}

type readerFunc func([]byte) (int, error)

func (f readerFunc) Read(p []byte) (int, error) { return f(p) }

// The files of a run get their names together or not at all, and their
// temporary names do not stay.
func TestInterruptBetweenFiles(t *testing.T) {
	dir := t.TempDir()
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	err := writeProducts(ctx, []product{{dir + "/a.pdf", []byte("a")}, {dir + "/a.json", []byte("b")}})
	if err != context.Canceled {
		t.Errorf("error %v, want %v", err, context.Canceled)
	}
	noFiles(t, dir)
}

// pipeCapacity is more than a pipe holds anywhere (64 KiB on Linux): when as
// much was written to the program, it has begun to read, and its signal
// handler, which it installs first of all, is there.
const pipeCapacity = 256 << 10

// The program as a whole ends with status 130 on SIGINT and on SIGTERM.
func TestInterruptSignal(t *testing.T) {
	slow, err := os.ReadFile("testdata/slow.yaml")
	if err != nil {
		t.Fatal(err)
	}
	padding := strings.Repeat("#"+strings.Repeat(" ", 62)+"\n", pipeCapacity/64)
	for _, signal := range []os.Signal{syscall.SIGINT, syscall.SIGTERM} {
		dir := t.TempDir()
		cmd := exec.Command("linewitness", "verify", "--no-bound", "-")
		cmd.Dir = dir
		var stdout, stderr bytes.Buffer
		cmd.Stdout, cmd.Stderr = &stdout, &stderr
		stdin, err := cmd.StdinPipe()
		if err != nil {
			t.Fatal(err)
		}
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		if _, err := io.WriteString(stdin, string(slow)+padding); err != nil {
			t.Fatal(err)
		}
		if err := stdin.Close(); err != nil {
			t.Fatal(err)
		}
		if err := cmd.Process.Signal(signal); err != nil {
			t.Fatal(err)
		}
		cmd.Wait() // its error is the exit status
		if got := cmd.ProcessState.ExitCode(); got != statusInterrupted {
			t.Errorf("%v: status %d, want %d", signal, got, statusInterrupted)
		}
		if stdout.Len() > 0 || stderr.String() != "linewitness: interrupted\n" {
			t.Errorf("%v: stdout %q, stderr %q", signal, &stdout, &stderr)
		}
		noFiles(t, dir)
	}
}
