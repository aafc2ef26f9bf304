package sim

import (
	"context"
	"path/filepath"
	"runtime"
	"sync"
	"time"

	"golang.org/x/sync/errgroup"

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
	// Grids is the number of grids of the convergence study: 0 for DefaultGrids,
	// or 1 to leave it out.
	Grids int
	// Version is the version of the program, for the record.
	Version string
	// Date is the date of the record if its design file gives none, and DateFrom
	// where it is from, as record.Design.DateFrom has it.
	Date, DateFrom string
}

// Verify solves, compares and judges every case of a design.
//
// A run that the bounds refuse gives a *BoundError. An error from ctx is
// returned as it is, within 100 ms of its cancellation.
func Verify(ctx context.Context, f *design.File, opt Options) (*record.Record, error) {
	grids := opt.Grids
	if grids == 0 {
		grids = DefaultGrids
	}
	all, err := planAll(ctx, f, grids)
	if err != nil {
		return nil, err
	}
	if !opt.NoBound {
		for _, p := range all {
			if err := p.plan.Bound(); err != nil {
				return nil, err
			}
		}
	}
	cases, err := solveAll(ctx, all, opt.Progress)
	if err != nil {
		if cause := ctx.Err(); cause != nil {
			err = cause
		}
		return nil, err
	}
	out := newRecord(ctx, f, cases, opt)
	return out, ctx.Err()
}

// solveAll solves the cases side by side, as many as there are processors.
func solveAll(ctx context.Context, all []*planned, progress func(float64)) ([]*solved, error) {
	total := 0.0
	for _, p := range all {
		total += p.plan.Grid.Updates
	}
	m := &meter{total: total, tell: progress}
	out := make([]*solved, len(all))
	g, ctx := errgroup.WithContext(ctx)
	g.SetLimit(runtime.GOMAXPROCS(0))
	for i, p := range all {
		g.Go(func() error {
			var err error
			out[i], err = p.solve(ctx, m.add)
			return err
		})
	}
	if err := g.Wait(); err != nil {
		return nil, err
	}
	m.finish()
	return out, nil
}

// newRecord judges the solved cases and writes the record. If ctx ends it is
// cut short and of no use.
func newRecord(ctx context.Context, f *design.File, cases []*solved, opt Options) *record.Record {
	byName := map[string]*solved{}
	for _, c := range cases {
		byName[c.name] = c
	}
	r := f.Nominal.Record
	date, from := dated(r, opt)
	out := &record.Record{
		Tool: record.Tool{Version: opt.Version, Go: runtime.Version() + " " + runtime.GOOS + "/" + runtime.GOARCH},
		Design: record.Design{
			Title: r.Title, Number: r.Number, Revision: r.Revision, Purpose: r.Purpose,
			PreparedBy: r.PreparedBy, CheckedBy: r.CheckedBy, ApprovedBy: r.ApprovedBy,
			Notes: r.Notes, Date: date, DateFrom: from, History: history(r),
			File: filepath.Base(f.Name), SHA256: f.SHA256, Source: f.Source,
			FSVChoices: choices(),
			Convention: conventionName(f.Nominal.Convention),
			Agreement:  f.Nominal.Grid.Agreement,
			Tolerance:  f.Nominal.Grid.SettleTolerance, MaxPeriods: f.Nominal.Grid.MaxPeriods,
		},
		Verdict:     record.Verified,
		Attachments: attached(f),
	}
	for _, c := range cases {
		if ctx.Err() != nil {
			return nil
		}
		reqs, studies := judge(ctx, c, byName)
		rc := c.caseRecord(ctx, reqs, studies)
		if rc.Verdict.Rank() > out.Verdict.Rank() {
			out.Verdict = rc.Verdict
		}
		out.Cases = append(out.Cases, rc)
	}
	var ids []string
	for _, r := range f.Nominal.Requirements {
		ids = append(ids, r.ID)
	}
	out.Matrix = matrix(out.Cases, ids)
	return out
}

// dated is the date of a record and where it is from: the design file, or else
// what the caller knows.
func dated(r design.Record, opt Options) (date, from string) {
	if r.Date == "" {
		return opt.Date, opt.DateFrom
	}
	return r.Date, "record"
}

// history is the revision history of a record, oldest first.
func history(r design.Record) []record.Revision {
	var out []record.Revision
	for _, v := range r.History {
		out = append(out, record.Revision(v))
	}
	return out
}

func conventionName(c design.Convention) string {
	if c == design.Physics {
		return "physics"
	}
	return "engineering"
}

// A meter adds up the work of several goroutines and tells of it.
type meter struct {
	mu    sync.Mutex
	total float64
	done  float64
	last  time.Time
	tell  func(float64)
}

// tellEvery is the least time between two reports of progress.
const tellEvery = 100 * time.Millisecond

func (m *meter) add(updates float64) {
	m.mu.Lock()
	defer m.mu.Unlock()
	m.done += updates
	if m.tell == nil || time.Since(m.last) < tellEvery {
		return
	}
	m.last = time.Now()
	m.tell(min(0.99, m.done/m.total))
}

func (m *meter) finish() {
	if m.tell != nil {
		m.tell(1)
	}
}
