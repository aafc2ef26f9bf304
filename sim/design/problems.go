package design

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// problems collects what is wrong with a file.
type problems struct {
	list []problem
	seen map[sighting]bool
}

type problem struct {
	pos     Pos
	message string
	hint    hint
}

// A sighting identifies a problem. Every case is walked anew, so a problem of
// the nominal design turns up again in every case: same place, same words.
type sighting struct {
	caseName string
	pos      Pos
	message  string
}

// A hint is worked out only for the problems that are told, because finding
// the nearest of many names takes time.
type hint func() string

func noHint() string { return "" }

func say(format string, args ...any) hint {
	return func() string { return sprintf(format, args...) }
}

// problem records a problem of the file as such.
func (p *problems) problem(pos Pos, h hint, format string, args ...any) {
	p.add("", pos, pos, h, sprintf(format, args...))
}

// sprintf is fmt.Sprintf, but keeps long texts from the file short.
func sprintf(format string, args ...any) string {
	const longest = 60
	for i, a := range args {
		if s, ok := a.(string); ok && len(s) > longest {
			args[i] = strings.ToValidUTF8(s[:longest], "") + "..."
		}
	}
	return fmt.Sprintf(format, args...)
}

// add records a problem found at pos in a case and told at tell, unless the
// nominal design (case name "") or the same case has shown it already.
func (p *problems) add(caseName string, pos, tell Pos, h hint, message string) {
	if p.seen == nil {
		p.seen = map[sighting]bool{}
	}
	here := sighting{caseName, pos, message}
	if p.seen[sighting{"", pos, message}] || p.seen[here] {
		return
	}
	p.seen[here] = true
	if caseName != "" {
		message = fmt.Sprintf("in case %q: %s", caseName, message)
	}
	p.list = append(p.list, problem{tell, message, h})
}

// diagnostics puts the problems in file order and fills in the source lines.
func (p *problems) diagnostics(file string, src *source) Diagnostics {
	slices.SortStableFunc(p.list, func(a, b problem) int { return a.pos.compare(b.pos) })
	told := p.list[:min(len(p.list), maxDiagnostics)]
	ds := Diagnostics{More: len(p.list) - len(told)}
	for _, x := range told {
		ds.List = append(ds.List, Diagnostic{file, x.pos, x.message, src.line(x.pos.Line), x.hint()})
	}
	return ds
}

func (a Pos) compare(b Pos) int {
	return cmp.Or(cmp.Compare(a.Line, b.Line), cmp.Compare(a.Column, b.Column))
}
