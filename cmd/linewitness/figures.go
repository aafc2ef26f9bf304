package main

import (
	"context"
	"fmt"
	"os"
	"path/filepath"

	"linewitness/report"
	"linewitness/sim/record"
)

// figureDir is the directory of the figures of a job: that of the option, and in
// it, if there are several designs, one for each.
func (opt *verifyOptions) figureDir(j job) string {
	if opt.several {
		return filepath.Join(opt.figures, outputBase(j.path))
	}
	return opt.figures
}

// drawn returns the files of the figures of a record; none if they are not asked
// for.
func (a *app) drawn(ctx context.Context, r *record.Record, j job, opt *verifyOptions) ([]product, error) {
	if opt.figures == "" {
		return nil, nil
	}
	return await(ctx, func() ([]product, error) {
		var out []product
		err := report.WriteFigures(r, report.Options{Paper: opt.paper.value}, func(f report.File) error {
			out = append(out, product{filepath.Join(opt.figureDir(j), f.Name), f.Data})
			return ctx.Err()
		})
		return out, err
	})
}

// makeFigureDirs makes the directories of the figures before the work starts, so
// that a wrong one is known at once.
func (opt *verifyOptions) makeFigureDirs(jobs []job) error {
	if opt.figures == "" {
		return nil
	}
	for _, j := range jobs {
		if j.file == nil {
			continue
		}
		if err := os.MkdirAll(opt.figureDir(j), 0o777); err != nil {
			return fileError(err.Error(), "")
		}
	}
	return nil
}

// spareDesigns refuses to write a figure over a design file.
func spareDesigns(files []product, designs []string) error {
	for _, f := range files {
		out, err := os.Stat(f.path)
		if err != nil {
			continue
		}
		for _, d := range designs {
			if in, err := os.Stat(d); err == nil && os.SameFile(in, out) {
				return usageError(fmt.Sprintf("verify: the figure %s would overwrite the design file %s", f.path, d),
					"draw the figures into another directory with --figures DIR")
			}
		}
	}
	return nil
}

// wroteFigures says how many files were written and where; first if nothing was
// said to be written before.
func (a *app) wroteFigures(files []product, first, asJSON bool) {
	if asJSON || len(files) == 0 {
		return
	}
	if first {
		fmt.Fprintln(a.stdout)
	}
	fmt.Fprintf(a.stdout, "wrote %d figures as SVG and PNG, and captions.txt, to %s\n", (len(files)-1)/2, filepath.Dir(files[0].path))
}
