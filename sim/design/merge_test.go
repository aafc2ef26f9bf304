package design

import (
	"fmt"
	"strings"
	"testing"
)

// TestMergePatch runs the test cases of RFC 7396, appendix A.
func TestMergePatch(t *testing.T) {
	for _, tt := range []struct{ original, patch, want string }{
		{`{"a":"b"}`, `{"a":"c"}`, `{"a":"c"}`},
		{`{"a":"b"}`, `{"b":"c"}`, `{"a":"b","b":"c"}`},
		{`{"a":"b"}`, `{"a":null}`, `{}`},
		{`{"a":"b","b":"c"}`, `{"a":null}`, `{"b":"c"}`},
		{`{"a":["b"]}`, `{"a":"c"}`, `{"a":"c"}`},
		{`{"a":"c"}`, `{"a":["b"]}`, `{"a":["b"]}`},
		{`{"a":{"b":"c"}}`, `{"a":{"b":"d","c":null}}`, `{"a":{"b":"d"}}`},
		{`{"a":[{"b":"c"}]}`, `{"a":[1]}`, `{"a":["1"]}`},
		{`["a","b"]`, `["c","d"]`, `["c","d"]`},
		{`{"a":"b"}`, `["c"]`, `["c"]`},
		{`{"a":"foo"}`, `null`, `null`},
		{`{"a":"foo"}`, `"bar"`, `"bar"`},
		{`{"e":null}`, `{"a":1}`, `{"e":null,"a":"1"}`},
		{`[1,2]`, `{"a":"b","c":null}`, `{"a":"b"}`},
		{`{}`, `{"a":{"bb":{"ccc":null}}}`, `{"a":{"bb":{}}}`},
	} {
		p := &problems{}
		both := parse(fmt.Appendf(nil, `{"original": %s, "patch": %s}`, tt.original, tt.patch), p)
		original, patch := both.get("original"), both.get("patch")
		if len(p.list) > 0 {
			t.Fatalf("%s, %s: %v", tt.original, tt.patch, p.list)
		}
		before := written(original)
		if got := written(merge(original, patch, nil, "")); got != tt.want {
			t.Errorf("%s with %s gives %s, want %s", tt.original, tt.patch, got, tt.want)
		}
		if after := written(original); after != before {
			t.Errorf("merging changed the original: %s to %s", before, after)
		}
	}
}

// written is a node as JSON in which every value is a text.
func written(n *node) string {
	var parts []string
	switch n.kind {
	case null:
		return "null"
	case mapping:
		for _, p := range n.pairs {
			parts = append(parts, `"`+p.key.text+`":`+written(p.value))
		}
		return "{" + strings.Join(parts, ",") + "}"
	case list:
		for _, i := range n.items {
			parts = append(parts, written(i))
		}
		return "[" + strings.Join(parts, ",") + "]"
	default:
		return `"` + n.text + `"`
	}
}

// A patch that gives one form drops the inherited other form; see merge.
func TestPatchDropsOtherForm(t *testing.T) {
	const design = `{source: {emf: 1, start: {profile: ramp, rise: 3}}, lines: {c: {z0: 1, velocity_factor: 2, loss: 3}, g: {geometry: {coax: {inner_diameter: 1}}}},
		loads: {a: {at: m, r: 1, l: 2}, b: {at: m, impedance: 5}, p: {at: m, parallel: {l: 1, q: 2}}, t: {at: m, table: [x]}},
		elements: {e: {at: m, c: 1}, b: {from: m, to: n, ratio: 2}}}`
	for _, tt := range []struct{ patch, key, want string }{
		{`{loads: {a: {impedance: short}}}`, "loads", `"a":{"at":"m","impedance":"short"}`},
		{`{loads: {a: {l: 3}}}`, "loads", `"a":{"at":"m","r":"1","l":"3"}`},
		{`{loads: {a: {impedance: null, l: 3}}}`, "loads", `"a":{"at":"m","r":"1","l":"3"}`},
		{`{loads: {b: {c: 3}}}`, "loads", `"b":{"at":"m","c":"3"}`},
		{`{loads: {b: {impedance: 6, c: 3}}}`, "loads", `"b":{"at":"m","impedance":"6","c":"3"}`}, // refused later
		{`{elements: {e: {between: [m, n]}}}`, "elements", `"e":{"c":"1","between":["m","n"]}`},
		{`{source: {available_power: 2}}`, "source", `{"start":{"profile":"ramp","rise":"3"},"available_power":"2"}`},
		{`{source: {start: {profile: abrupt}}}`, "source", `"start":{"profile":"abrupt"}`},
		{`{source: {start: {rise: 4}}}`, "source", `"start":{"profile":"ramp","rise":"4"}`},
		{`{lines: {c: {l: 1, c: 2}}}`, "lines", `"c":{"l":"1","c":"2"}`},
		{`{loads: {a: {parallel: {r: 1, c: 2}}}}`, "loads", `"a":{"at":"m","parallel":{"r":"1","c":"2"}}`},
		{`{loads: {a: {q: 100}}}`, "loads", `"a":{"at":"m","r":"1","l":"2","q":"100"}`},
		{`{loads: {b: {q: 100, l: 1}}}`, "loads", `"b":{"at":"m","q":"100","l":"1"}`},
		{`{loads: {p: {parallel: {esr: 3}}}}`, "loads", `"p":{"at":"m","parallel":{"l":"1","esr":"3"}}`},
		{`{loads: {p: {parallel: [x, y]}}}`, "loads", `"p":{"at":"m","parallel":["x","y"]}`},
		{`{loads: {p: {l: 3}}}`, "loads", `"p":{"at":"m","l":"3"}`},
		{`{loads: {t: {file: x}}}`, "loads", `"t":{"at":"m","file":"x"}`},
		{`{elements: {b: {r: 1}}}`, "elements", `"b":{"from":"m","to":"n","r":"1"}`}, // refused later
		{`{elements: {b: {at: m, r: 1}}}`, "elements", `"b":{"at":"m","r":"1"}`},
		{`{elements: {e: {from: m, to: n, ratio: 3}}}`, "elements", `"e":{"from":"m","to":"n","ratio":"3"}`},
		{`{lines: {c: {delay: 5}}}`, "lines", `"c":{"z0":"1","loss":"3","delay":"5"}`},
		{`{lines: {c: {capacitance: 5}}}`, "lines", `"c":{"z0":"1","velocity_factor":"2","loss":"3","capacitance":"5"}`},
		{`{lines: {c: {cable: X, rating: {margin: 3}}}}`, "lines", `"c":{"cable":"X","rating":{"margin":"3"}}`},
		{`{lines: {g: {geometry: {two_wire: {spacing: 5}}}}}`, "lines", `"g":{"geometry":{"two_wire":{"spacing":"5"}}}`},
		{`{lines: {g: {geometry: {coax: {wall: 5}}}}}`, "lines", `"g":{"geometry":{"coax":{"inner_diameter":"1","wall":"5"}}}`},
		{`{lines: {g: {r: 1, model: constant}}}`, "lines", `"g":{"r":"1","model":"constant"}`},
		{`{lines: {c: {loss: null}}}`, "lines", `"c":{"z0":"1","velocity_factor":"2"}`},
	} {
		p := &problems{}
		patch := &patch{node: parse([]byte(tt.patch), p)}
		got := written(patch.apply(parse([]byte(design), p)).get(tt.key))
		if len(p.list) > 0 || !strings.Contains(got, tt.want) {
			t.Errorf("%s gives %s, want %s in it (%v)", tt.patch, got, tt.want, p.list)
		}
	}
}
