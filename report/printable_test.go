package report

import (
	"bytes"
	"errors"
	"testing"

	"linewitness/report/internal/reporttest"
)

// Printable says of a title what the writer of the document would.
func TestPrintable(t *testing.T) {
	for _, c := range []struct {
		title string
		want  rune // 0: it can be printed
	}{
		{"Feeder 7", 0},
		{"Füße, Łódź, Ωμέγα, Привет – “q” ± ≤ µ °", 0},
		{"two\twords\u00a0joined", 0},
		{"Mast 📡", '📡'},
		{"50 ∠ 30", '∠'},
		{"漢字", '漢'},
	} {
		r := reporttest.One(c.title, reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.5})
		written := WritePDF(new(bytes.Buffer), r, Options{Summary: true})
		for from, err := range map[string]error{"Printable": Printable("Plain", c.title), "WritePDF": written} {
			var sign *SignError
			switch {
			case c.want == 0 && err != nil:
				t.Errorf("%s: %q: %v", from, c.title, err)
			case c.want != 0 && (!errors.As(err, &sign) || sign.Sign != c.want):
				t.Errorf("%s: %q: error %v, want one of %q", from, c.title, err, c.want)
			}
		}
	}
}
