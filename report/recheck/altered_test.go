package recheck

import (
	"math"
	"math/rand/v2"
	"slices"
	"strconv"
	"strings"
	"testing"

	"linewitness/report/result"
)

// altered is a copy of a document with every plain value changed.
func altered(n *result.Node, change func(n *result.Node)) *result.Node {
	out := *n
	out.Nodes = nil
	for _, inner := range n.Nodes {
		out.Nodes = append(out.Nodes, altered(inner, change))
	}
	if n.Kind == result.Number || n.Kind == result.Text || n.Kind == result.Bool {
		change(&out)
	}
	return &out
}

func setNumber(n *result.Node, v float64) {
	n.Value, n.Text = v, strconv.FormatFloat(v, 'g', 12, 64)
}

// Another rounding of the arithmetic is not a difference: on another processor a
// record must stand. Counts stay as they are.
func TestRoundingIsNoDifference(t *testing.T) {
	const bits = 1e-11 // relative: a digit more than the JSON has
	eachDemo(t, func(t *testing.T, n *result.Node) {
		r := rand.New(rand.NewPCG(5, 7))
		rounded := altered(n, func(n *result.Node) {
			if n.Kind == result.Number && n.Value != math.Trunc(n.Value) {
				setNumber(n, n.Value*(1+bits*(2*r.Float64()-1)))
			}
		})
		out := Compare(rounded, n)
		if out.Status() != Within || out.Numbers.Within < out.Numbers.Total()/2 {
			t.Errorf("%v, numbers %+v, texts %+v, differences %+v", out.Status(), out.Numbers, out.Texts, out.Differences)
		}
	})
}

// lenient are the numbers of which no change is a difference in the demos, and why.
var lenient = map[string]string{
	"cases.*.stress.peak_voltage.phase_deg": "the time of the peak is altered too, and another time has another phase",
	"cases.*.stress.peak_current.phase_deg": "likewise",
	"cases.*.space_time.phase_deg":          "likewise",
}

// Every number that is altered by more than it can be uncertain is found. Of each
// rule at least one is, in one of the demos.
func TestAlteredNumberIsDifferent(t *testing.T) {
	found := map[string]bool{}
	eachDemo(t, func(t *testing.T, n *result.Node) {
		out := Compare(altered(n, func(n *result.Node) {
			if n.Kind == result.Number {
				setNumber(n, 5+n.Value*3)
			}
		}), n)
		different := map[string]bool{}
		for _, d := range out.Differences {
			different[d.Path] = true
		}
		leaves(&place{}, n, func(at *place, n *result.Node) {
			if isNumber(n) && n.Kind != result.Null {
				path := generic(at.path)
				found[path] = found[path] || different[at.label]
			}
		})
	})
	for path, yes := range found {
		if _, ok := lenient[path]; yes == ok {
			t.Errorf("%s: found different %t, lenient %t", path, yes, ok)
		}
	}
}

// Every text and every flag that is altered is found, but for the names among
// equals that rounding chooses, and the version.
func TestAlteredTextIsDifferent(t *testing.T) {
	free := []string{
		"tool.version", "tool.go",
		"cases.*.requirements.[].method", "cases.*.agreement.worst.section", "cases.*.agreement.worst.quantity",
		"matrix.rows.[].cells.[].worst",
	}
	eachDemo(t, func(t *testing.T, n *result.Node) {
		out := Compare(altered(n, func(n *result.Node) {
			switch {
			case n.Kind == result.Bool:
				n.Text = map[string]string{"true": "false", "false": "true"}[n.Text]
			case n.Kind == result.Text:
				n.Text += "x"
			}
		}), n)
		var different []string
		for _, d := range out.Differences {
			different = append(different, strings.TrimSuffix(d.Path, "x]"))
		}
		leaves(&place{}, n, func(at *place, n *result.Node) {
			if isNumber(n) || slices.Contains(free, generic(at.path)) {
				return
			}
			// An entry whose name is altered is lost as a whole.
			if !slices.ContainsFunc(different, func(d string) bool { return lostWith(at.label, d) }) {
				t.Errorf("%s: an altered text was not found", at.label)
			}
		})
	})
}

// lostWith reports whether a value is at a path, or in an entry of a list that
// another entry in the same list was lost with.
func lostWith(label, path string) bool {
	list, _, in := strings.Cut(path, "[")
	return label == path || in && strings.HasPrefix(label, list+"[") && !strings.Contains(path[len(list):], "].")
}

// leaves calls f for every plain value and every complex number.
func leaves(at *place, n *result.Node, f func(at *place, n *result.Node)) {
	switch {
	case n.Kind == result.List:
		name := entryNames(at, n, n)
		for i, x := range n.Nodes {
			leaves(at.entry(i, name(i, x), n, n), x, f)
		}
	case n.Kind == result.Object && !n.IsComplex():
		for i, key := range n.Keys {
			leaves(at.child(key, n, n), n.Nodes[i], f)
		}
	default:
		f(at, n)
	}
}

// generic is a path with * for the names of the design.
func generic(path []string) string {
	out := slices.Clone(path)
	for _, p := range patterns {
		if p.fits(path) {
			for i, part := range p.parts {
				if part == nil {
					out[i] = "*"
				}
			}
			break
		}
	}
	return strings.Join(out, ".")
}
