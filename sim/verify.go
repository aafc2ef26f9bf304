package sim

import (
	"context"
	"errors"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// Options steer Verify. The zero value is the default.
type Options struct {
	// Progress, if not nil, is told the fraction of the work done, from 0 to
	// 1, not more often than about ten times a second and never from two
	// goroutines at once.
	Progress func(fraction float64)
	// NoBound lets a run pass the bounds MaxUpdates and MaxBytes.
	NoBound bool
	// Version is the version of the program, for the record.
	Version string
}

// Verify solves, compares and judges every case of a design.
//
// A run that the bounds refuse gives a *BoundError. An error from ctx is
// returned as it is, within 100 ms of its cancellation.
func Verify(ctx context.Context, f *design.File, opt Options) (*record.Record, error) {
	return nil, errors.New("sim: not built yet")
}
