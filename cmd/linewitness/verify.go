package main

import (
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"linewitness/report"
	"linewitness/report/data"
	"linewitness/sim"
	"linewitness/sim/record"
)

const verifyHelp = `linewitness verify solves every case of a design by two methods, compares them, judges
the requirements, prints a short table and writes the record.

  linewitness verify DESIGN...

  -o, --output DIR       directory of the files, made if missing    (default .)
      --formats LIST     pdf, json, csv with commas, or none         (default pdf,json)
      --figures DIR      draw each figure into DIR as SVG and PNG, for slides
      --paper SIZE       a4 or letter                                (default a4)
      --full             every case in the PDF with all its figures and tables
      --summary          one page: verdict, worst margins, cases; the attachments stay
      --grids N          grids of the convergence study, 3 or 1      (default 3)
      --json             print the JSON on standard output instead of the table
      --no-bound         let a run pass the bounds on work and memory
  -h, --help             this text

A DESIGN of - is standard input. The files are named after the design file:
feeder.yaml gives feeder.pdf, feeder.json, feeder.waveforms.csv, feeder.envelopes.csv
and feeder.error.csv, each written whole or not at all. With --json and several
designs, one JSON document follows the other.

The figures are those of the PDF, named after case and subject, as in
nominal-envelopes-main.svg; captions.txt has the finding of each. With several
designs each has its own directory in DIR. Text in SVG is text: without the
Liberation faces, which the PNG files use, it is shown in Arial or the like.

For the exit status see "linewitness --help".

Example:
  linewitness verify -o records --formats pdf,csv feeder.yaml
`

// verifyOptions are the options of the verb.
type verifyOptions struct {
	dir     string
	figures string // directory of the figures; empty for none
	several bool   // designs
	formats choices
	paper   choice
	full    bool
	summary bool
	grids   *choice
	json    bool
	noBound bool
}

func (a *app) verifyCommand() *cobra.Command {
	opt := &verifyOptions{
		formats: choices{[]string{formatPDF, formatJSON}, []string{formatPDF, formatJSON, formatCSV}},
		paper:   choice{"a4", []string{"a4", "letter"}},
		grids:   newGrids(),
	}
	cmd := &cobra.Command{
		Use:               "verify DESIGN...",
		Short:             "solve, compare, judge, write the record",
		Long:              verifyHelp,
		Args:              atLeastOne("a design file"),
		ValidArgsFunction: designFiles,
		RunE: func(cmd *cobra.Command, args []string) error {
			return a.verifyAll(cmd.Context(), args, opt)
		},
	}
	flags := cmd.Flags()
	flags.StringVarP(&opt.dir, "output", "o", ".", "directory of the files")
	flags.Var(&opt.formats, "formats", "formats of the record")
	flags.StringVar(&opt.figures, "figures", "", "draw each figure into a directory")
	flags.Var(&opt.paper, "paper", "paper size of the PDF")
	addGrids(cmd, opt.grids)
	flags.BoolVar(&opt.full, "full", false, "every case with all its figures")
	flags.BoolVar(&opt.summary, "summary", false, "the PDF as one page")
	flags.BoolVar(&opt.json, "json", false, "print the JSON instead of the table")
	flags.BoolVar(&opt.noBound, "no-bound", false, "let a run pass the bounds")
	// The errors are of names that are no options; the tests complete each.
	_ = cmd.RegisterFlagCompletionFunc("formats", oneOf(formatPDF, formatJSON, formatCSV, "pdf,json,csv", noChoice))
	_ = cmd.RegisterFlagCompletionFunc("paper", oneOf(opt.paper.of...))
	_ = cmd.MarkFlagDirname("output")
	_ = cmd.MarkFlagDirname("figures")
	return cmd
}

