package effect

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/result"
	"linewitness/sim/record"
)

const small = `{"format": 1, "tool": {}, "design": {}, "verdict": "verified", "cases": {
 "nominal": {"verdict": "verified",
  "requirements": [
   {"id": "R1", "quantity": "vswr", "subject": "main, from end", "unit": "1", "value": 1.2, "margin": 0.3, "uncertainty": 0.01, "limit_text": "at most 1.5", "verdict": "met"},
   {"id": "R2", "quantity": "load_power", "subject": "aerial", "unit": "W", "value": 5, "margin": -1, "uncertainty": 0.1, "limit_text": "at least 6 W", "verdict": "missed"}],
  "ratings": [{"section": "main", "quantity": "voltage", "unit": "V", "steady": 80, "peak": 100, "uncertainty": 1, "margin": 50, "rated_text": "200 V", "verdict": "met"}],
  "claims": [{"id": "C1", "quantity": "input_impedance", "subject": "main", "unit": "ohm", "complex": true, "phasor": {"re": 50, "im": 1}, "fdtd": {"re": 50, "im": 1},
   "tolerance": 2, "difference": 1, "uncertainty": 0.1, "verdict": "confirmed", "claimed_text": "50 ohm", "tolerance_text": "2 ohm"}],
  "convergence": {"figures": [
   {"id": "R1", "quantity": "vswr", "subject": "main, from end", "unit": "1", "phasor": 1.2, "uncertainty": 0.01, "values": [1.2]},
   {"id": "", "quantity": "source_power", "subject": "source", "unit": "W", "phasor": 10, "uncertainty": 0.1, "values": [10.01]},
   {"id": "", "quantity": "peak_voltage", "subject": "whole network", "unit": "V peak", "phasor": null, "uncertainty": 1, "values": [100, 101]}]}},
 "iced": {"verdict": "verified"}}}`

func read(t *testing.T, exchange ...string) *result.Node {
	t.Helper()
	text := small
	for i := 0; i < len(exchange); i += 2 {
		if !strings.Contains(text, exchange[i]) {
			t.Fatalf("no %q to exchange", exchange[i])
		}
		text = strings.Replace(text, exchange[i], exchange[i+1], 1)
	}
	n, err := result.Read([]byte(text))
	if err != nil {
		t.Fatal(err)
	}
	return n
}

func TestDirection(t *testing.T) {
	for _, tt := range []struct {
		name     string
		exchange []string
		of       int // the number of the effect in the nominal case
		want     record.Direction
		worsened bool
	}{
		{"nothing", nil, 0, record.AsBefore, false},
		{"a verdict that is worse", []string{`"verdict": "met"`, `"verdict": "not shown"`}, 0, record.Worse, true},
		{"a verdict that is better", []string{`"verdict": "missed"`, `"verdict": "not shown"`}, 1, record.Better, false},
		{"a margin beyond the uncertainties", []string{`"margin": 0.3`, `"margin": 0.33`}, 0, record.Better, false},
		{"a margin within them", []string{`"margin": 0.3`, `"margin": 0.31`}, 0, record.AsBefore, false},
		{"a smaller margin", []string{`"margin": -1`, `"margin": -1.5`}, 1, record.Worse, false},
		{"another unit", []string{`"unit": "W", "value"`, `"unit": "dBm", "value"`}, 1, record.Moved, false},
		{"another subject", []string{`"subject": "aerial"`, `"subject": "dummy"`}, 1, record.NewFigure, false},
		{"no margin any more", []string{`"margin": 0.3`, `"margin": null`}, 0, record.AsBefore, false},
		{"a rating", []string{`"margin": 50`, `"margin": 40`}, 2, record.Worse, false},
		{"a claim that is contradicted", []string{"confirmed", "contradicted"}, 3, record.Worse, true},
		{"a claim that is nearer", []string{`"difference": 1`, `"difference": 0.2`}, 3, record.Better, false},
		{"a key figure", []string{`"phasor": 10,`, `"phasor": 11,`}, 4, record.Moved, false},
		{"a key figure, by little", []string{`"phasor": 10,`, `"phasor": 10.1,`}, 4, record.AsBefore, false},
		{"a key figure of the time domain", []string{`[100, 101]`, `[104, 101]`}, 5, record.Moved, false},
		{"the verdict of the design", []string{`"verdict": "verified", "cases"`, `"verdict": "not settled", "cases"`}, 0, record.AsBefore, true},
		{"the verdict of a case", []string{`"iced": {"verdict": "verified"`, `"iced": {"verdict": "methods disagree"`}, 0, record.AsBefore, true},
		{"a case less", []string{`"iced"`, `"dry"`}, 0, record.AsBefore, false},
	} {
		t.Run(tt.name, func(t *testing.T) {
			var c record.Comparison
			Fill(&c, read(t), read(t, tt.exchange...))
			if got := c.Cases[0].Effects[tt.of].Direction; got != tt.want {
				t.Errorf("%s, want %s: %+v", got, tt.want, c.Cases[0].Effects[tt.of])
			}
			if c.Worsened != tt.worsened {
				t.Errorf("worsened %t, want %t", c.Worsened, tt.worsened)
			}
		})
	}
}

