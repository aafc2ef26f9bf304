package oneport

import (
	"errors"
	"fmt"
	"math"
	"math/cmplx"
	"slices"
	"sort"
)

// A Table is a one-port at one or more points of rising frequency. Read and
// FromImpedances make it.
type Table struct {
	Name      string  // of the file; empty if the table was typed
	Version   string  // of the format, "1" if the file does not say; empty if typed
	Reference float64 // ohm, of the reflection coefficients
	points    []Point
}

// An Impedance is a typed point of a table. An open is cmplx.Inf().
type Impedance struct {
	F float64    // Hz
	Z complex128 // ohm
}

// FromImpedances makes a table of points with rising frequency. Its reference,
// which matters between points only, is the geometric mean of the finite |Z|
// that are not 0, so that the interpolation does not depend on the unit; 50
// ohm if there is none.
func FromImpedances(points []Impedance) (*Table, error) {
	if len(points) == 0 {
		return nil, errors.New("the table has no points")
	}
	t := &Table{Reference: meanMagnitude(points)}
	last := math.Inf(-1)
	for i, p := range points {
		switch {
		case !(p.F >= 0) || math.IsInf(p.F, 1):
			return nil, fmt.Errorf("point %d: the frequency must be a finite number of at least 0", i+1)
		case p.F <= last:
			return nil, fmt.Errorf("point %d: %s does not come after %s; list the points with rising frequency", i+1, hertz(p.F), hertz(last))
		case cmplx.IsNaN(p.Z):
			return nil, fmt.Errorf("point %d: the impedance is not a number", i+1)
		}
		last = p.F
		q := fromImpedance(p.F, p.Z, t.Reference)
		if !finite(q.S) {
			return nil, fmt.Errorf("point %d: the impedance is a negative resistance; is its sign right?", i+1)
		}
		t.points = append(t.points, q)
	}
	return t, nil
}

func meanMagnitude(points []Impedance) float64 {
	var sum, n float64
	for _, p := range points {
		if a := cmplx.Abs(p.Z); a > 0 && !math.IsInf(a, 1) {
			sum, n = sum+math.Log(a), n+1
		}
	}
	if n == 0 {
		return 50
	}
	return math.Exp(sum / n)
}

// Len is the number of points.
func (t *Table) Len() int { return len(t.points) }

// Points gives the points in order of frequency.
func (t *Table) Points() []Point { return slices.Clone(t.points) }

// Range gives the lowest and the highest frequency, Hz.
func (t *Table) Range() (low, high float64) {
	return t.points[0].F, t.points[len(t.points)-1].F
}

// sameTolerance is the relative difference up to which two frequencies are the
// same one, written in other units and rounded.
const sameTolerance = 1e-12

// At gives the impedance in ohm at the frequency f in Hz; an open is
// cmplx.Inf(). At a point of the table it is that of the point. Between two
// points the real and the imaginary part of the reflection coefficient are
// interpolated linearly: unlike an impedance it stays finite through opens and
// shorts, and between passive points the result is passive. It lies on the
// chord of the true curve and so has a little more loss: see Warnings. A
// table with one point holds at its frequency only. Outside of the range At
// gives an error: nothing is extrapolated.
func (t *Table) At(f float64) (complex128, error) {
	i, same := t.find(f)
	if same {
		return t.points[i].Z, nil
	}
	if i == 0 || i == len(t.points) || math.IsNaN(f) {
		return 0, t.outside(f)
	}
	a, b := t.points[i-1], t.points[i]
	share := complex((f-a.F)/(b.F-a.F), 0)
	return fromReflection(f, a.S+share*(b.S-a.S), t.Reference).Z, nil
}

// find gives the first point at f or above, and whether it is at f.
func (t *Table) find(f float64) (int, bool) {
	i := sort.Search(len(t.points), func(i int) bool { return t.points[i].F >= f*(1-sameTolerance) })
	return i, i < len(t.points) && t.points[i].F <= f*(1+sameTolerance)
}

func (t *Table) outside(f float64) error {
	name := "the table"
	if t.Name != "" {
		name = t.Name
	}
	low, high := t.Range()
	if len(t.points) == 1 {
		return fmt.Errorf("%s has one point, at %s, and none at %s", name, hertz(low), hertz(f))
	}
	return fmt.Errorf("%s reaches from %s to %s; %s is outside of it, and nothing is extrapolated",
		name, hertz(low), hertz(high), hertz(f))
}

// hertz prints a frequency with the unit that gives it one to three digits
// before the point.
func hertz(f float64) string {
	for _, u := range []struct {
		size float64
		name string
	}{{1e9, "GHz"}, {1e6, "MHz"}, {1e3, "kHz"}} {
		if f >= u.size {
			return fmt.Sprintf("%.9g %s", f/u.size, u.name)
		}
	}
	return fmt.Sprintf("%.9g Hz", f)
}
