package design

import (
	"errors"
	"fmt"
	"math/cmplx"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// FuzzLoad: no bytes make Load panic; what it refuses it tells of at places in
// the file, in order; what it loads it loads again the same.
func FuzzLoad(f *testing.F) {
	for _, pattern := range []string{"testdata/good/*.yaml", "testdata/bad/*/*.yaml", "../../testdata/designs/*.yaml", "starter.yaml"} {
		files, err := filepath.Glob(pattern)
		if err != nil {
			f.Fatal(err)
		}
		for _, file := range files {
			if src := readFile(f, file); len(src) < 1<<13 {
				f.Add(src)
			}
		}
	}
	f.Fuzz(func(t *testing.T, src []byte) {
		file, err := LoadWith("f.yaml", src, openIn(filesDir))
		again, err2 := LoadWith("f.yaml", src, openIn(filesDir))
		if diff := cmp.Diff(file, again); diff != "" {
			t.Errorf("loads differently the second time:\n%s", diff)
		}
		if err == nil {
			checkLoaded(t, file)
			return
		}
		if err2 == nil || err.Error() != err2.Error() {
			t.Errorf("tells %v, then %v", err, err2)
		}
		checkTold(t, err, newSource(src))
	})
}

// checkLoaded checks what Load promises of every design.
func checkLoaded(t *testing.T, f *File) {
	for _, c := range append(f.Cases, Case{nominalName, f.Nominal}) {
		d := c.Design
		if d.Source.Frequency.SI <= 0 || d.Source.EMF.SI <= 0 || len(d.Sections) == 0 || d.Junctions[0] != d.Source.At {
			t.Errorf("%s: source %+v, junctions %v", c.Name, d.Source, d.Junctions)
		}
		for _, x := range d.Claims {
			if !(x.Tolerance > 0) || cmplx.IsNaN(x.Value) || cmplx.IsInf(x.Value) || len(x.Cases) != 1 || x.Unit == "" || x.ToleranceText == "" {
				t.Errorf("%s: claim %+v", c.Name, x)
			}
		}
		for _, s := range d.Sections {
			k := s.Constants
			if !(s.Length.SI > 0) || !(k.L > 0) || !(k.C > 0) || !(k.R >= 0) || !(k.G >= 0) {
				t.Errorf("%s: section %+v", c.Name, s)
			}
		}
	}
}

func checkTold(t *testing.T, err error, src *source) {
	var ds Diagnostics
	if !errors.As(err, &ds) || len(ds.List) == 0 || len(ds.List) > maxDiagnostics {
		t.Fatalf("not diagnostics: %v", err)
	}
	for i, d := range ds.List {
		if d.Pos.Line < 0 || d.Pos.Line > len(src.lines)+1 || d.Message == "" {
			t.Errorf("place %v: %q", d.Pos, d.Message)
		}
		if i > 0 && d.Pos.compare(ds.List[i-1].Pos) < 0 {
			t.Errorf("%v is told after %v", d.Pos, ds.List[i-1].Pos)
		}
	}
	var b strings.Builder
	if err := ds.Render(&b, true); err != nil {
		t.Error(err)
	}
}

func TestTooLarge(t *testing.T) {
	src := readFile(t, "testdata/good/minimal.yaml")
	padded := append(src, "\n#"+strings.Repeat("x", maxBytes-len(src)-2)...)
	mustLoad(t, "just fits", padded)
	if _, err := Load("x", append(padded, 'x')); err == nil {
		t.Error("a file of more than 1 MiB is read")
	}
}

func TestMoreThanTold(t *testing.T) {
	_, err := Load("x", readFile(t, "testdata/bad/meaning/many.yaml"))
	ds := err.(Diagnostics)
	if len(ds.List) != maxDiagnostics || ds.More != 11 { // 31 unknown keys
		t.Errorf("%d told and %d more", len(ds.List), ds.More)
	}
}

// heavy are files of up to 1 MiB, or a part of that, that a check with nested
// loops would choke on.
func heavy(part int) map[string]string {
	const head = "format: 1\nrecord: {title: T, number: 1}\nsource: {at: j0, frequency: 1 MHz, emf: 1 V peak, impedance: 50 ohm}\n" +
		"lines: {l: {z0: 50 ohm, velocity_factor: 1}}\n"
	repeat := func(format string, n int) string {
		var b strings.Builder
		for i := range n {
			fmt.Fprintf(&b, format, i, i+1)
		}
		return b.String()
	}
	fill := func(s string) string { return strings.Repeat(s, maxBytes*15/16/part/len(s)) }
	const oneSection = "sections: {s: {from: j0, to: j1, length: 1 m, line: l}}\n"
	chain := head + "sections:\n" + repeat("  s%d: {from: j0, to: j%d, length: 1 m, line: l}\n", 500)
	return map[string]string{
		"full": chain + "loads:\n" + repeat("  a%d: {at: j%d, r: 1 ohm}\n", 500) + "elements:\n" + repeat("  e%d: {at: j%d, r: 1 ohm}\n", 500) +
			"cases:\n" + repeat("  c%d: {sections: {s%d: null}, loads: null, elements: null}\n", 100) +
			"requirements:\n" + repeat("  - {id: r%d, quantity: steady_voltage, at: j%d, max: 1 V peak, cases: all}\n", 500) +
			"claims:\n" + repeat("  - {id: c%d, quantity: voltage, at: j%d, value: 1 V peak, tolerance: 1 %%}\n", 500),
		"unknown keys":  head + repeat("k%d%d: 1\n", 70000/part),
		"long sections": head + "sections:\n" + repeat("  s%d: {from: j0, to: j%d, length: 1 m, line: l}\n", 16000/part),
		"long cases":    chain + "cases:\n" + repeat("  c%d: {sections: {s%d: null}}\n", 24000/part),
		"many patches":  chain + "cases: {c: {loads: {" + repeat("a%d: {at: j%d, x: 1}, ", 30000/part) + "}}}\n",
		"one line":      "{" + fill("a: [b, {c: d}], ") + "}",
		"comments":      fill("# comment\n") + head + oneSection,
		"blank lines":   fill("\n") + head + oneSection,
		"one text":      head + "x: " + fill("y"),
		"one key":       head + fill("y") + ": 1",
		"flow":          fill("[],"),
		"quotes":        head + "x: '" + fill("''"),
		"open":          fill("{a: "),
	}
}

// TestHeavyFiles only sees to an answer; BenchmarkLoad sees how fast it is.
func TestHeavyFiles(t *testing.T) {
	for name, text := range heavy(8) {
		if len(text) > maxBytes {
			t.Errorf("%s has %d bytes", name, len(text))
		}
		if _, err := Load(name, []byte(text)); err != nil {
			checkTold(t, err, newSource([]byte(text)))
		} else if name != "comments" && name != "blank lines" && name != "full" {
			t.Errorf("%s loads", name)
		}
	}
}

func BenchmarkLoad(b *testing.B) {
	for name, text := range heavy(1) {
		b.Run("file="+strings.ReplaceAll(name, " ", "_"), func(b *testing.B) {
			b.SetBytes(int64(len(text)))
			for b.Loop() {
				Load(name, []byte(text))
			}
		})
	}
}