func TestFill(t *testing.T) {
	var c record.Comparison
	Fill(&c, read(t), read(t, `"id": "R1"`, `"id": "R9"`, `"iced"`, `"wet"`))
	var names []string
	for _, k := range c.Cases {
		names = append(names, k.Name+":"+string(k.Old)+":"+string(k.New))
	}
	if got, want := strings.Join(names, " "), "nominal:verified:verified wet::verified iced:verified:"; got != want {
		t.Errorf("cases %s, want %s", got, want)
	}
	effects := c.Cases[0].Effects
	if len(effects) != 7 {
		t.Fatalf("%d effects: %+v", len(effects), effects)
	}
	if e := effects[0]; e.ID != "R9" || e.Direction != record.NewFigure || e.Old != nil {
		t.Errorf("first %+v, want a new R9", e)
	}
	if e := effects[6]; e.ID != "R1" || e.Direction != record.NoMore || e.New != nil || e.Old.Limit != "at most 1.5" {
		t.Errorf("last %+v, want R1, which is no more", e)
	}
	if f := effects[2].New; f.Value != 100 || f.Unit != "V peak" || f.Limit != "200 V" {
		t.Errorf("rating %+v", f)
	}
	if f := effects[3].New; f.Value != 50+1i || !f.Complex || f.Margin != 1 || f.Limit != "50 ohm within 2 ohm" {
		t.Errorf("claim %+v", f)
	}
	if f := effects[5].New; f.Value != 100 || !math.IsNaN(f.Margin) {
		t.Errorf("key figure %+v", f)
	}
}

// The rounding of a zero is a zero beside a figure, and a figure beside nothing.
func TestRoundingOfZero(t *testing.T) {
	var c record.Comparison
	Fill(&c, read(t, `"phasor": 10,`, `"phasor": 4e-30,`), read(t))
	if e := c.Cases[0].Effects[4]; e.Old.Value != 0 || e.New.Value != 10 || e.Direction != record.Moved {
		t.Errorf("from %v to %v, %s", e.Old.Value, e.New.Value, e.Direction)
	}
}

// What worsened one way is better the other way, and nothing is both.
func TestReversed(t *testing.T) {
	a, b := read(t), read(t, `"margin": 0.3`, `"margin": 0.2`, `"verdict": "missed"`, `"verdict": "met"`, `"phasor": 10,`, `"phasor": 12,`)
	opposite := map[record.Direction]record.Direction{
		record.Better: record.Worse, record.Worse: record.Better, record.AsBefore: record.AsBefore, record.Moved: record.Moved,
	}
	var there, back record.Comparison
	Fill(&there, a, b)
	Fill(&back, b, a)
	for i, e := range there.Cases[0].Effects {
		if got := back.Cases[0].Effects[i].Direction; got != opposite[e.Direction] {
			t.Errorf("%s %s: %s, and back %s", e.ID, e.Quantity, e.Direction, got)
		}
	}
	if there.Worsened || !back.Worsened {
		t.Errorf("worsened %t, and back %t", there.Worsened, back.Worsened)
	}
}
