package recheck

import (
	"context"
	"fmt"
	"os"
	"path/filepath"
	"sync"
	"testing"

	"linewitness/report/data"
	"linewitness/report/result"
	"linewitness/sim"
	"linewitness/sim/design"
)

const designs = "../../testdata/designs/"

// coarse is added to the demos: the same result key by key, on a grid that takes
// a twentieth of the time.
const coarse = "\ngrid: {cells_per_wavelength: 12, agreement: 10 %, settle_tolerance: 1e-3}\n"

// demos are the results of the demo designs on a coarse grid, and of one of them
// the study of three.
var demos = sync.OnceValues(func() (map[string]*result.Node, error) {
	all := map[string]*result.Node{}
	for name, grids := range map[string]int{"hilltop-fm-feeder.yaml": 1, "reference-tree.yaml": 1, "receiving-site.yaml": 3} {
		n, err := solved(name, grids)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", name, err)
		}
		all[name] = n
	}
	return all, nil
})

func solved(name string, grids int) (*result.Node, error) {
	source, err := os.ReadFile(designs + name)
	if err != nil {
		return nil, err
	}
	f, err := design.LoadWith(name, append(source, coarse...), func(path string) ([]byte, error) {
		return os.ReadFile(filepath.Join(designs, path))
	})
	if err != nil {
		return nil, err
	}
	r, err := sim.Verify(context.Background(), f, sim.Options{Version: "test", Grids: grids})
	if err != nil {
		return nil, err
	}
	text, err := data.JSON(r)
	if err != nil {
		return nil, err
	}
	return result.Read(text)
}

func eachDemo(t *testing.T, test func(t *testing.T, n *result.Node)) {
	t.Helper()
	all, err := demos()
	if err != nil {
		t.Fatal(err)
	}
	for name, n := range all {
		t.Run(name, func(t *testing.T) { test(t, n) })
	}
}

// Every number, text and flag of the demos has a rule, and a result is the same
// as itself.
func TestRulesCoverDemos(t *testing.T) {
	eachDemo(t, func(t *testing.T, n *result.Node) {
		out := Compare(n, n)
		if len(out.Unruled) > 0 {
			t.Errorf("no rule for %q", out.Unruled)
		}
		if out.Status() != Same || len(out.Said) > 0 || out.Largest != nil {
			t.Errorf("%v: %+v", out.Status(), out)
		}
		if out.Numbers.Total() < 2000 || out.Texts.Total() < 500 {
			t.Errorf("%d numbers and %d texts compared: too few for a demo", out.Numbers.Total(), out.Texts.Total())
		}
	})
}
