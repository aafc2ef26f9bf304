package reporttest

import "linewitness/sim/record"

// SixCases is the feeder in two cases more: its flange open, and its stub cut too
// long.
func SixCases() *record.Record { return sixCases() }

var sixCases = made(newSixCases)

func newSixCases() *record.Record {
	r := Feeder()
	opt := Options{Error: 2e-4, Loop: 0.35}
	open, long := FeederNetwork(), FeederNetwork()
	open.Loads[0] = Load{Name: "antenna", At: "flange", R: 1e4}
	long.Sections[2].Length = 0.52
	for _, c := range []record.Case{open.Case("flange_open", opt), long.Case("stub_long", opt)} {
		judgeFeeder(&c)
		c.Convergence = study(&c, opt)
		r.Cases = append(r.Cases, c)
	}
	finish(r)
	return r
}
