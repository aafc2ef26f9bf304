package main

import (
	"bytes"
	"context"
	"errors"
	"io"
	"os"
	"testing"

	"linewitness/report"
	"linewitness/sim"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// verifyWith runs "verify -" on the starter in an empty directory, with a
// solver and a writer that end as given.
func verifyWith(t *testing.T, r *record.Record, solver, writer error) (status int, stdout, stderr string) {
	t.Helper()
	t.Chdir(t.TempDir())
	var out, err bytes.Buffer
	a := newApp(bytes.NewReader(design.Starter()), &out, &err)
	a.verify = func(context.Context, *design.File, sim.Options) (*record.Record, error) { return r, solver }
	a.writePDF = func(w io.Writer, _ *record.Record, _ report.Options) error {
		io.WriteString(w, "%PDF-")
		return writer
	}
	status = a.run(context.Background(), []string{"verify", "-"})
	return status, out.String(), err.String()
}

func TestVerifyFails(t *testing.T) {
	for _, tt := range []struct {
		name           string
		solver, writer error
		status         int
		stderr         string
	}{
		{
			"bound", &sim.BoundError{Case: "iced", Updates: 3e12, Bytes: 1 << 30}, nil, statusUsage,
			"linewitness: stdin: case iced would take 3e+12 cell updates and 1e+03 MiB, over the bound of 2e+12 updates or 8192 MiB\n" +
				"hint: \"linewitness plan\" shows what it takes; --grids 1 takes less; --no-bound runs it all the same\n",
		},
		{"solver", errors.New("sim: no way"), nil, statusUsage, "linewitness: stdin: sim: no way\n"},
		{"writer", nil, errors.New("report: no font"), statusFile, "linewitness: stdin: report: no font\n"},
	} {
		t.Run(tt.name, func(t *testing.T) {
			status, stdout, stderr := verifyWith(t, sampleRecord(), tt.solver, tt.writer)
			if status != tt.status || stdout != "" || stderr != tt.stderr {
				t.Errorf("status %d, stdout %q, stderr %q; want %d, nothing, %q", status, stdout, stderr, tt.status, tt.stderr)
			}
			noFiles(t, ".")
		})
	}
}

// The files are written whatever the verdict is: a design that fails is filed
// too.
func TestVerifyVerdicts(t *testing.T) {
	for _, verdict := range []record.Verdict{record.Verified, record.NotShown, record.Doubted, record.Missed, record.Disagree, record.Unsettle} {
		t.Run(string(verdict), func(t *testing.T) {
			r := sampleRecord()
			r.Verdict = verdict
			status, _, stderr := verifyWith(t, r, nil, nil)
			if want := statusOf(verdict); status != want || stderr != "" {
				t.Errorf("status %d, stderr %q; want %d, nothing", status, stderr, want)
			}
			for _, name := range []string{"design.pdf", "design.json"} {
				if _, err := os.Stat(name); err != nil {
					t.Error(err)
				}
			}
		})
	}
}

// A result that could not be delivered is status 5, even of a design that is
// verified.
func TestStdoutFails(t *testing.T) {
	var stderr bytes.Buffer
	got := run(context.Background(), []string{"version"}, nil, failingWriter{}, &stderr)
	if want := "linewitness: standard output: disk full\n"; got != statusFile || stderr.String() != want {
		t.Errorf("status %d, stderr %q; want %d, %q", got, &stderr, statusFile, want)
	}
}

type failingWriter struct{}

func (failingWriter) Write([]byte) (int, error) { return 0, errors.New("disk full") }
