package line

import (
	"math"
	"strings"
	"testing"
)

// TestCableIdentity: each row of the table against the relation that
// MIL-DTL-28830E 4.7.10 prints, z0 = 101 670/(velocity in % times pF/ft).
func TestCableIdentity(t *testing.T) {
	// tableTol: the table gives the velocity to 0.5 % and the capacitance to
	// half a per cent.
	const tableTol = 0.01
	const foot = 0.3048
	near(t, "the constant, from c", foot*100e12/C0, 101670, 0.5)
	for _, c := range Cables() {
		z0 := 101670 / (100 * c.VelocityFactor * c.Capacitance * 1e12 * foot)
		near(t, c.Type+": z0 over the relation", c.Z0/z0, 1, tableTol)
		near(t, c.Type+": the same", 1+CapacitanceError(c.Z0, c.VelocityFactor, c.Capacitance), c.Z0/z0, 1e-5)
		if w := CapacitanceWarning(c.Z0, c.VelocityFactor, c.Capacitance); w != "" {
			t.Errorf("%s: %s", c.Type, w)
		}
	}
}

// TestCableRows: the rows are those of real cables: polyethylene or PTFE, more
// loss at more frequency, and a loss that two terms fit as well as a table
// from memory deserves.
func TestCableRows(t *testing.T) {
	const memory = 0.15
	if len(Cables()) != 11 {
		t.Errorf("%d cables", len(Cables()))
	}
	for _, c := range Cables() {
		if c.Z0 != 50 && c.Z0 != 75 || c.VelocityFactor < 0.65 || c.VelocityFactor > 0.7 || c.MaxVoltage < 500 || c.MaxVoltage > 5000 {
			t.Errorf("%+v", c)
		}
		fit := mustFit(t, c.Loss...)
		if p, r := fit.Worst(); math.Abs(r) > memory {
			t.Errorf("%s: %+.1f %% at %g Hz", c.Type, 100*r, p.F)
		}
		for i := 1; i < len(c.Loss); i++ {
			if c.Loss[i].Attenuation <= c.Loss[i-1].Attenuation {
				t.Errorf("%s: the loss does not rise", c.Type)
			}
		}
	}
	if !strings.Contains(CablePedigree(), "FROM MEMORY") {
		t.Errorf("pedigree: %q", CablePedigree())
	}
}

func TestFindCable(t *testing.T) {
	for _, name := range []string{"RG-213", "rg-213", "RG213", "rg 213/u"} {
		c, ok := FindCable(name)
		if !ok || c.Type != "RG-213" || c.MaxVoltage != 3700 {
			t.Errorf("%q: %+v, %v", name, c, ok)
		}
	}
	c, _ := FindCable("RG-213")
	near(t, "RG-213 at 10 MHz, dB/100 m", c.Loss[0].Attenuation*100*NeperDB, 1.97, 1e-12)
	for _, name := range []string{"", "RG-21", "RG-2133", "213"} {
		if c, ok := FindCable(name); ok {
			t.Errorf("%q is %s", name, c.Type)
		}
	}
	if names := CableNames(); len(names) != len(Cables()) || names[0] != "RG-213" {
		t.Errorf("names: %v", names)
	}
}

func TestCapacitanceWarning(t *testing.T) {
	// 50 ohm and 0.66 make 101.1 pF/m.
	near(t, "C - 1", CapacitanceError(50, 0.66, 101.1e-12), 0, 0.0005)
	for _, row := range []struct {
		c    float64
		want string
	}{
		{101.1e-12, ""},
		{104e-12, ""},
		{98.2e-12, ""},
		{93.5e-12, "the capacitance 93.5 pF/m is -7.5 % from the 101.1 pF/m of z0 and velocity factor, 1/(z0 v): one of the three is wrong"},
		{105e-12, "the capacitance 105 pF/m is +3.9 % from the 101.1 pF/m of z0 and velocity factor, 1/(z0 v): one of the three is wrong"},
	} {
		if got := CapacitanceWarning(50, 0.66, row.c); got != row.want {
			t.Errorf("%g: %q, want %q", row.c, got, row.want)
		}
	}
}
