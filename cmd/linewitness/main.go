// Command linewitness solves a transmission-line network twice, by two methods
// that share no code, compares the two, judges the design against its
// requirements and writes a record that a design review can file.
//
//	linewitness verify DESIGN...   solve, compare, judge; write DESIGN.pdf and DESIGN.json
//	linewitness recheck RECORD     solve the design in a record again and compare
//	linewitness compare OLD NEW    what changed in a design, and what that did
//	linewitness plan DESIGN        the grid and the predicted cost; solves nothing
//	linewitness starter [FILE]     a commented design file to begin from
//	linewitness cables             the cable table with its pedigree
//	linewitness schema             the JSON Schema of the design file
//	linewitness version            the version of this program
//	linewitness completion SHELL   a completion script
//
// The result is on standard output, diagnostics and progress are on standard
// error, and the exit status tells them apart: see the status constants.
package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"
)

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	status := run(ctx, os.Args[1:], os.Stdin, os.Stdout, os.Stderr)
	stop()
	os.Exit(status)
}
