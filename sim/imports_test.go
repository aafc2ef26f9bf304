package sim

import (
	"os/exec"
	"strings"
	"testing"
)

// TestImports keeps the house in order: what a package must not come to
// depend on, directly or through others.
func TestImports(t *testing.T) {
	const module = "linewitness/"
	for pkg, never := range map[string][]string{
		"fdtd":           {"phasor", "sim/design", "report"},
		"phasor":         {"fdtd", "sim/design", "report"},
		"sim/network":    {"fdtd", "phasor", "sim/design", "report"},
		"sim/line":       {"fdtd", "phasor", "sim/network", "sim/design", "report"},
		"sim/record":     {"fdtd", "phasor", "sim/network", "sim/design", "sim/line"},
		"sim/gci":        {"fdtd", "phasor", "sim/network", "sim/design", "sim/line", "report"},
		"sim/fsv":        {"fdtd", "phasor", "sim/network", "sim/design", "sim/line", "report"},
		"sim/slip":       {"fdtd", "report"},
		"sim/agree":      {"fdtd", "phasor", "sim/design", "report"},
		"sim/design":     {"fdtd", "phasor", "report"},
		"report":         {"fdtd", "phasor", "sim/design", "sim/network"},
		"report/data":    {"fdtd", "phasor", "sim/design", "sim/network"},
		"report/result":  {"fdtd", "phasor", "sim/design", "sim/network"},
		"report/recheck": {"fdtd", "phasor", "sim/design", "sim/network"},
		"report/effect":  {"fdtd", "phasor", "sim/design", "sim/network"},
		"sim/change":     {"fdtd", "phasor", "sim/network", "report"},
		"sim":            {"report"},
	} {
		out, err := exec.Command("go", "list", "-deps", module+pkg).Output()
		if err != nil {
			t.Fatalf("go list %s: %v", pkg, err)
		}
		deps := strings.Fields(string(out))
		for _, d := range deps {
			for _, n := range never {
				if d == module+n || strings.HasPrefix(d, module+n+"/") {
					t.Errorf("%s depends on %s", pkg, d)
				}
			}
			if d == "linewitness/sim" && strings.HasPrefix(pkg, "report") {
				t.Errorf("%s depends on package sim, and so on the solvers", pkg)
			}
		}
	}
}
