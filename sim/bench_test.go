package sim

import (
	"context"
	"os"
	"testing"

	"linewitness/sim/design"
)

// BenchmarkVerify is everything but the writing of files, for each demo.
func BenchmarkVerify(b *testing.B) {
	for _, name := range []string{"hilltop-fm-feeder", "reference-tree", "receiving-site"} {
		b.Run("design="+name, func(b *testing.B) {
			src, err := os.ReadFile("../testdata/designs/" + name + ".yaml")
			if err != nil {
				b.Fatal(err)
			}
			f, err := design.LoadWith(name, src, func(p string) ([]byte, error) { return os.ReadFile("../testdata/designs/" + p) })
			if err != nil {
				b.Fatal(err)
			}
			for b.Loop() {
				if _, err := Verify(context.Background(), f, Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
