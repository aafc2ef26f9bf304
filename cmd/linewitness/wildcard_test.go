package main

import (
	"fmt"
	"regexp"
	"strings"
	"testing"
)

// differs compares a text with what is expected, line by line, and describes
// the first difference. "..." in an expected line stands for any text, as for
// numbers that depend on the machine.
func differs(want, got string) string {
	ws, gs := lines(want), lines(got)
	for i, w := range ws {
		if i == len(gs) {
			return fmt.Sprintf("line %d is missing: %q\ngot:\n%s", i+1, w, got)
		}
		if !pattern(w).MatchString(gs[i]) {
			return fmt.Sprintf("line %d\n got  %q\n want %q\ngot:\n%s", i+1, gs[i], w, got)
		}
	}
	if len(gs) > len(ws) {
		return fmt.Sprintf("line %d is not expected: %q\ngot:\n%s", len(ws)+1, gs[len(ws)], got)
	}
	return ""
}

func lines(s string) []string {
	s = strings.TrimSuffix(s, "\n")
	if s == "" {
		return nil
	}
	return strings.Split(s, "\n")
}

func pattern(line string) *regexp.Regexp {
	parts := strings.Split(line, "...")
	for i, p := range parts {
		parts[i] = regexp.QuoteMeta(p)
	}
	return regexp.MustCompile("^" + strings.Join(parts, ".*") + "$")
}

func TestDiffers(t *testing.T) {
	for _, tt := range []struct {
		want, got string
		same      bool
	}{
		{"", "", true},
		{"a\nb\n", "a\nb", true},
		{"time ... s\n", "time 12.5 s\n", true},
		{"a.c", "abc", false},
		{"time ... s\n", "time 12.5 ms\nmore\n", false},
		{"a\n", "a\nb\n", false},
		{"a\nb\n", "a\n", false},
		{"", "a\n", false},
		{"a...", "ba", false},
	} {
		if got := differs(tt.want, tt.got); (got == "") != tt.same {
			t.Errorf("want %q, got %q: difference %q", tt.want, tt.got, got)
		}
	}
}
