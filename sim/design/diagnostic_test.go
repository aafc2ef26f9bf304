package design

import (
	"bytes"
	"strings"
	"testing"
)

func render(t *testing.T, colour bool, d ...Diagnostic) string {
	t.Helper()
	var b bytes.Buffer
	if err := (Diagnostics{List: d}).Render(&b, colour); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestRender(t *testing.T) {
	for _, tt := range []struct {
		name string
		d    Diagnostic
		want string
	}{
		{
			"with a hint",
			Diagnostic{"a.yaml", Pos{3, 5}, "bad", "foo: bar", "do this"},
			"a.yaml:3:5: error: bad\n    foo: bar\n        ^\n    hint: do this\n",
		},
		{
			"tabs stay tabs",
			Diagnostic{"a", Pos{1, 4}, "bad", "\tx\ty", ""},
			"a:1:4: error: bad\n    \tx\ty\n    \t \t^\n",
		},
		{
			"wide characters take two columns",
			Diagnostic{"a", Pos{1, 4}, "bad", "測定: x", ""},
			"a:1:4: error: bad\n    測定: x\n         ^\n",
		},
		{
			"combining marks take none",
			Diagnostic{"a", Pos{1, 4}, "bad", "e\u0301: x", ""},
			"a:1:4: error: bad\n    e\u0301: x\n      ^\n",
		},
		{
			"control characters stay in the file",
			Diagnostic{"a", Pos{1, 1}, "bad", "\x1b[31mred", ""},
			"a:1:1: error: bad\n    \ufffd[31mred\n    ^\n",
		},
		{
			"past the end of the line",
			Diagnostic{"a", Pos{1, 9}, "bad", "xy", ""},
			"a:1:9: error: bad\n    xy\n      ^\n",
		},
		{
			"about the whole file",
			Diagnostic{"a", Pos{}, "bad", "", "write one"},
			"a: error: bad\n    hint: write one\n",
		},
		{"a blank line", Diagnostic{"a", Pos{2, 1}, "bad", "", ""}, "a:2:1: error: bad\n"},
	} {
		if got := render(t, false, tt.d); got != tt.want {
			t.Errorf("%s:\n%s\nwant\n%s", tt.name, got, tt.want)
		}
	}
}

func TestRenderLongLine(t *testing.T) {
	long := strings.Repeat("a", 5000) + "X" + strings.Repeat("b", 5000)
	lines := strings.Split(render(t, false, Diagnostic{"a", Pos{1, 5001}, "bad", long, ""}), "\n")
	if len(lines[1]) > 160 || strings.Index(lines[1], "X") != strings.Index(lines[2], "^") {
		t.Errorf("got\n%s\n%s", lines[1], lines[2])
	}
}

func TestRenderColour(t *testing.T) {
	d := Diagnostic{"a", Pos{1, 1}, "bad", "x", "do"}
	if got := render(t, true, d); !strings.Contains(got, "\x1b[1;31merror:\x1b[0m bad") {
		t.Errorf("no colour in %q", got)
	}
	if got := render(t, false, d); strings.Contains(got, "\x1b") {
		t.Errorf("colour in %q", got)
	}
}

func TestDiagnosticsError(t *testing.T) {
	ds := Diagnostics{[]Diagnostic{{File: "a", Pos: Pos{1, 2}, Message: "one"}, {File: "a", Message: "two"}}, 3}
	if got, want := ds.Error(), "a:1:2: error: one\na: error: two\nand 3 more"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestNearest(t *testing.T) {
	known := []string{"length", "line", "from", "to", "velocity_factor"}
	for name, want := range map[string]string{
		"lenght": "length", "lentgh": "length", "Length": "length", "lin": "line", "form": "from", "velocity factor": "velocity_factor",
		"impedance": "", "x": "", "": "", strings.Repeat("length", 20): "",
	} {
		if got := nearest(name, known); got != want {
			t.Errorf("nearest to %q is %q, want %q", name, got, want)
		}
	}
}

func TestEditDistance(t *testing.T) {
	for _, tt := range []struct {
		a, b string
		want int
	}{
		{"", "", 0},
		{"abc", "abc", 0},
		{"abc", "acb", 1},
		{"abc", "ab", 1},
		{"abc", "xabc", 1},
		{"kitten", "sitting", 3}, // the textbook example of V. Levenshtein's distance
		{"abcd", "badc", 2},
	} {
		if got := editDistance(tt.a, tt.b, 100); got != tt.want {
			t.Errorf("%q to %q is %d, want %d", tt.a, tt.b, got, tt.want)
		}
		if got := editDistance(tt.b, tt.a, 100); got != tt.want {
			t.Errorf("%q to %q is %d, want %d", tt.b, tt.a, got, tt.want)
		}
	}
}
