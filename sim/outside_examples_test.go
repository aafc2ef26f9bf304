package sim_test

import (
	"encoding/json"
	"math"
	"math/cmplx"
	"os"
	"testing"
)

// An example is a worked example from outside, as testdata/outside_examples.json
// holds it: source with edition and number, inputs, and for each quantity the
// value printed there and the value recomputed apart from this program.
type example struct {
	ID, Source, Read, About, Note string
	Inputs                        inputs
	Checks                        []struct {
		Quantity, Unit string
		Printed        value
		// PrintTolerance holds for each component: half of the last printed
		// digit, or the true distance of a misprint or chart reading (Note).
		PrintTolerance float64 `json:"print_tolerance"`
		Recomputed     value
		// TimeDomain: the quantity can be read at the terminals of a run.
		TimeDomain bool `json:"time_domain"`
		Note       string
	}
}

// A value is a number, or [re, im].
type value complex128

func (v *value) UnmarshalJSON(b []byte) error {
	var pair [2]float64
	if err := json.Unmarshal(b, &pair[0]); err == nil {
		*v = value(complex(pair[0], 0))
		return nil
	}
	if err := json.Unmarshal(b, &pair); err != nil {
		return err
	}
	*v = value(complex(pair[0], pair[1]))
	return nil
}

// inputs are the numbers an example gives, in SI units; wavelengths are _wl.
type inputs map[string]json.RawMessage

// c gives an input by name, and panics if it is not there.
func (in inputs) c(name string) complex128 {
	var v value
	if err := v.UnmarshalJSON(in[name]); err != nil {
		panic("outside: input " + name + ": " + err.Error())
	}
	return complex128(v)
}

func (in inputs) f(name string) float64 { return real(in.c(name)) }

// list gives an input that is a list of numbers.
func (in inputs) list(name string) (v []float64) {
	if err := json.Unmarshal(in[name], &v); err != nil {
		panic("outside: input " + name + ": " + err.Error())
	}
	return v
}

// found are the quantities that a recipe reads, by the names in the file.
type found map[string]complex128

func (f found) real(name string, v float64) { f[name] = complex(v, 0) }

// A recipe builds the networks of an example, has them solved and reads the
// quantities. With a reader that cannot look along a line it leaves out those
// that need it.
type recipe func(t *testing.T, in inputs, solve reader) found

const (
	// phasorTol is the relative tolerance of the closed form against the
	// recomputed values, which are given to 9 digits or more; what is left is
	// for places found by bisection.
	phasorTol = 1e-6
	// residueTol is how far a time-domain reading may be from what its grid
	// must give: the settling tolerance, magnified by the reactive networks.
	residueTol = 1e-5
	// gridTol bounds what the grid itself may do at 60 cells per wavelength.
	gridTol = 5e-3
)

// TestOutsideExamples checks the worked examples through both witnesses: the
// closed form against the recomputed and the printed values, the time domain
// against the recomputed values within the error of its grid, which the
// equivalent lines give.
func TestOutsideExamples(t *testing.T) {
	for _, e := range readExamples(t) {
		t.Run(e.ID, func(t *testing.T) {
			t.Logf("%s (%s): %s", e.Source, e.Read, e.About)
			cook, ok := recipes[e.ID]
			if !ok {
				t.Fatal("no recipe")
			}
			exact := cook(t, e.Inputs, readPhasor)
			for _, c := range e.Checks {
				got, ok := exact[c.Quantity]
				if !ok {
					t.Fatalf("the recipe does not give %q", c.Quantity)
				}
				near(t, "phasor, recomputed", c.Quantity, got, complex128(c.Recomputed), phasorTol*size(c.Recomputed))
				nearPrint(t, c.Quantity, got, complex128(c.Printed), c.PrintTolerance)
			}
			checkTimeDomain(t, e, cook)
		})
	}
}

// checkTimeDomain cooks an example with the time-domain witness.
func checkTimeDomain(t *testing.T, e example, cook recipe) {
	any := false
	for _, c := range e.Checks {
		any = any || c.TimeDomain
	}
	if !any {
		return
	}
	run, must := cook(t, e.Inputs, readFDTD), cook(t, e.Inputs, readEquivalent)
	for _, c := range e.Checks {
		got, ok := run[c.Quantity]
		if ok != c.TimeDomain {
			t.Errorf("%s: read in the time domain: %v, the file says %v", c.Quantity, ok, c.TimeDomain)
		}
		if !ok {
			continue
		}
		s := size(c.Recomputed)
		grid := cmplx.Abs(must[c.Quantity] - complex128(c.Recomputed))
		if grid > gridTol*s {
			t.Errorf("%s: the grid must err by %.2g of the value, more than %g", c.Quantity, grid/s, gridTol)
		}
		near(t, "fdtd, recomputed", c.Quantity, got, complex128(c.Recomputed), grid+residueTol*s)
		near(t, "fdtd, its grid", c.Quantity, got, must[c.Quantity], residueTol*s)
	}
}

// size is what a relative error is taken of: 1 for a match, which is 0.
func size(v value) float64 {
	if v == 0 {
		return 1
	}
	return cmplx.Abs(complex128(v))
}

func near(t *testing.T, against, quantity string, got, want complex128, tol float64) {
	t.Helper()
	if !(cmplx.Abs(got-want) <= tol) {
		t.Errorf("%s: %s = %.9g, want %.9g within %.2g", against, quantity, got, want, tol)
	}
}

func nearPrint(t *testing.T, quantity string, got, want complex128, tol float64) {
	t.Helper()
	const half = 1 + 1e-9 // a value halfway between two digits
	if d := got - want; !(math.Max(math.Abs(real(d)), math.Abs(imag(d))) <= tol*half) {
		t.Errorf("print: %s = %.9g, want %.9g within %.2g", quantity, got, want, tol)
	}
}

func readExamples(t *testing.T) []example {
	t.Helper()
	b, err := os.ReadFile("testdata/outside_examples.json")
	if err != nil {
		t.Fatal(err)
	}
	var all []example
	if err := json.Unmarshal(b, &all); err != nil {
		t.Fatal(err)
	}
	if len(all) != len(recipes) {
		t.Errorf("%d examples, %d recipes", len(all), len(recipes))
	}
	return all
}
