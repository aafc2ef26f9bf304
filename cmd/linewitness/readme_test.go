package main

import (
	"bytes"
	"context"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// A step is a command line of a console block and what it printed.
type step struct{ command, output string }

var consoleBlock = regexp.MustCompile("(?ms)^```console\n(.*?)^```")

// steps returns the commands of all console blocks of a Markdown text. Lines
// that begin with "$ " are commands.
func steps(markdown string) []step {
	var out []step
	for _, block := range consoleBlock.FindAllStringSubmatch(markdown, -1) {
		for line := range strings.Lines(block[1]) {
			command, ok := strings.CutPrefix(line, "$ ")
			switch {
			case ok:
				out = append(out, step{command: strings.TrimSpace(command)})
			case len(out) > 0:
				out[len(out)-1].output += line
			}
		}
	}
	return out
}

// arguments returns the arguments that a command line gives to linewitness,
// installed or run from its source.
func arguments(command string) ([]string, bool) {
	words := strings.Fields(command)
	for _, prefix := range [][]string{{"linewitness"}, {"go", "run", "./cmd/linewitness"}} {
		if len(words) >= len(prefix) && strings.Join(words[:len(prefix)], " ") == strings.Join(prefix, " ") {
			return words[len(prefix):], true
		}
	}
	return nil, false
}

// Every run of linewitness that README.md shows ends as README.md shows it.
// The runs share one directory, in the order of the text.
func TestReadme(t *testing.T) {
	text, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	if err := os.CopyFS(filepath.Join(dir, "testdata", "designs"), os.DirFS("../../testdata/designs")); err != nil {
		t.Fatal(err)
	}
	t.Chdir(dir)
	ran, status := 0, 0
	for _, s := range steps(string(text)) {
		var output bytes.Buffer
		if args, ok := arguments(s.command); ok {
			ran++
			status = run(context.Background(), args, strings.NewReader(""), &output, &output)
		} else if s.command == "echo $?" {
			fmt.Fprintln(&output, status)
		} else {
			continue
		}
		if diff := differs(s.output, output.String()); diff != "" {
			t.Errorf("$ %s\n%s", s.command, diff)
		}
	}
	if ran == 0 {
		t.Error("README.md shows no run of linewitness in a console block")
	}
}

func TestSteps(t *testing.T) {
	text := "text\n```console\n$ linewitness version\nlinewitness ...\n$ echo $?\n0\n```\n" +
		"```yaml\n$ not a command\n```\n```console\n$ go run ./cmd/linewitness plan x.yaml\n```\n"
	want := []step{
		{"linewitness version", "linewitness ...\n"},
		{"echo $?", "0\n"},
		{"go run ./cmd/linewitness plan x.yaml", ""},
	}
	got := steps(text)
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("steps %q, want %q", got, want)
	}
	if args, ok := arguments(got[2].command); !ok || strings.Join(args, " ") != "plan x.yaml" {
		t.Errorf("arguments %q (%t), want plan x.yaml", args, ok)
	}
	for _, other := range []string{"go test ./...", "linewitnessed", "go run ./cmd"} {
		if _, ok := arguments(other); ok {
			t.Errorf("%q counts as a run of linewitness", other)
		}
	}
}
