package report

import (
	"bytes"
	"strings"
	"testing"

	"github.com/pdfcpu/pdfcpu/pkg/api"
	"github.com/pdfcpu/pdfcpu/pkg/pdfcpu/model"
	"github.com/pdfcpu/pdfcpu/pkg/pdfcpu/types"

	"linewitness/report/internal/reporttest"
)

// Other programs read the file: it is valid, all its fonts are embedded and
// its outline names the cases.
func TestFileIsValid(t *testing.T) {
	file := written(t, reporttest.Feeder(), Options{})
	api.DisableConfigDir()
	conf := model.NewDefaultConfiguration()
	conf.ValidationMode = model.ValidationRelaxed
	conf.Offline = true
	ctx, err := api.ReadValidateAndOptimize(bytes.NewReader(file), conf)
	if err != nil {
		t.Fatal(err)
	}
	if want := len(pages(t, file)); ctx.PageCount != want {
		t.Errorf("%d pages, want %d", ctx.PageCount, want)
	}
	if len(ctx.Optimize.FontObjects) != 4 {
		t.Errorf("%d fonts, want regular, bold, italic and mono", len(ctx.Optimize.FontObjects))
	}
	for _, f := range ctx.Optimize.FontObjects {
		if !strings.HasPrefix(f.FontName, "Liberation") || !embedded(t, ctx, f.FontDict) {
			t.Errorf("font %s is not embedded", f.FontName)
		}
	}
	if ctx.Title != reporttest.Feeder().Design.Title {
		t.Errorf("title %q", ctx.Title)
	}
	marks, err := api.Bookmarks(bytes.NewReader(file), conf)
	if err != nil {
		t.Fatal(err)
	}
	var titles []string
	for _, m := range marks {
		titles = append(titles, m.Title)
	}
	if got := strings.Join(titles, ", "); !strings.Contains(got, "Summary, Contents, Compliance, Cases side by side, Claims, The design as modelled, Case nominal, Case iced, Case arc, Case stub_missing") {
		t.Errorf("outline %s", got)
	}
}

// embedded reports whether the program of a composite font is in the file.
func embedded(t *testing.T, ctx *model.Context, font types.Dict) bool {
	t.Helper()
	parts, err := ctx.DereferenceArray(font["DescendantFonts"])
	if err != nil || len(parts) != 1 {
		t.Fatalf("descendant fonts %v, %v", parts, err)
	}
	part, err := ctx.DereferenceDict(parts[0])
	if err != nil {
		t.Fatal(err)
	}
	descriptor, err := ctx.DereferenceDict(part["FontDescriptor"])
	if err != nil {
		t.Fatal(err)
	}
	program, _, err := ctx.DereferenceStreamDict(descriptor["FontFile2"])
	return err == nil && program != nil && len(program.Raw) > 1000
}
