package report

import (
	"io"
	"testing"

	"linewitness/report/internal/reporttest"
)

func BenchmarkWritePDF(b *testing.B) {
	r := reporttest.Feeder()
	b.ReportAllocs()
	for b.Loop() {
		if err := WritePDF(io.Discard, r, Options{}); err != nil {
			b.Fatal(err)
		}
	}
}
