package oneport

import (
	"fmt"
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

// roundTol allows for the rounding of a handful of operations.
const roundTol = 1e-14

func mustRead(t testing.TB, src string) *Table {
	t.Helper()
	table, err := Read("a.s1p", []byte(src))
	if err != nil {
		t.Fatal(err)
	}
	return table
}

func close(got, want complex128, tol float64) bool {
	if cmplx.IsInf(want) {
		return cmplx.IsInf(got)
	}
	return cmplx.Abs(got-want) <= tol*math.Max(1, cmplx.Abs(want))
}

// TestReflectionRows: the first row is a line of the version 1.1
// specification, its value computed; the others follow from its defaults and
// from the meaning of the formats.
func TestReflectionRows(t *testing.T) {
	for _, tt := range []struct {
		name, src string
		f         float64
		want      complex128
		tol       float64
	}{
		{"magnitude and angle", "# MHz S MA R 50\n2 0.894 -12.136", 2e6, 0.874020 - 0.187948i, 1e-6},
		{"defaults", "#\n1 0.5 90", 1e9, 0.5i, roundTol},
		{"decibels are of 20 lg", "# kHz S DB R 50\n3 -20 180", 3e3, -0.1, roundTol},
		{"open", "# hz\n7 1 0", 7, 1, 0},
		{"short", "# hz\n7 1 -180", 7, -1, 0},
		{"order free, any case", "# r 75 ri mHz s\n1 .25 -5E-1", 1e6, 0.25 - 0.5i, roundTol},
		{"later option lines", "# MHz S RI R 50\n# GHz Z MA R 9\n1 0.5 0\n#\n2 0.25 0", 1e6, 0.5, roundTol},
		{"comments, tabs, CR LF", "! a\r\n!b\r\n\t# MHz S RI R 50 ! c\r\n 1\t0.5 0!d\r\n", 1e6, 0.5, roundTol},
		{"CR alone", "# MHz RI\r1 0.5 0\r", 1e6, 0.5, roundTol},
	} {
		p := mustRead(t, tt.src).Points()[0]
		if p.F != tt.f || !close(p.S, tt.want, tt.tol) {
			t.Errorf("%s: %g Hz, %v; want %g Hz, %v", tt.name, p.F, p.S, tt.f, tt.want)
		}
	}
}

// TestNormalisation: version 1 has Z/R and Y R, version 2 ohms and siemens.
// The Z values are an example of the version 1.1 specification, with its
// counterpart of version 2.0 as quoted elsewhere.
func TestNormalisation(t *testing.T) {
	want := []complex128{74.25, 60, 53.025, 30, 0.75}
	z1 := mustRead(t, "# MHz Z MA R 75\n1 .99 0\n2 .80 0\n3 .707 0\n4 .40 0\n5 .01 0")
	z2 := mustRead(t, "[Version] 2.0\n# MHz Z MA R 75\n[Number of Ports] 1\n[Number of Frequencies] 5\n[Network Data]\n1 74.25 0\n2 60 0\n3 53.025 0\n4 30 0\n5 0.75 0\n[End]")
	for i, w := range want {
		if got := z1.Points()[i].Z; !close(got, w, roundTol) {
			t.Errorf("version 1: %v, want %v", got, w)
		}
		if got := z2.Points()[i].Z; !close(got, w, roundTol) {
			t.Errorf("version 2: %v, want %v", got, w)
		}
	}
	for src, z := range map[string]complex128{
		"# HZ Y RI R 50\n1 1 0": 50, // Y = 0.02 S
		"# HZ Y RI R 50\n1 0 0": cmplx.Inf(),
		"# HZ Z RI R 50\n1 0 0": 0,
	} {
		if got := mustRead(t, src).Points()[0].Z; !close(got, z, roundTol) {
			t.Errorf("%q: %v ohm, want %v", src, got, z)
		}
	}
}

func TestVersionTwo(t *testing.T) {
	table := mustRead(t, `! comment
[Version] 2.1
# MHz S RI
[number  of Ports] 1
[Reference]
 75 ! its own line
[NUMBER OF FREQUENCIES] 2
[Matrix Format] Lower
[Begin Information]
[Manufacturer] nobody
# GHz
[End Information]
[Network Data]
1 0 0
2 0.5 0
[End]
what follows does not count`)
	if table.Version != "2.1" || table.Reference != 75 || table.Len() != 2 {
		t.Fatalf("%+v", table)
	}
	for i, want := range []complex128{75, 225} {
		if got := table.Points()[i].Z; !close(got, want, roundTol) {
			t.Errorf("point %d: %v ohm, want %v", i, got, want)
		}
	}
}

// TestFrequencyIsRoundedOnce: 98.1 MHz is the number 98.1e6, not 98.1 times 1e6.
func TestFrequencyIsRoundedOnce(t *testing.T) {
	for _, s := range []string{"# MHz\n98.1 1 0", "# GHz\n0.0981 1 0", "# kHz\n9.81e4 1 0", "# Hz\n981E+5 1 0"} {
		if f := mustRead(t, s).Points()[0].F; f != 98.1e6 {
			t.Errorf("%q: %.17g Hz", s, f)
		}
	}
}

func TestMalformed(t *testing.T) {
	const head = "[Version] 2.0\n#\n[Number of Ports] 1\n[Number of Frequencies] 1\n"
	for _, tt := range []struct{ src, want string }{
		{"", "a.s1p: the file has no data; a one-port has lines of a frequency and two numbers after the option line"},
		{"1 0.5 0", `a.s1p:1:1: there is no option line before "1"; begin the data with a line such as # MHz S RI R 50; a bare # means GHz S MA R 50`},
		{"# MHz T", `a.s1p:1:7: unknown option "T"; ` + optionHint},
		{"# MHz G", "a.s1p:1:7: G and H parameters need two ports; a one-port has S, Y or Z"},
		{"# H", "a.s1p:1:3: G and H parameters need two ports; a one-port has S, Y or Z"},
		{"# MHz GHz", "a.s1p:1:7: the frequency unit is given twice; leave one"},
		{"# R 50 R 50", "a.s1p:1:8: the reference is given twice; leave one"},
		{"# R", `a.s1p:1:3: no number follows "R"; write the reference resistance, such as R 50`},
		{"# R MHz", `a.s1p:1:3: no number follows "R"; write the reference resistance, such as R 50`},
		{"# R 0", "a.s1p:1:5: the reference must be above 0 ohm"},
		{"# S R 50 75", "a.s1p:1:5: the file seems to have 2 ports; a load is a one-port; export the one reflection that is wanted"},
		{"#\n1 0.5", "a.s1p:2:3: the line has 2 numbers; a line of a one-port has three: frequency and a pair"},
		{"#\n1 0.5 0 0.1", "a.s1p:2:9: the line has 4 numbers; a line of a one-port has three: frequency and a pair"},
		{"#\n1 .1 0 .9 0 .9 0 .1 0\n2 .1 0 .9 0 .9 0 .1 0", "a.s1p:2:1: the file seems to have 2 ports; a load is a one-port; export the one reflection that is wanted"},
		{"#\n1 1 0 1 0 1 0\n 1 0 1 0 1 0\n 1 0 1 0 1 0", "a.s1p:2:1: the file seems to have 3 ports; a load is a one-port; export the one reflection that is wanted"},
		{"#\n1 1 0 1 0 1 0 1 0\n1 0 1 0 1 0 1 0\n1 0 1 0 1 0 1 0\n1 0 1 0 1 0 1 0\n2", "a.s1p:2:1: the file seems to have 4 ports; a load is a one-port; export the one reflection that is wanted"},
		{"#\n1 x 0", `a.s1p:2:3: "x" is not a number`},
		{"#\n1 0x1 0", `a.s1p:2:3: "0x1" is not a number`},
		{"#\n1 0 inf", `a.s1p:2:5: "inf" is not a number`},
		{"#\n1 0,5 0", `a.s1p:2:3: "0,5" is not a number`},
		{"#\n1 1e999 0", `a.s1p:2:3: "1e999" is not a number`},
		{"#\n-1 0 0", "a.s1p:2:1: the frequency is negative"},
		{"# MHz\n2 0 0\n2 0 0", "a.s1p:3:1: the frequency 2 MHz does not come after 2 MHz; sort the lines by frequency; each occurs once"},
		{"#\n2 0 0\n1 0 0", "a.s1p:3:1: the frequency 1 GHz does not come after 2 GHz; sort the lines by frequency; each occurs once"},
		{"#\n1 -0.5 0", "a.s1p:2:3: the magnitude is negative; is the format RI or DB?"},
		{"# DB\n1 1e6 0", "a.s1p:2:3: the value is infinite; is it a negative resistance or too large a number?"},
		{"# Z RI\n1 -1 0", "a.s1p:2:3: the value is infinite; is it a negative resistance or too large a number?"},
		{"# Z RI\n1 1e308 0", "a.s1p:2:3: the value is infinite; is it a negative resistance or too large a number?"},
		{"! 50 Ω\n#", "a.s1p:1:6: the byte 0xce is not allowed: the format is plain ASCII; write ohm or deg in letters, also in comments"},
		{"\ufeff#", "a.s1p:1:1: the byte 0xef is not allowed: the format is plain ASCII; save the file without a byte order mark"},
		{"#\n\x00", "a.s1p:2:1: the byte 0x00 is not allowed: the format is plain ASCII; is it a text file?"},
		{"[Number of Ports] 1", "a.s1p:1:1: [number of ports] belongs to version 2; begin the file with [Version] 2.0, or leave out the keyword"},
		{"[Version 2.0", "a.s1p:1:1: the bracket is not closed"},
		{"[Version] 1.1", "a.s1p:1:1: the version is not known; versions 2.0 and 2.1 are; a file of version 1 has no such line"},
		{"#\n[Version] 2.0", "a.s1p:2:1: [version] is not on the first line; only comments may come before it, and it occurs once"},
		{"[Version] 2.0\n[Number of Ports] 1", "a.s1p:2:1: there is no option line before [number of ports]; it follows [Version]; a bare # means GHz S MA R 50"},
		{"[Version] 2.0\n#\n[Number of Ports] 2", "a.s1p:3:19: the file seems to have 2 ports; a load is a one-port; export the one reflection that is wanted"},
		{"[Version] 2.0\n#\n[Number of Ports]", "a.s1p:3:1: a whole number above 0 is wanted"},
		{"[Version] 2.0\n#\n[Number of Frequencies] 0", "a.s1p:3:25: a whole number above 0 is wanted"},
		{"[Version] 2.0\n#\n[Network Data]", "a.s1p:3:1: there is no [Number of Ports] before [Network Data]; it is required"},
		{"[Version] 2.0\n#\n[Number of Ports] 1\n[Network Data]", "a.s1p:4:1: there is no [Number of Frequencies] before [Network Data]; it is required"},
		{head + "[Network Data]\n1 0 0", "a.s1p: there is no [End]; is the file whole?"},
		{head + "1 0 0", "a.s1p:5:1: there are data before [Network Data]; put the keyword on the line before them"},
		{head + "[End]", "a.s1p: there is no [Network Data]"},
		{head + "[Network Data]\n1 0 0\n2 0 0\n[End]", "a.s1p: [Number of Frequencies] is 1 and there are 2; is the file whole?"},
		{head + "[Number of Ports] 1", "a.s1p:5:1: [number of ports] occurs twice"},
		{head + "[Reference]\n[Network Data]", "a.s1p:6:1: [Reference] has no value; write one in ohm, such as [Reference] 50"},
		{head + "[Reference] 50 x", `a.s1p:5:16: "x" is not a number`},
		{head + "[Reference] 50 75", "a.s1p:5:1: the file seems to have 2 ports; a load is a one-port; export the one reflection that is wanted"},
		{head + "[Network Data]\n1 0 0\n[Reference] 50", "a.s1p:7:1: [Reference] comes after data; put it before [Network Data]"},
		{head + "[Begin Information]\n1 0 0", "a.s1p: [Begin Information] has no [End Information]"},
		{head + "[Noise Data]", "a.s1p:5:1: [noise data] belongs to two-port files; leave it out"},
		{head + "[Two-Port Data Order] 12_21", "a.s1p:5:1: [two-port data order] belongs to two-port files; leave it out"},
		{head + "[Mixed-Mode Order] D1,2", "a.s1p:5:1: [mixed-mode order] needs two ports or more; leave it out"},
		{head + "[Nonsense]", `a.s1p:5:1: unknown keyword "[nonsense]"`},
	} {
		table, err := Read("a.s1p", []byte(tt.src))
		if err == nil {
			t.Errorf("%q: read as %+v", tt.src, table)
			continue
		}
		if diff := cmp.Diff(tt.want, err.Error()); diff != "" {
			t.Errorf("%q (-want +got):\n%s", tt.src, diff)
		}
	}
}

func TestTooLarge(t *testing.T) {
	_, err := Read("a.s1p", make([]byte, maxBytes+1))
	if want := "a.s1p: the file has 4194305 bytes, and at most 4 MiB are read; thin out the points"; err == nil || err.Error() != want {
		t.Errorf("%v, want %s", err, want)
	}
}

// written is a file of the points in the given form.
func written(points []Point, version, unit, parameter, format string, reference float64) string {
	var b strings.Builder
	if version != "1" {
		fmt.Fprintf(&b, "[Version] %s\n", version)
	}
	fmt.Fprintf(&b, "# %s %s %s R %.17g\n", unit, parameter, format, reference)
	if version != "1" {
		fmt.Fprintf(&b, "[Number of Ports] 1\n[Number of Frequencies] %d\n[Network Data]\n", len(points))
	}
	size := map[string]float64{"Hz": 1, "kHz": 1e3, "MHz": 1e6, "GHz": 1e9}[unit]
	for _, p := range points {
		v := p.S
		norm := complex(1, 0)
		if version == "1" {
			norm = complex(reference, 0)
		}
		switch parameter {
		case "Z":
			v = p.Z / norm
		case "Y":
			v = norm / p.Z
		}
		x, y := real(v), imag(v)
		if format != "RI" {
			x, y = cmplx.Abs(v), cmplx.Phase(v)*180/math.Pi
		}
		if format == "DB" {
			x = 20 * math.Log10(x)
		}
		fmt.Fprintf(&b, "%.17g %.17g %.17g\n", p.F/size, x, y)
	}
	if version != "1" {
		b.WriteString("[End]\n")
	}
	return b.String()
}

// TestRoundTrip writes random points in every form and reads them back.
func TestRoundTrip(t *testing.T) {
	// conditionTol allows for |S| up to 0.99, where an impedance is up to 200
	// times as sensitive as its reflection, and for decibels of 17 digits.
	const conditionTol = 1e-11
	rapid.Check(t, func(t *rapid.T) {
		reference := rapid.Float64Range(1, 1000).Draw(t, "reference")
		var points []Point
		f := 0.0
		for range rapid.IntRange(1, 5).Draw(t, "points") {
			f += rapid.Float64Range(1, 1e9).Draw(t, "step")
			s := cmplx.Rect(rapid.Float64Range(0.01, 0.99).Draw(t, "|S|"), rapid.Float64Range(-math.Pi, math.Pi).Draw(t, "angle"))
			points = append(points, fromReflection(f, s, reference))
		}
		src := written(points,
			rapid.SampledFrom([]string{"1", "2.0"}).Draw(t, "version"),
			rapid.SampledFrom([]string{"Hz", "kHz", "MHz", "GHz"}).Draw(t, "unit"),
			rapid.SampledFrom([]string{"S", "Y", "Z"}).Draw(t, "parameter"),
			rapid.SampledFrom([]string{"MA", "DB", "RI"}).Draw(t, "format"), reference)
		table, err := Read("r.s1p", []byte(src))
		if err != nil {
			t.Fatalf("%v\n%s", err, src)
		}
		for i, p := range points {
			got := table.Points()[i]
			if math.Abs(got.F/p.F-1) > roundTol || cmplx.Abs(got.S-p.S) > conditionTol || cmplx.Abs(got.Z-p.Z) > conditionTol*cmplx.Abs(p.Z)+conditionTol*reference {
				t.Fatalf("point %d: %+v, want %+v\n%s", i, got, p, src)
			}
		}
	})
}
