package recheck

import (
	"slices"
	"strings"
)

// A pattern is a path of a rule, cut into its parts.
type pattern struct {
	parts [][]string // what each part may be; nil: anything but an item of a list
	rule  *rule
}

// patterns are all paths of all rules, in their order.
var patterns = compile(slices.Concat(rules, evidence))

func compile(table []rule) (all []pattern) {
	for i := range table {
		for _, path := range table[i].paths {
			all = append(all, pattern{cut(path), &table[i]})
		}
	}
	return all
}

func cut(path string) (parts [][]string) {
	for part := range strings.SplitSeq(path, ".") {
		if part == "*" {
			parts = append(parts, nil)
			continue
		}
		parts = append(parts, strings.Split(part, "|"))
	}
	return parts
}

func (p *pattern) fits(path []string) bool {
	if len(path) != len(p.parts) {
		return false
	}
	for i, part := range p.parts {
		if part == nil && path[i] == item || part != nil && !slices.Contains(part, path[i]) {
			return false
		}
	}
	return true
}

// ruleFor is the rule of a path, nil if none fits.
func ruleFor(table []pattern, path []string) *rule {
	for i := range table {
		if table[i].fits(path) {
			return table[i].rule
		}
	}
	return nil
}
