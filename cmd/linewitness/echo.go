package main

import (
	"linewitness/report/result"
	"linewitness/sim/design"
)

// echoNote says that only results are compared, and why.
func echoNote(old, now *side) string {
	of := "of either"
	switch {
	case old.file != nil:
		of = "of the new one"
	case now.file != nil:
		of = "of the old one"
	}
	return "The design file " + of + " is not at hand. Only what both results repeat of their designs is compared: " +
		"identity, frequency, kinds of line, names of sections, loads and cases, limits and claims. Lengths and parts may have changed too."
}

// echoed is what a result repeats of its design, as terms of a design file.
func echoed(n *result.Node) design.Term {
	d, nominal := n.Get("design"), firstCase(n)
	return design.Term{Terms: []design.Term{
		echoedKeys("record", d, "title", "number", "revision"),
		{Key: "convention", Text: d.String("convention")},
		{Key: "source", Terms: []design.Term{{Key: "frequency", Text: inSI(nominal.Float("frequency_hz"), "Hz")}}},
		echoedNames("lines", nominal.Get("lines"), "text"),
		echoedNames("sections", nominal.Get("phasor", "sections"), ""),
		echoedNames("loads", nominal.Get("phasor", "loads"), ""),
		echoedNames("cases", n.Get("cases"), ""),
		echoedEntries("requirements", n, "limit_text", "text", "source"),
		echoedEntries("claims", n, "claimed_text", "tolerance_text", "text", "source"),
		echoedKeys("grid", d, "agreement_limit", "settle_tolerance", "max_periods"),
	}}
}

// firstCase is the nominal design of a result.
func firstCase(n *result.Node) *result.Node {
	if cases := n.Get("cases").Nodes; len(cases) > 0 {
		return cases[0]
	}
	return nil
}

// echoedKeys is a mapping of some keys of an object.
func echoedKeys(key string, n *result.Node, keys ...string) design.Term {
	t := design.Term{Key: key}
	for _, k := range keys {
		if v := n.Get(k); v != nil && v.Text != "" {
			t.Terms = append(t.Terms, design.Term{Key: k, Text: v.Text})
		}
	}
	return t
}

// echoedNames is a mapping of the names of an object, each with a text under a key
// or with none.
func echoedNames(key string, n *result.Node, text string) design.Term {
	t := design.Term{Key: key}
	if n == nil {
		return t
	}
	for i, name := range n.Keys {
		said := "{" + name + "}" // so that no name is taken for another
		if text != "" {
			said = n.Nodes[i].String(text)
		}
		t.Terms = append(t.Terms, design.Term{Key: name, Text: said})
	}
	return t
}

// echoedEntries is a mapping of ids, from the lists of all cases.
func echoedEntries(key string, n *result.Node, keys ...string) design.Term {
	t := design.Term{Key: key}
	seen := map[string]bool{}
	for _, c := range n.Get("cases").Nodes {
		for _, entry := range c.Get(key).Items() {
			if id := entry.String("id"); id != "" && !seen[id] {
				seen[id] = true
				t.Terms = append(t.Terms, echoedKeys(id, entry, keys...))
			}
		}
	}
	return t
}
