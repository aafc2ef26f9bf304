package design

import (
	"bytes"
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// Where the words of a problem stand among the arguments of the functions
// that make one.
var wordsAt = map[string]int{"problem": 2, "newFault": 1, "when": 1}

// TestEveryProblemIsShown demands that every problem the package can tell of
// occurs in a golden file. It reads the words from the source of the package,
// so a new problem without an example fails here.
func TestEveryProblemIsShown(t *testing.T) {
	var golden strings.Builder
	for _, file := range badFiles(t, "") {
		golden.Write(readFile(t, strings.TrimSuffix(file, ".yaml")+".out"))
	}
	golden.WriteString(toldOfOddBytes(t))
	known := wordsOfProblems(t)
	if len(known) < 80 {
		t.Fatalf("found only %d problems in the source", len(known))
	}
	for words, place := range known {
		if !wordsPattern(words).MatchString(golden.String()) {
			t.Errorf("%s: no golden file shows %q", place, words)
		}
	}
}

// toldOfOddBytes is what is told of files that no editor would keep, and of
// folders that no test can bring about everywhere.
func toldOfOddBytes(t *testing.T) string {
	comment := append([]byte("!"), bytes.Repeat([]byte("-"), 4<<20-20)...)
	large := func(string) ([]byte, error) { return append(comment, "\n# MHz\n10 0 0\n"...), nil }
	locked := func(path string) ([]byte, error) {
		return nil, &fs.PathError{Op: "open", Path: "/elsewhere/" + path, Err: fs.ErrPermission}
	}
	said := told(t, "x", withFiles(1), locked)
	if strings.Contains(said, "elsewhere") {
		t.Errorf("a path of this machine is told of: %s", said)
	}
	return said + told(t, "x", withFiles(5), large) + told(t, "x", withFiles(1), nil) +
		rendered(t, "x", make([]byte, maxBytes+1))
}

// withFiles is a design that refers to some files.
func withFiles(n int) []byte {
	var b strings.Builder
	b.WriteString("format: 1\nrecord: {title: T, number: 1}\n" +
		"source: {at: tx, frequency: 10 MHz, emf: 1 V peak, impedance: 50 ohm}\n" +
		"lines: {coax: {z0: 50 ohm, velocity_factor: 0.66}}\n" +
		"sections: {main: {from: tx, to: mast, length: 20 m, line: coax}}\nloads:\n")
	for i := range n {
		fmt.Fprintf(&b, "  a%d: {at: mast, file: a%d.s1p}\n", i, i)
	}
	return []byte(b.String())
}

func wordsOfProblems(t *testing.T) map[string]token.Position {
	files, err := filepath.Glob("*.go")
	if err != nil {
		t.Fatal(err)
	}
	found := map[string]token.Position{}
	set := token.NewFileSet()
	for _, name := range files {
		if strings.HasSuffix(name, "_test.go") {
			continue
		}
		file, err := parser.ParseFile(set, name, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		ast.Inspect(file, func(n ast.Node) bool {
			if call, ok := n.(*ast.CallExpr); ok {
				if words, ok := wordsOf(call); ok {
					found[words] = set.Position(call.Pos())
				}
			}
			return true
		})
	}
	return found
}

// wordsOf returns the literal words of a call that makes a problem.
func wordsOf(call *ast.CallExpr) (string, bool) {
	var name string
	switch fun := call.Fun.(type) {
	case *ast.Ident:
		name = fun.Name
	case *ast.SelectorExpr:
		name = fun.Sel.Name
	}
	at, ok := wordsAt[name]
	if !ok || at >= len(call.Args) {
		return "", false
	}
	literal, ok := call.Args[at].(*ast.BasicLit)
	if !ok {
		return "", false
	}
	words, err := strconv.Unquote(literal.Value)
	return words, err == nil
}

var verb = regexp.MustCompile(`%(%|[.0-9]*[a-z])`)

// wordsPattern matches what a format prints.
func wordsPattern(format string) *regexp.Regexp {
	var b strings.Builder
	b.WriteString(`(?m)error: .*`)
	rest := format
	for {
		at := verb.FindStringIndex(rest)
		if at == nil {
			break
		}
		b.WriteString(regexp.QuoteMeta(rest[:at[0]]))
		switch rest[at[0]:at[1]] {
		case "%%":
			b.WriteString("%")
		case "%q":
			b.WriteString(`".*"`)
		default:
			b.WriteString(".*")
		}
		rest = rest[at[1]:]
	}
	b.WriteString(regexp.QuoteMeta(rest))
	return regexp.MustCompile(b.String())
}
