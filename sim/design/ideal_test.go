package design

import (
	"math/big"
	"testing"

	"pgregory.net/rapid"
)

// An equation between junction voltages, as rows of exact numbers.
type equations [][]*big.Rat

// add takes an equation in if it does not follow from the others, by Gaussian
// elimination in rational numbers, and reports whether it did.
func (e *equations) add(row []*big.Rat) bool {
	for _, known := range *e {
		p := pivot(known)
		if row[p].Sign() == 0 {
			continue
		}
		factor := new(big.Rat).Quo(row[p], known[p])
		for i := range row {
			row[i].Sub(row[i], new(big.Rat).Mul(factor, known[i]))
		}
	}
	if pivot(row) < 0 {
		return false
	}
	*e = append(*e, row)
	return true
}

func pivot(row []*big.Rat) int {
	for i, x := range row {
		if x.Sign() != 0 {
			return i
		}
	}
	return -1
}

// TestTiesAreLinearEquations: ties find exactly the shorts, sources and
// transformers whose equation follows from the others, whatever their order.
func TestTiesAreLinearEquations(t *testing.T) {
	names := []string{"a", "b", "c", "d", "e"}
	ratios := []int64{1, 2, 3, 4, 6}
	rapid.Check(t, func(t *rapid.T) {
		tied, exact := ties{}, equations{}
		for range rapid.IntRange(1, 12).Draw(t, "branches") {
			row := make([]*big.Rat, len(names))
			for i := range row {
				row[i] = new(big.Rat)
			}
			a := rapid.IntRange(0, len(names)-1).Draw(t, "a")
			b := rapid.IntRange(0, len(names)-1).Draw(t, "b")
			var got bool
			if a == b { // a source or a short to the return conductor
				row[a].SetInt64(1)
				got = tied.fix(names[a])
			} else {
				up := rapid.SampledFrom(ratios).Draw(t, "up")
				down := rapid.SampledFrom(ratios).Draw(t, "down")
				row[b].SetInt64(1)
				row[a].SetFrac64(-up, down)
				got = tied.tie(names[a], names[b], float64(up)/float64(down))
			}
			if want := exact.add(row); got != want {
				t.Fatalf("branch from %s to %s: independent %v, want %v", names[a], names[b], got, want)
			}
		}
	})
}
