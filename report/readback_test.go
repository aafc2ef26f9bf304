package report

import (
	"bytes"
	"strings"
	"testing"

	"github.com/ledongthuc/pdf"
	"linewitness/report/internal/reporttest"
)

// A reader that keeps to the letter of the format finds the same text, also
// beyond Latin.
func TestTextForOtherReaders(t *testing.T) {
	file := write(t, reporttest.Feeder(), Options{})
	r, err := pdf.NewReader(bytes.NewReader(file), int64(len(file)))
	if err != nil {
		t.Fatal(err)
	}
	own := pages(t, file)
	for i := range own {
		s, err := r.Page(i + 1).GetPlainText(nil)
		if err != nil {
			t.Fatal(err)
		}
		// The reader ends a line after each piece of text.
		if got := strings.ReplaceAll(s, "\n", ""); got != own[i] {
			t.Errorf("page %d reads %.200q, want %.200q", i+1, got, own[i])
		}
	}
	all := strings.Join(own, "")
	for _, s := range []string{"Ω", "−", "λ", "γ", "Γ", "∂", "ℓ", "≈", "½"} {
		if !strings.Contains(all, s) {
			t.Errorf("the document lacks %s, so nothing is shown of it", s)
		}
	}
}
