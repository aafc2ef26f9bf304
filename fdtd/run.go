package fdtd

import "context"

// A run steps the lanes of a model together.
type run struct {
	ctx     context.Context
	m       *model
	set     Settings
	lanes   []*lane
	drives  []*drive
	n       int // steps done
	updates float64
}

func (m *model) newRun(ctx context.Context, set Settings, drives ...*drive) *run {
	r := &run{ctx: ctx, m: m, set: set, drives: drives}
	for range drives {
		r.lanes = append(r.lanes, m.newLane())
	}
	return r
}

// checkEvery is how many cell updates may pass between two looks at the
// context: about 10 ms.
const checkEvery = 4e6

// work is about how many cell updates a step of one lane is worth: a relaxed
// cell counts several times, and so does a junction or a branch with what
// watches it.
func (m *model) work() float64 {
	w := 60 * float64(len(m.net.Junctions)+len(m.junction.branches))
	for k, n := range m.grid.Cells {
		w += float64(n)
		for _, r := range []*relaxation{m.series[k], m.shunt[k]} {
			if r != nil {
				w += 4 * float64(n)
			}
		}
	}
	return w
}

// period takes all lanes over one period, calling after each step what each
// gives, with the step's number in the period from 1 to N.
func (r *run) period(each func(n int)) error {
	steps := r.m.grid.StepsPerPeriod
	work := r.m.work() * float64(len(r.lanes))
	since := checkEvery
	for n := 1; n <= steps; n++ {
		if since += work; since >= checkEvery {
			since = 0
			if err := r.ctx.Err(); err != nil {
				return err
			}
		}
		r.n++
		for i, l := range r.lanes {
			l.step(r.drives[i].at(r.n))
		}
		if each != nil {
			each(n)
		}
	}
	u := r.m.grid.Updates(1) * float64(len(r.lanes))
	r.updates += u
	if r.set.Progress != nil {
		r.set.Progress(u)
	}
	return nil
}
