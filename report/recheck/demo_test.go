package recheck

import (
	"context"
	"os"
	"path/filepath"
	"testing"

	"linewitness/report/data"
	"linewitness/report/result"
	"linewitness/sim"
	"linewitness/sim/design"
)

const designs = "../../testdata/designs/"

// solved is the result of a demo design.
func solved(t *testing.T, name string) *result.Node {
	t.Helper()
	source, err := os.ReadFile(designs + name)
	if err != nil {
		t.Fatal(err)
	}
	f, err := design.LoadWith(name, source, func(path string) ([]byte, error) {
		return os.ReadFile(filepath.Join(designs, path))
	})
	if err != nil {
		t.Fatal(err)
	}
	r, err := sim.Verify(context.Background(), f, sim.Options{Version: "test", Grids: 1})
	if err != nil {
		t.Fatal(err)
	}
	text, err := data.JSON(r)
	if err != nil {
		t.Fatal(err)
	}
	n, err := result.Read(text)
	if err != nil {
		t.Fatal(err)
	}
	return n
}

func TestDemosHaveRules(t *testing.T) {
	for _, name := range []string{"hilltop-fm-feeder.yaml", "reference-tree.yaml", "receiving-site.yaml"} {
		n := solved(t, name)
		out := Compare(n, n)
		if len(out.Unruled) > 0 {
			t.Errorf("%s: no rule for %q", name, out.Unruled)
		}
		if out.Status() != Same || len(out.Said) > 0 || out.Largest != nil {
			t.Errorf("%s: %v, %+v", name, out.Status(), out)
		}
		t.Logf("%s: %+v %+v", name, out.Numbers, out.Texts)
	}
}
