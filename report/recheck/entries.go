package recheck

import (
	"fmt"
	"strconv"
	"strings"

	"linewitness/report/result"
)

// identities are the keys that tell the items of a list apart, by the key of the
// list. The items of other lists go by their number.
var identities = map[string][]string{
	"requirements": {"id", "subject"},
	"claims":       {"id"},
	"slips":        {"name", "where"},
	"figures":      {"id", "quantity", "subject"},
	"fidelity":     {"subject", "curve"},
	"ratings":      {"section", "quantity"},
	"places":       {"kind", "name", "quantity"},
	"echoes":       {"name"},
	"pedigree":     {"what"},
	"rows":         {"id", "label"},
	"coefficients": {"junction"},
}

// entryNames is how the items of a list are called: by what tells them apart, or
// by their numbers where nothing does.
func entryNames(at *place, then, now *result.Node) func(i int, n *result.Node) string {
	keys := identities[at.path[len(at.path)-1]]
	byNumber := func(i int, _ *result.Node) string { return strconv.Itoa(i) }
	if keys == nil {
		return byNumber
	}
	byIdentity := func(_ int, n *result.Node) string { return identity(n, keys) }
	for _, list := range []*result.Node{then, now} {
		seen := map[string]bool{}
		for i, n := range list.Nodes {
			called := byIdentity(i, n)
			if called == "" || seen[called] {
				return byNumber
			}
			seen[called] = true
		}
	}
	return byIdentity
}

func identity(n *result.Node, keys []string) string {
	var parts []string
	for _, key := range keys {
		if s := n.String(key); s != "" {
			parts = append(parts, s)
		}
	}
	return strings.Join(parts, ", ")
}

// none stands for a value that is not there.
const none = "-"

// longest is how much of a text a difference shows.
const longest = 60

// printedValue is a value in a few characters.
func printedValue(n *result.Node) string {
	switch {
	case n.IsComplex():
		return n.Nodes[0].Text + " + j(" + n.Nodes[1].Text + ")"
	case n.Kind == result.Text:
		return shortened(strconv.Quote(n.Text))
	case n.Kind == result.Object:
		return fmt.Sprintf("{%d}", len(n.Nodes))
	case n.Kind == result.List:
		return fmt.Sprintf("[%d]", len(n.Nodes))
	}
	return n.Text
}

func shortened(s string) string {
	runes := []rune(s)
	if len(runes) <= longest {
		return s
	}
	return string(runes[:longest-3]) + "..."
}
