package recheck

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/result"
)

// document is a small result with parts to be exchanged: old and new text in
// turn.
func document(t *testing.T, exchange ...string) *result.Node {
	t.Helper()
	n, err := result.Read([]byte(strings.NewReplacer(exchange...).Replace(small)))
	if err != nil {
		t.Fatal(err)
	}
	return n
}

const small = `{"format": 1, "tool": {"version": "v1", "go": "go1"}, "design": {"title": "Feeder", "settle_tolerance": 1e-4},
"verdict": "verified",
"cases": {"nominal": {
  "verdict": "verified", "frequency_hz": 1e6,
  "phasor": {"source": {"v": {"re": 10, "im": 0}}},
  "fdtd": {"sections": {
    "main": {"from": {"v": {"re": 10, "im": 0}, "i": {"re": 0.2, "im": 0}, "impedance": {"re": 50, "im": 0}, "reflection": {"re": 0, "im": 0}, "vswr": 1},
             "voltage_max": {"value_v": 12, "at_m": 20}, "voltage_min": {"value_v": 8, "at_m": 70}},
    "stub": {"to": {"v": {"re": 0, "im": 0}, "i": {"re": 0.4, "im": 0}, "impedance": {"re": 0, "im": 0}, "reflection": {"re": -1, "im": 0}, "vswr": null}}}},
  "settling": {"residual": 2e-5},
  "agreement": {"sections": {
    "main": {"voltage": 1e-3, "voltage_expected": 9e-4, "voltage_scale_v": 12, "current": 1e-3, "current_expected": 1e-3, "current_scale_a": 0.24},
    "stub": {"voltage": 1e-3, "voltage_expected": 9e-4, "voltage_scale_v": 10, "current": 1e-3, "current_expected": 1e-3, "current_scale_a": 0.4}}},
  "grid": {"sections": {"main": {"cells": 100, "cell_m": 1, "cells_per_wavelength": 200}}},
  "stress": {"duration_s": 2e-5,
    "peak_voltage": {"value_v": 20, "uncertainty_v": 0.1, "section": "main", "at_m": 20, "time_s": 3e-6, "phase_deg": 30},
    "sections": {"main": {"peak_voltage_v": 20}, "stub": {"peak_voltage_v": 19.95}, "tail": {"peak_voltage_v": 15}}},
  "requirements": [
    {"id": "R1", "subject": "main", "value": 1.2, "margin": 0.3, "uncertainty": 0.01, "verdict": "met", "method": "phasor"},
    {"id": "R2", "subject": "main", "value": 7, "margin": 1, "uncertainty": 0.1, "verdict": "met", "method": "fdtd"}],
  "warnings": ["the residual is 1.25 %"]}}}`

func TestCompare(t *testing.T) {
	for _, tt := range []struct {
		name, then, now string
		want            Status
		path            string // of the first difference
	}{
		{"nothing", "", "", Same, ""},
		{"other digits of the same number", "1e6", "1000000", Same, ""},
		{"a requirement within its uncertainty", `"value": 1.2`, `"value": 1.205`, Within, ""},
		{"and beyond", `"value": 1.2`, `"value": 1.22`, Different, "cases.nominal.requirements[R1, main].value"},
		{"its verdict", `"verdict": "met", "method": "fdtd"`, `"verdict": "missed", "method": "fdtd"`, Different, "cases.nominal.requirements[R2, main].verdict"},
		{"the witness that was worse", `"method": "phasor"`, `"method": "fdtd"`, Within, ""},
		{"another requirement", `"id": "R2"`, `"id": "R3"`, Different, "cases.nominal.requirements[R2, main]"},
		{"the verdict of the design", `"verdict": "verified",` + "\n", `"verdict": "not shown",` + "\n", Different, "verdict"},
		{"a phasor within the difference of the solutions", `"v": {"re": 10, "im": 0}}}`, `"v": {"re": 10, "im": 0.011}}}`, Within, ""},
		{"and beyond, in its imaginary part", `"v": {"re": 10, "im": 0}}}`, `"v": {"re": 10, "im": 0.013}}}`, Different, "cases.nominal.phasor.source.v"},
		{"an impedance", `{"re": 50, "im": 0}`, `{"re": 50.1, "im": 0}`, Within, ""},
		{"and beyond", `{"re": 50, "im": 0}`, `{"re": 50.2, "im": 0}`, Different, "cases.nominal.fdtd.sections.main.from.impedance"},
		{"a standing wave ratio", `"vswr": 1}`, `"vswr": 1.002}`, Within, ""},
		{"and beyond", `"vswr": 1}`, `"vswr": 1.003}`, Different, "cases.nominal.fdtd.sections.main.from.vswr"},
		{"a total reflection that is not quite", `"vswr": null`, `"vswr": 2000`, Within, ""},
		{"and not at all", `"vswr": null`, `"vswr": 100`, Different, "cases.nominal.fdtd.sections.stub.to.vswr"},
		{"a residual below its tolerance", "2e-5}", "8e-5}", Within, ""},
		{"and above", "2e-5}", "1.3e-4}", Different, "cases.nominal.settling.residual"},
		{"a crest, by the flatness of it", `"value_v": 12, "at_m": 20`, `"value_v": 12, "at_m": 23`, Within, ""},
		{"a crest half a wavelength on", `"value_v": 12, "at_m": 20`, `"value_v": 12, "at_m": 119`, Within, ""},
		{"a crest elsewhere", `"value_v": 12, "at_m": 20`, `"value_v": 12, "at_m": 40`, Different, "cases.nominal.fdtd.sections.main.voltage_max.at_m"},
		{"a peak a period later, with its phase", `"time_s": 3e-6, "phase_deg": 30`, `"time_s": 3.25e-6, "phase_deg": -60`, Within, ""},
		{"the phase alone", `"phase_deg": 30`, `"phase_deg": 50`, Different, "cases.nominal.stress.peak_voltage.phase_deg"},
		{"the opposite phase", `"phase_deg": 30`, `"phase_deg": -150`, Within, ""},
		{"two periods later", `"time_s": 3e-6`, `"time_s": 5.1e-6`, Different, "cases.nominal.stress.peak_voltage.time_s"},
		{"the last digit in a warning", "1.25 %", "1.26 %", Within, ""},
		{"the figure in a warning", "1.25 %", "1.28 %", Different, "cases.nominal.warnings[0]"},
		{"the words of a warning", "the residual", "a residual", Different, "cases.nominal.warnings[0]"},
		{"a count", `"cells": 100`, `"cells": 101`, Different, "cases.nominal.grid.sections.main.cells"},
		{"a section less", `, "tail": {"peak_voltage_v": 15}`, "", Different, "cases.nominal.stress.sections.tail"},
		{"a number that has become a text", `"cells": 100`, `"cells": "100"`, Different, "cases.nominal.grid.sections.main.cells"},
		{"another version", `"version": "v1"`, `"version": "v2"`, Same, ""},
		{"a new key", `"frequency_hz": 1e6`, `"frequency_hz": 1e6, "colour": 3`, Same, ""},
	} {
		t.Run(tt.name, func(t *testing.T) {
			then, now := document(t), document(t, tt.then, tt.now)
			if tt.then != "" && !strings.Contains(small, tt.then) {
				t.Fatalf("no %q to exchange", tt.then)
			}
			out := Compare(then, now)
			if out.Status() != tt.want {
				t.Fatalf("%v, want %v: %+v", out.Status(), tt.want, out.Differences)
			}
			if tt.path != "" && out.Differences[0].Path != tt.path {
				t.Errorf("first difference at %s, want %s", out.Differences[0].Path, tt.path)
			}
		})
	}
}

