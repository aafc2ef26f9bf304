package data

import (
	"bytes"
	"encoding/csv"
	"strings"
	"testing"

	"linewitness/sim/record"
)

func TestCSVGolden(t *testing.T) {
	files, err := CSV(sample())
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, f := range files {
		names = append(names, f.Name)
		if n := bytes.Count(f.Data, []byte("\n")); n != bytes.Count(f.Data, []byte("\r\n")) {
			t.Errorf("%s: a line that does not end in CRLF", f.Name)
		}
		// The golden files are kept with LF, so that tools that change line
		// ends do not break them.
		golden(t, f.Name+".csv", bytes.ReplaceAll(f.Data, []byte("\r\n"), []byte("\n")))
	}
	if got, want := strings.Join(names, " "), "waveforms envelopes error"; got != want {
		t.Errorf("files %s, want %s", got, want)
	}
}

// Every row is as long as the header and no field is spelled NaN or Inf.
func TestCSVReads(t *testing.T) {
	r := sample()
	r.Cases[0].Name = "with \"quotes\", and\na line"
	files, err := CSV(r)
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range files {
		rows, err := csv.NewReader(bytes.NewReader(f.Data)).ReadAll() // checks the number of fields
		if err != nil {
			t.Fatalf("%s: %v", f.Name, err)
		}
		if len(rows) < 2 || rows[1][0] != r.Cases[0].Name {
			t.Errorf("%s: first row %q, want one of case %q", f.Name, rows[1:], r.Cases[0].Name)
		}
		if s := strings.ToLower(string(f.Data)); strings.Contains(s, "nan") || strings.Contains(s, "inf") {
			t.Errorf("%s holds what is not a number:\n%s", f.Name, f.Data)
		}
	}
}

func TestCSVRefusesRaggedSamples(t *testing.T) {
	for _, tt := range []struct {
		name   string
		spoil  func(*record.Case)
		reason string
	}{
		{"phasor", func(c *record.Case) { c.Profiles[0].VP = c.Profiles[0].VP[1:] }, "voltages at 2 places and 1 values"},
		{"peaks", func(c *record.Case) { c.Profiles[0].PeakI = nil }, "peak currents at 1 places and 0 values"},
		{"tail", func(c *record.Case) { c.Waveforms[0].Tail.Phasor = make([]float64, 3) }, "1 samples and 3 of the phasor"},
	} {
		r := sample()
		tt.spoil(&r.Cases[0])
		if _, err := CSV(r); err == nil || !strings.Contains(err.Error(), tt.reason) {
			t.Errorf("%s: error %v, want one with %q", tt.name, err, tt.reason)
		}
	}
}
