package result

import (
	"math"
	"strings"
	"testing"
)

const sample = `{"format": 1, "tool": {"version": "v1"}, "design": {"title": "Feeder"}, "cases": {
  "nominal": {"frequency_hz": 1.6e6, "z": {"re": 3, "im": -4}, "settled": true, "q": null, "list": ["a", 2]}}}`

func TestRead(t *testing.T) {
	root, err := Read([]byte(sample))
	if err != nil {
		t.Fatal(err)
	}
	c := root.Get("cases", "nominal")
	if got := c.Float("frequency_hz"); got != 1.6e6 {
		t.Errorf("frequency %v, want 1.6e6", got)
	}
	if got := c.Get("frequency_hz").Text; got != "1.6e6" {
		t.Errorf("digits %q, want those of the document", got)
	}
	if z := c.Get("z"); !z.IsComplex() || z.Complex() != 3-4i {
		t.Errorf("z = %v", z.Complex())
	}
	if got := c.Get("frequency_hz").Complex(); got != 1.6e6 {
		t.Errorf("a plain number as a complex one: %v", got)
	}
	if got := root.String("design", "title"); got != "Feeder" {
		t.Errorf("title %q", got)
	}
	if items := c.Get("list").Items(); len(items) != 2 || items[0].Text != "a" || items[1].Value != 2 {
		t.Errorf("list %v", items)
	}
	if c.Get("settled").Text != "true" || c.Get("q").Kind != Null {
		t.Errorf("settled %q, q of kind %v", c.Get("settled").Text, c.Get("q").Kind)
	}
}

// What is not there is nothing: no caller has to look before it asks.
func TestNothing(t *testing.T) {
	var none *Node
	if none.Get("a", "b") != nil || !math.IsNaN(none.Float("a")) || none.String() != "" || none.IsComplex() || none.Items() != nil {
		t.Error("nil is not nothing")
	}
	if z := none.Complex(); !math.IsNaN(real(z)) {
		t.Errorf("nil as a complex number is %v", z)
	}
	text := &Node{Kind: Text, Text: "7"}
	if !math.IsNaN(text.Float()) || text.Get("a") != nil {
		t.Error("a text has a number or a key")
	}
}

func TestReadRefuses(t *testing.T) {
	for _, tt := range []struct{ name, text, want string }{
		{"nothing", "", "the document ends"},
		{"cut", sample[:len(sample)-3], "the document ends"},
		{"no JSON", "%PDF-1.7", "line 1: invalid character"},
		{"more", sample + "{}", "more follows"},
		{"twice", `{"format": 1, "tool": {"a": 1, "a": 2}}`, `the key "a" is there twice`},
		{"deep", `{"format": ` + strings.Repeat("[", 40) + strings.Repeat("]", 40) + "}", "more than 32 levels"},
		{"huge", `{"format": 1e999}`, "too large"},
		{"a list", `[1]`, `no "format"`},
		{"no format", `{"tool": {}}`, `no "format"`},
		{"another format", strings.Replace(sample, "1", "2", 1), "its format is 2, and this program knows format 1"},
		{"no cases", `{"format": 1, "tool": {}, "design": {}}`, `no "cases"`},
		{"a case that is none", `{"format": 1, "tool": {}, "design": {}, "cases": {"iced": 3}}`, `case "iced" is no object`},
	} {
		_, err := Read([]byte(tt.text))
		if err == nil || !strings.Contains(err.Error(), tt.want) {
			t.Errorf("%s: error %v, want %q", tt.name, err, tt.want)
		}
	}
	if _, err := Read(make([]byte, MaxBytes+1)); err == nil || !strings.Contains(err.Error(), "more than 64 MiB") {
		t.Errorf("a large document: error %v", err)
	}
}

func TestRecognised(t *testing.T) {
	for text, want := range map[string]bool{
		sample:      true,
		"format: 1": false,
		`{"format": 1, "record": {"title": "a"}, "cases": {}}`: false, // a design file in JSON
		"": false,
	} {
		if got := Recognised([]byte(text)); got != want {
			t.Errorf("%.30q recognised: %t, want %t", text, got, want)
		}
	}
}

// FuzzRead: whatever the bytes are, there is a result or an error, and what was
// read can be asked for anything.
func FuzzRead(f *testing.F) {
	f.Add([]byte(sample))
	f.Add([]byte(`{"format": 1, "tool": {}, "design": {}, "cases": {}}`))
	f.Add([]byte(`{"format":1,"tool":{},"design":{},"cases":{"a":{"z":{"re":1,"im":null}}}} `))
	f.Fuzz(func(t *testing.T, text []byte) {
		root, err := Read(text)
		if err != nil {
			if err.Error() == "" {
				t.Error("an error without words")
			}
			return
		}
		if root.Float("format") != 1 || !Recognised(text) {
			t.Error("read, but not a result")
		}
		var walk func(*Node)
		walk = func(n *Node) {
			if n.Kind == Object && len(n.Keys) != len(n.Nodes) {
				t.Error("keys without values")
			}
			n.Complex()
			for _, c := range n.Nodes {
				walk(c)
			}
		}
		walk(root)
	})
}
