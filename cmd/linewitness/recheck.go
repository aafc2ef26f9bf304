package main

import (
	"context"
	"errors"
	"fmt"
	"os"

	"github.com/spf13/cobra"

	"linewitness/report/archive"
	"linewitness/report/data"
	"linewitness/report/recheck"
	"linewitness/report/result"
	"linewitness/sim"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

const recheckHelp = `linewitness recheck takes the design out of a record, solves it again with this
program, and compares every number and text of the result that is attached to the
record with the new one.

  linewitness recheck RECORD.pdf

      --json             print the outcome as JSON instead of the table
      --no-bound         let a run pass the bounds on work and memory
  -h, --help             this text

All is taken from the record: the design file, the files it reads, the result, and
the number of grids. A value is the same if it is equal to the printed digits, the
same within uncertainty if it moved by no more than it is known to, and different
otherwise; different ones are listed with their paths. Another version of the program
is said and not counted.

The exit status is 0 if all is the same or the same within uncertainty, 3 if anything
is different, 2 if the file is not a record of linewitness or an attached file is
missing or not what the record was made with, 5 if it could not be read, and 130 if
interrupted.

Example:
  linewitness recheck feeder.pdf
`

// recheckOptions are the options of the verb.
type recheckOptions struct{ json, noBound bool }

func (a *app) recheckCommand() *cobra.Command {
	opt := &recheckOptions{}
	cmd := &cobra.Command{
		Use:               "recheck RECORD.pdf",
		Short:             "solve the design in a record again and compare",
		Long:              recheckHelp,
		Args:              exactlyOne("a record"),
		ValidArgsFunction: recordFiles,
		RunE: func(cmd *cobra.Command, args []string) error {
			return a.recheck(cmd.Context(), args[0], opt)
		},
	}
	cmd.Flags().BoolVar(&opt.json, "json", false, "print the outcome as JSON")
	cmd.Flags().BoolVar(&opt.noBound, "no-bound", false, "let a run pass the bounds")
	return cmd
}

// recordFiles lets a shell complete the names of records.
func recordFiles(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
	return []string{"pdf"}, cobra.ShellCompDirectiveFilterFileExt
}

// recheck rechecks one record and returns the status of the outcome.
func (a *app) recheck(ctx context.Context, path string, opt *recheckOptions) error {
	old, err := a.openRecord(ctx, path)
	if err != nil {
		return err
	}
	again, err := a.solveAgain(ctx, old, opt.noBound)
	if err != nil {
		return err
	}
	now, err := resultOf(again)
	if err != nil {
		return err
	}
	out := recheck.Compare(old.result, now)
	report := recheckReport{path: path, then: old.result, now: now, out: out}
	if opt.json {
		err = report.writeJSON(a.stdout)
	} else {
		a.print(report.write)
	}
	if err != nil {
		return fileError(err.Error(), "")
	}
	if out.Status() == recheck.Different {
		return errStatus(statusDisagree)
	}
	return nil
}

// filed is a record with what is attached to it, read.
type filed struct {
	path   string
	file   *archive.File
	result *result.Node
}

// openRecord reads a record and checks what is attached to it.
func (a *app) openRecord(ctx context.Context, path string) (*filed, error) {
	text, err := await(ctx, func() ([]byte, error) { return a.readUpTo(path, archive.MaxSize+1) })
	if errors.Is(err, context.Canceled) {
		return nil, err
	}
	if err != nil {
		return nil, fileError(err.Error(), "")
	}
	return await(ctx, func() (*filed, error) { return unpack(path, text) })
}

// unpack opens the bytes of a record.
func unpack(path string, text []byte) (*filed, error) {
	f, err := archive.Open(text)
	if err != nil {
		return nil, usageError(printable(displayName(path)+": "+err.Error()), recordHint(err))
	}
	n, err := result.Read(f.Result().Data)
	if err != nil {
		return nil, usageError(printable(fmt.Sprintf("%s: %s, which is attached: %s", displayName(path), f.Result().Name, err)), "")
	}
	return &filed{path, f, n}, nil
}

// recordHint says what to do about a file that is no record, or no longer.
func recordHint(err error) string {
	switch {
	case errors.Is(err, archive.ErrNotPDF), errors.Is(err, archive.ErrNotRecord):
		return `give the PDF that "linewitness verify" wrote`
	case errors.Is(err, archive.ErrNewer):
		return "use the version that made it, or a later one"
	case errors.Is(err, archive.ErrMissing), errors.Is(err, archive.ErrTampered), errors.Is(err, archive.ErrDamaged):
		return "the file was changed after it was made; get it as it was filed"
	}
	return ""
}

// solveAgain verifies the design of a record. Nothing is read but the record.
func (a *app) solveAgain(ctx context.Context, old *filed, noBound bool) (*record.Record, error) {
	file, err := a.loadFrom(ctx, printable(old.file.Design().Name), old.file.Design().Data, old.attached)
	if err != nil {
		return nil, err
	}
	d := old.result.Get("design")
	return a.solve(ctx, file, outputBase(old.path), sim.Options{
		Grids: old.grids(), NoBound: noBound,
		// Where the design gives no date it was that of a file, or of the environment.
		Date: d.String("date"), DateFrom: d.String("date_from"),
	})
}

// attached opens a file that the design reads. To the reader of designs a file that
// is not attached is one that does not exist.
func (old *filed) attached(name string) ([]byte, error) {
	text, err := old.file.Input(name)
	if errors.Is(err, archive.ErrMissing) {
		return nil, &os.PathError{Op: "open", Path: name, Err: os.ErrNotExist}
	}
	return text, err
}

// grids is the number of grids that the record was made with.
func (old *filed) grids() int {
	for _, c := range old.result.Get("cases").Nodes {
		if len(c.Get("convergence", "grids").Items()) == 1 {
			return 1
		}
	}
	return sim.DefaultGrids
}

// solve verifies a design with a bar of progress.
func (a *app) solve(ctx context.Context, f *design.File, label string, opt sim.Options) (*record.Record, error) {
	bar := startBar(a.stderr, label)
	defer bar.stop()
	opt.Progress, opt.Version = bar.progress(), version()
	r, err := await(ctx, func() (*record.Record, error) { return a.verify(ctx, f, opt) })
	if err != nil {
		return nil, verifyError(f.Name, err)
	}
	return r, nil
}

// resultOf is the result of a record as its JSON form has it, digit by digit.
func resultOf(r *record.Record) (*result.Node, error) {
	text, err := data.JSON(r)
	if err != nil {
		return nil, fileError(err.Error(), "")
	}
	n, err := result.Read(text)
	if err != nil {
		return nil, fileError("the new result: "+err.Error(), "")
	}
	return n, nil
}
