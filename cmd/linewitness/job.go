package main

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"linewitness/report"
	"linewitness/sim/design"
)

// A job is one design on its way through verify.
type job struct {
	path, stem string // of the design file; of its output files, without suffix
	file       *design.File
}

// jobs names the output files of the designs and refuses names that would
// make one file overwrite another, or a design.
func (opt *verifyOptions) jobs(paths []string) ([]job, error) {
	jobs := make([]job, len(paths))
	seen := map[string]string{}
	for i, path := range paths {
		base := outputBase(path)
		// Some file systems take Feeder.pdf and feeder.pdf for the same file.
		key := strings.ToLower(base)
		if other, ok := seen[key]; ok {
			return nil, usageError(
				fmt.Sprintf("verify: %s and %s would both write %s", displayName(other), displayName(path), base+suffixes[formatPDF][0]),
				"run them one after the other with different directories: -o DIR")
		}
		seen[key] = path
		jobs[i] = job{path: path, stem: filepath.Join(opt.dir, base)}
	}
	for _, j := range jobs {
		if err := opt.spare(j, paths); err != nil {
			return nil, err
		}
	}
	return jobs, nil
}

// spare refuses to write the files of a job over a design file.
func (opt *verifyOptions) spare(j job, designs []string) error {
	for _, format := range opt.formats.values {
		for _, suffix := range suffixes[format] {
			out, err := os.Stat(j.stem + suffix)
			if err != nil {
				continue
			}
			for _, d := range designs {
				if in, err := os.Stat(d); err == nil && os.SameFile(in, out) {
					return usageError(fmt.Sprintf("verify: %s would overwrite the design file %s", j.stem+suffix, d),
						"write the files to another directory with -o DIR, or rename the design")
				}
			}
		}
	}
	return nil
}

// printable refuses a design whose first page could not be printed, before the
// work starts. Of the other texts the writer of the PDF says so.
func (opt *verifyOptions) printable(j job) error {
	if !opt.formats.has(formatPDF) {
		return nil
	}
	r := j.file.Nominal.Record
	err := report.Printable(filepath.Base(j.file.Name), r.Title, r.Number, r.Revision, r.Purpose, r.PreparedBy, r.CheckedBy, r.ApprovedBy)
	if err != nil {
		return documentError(j.file.Name+": ", err)
	}
	return nil
}

// makeDir makes the output directory before the work starts, so that a wrong
// one is known at once.
func (opt *verifyOptions) makeDir(jobs []job) error {
	if len(opt.formats.values) == 0 {
		return nil
	}
	for _, j := range jobs {
		if j.file != nil {
			if err := os.MkdirAll(opt.dir, 0o777); err != nil {
				return fileError(err.Error(), "")
			}
			return nil
		}
	}
	return nil
}