// verifyAll goes through the designs in order. Only an interruption or a
// wrong command line stops it; all else counts in the status.
func (a *app) verifyAll(ctx context.Context, paths []string, opt *verifyOptions) error {
	if opt.full && opt.summary {
		return usageError("verify: --full and --summary exclude each other", "without either the PDF has the nominal case in full and of the others what differs")
	}
	jobs, err := opt.jobs(paths)
	if err != nil {
		return err
	}
	opt.several = len(jobs) > 1
	status := statusVerified
	for i := range jobs {
		jobs[i].file, err = a.load(ctx, jobs[i].path)
		if errors.Is(err, context.Canceled) {
			return err
		}
		status = max(status, a.explain(err))
	}
	if err := errors.Join(opt.makeDir(jobs), opt.makeFigureDirs(jobs)); err != nil {
		return err
	}
	first := true
	for _, j := range jobs {
		if j.file == nil {
			continue
		}
		if !first {
			fmt.Fprintln(a.stdout)
		}
		first = false
		s, err := a.verifyOne(ctx, j, paths, opt)
		if errors.Is(err, context.Canceled) {
			return err
		}
		status = max(status, s, a.explain(err))
	}
	return errStatus(status)
}

// verifyOne verifies one design and returns the status of its verdict.
func (a *app) verifyOne(ctx context.Context, j job, designs []string, opt *verifyOptions) (int, error) {
	if err := opt.printable(j); err != nil {
		return statusVerified, err
	}
	how := sim.Options{NoBound: opt.noBound, Grids: gridCount(opt.grids), Version: version()}
	if j.file.Nominal.Record.Date == "" {
		var err error
		if how.Date, how.DateFrom, err = dateOf(j.path); err != nil {
			return statusVerified, err
		}
	}
	bar := startBar(a.stderr, outputBase(j.path))
	defer bar.stop()
	how.Progress = bar.progress()
	r, err := await(ctx, func() (*record.Record, error) { return a.verify(ctx, j.file, how) })
	if err != nil {
		return statusVerified, verifyError(j.file.Name, err)
	}
	files, err := a.products(ctx, r, j.stem, &opt.formats, report.Options{Paper: opt.paper.value, Full: opt.full, Summary: opt.summary})
	var figures []product
	if err == nil {
		figures, err = a.drawn(ctx, r, j, opt)
	}
	if errors.Is(err, context.Canceled) {
		return statusVerified, err
	}
	if err != nil {
		return statusVerified, documentError(j.file.Name+": ", err)
	}
	bar.stop()
	status := statusOf(r.Verdict)
	if err := a.tell(r, opt.json); err != nil {
		return status, err
	}
	if err := spareDesigns(figures, designs); err != nil {
		return status, err
	}
	if err := writeProducts(ctx, append(files, figures...)); err != nil {
		return status, err
	}
	a.wrote(files, opt.json)
	a.wroteFigures(figures, len(files) == 0, opt.json)
	return status, nil
}

// verifyError says which design could not be verified.
func verifyError(name string, err error) error {
	var bound *sim.BoundError
	switch {
	case errors.Is(err, context.Canceled):
		return err
	case errors.As(err, &bound):
		return usageError(name+": "+err.Error(), `"linewitness plan" shows what it takes; --grids 1 takes less; --no-bound runs it all the same`)
	}
	return usageError(name+": "+err.Error(), "")
}

// documentError says why a document could not be made: as a rule the design file
// has a text that cannot be printed.
func documentError(where string, err error) error {
	var sign *report.SignError
	if errors.As(err, &sign) {
		return usageError(fmt.Sprintf("%sthe fonts of the PDF have no sign for %q (%U), in %q", where, sign.Sign, sign.Sign, sign.Text),
			"write it with Latin, Greek or Cyrillic letters, in the design file or in its name")
	}
	return fileError(where+err.Error(), "")
}

// tell prints the result.
func (a *app) tell(r *record.Record, asJSON bool) error {
	if !asJSON {
		writeOutcome(a.stdout, r)
		return nil
	}
	text, err := data.JSON(r)
	if err != nil {
		return fileError(err.Error(), "")
	}
	a.stdout.Write(text)
	return nil
}
