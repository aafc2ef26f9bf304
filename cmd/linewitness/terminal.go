package main

import (
	"io"
	"os"
	"time"

	"github.com/vbauerster/mpb/v8"
	"github.com/vbauerster/mpb/v8/decor"
	"golang.org/x/term"
)

// isTerminal reports whether somebody watches w. A dumb terminal cannot
// rewrite a line and counts as a file.
func isTerminal(w io.Writer) bool {
	f, ok := w.(*os.File)
	return ok && term.IsTerminal(int(f.Fd())) && os.Getenv("TERM") != "dumb"
}

// colourful reports whether w takes colour: a terminal whose owner did not
// set NO_COLOR to anything.
func colourful(w io.Writer) bool {
	return isTerminal(w) && os.Getenv("NO_COLOR") == ""
}

// A bar shows how far the work on one design is, with the time left. It is
// one line on a terminal, gone when it is stopped; elsewhere it is nothing.
type bar struct {
	pool *mpb.Progress
	bar  *mpb.Bar
}

const (
	barSteps   = 1000                   // the bar's total: a tenth of a per cent a step
	barWidth   = 80                     // columns at most
	barRefresh = 100 * time.Millisecond // ten times a second
)

// startBar shows a bar on w; the nil bar does nothing.
func startBar(w io.Writer, label string) *bar {
	if !isTerminal(w) {
		return nil
	}
	pool := mpb.New(mpb.WithOutput(w), mpb.WithWidth(barWidth), mpb.WithRefreshRate(barRefresh))
	return &bar{pool, pool.AddBar(barSteps,
		mpb.BarRemoveOnComplete(),
		mpb.PrependDecorators(decor.Name(label)),
		mpb.AppendDecorators(
			decor.Percentage(decor.WCSyncSpace),
			decor.Name(" "),
			decor.AverageETA(decor.ET_STYLE_GO),
			decor.Name(" left"),
		),
	)}
}

// progress is the callback for the solver, nil without a bar.
func (b *bar) progress() func(float64) {
	if b == nil {
		return nil
	}
	// The last step is left to stop: a complete bar is removed, and the work
	// on the record comes after the solver's.
	return func(fraction float64) { b.bar.SetCurrent(int64(fraction * (barSteps - 1))) }
}

// stop removes the bar. What is written to the terminal after it stands where
// the bar was.
func (b *bar) stop() {
	if b == nil {
		return
	}
	b.bar.Abort(true)
	b.pool.Wait()
}
