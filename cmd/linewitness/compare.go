package main

import (
	"bytes"
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"linewitness/report"
	"linewitness/report/data"
	"linewitness/report/effect"
	"linewitness/sim"
	"linewitness/sim/change"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

const compareHelp = `linewitness compare says what changed from one version of a design to another, term by
term, and what that did to each requirement, rating, claim and key figure.

  linewitness compare OLD NEW

  -o, --output FILE.pdf  write the comparison as a page for the revision history
      --paper SIZE       a4 or letter                                (default a4)
      --grids N          grids of the convergence study, 3 or 1      (default 3)
      --json             print the comparison as JSON instead of the table
      --no-bound         let a run pass the bounds on work and memory
  -h, --help             this text

OLD and NEW are each a design file, which is verified first, a record (.pdf) or a
result (.json) that verify wrote; - is standard input. Of a result without its design
only what it repeats of the design can be compared, and the output says so.

A requirement, a rating or a claim is better or worse by its verdict, or where that is
the same by its margin; it is as before where the margins differ by no more than their
uncertainties.

The exit status is 0 if no verdict is worse, 1 if one is: of the design, of a case, or
of a requirement, a rating or a claim that both have, such as a requirement that was
met and is not any more. It is 2 for bad usage, a bad design file or a file that is
none of the three, 5 if a file could not be read or written, and 130 if interrupted.

Example:
  linewitness compare feeder-a.pdf feeder.yaml -o changes.pdf
`

// compareOptions are the options of the verb.
type compareOptions struct {
	output  string
	paper   choice
	grids   *choice
	json    bool
	noBound bool
}

func (a *app) compareCommand() *cobra.Command {
	opt := &compareOptions{paper: choice{"a4", []string{"a4", "letter"}}, grids: newGrids()}
	cmd := &cobra.Command{
		Use:               "compare OLD NEW",
		Short:             "what changed in a design, and what that did",
		Long:              compareHelp,
		Args:              exactlyTwo("an old and a new design, result or record"),
		ValidArgsFunction: comparedFiles,
		RunE: func(cmd *cobra.Command, args []string) error {
			return a.compare(cmd.Context(), args, opt)
		},
	}
	flags := cmd.Flags()
	flags.StringVarP(&opt.output, "output", "o", "", "file of the page")
	flags.Var(&opt.paper, "paper", "paper size of the page")
	addGrids(cmd, opt.grids)
	flags.BoolVar(&opt.json, "json", false, "print the JSON instead of the table")
	flags.BoolVar(&opt.noBound, "no-bound", false, "let a run pass the bounds")
	// The errors are of names that are no options; the tests complete each.
	_ = cmd.RegisterFlagCompletionFunc("paper", oneOf(opt.paper.of...))
	_ = cmd.MarkFlagFilename("output", "pdf")
	return cmd
}

// comparedFiles lets a shell complete what can be compared.
func comparedFiles(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
	return []string{"yaml", "yml", "pdf", "json"}, cobra.ShellCompDirectiveFilterFileExt
}

// compare compares two designs and returns whether a verdict is worse as a status.
func (a *app) compare(ctx context.Context, paths []string, opt *compareOptions) error {
	if err := opt.check(paths); err != nil {
		return err
	}
	var sides [2]*side
	for i, path := range paths {
		var err error
		if sides[i], err = a.readSide(ctx, path); err != nil {
			return err
		}
	}
	for _, s := range sides { // both are known to be good before the first is solved
		if err := a.solveSide(ctx, s, sim.Options{Grids: gridCount(opt.grids), NoBound: opt.noBound}); err != nil {
			return err
		}
	}
	c := comparisonOf(sides[0], sides[1])
	if err := a.deliver(ctx, c, opt); err != nil {
		return err
	}
	if c.Worsened {
		return errStatus(statusMissed)
	}
	return nil
}

// check refuses a command line that cannot be meant.
func (opt *compareOptions) check(paths []string) error {
	if paths[0] == standardInput && paths[1] == standardInput {
		return usageError("compare: only one of the two can be standard input", "save one of them to a file")
	}
	if opt.output == "" {
		return nil
	}
	if _, err := os.Stat(filepath.Dir(opt.output)); err != nil {
		return notWritten(opt.output, err) // before the work, not after it
	}
	out, err := os.Stat(opt.output)
	if err != nil {
		return nil
	}
	if out.IsDir() {
		return fileError("write "+opt.output+": is a directory", "name the file in it: -o FILE.pdf")
	}
	for _, path := range paths {
		if in, err := os.Stat(path); err == nil && os.SameFile(in, out) {
			return usageError("compare: "+opt.output+" would overwrite what is to be compared", "choose another name with -o FILE.pdf")
		}
	}
	return nil
}

// comparisonOf compares two sides that have been solved.
func comparisonOf(old, now *side) *record.Comparison {
	c := &record.Comparison{Old: old.side, New: now.side}
	effect.Fill(c, old.result, now.result)
	if old.file == nil || now.file == nil {
		c.Changes, c.Echo = change.Between(echoed(old.result), echoed(now.result)), echoNote(old, now)
		return c
	}
	c.Changes = change.Between(design.Terms(old.file), design.Terms(now.file))
	c.Changes = append(c.Changes, change.Follows(old.file, now.file)...)
	c.Changes = append(c.Changes, change.Files(old.file, now.file)...)
	return c
}

// deliver prints the comparison and writes its page.
func (a *app) deliver(ctx context.Context, c *record.Comparison, opt *compareOptions) error {
	var files []product
	if opt.output != "" {
		page, err := await(ctx, func() ([]byte, error) {
			var b bytes.Buffer
			err := report.WriteComparison(&b, c, report.Options{Paper: opt.paper.value})
			return b.Bytes(), err
		})
		if errors.Is(err, context.Canceled) {
			return err
		}
		if err != nil {
			return documentError("", err)
		}
		files = []product{{opt.output, page}}
	}
	if opt.json {
		text, err := data.Comparison(c)
		if err != nil {
			return fileError(err.Error(), "")
		}
		a.stdout.Write(text)
	} else {
		a.print(func(w io.Writer) { writeComparison(w, c) })
	}
	if err := writeProducts(ctx, files); err != nil {
		return err
	}
	a.wrote(files, opt.json)
	return nil
}
