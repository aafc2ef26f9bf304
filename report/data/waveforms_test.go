package data

import (
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"linewitness/sim/record"
)

func waveform(name, where, quantity string, start float64, samples ...float64) record.Waveform {
	return record.Waveform{Name: name, Where: where, Quantity: quantity, Start: start, Step: 1, Samples: samples}
}

// Waveforms on two clocks take turns in the rows of a case, a case without a
// waveform leaves its column empty, and two of one name have columns of their own.
func TestWaveformColumns(t *testing.T) {
	r := &record.Record{Cases: []record.Case{
		{Name: "a", Waveforms: []record.Waveform{
			waveform("source voltage", "feed", "voltage", 1, 10, 20),
			waveform("source current", "feed", "current", 0.5, 3, 4, 5),
			waveform("source voltage", "source", "voltage", 1, 6, math.NaN()),
		}},
		{Name: "b", Waveforms: []record.Waveform{
			waveform("source voltage", "feed", "voltage", 0.5, 7),
			waveform("end voltage", "end", "voltage", 1, 8),
		}},
	}}
	files, err := CSV(r)
	if err != nil {
		t.Fatal(err)
	}
	want := []string{
		"case,part,time_s,source_v,source_a,source at source_v,end_v",
		"a,run,0.5,,3,,",
		"a,run,1,10,,6,",
		"a,run,1.5,,4,,",
		"a,run,2,20,,,",
		"a,run,2.5,,5,,",
		"b,run,0.5,7,,,",
		"b,run,1,,,,8",
		"",
	}
	if diff := cmp.Diff(want, strings.Split(string(files[0].Data), "\r\n")); diff != "" {
		t.Errorf("rows (-want +got):\n%s", diff)
	}
}

// A sample ends at the place where the largest has its last digit.
func TestSampleDigits(t *testing.T) {
	for _, c := range []struct {
		x, largest float64
		want       string
	}{
		{1394.152, 1394.152, "1394.15"},
		{-71.30198, 1394.152, "-71.3"},
		{0.714219, 1394.152, "0.71"},
		{0.0049, 1394.152, "0"},
		{0.0051, 1394.152, "0.005"},
		{9.999999, 1394.152, "10"},
		{2.5e-9, 2.5e-9, "2.5e-09"},
		{1.23456789e-11, 2.5e-9, "1.235e-11"},
		{0, 5, "0"},
		{0, 0, "0"},
		{math.NaN(), 5, ""},
		{math.Inf(1), 0, ""},
	} {
		tab := newTable(nil)
		tab.sample(c.x, c.largest)
		if got := strings.Join(tab.row, ","); got != c.want {
			t.Errorf("sample(%v, %v) = %q, want %q", c.x, c.largest, got, c.want)
		}
	}
}
