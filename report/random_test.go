package report

import (
	"flag"
	"io"
	"math"
	"testing"

	"linewitness/report/internal/reporttest"
	"pgregory.net/rapid"
)

// randomRecords is how many records TestRandomRecords writes: each is a whole
// document of some 60 ms.
const randomRecords = "20"

func TestMain(m *testing.M) {
	if err := flag.Set("rapid.checks", randomRecords); err != nil {
		panic(err)
	}
	m.Run()
}

// Any plausible record can be written, and no text in it is too wide.
func TestRandomRecords(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := reporttest.Random(t, 5)
		opt := reporttest.Options{
			Error: math.Pow(10, rapid.Float64Range(-12, -1).Draw(t, "error")), Loop: rapid.Float64Range(0, 0.99).Draw(t, "loop"),
			Unsettled: rapid.Bool().Draw(t, "unsettled"), MaxPoints: 30,
		}
		r := reporttest.One("Random", n, opt)
		paper := rapid.SampledFrom([]string{"a4", "letter"}).Draw(t, "paper")
		d, err := build(r, Options{Paper: paper})
		if err == nil {
			err = d.b.Write(io.Discard)
		}
		if err != nil {
			t.Fatal(explain(err))
		}
		sound(t, d)
	})
}
