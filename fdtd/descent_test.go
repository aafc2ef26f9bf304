package fdtd

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestDescentOfSlowFall: an error that falls by far less than descentStep from
// step to step passes a level when it passes it, not at the start.
func TestDescentOfSlowFall(t *testing.T) {
	var d descent
	const tau = 20000.0 // steps
	for step := range 200000 {
		d = d.push(step, math.Exp(-float64(step)/tau))
	}
	for _, level := range []float64{0.5, 0.1, 0.01, 0.001} {
		want := tau * math.Log(1/level)
		// The level is known to descentStep, the step to one.
		if got := float64(d.last(level)); math.Abs(got-want) > tau*descentStep+1 {
			t.Errorf("level %g: passed at step %.0f, want %.0f", level, got, want)
		}
	}
	if most := int(200000/tau/descentStep) + 1; len(d) > most {
		t.Errorf("%d entries, %d are enough", len(d), most)
	}
}

// TestDescentOfWanderingErrors: the last step above a level is that of all errors, to within
// descentStep of the level, however they rise and fall.
func TestDescentOfWanderingErrors(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var d descent
		var all []float64
		e := 1.0
		for i := range rapid.IntRange(1, 300).Draw(t, "steps") {
			e *= rapid.Float64Range(0.99, 1.008).Draw(t, "factor")
			d, all = d.push(i+1, e), append(all, e)
		}
		level := rapid.Float64Range(0.05, 2).Draw(t, "level")
		last := func(level float64) int {
			for i := len(all) - 1; i >= 0; i-- {
				if all[i] > level {
					return i + 1
				}
			}
			return 0
		}
		got := d.last(level)
		if early, late := last(level), last(level/(1+descentStep)); got < early || got > late {
			t.Fatalf("last step above %g: %d, want %d to %d", level, got, early, late)
		}
	})
}