// Compare takes the uncertainty from the new run: one that was altered in the
// record excuses nothing.
func TestUncertaintyIsOfTheNewRun(t *testing.T) {
	then := document(t, `"value": 1.2, "margin": 0.3, "uncertainty": 0.01`, `"value": 1.4, "margin": 0.3, "uncertainty": 1`)
	out := Compare(then, document(t))
	if len(out.Differences) != 2 {
		t.Fatalf("%+v", out.Differences)
	}
	if d := out.Differences[0]; math.Abs(d.Ratio()-20) > 1e-3 || d.Then != "1.4" || d.Now != "1.2" {
		t.Errorf("ratio %v of %+v, want 0.2/0.01", d.Ratio(), d)
	}
	if out.Largest == nil || out.Largest.Path != out.Differences[0].Path {
		t.Errorf("largest %+v", out.Largest)
	}
}

// Of sections with equal peaks the record may name another one.
func TestRival(t *testing.T) {
	for name, want := range map[string]Status{"stub": Within, "tail": Different, "none": Different} {
		out := Compare(document(t, `"section": "main"`, `"section": "`+name+`"`), document(t))
		if out.Status() != want {
			t.Errorf("%s: %v, want %v", name, out.Status(), want)
		}
	}
}

func TestSaid(t *testing.T) {
	out := Compare(document(t), document(t, `"go1"`, `"go2"`, `"verdict": "verified",`+"\n", `"verdict": "verified", "more": {"a": 1},`+"\n"))
	if len(out.Said) != 2 || out.Said[0].Path != "tool.go" || out.Said[1].Path != "more" {
		t.Errorf("said %+v", out.Said)
	}
	if out.Status() != Same || out.Texts.Different != 0 {
		t.Errorf("%v %+v", out.Status(), out.Texts)
	}
}

// A value without a rule is compared digit by digit, and named.
func TestUnruled(t *testing.T) {
	then, now := document(t, `"frequency_hz": 1e6`, `"frequency_hz": 1e6, "colour": 3`), document(t, `"frequency_hz": 1e6`, `"frequency_hz": 1e6, "colour": 3.0000001`)
	out := Compare(then, now)
	if out.Status() != Different || len(out.Unruled) != 1 || out.Unruled[0] != "cases.nominal.colour" {
		t.Errorf("%v, unruled %q", out.Status(), out.Unruled)
	}
}

// A result that was made to fill the memory is compared all the same, and its
// differences are counted.
func TestMost(t *testing.T) {
	many := strings.Repeat(`"w", `, Most+7)
	out := Compare(document(t, `"warnings": [`, `"warnings": [`+many), document(t))
	if len(out.Differences) != Most || out.Further != 8 || out.Texts.Different != Most+8 {
		t.Errorf("%d differences and %d further, %+v", len(out.Differences), out.Further, out.Texts)
	}
}

// FuzzCompare: any two results can be compared, and a result is the same as itself.
func FuzzCompare(f *testing.F) {
	f.Add([]byte(small), []byte(strings.ReplaceAll(small, "10", "null")))
	f.Add([]byte(small), []byte(strings.ReplaceAll(small, `"re"`, `"r"`)))
	f.Add([]byte(strings.ReplaceAll(small, "{", `{"a": [], `)), []byte(strings.ReplaceAll(small, "main", "")))
	f.Fuzz(func(t *testing.T, a, b []byte) {
		then, err := result.Read(a)
		if err != nil {
			return
		}
		if out := Compare(then, then); out.Status() != Same {
			t.Errorf("not the same as itself: %+v", out.Differences)
		}
		now, err := result.Read(b)
		if err != nil {
			return
		}
		if out := Compare(then, now); out.Status() == Different && len(out.Differences) == 0 {
			t.Error("different, and no difference")
		}
	})
}
