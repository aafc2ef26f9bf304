package report

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// elsewhere are the packages whose numbers are not printed on a page, with the
// reason.
var elsewhere = map[string]string{
	"format":   "it is the place where numbers become text",
	"data":     "JSON and CSV, for machines",
	"result":   "reads JSON",
	"recheck":  "a table on the terminal, in the digits of the JSON",
	"effect":   "compares; makes no text of numbers",
	"archive":  "the syntax of PDF",
	"canvas":   "coordinates in the syntax of PDF",
	"internal": "records for tests",
}

// exempt are files in which a number becomes text that is not one of the record's,
// with the reason.
var exempt = map[string]string{
	"picture.go":       "names of files",
	"typeset/clean.go": "codes of characters that cannot be printed",
}

// Numbers on the pages are made text in package format alone, so that all are
// written alike: no other file that draws pages prints one by itself.
func TestNumbersAreFormattedInOnePlace(t *testing.T) {
	files := 0
	err := filepath.WalkDir(".", func(name string, e fs.DirEntry, err error) error {
		slash := filepath.ToSlash(name)
		dir, _, _ := strings.Cut(slash, "/")
		switch {
		case err != nil:
			return err
		case e.IsDir() && (elsewhere[dir] != "" || e.Name() == "testdata"):
			return fs.SkipDir
		case e.IsDir() || !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") || exempt[slash] != "":
			return nil
		}
		files++
		for _, f := range numberForms(t, name) {
			t.Errorf("%s; use package format", f)
		}
		return nil
	})
	if err != nil || files < 50 {
		t.Fatalf("%d files looked at, error %v", files, err)
	}
	for name, why := range exempt {
		if len(numberForms(t, filepath.FromSlash(name))) == 0 {
			t.Errorf("%s is exempt (%s) and has nothing to exempt", name, why)
		}
	}
}

// numberForms lists the places of a file that turn a number into text.
func numberForms(t *testing.T, name string) (found []string) {
	t.Helper()
	set := token.NewFileSet()
	file, err := parser.ParseFile(set, name, nil, 0)
	if err != nil {
		t.Fatal(err)
	}
	imports := map[string]string{} // package by the name it has in the file
	for _, i := range file.Imports {
		where, err := strconv.Unquote(i.Path.Value)
		if err != nil {
			t.Fatal(err)
		}
		as := path.Base(where)
		if i.Name != nil {
			as = i.Name.Name
		}
		imports[as] = where
		if slices.Contains([]string{"text/template", "text/tabwriter", "math/big"}, where) {
			found = append(found, set.Position(i.Pos()).String()+": package "+where)
		}
	}
	ast.Inspect(file, func(n ast.Node) bool {
		if call, ok := n.(*ast.CallExpr); ok {
			if what := numberForm(imports, call); what != "" {
				found = append(found, set.Position(call.Pos()).String()+": "+what)
			}
		}
		return true
	})
	return found
}

// numberForm says how a call turns a number into text, or nothing.
func numberForm(imports map[string]string, call *ast.CallExpr) string {
	f, ok := call.Fun.(*ast.SelectorExpr)
	if !ok {
		return ""
	}
	pkg, ok := f.X.(*ast.Ident)
	if !ok {
		return ""
	}
	whole := pkg.Name + "." + f.Sel.Name
	switch imports[pkg.Name] {
	case "strconv":
		if f.Sel.Name == "Itoa" || strings.HasPrefix(f.Sel.Name, "Format") || strings.HasPrefix(f.Sel.Name, "Append") {
			return whole
		}
	case "fmt":
		if f.Sel.Name == "Errorf" || strings.Contains(f.Sel.Name, "can") { // errors are not printed on a page; Sscanf reads
			return ""
		}
		if !strings.HasSuffix(f.Sel.Name, "f") {
			return whole + " prints values in forms of its own"
		}
		for _, a := range call.Args {
			if s, ok := a.(*ast.BasicLit); ok && s.Kind == token.STRING {
				if verbs := otherVerbs(s.Value); verbs != "" {
					return whole + " with " + verbs
				}
				return ""
			}
		}
		return whole + " without a literal format"
	}
	return ""
}

// otherVerbs returns the verbs of a format that are not for texts; go vet sees to
// it that those for texts get no numbers.
func otherVerbs(literal string) string {
	var out []string
	for i := 0; i+1 < len(literal); i++ {
		if literal[i] != '%' {
			continue
		}
		from := i
		for i++; i < len(literal)-1 && strings.ContainsRune("+-# 0123456789.[]*", rune(literal[i])); i++ {
		}
		if !strings.ContainsRune("sq%", rune(literal[i])) {
			out = append(out, literal[from:i+1])
		}
	}
	return strings.Join(out, " ")
}

// The search finds every form, and nothing where there is none.
func TestNumberForms(t *testing.T) {
	imports := map[string]string{"fmt": "fmt", "conv": "strconv", "strconv": "strconv", "format": "linewitness/report/format"}
	for code, bad := range map[string]bool{
		`fmt.Sprintf("%s and %q, 5 %%", a, b)`: false,
		`fmt.Sprintf("%d", n)`:                 true,
		`fmt.Sprintf("%-8.3f m", x)`:           true,
		`fmt.Fprintf(w, "%s %v", a, b)`:        true,
		`fmt.Sprintf(layout, x)`:               true,
		`fmt.Sprint(x)`:                        true,
		`fmt.Errorf("%d pages", n)`:            false,
		`conv.Itoa(n)`:                         true,
		`strconv.FormatFloat(x, 'g', 4, 64)`:   true,
		`strconv.Atoi(s)`:                      false,
		`format.Count(n)`:                      false,
	} {
		e, err := parser.ParseExpr(code)
		if err != nil {
			t.Fatal(err)
		}
		if got := numberForm(imports, e.(*ast.CallExpr)); (got != "") != bad {
			t.Errorf("%s: %q", code, got)
		}
	}
}
