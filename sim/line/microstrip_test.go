package line

import (
	"math"
	"testing"
)

// TestHammerstadJensen: values computed apart from this program from two
// copies of the formulas that agree.
func TestHammerstadJensen(t *testing.T) {
	for _, row := range []struct{ u, er, t, z0, ee float64 }{
		{1, 1, 0, 126.423865, 1},
		{1, 9.8, 0, 49.288800, 6.5790266},
		{0.9654, 9.9, 0, 49.902975, 6.6227661},
		{2, 4.5, 0, 48.195090, 3.4123747},
		{1.9125, 4.4, 0, 50.020697, 3.3310864},
		{0.1, 2.2, 0, 202.684942, 1.6806232},
		{10, 2.2, 0, 20.439215, 2.0159900},
		{2, 4.5, 0.02, 47.815547, 3.3895739},
	} {
		g := mustGeometry(t, Microstrip{row.u * 1e-3, 1e-3, row.t * 1e-3, row.er, 0, copper})
		near(t, "Z0", g.Z0, row.z0, 1e-6) // a unit of the last digit
		near(t, "permittivity", g.Permittivity, row.ee, 1e-7)
	}
	// The same, to four decimals: w 0.3, h 0.2, t 0.035, er 4.3.
	g := mustGeometry(t, Microstrip{0.3e-3, 0.2e-3, 0.035e-3, 4.3, 0, copper})
	near(t, "Z0", g.Z0, 55.0772, 0.00005)
}

// pozar is the approximation of POZ eqs. 3.195 and 3.196 (see
// conductor_test.go), good to about 1 %.
func pozar(u, er float64) (z0, ee float64) {
	ee = (er+1)/2 + (er-1)/2/math.Sqrt(1+12/u)
	if u <= 1 {
		return 60 / math.Sqrt(ee) * math.Log(8/u+u/4), ee
	}
	return 120 * math.Pi / math.Sqrt(ee) / (u + 1.393 + 0.667*math.Log(u+1.444)), ee
}

// TestMicrostripAgainstOthers: two other formulas, with their printed values.
func TestMicrostripAgainstOthers(t *testing.T) {
	const approximation = 0.015
	for _, row := range []struct{ u, er, z0, ee float64 }{
		{1, 9.8, 49.2082, 6.62034},
		{2, 4.5, 48.3919, 3.41144},
		{0.9654, 9.9, 49.8162, 6.66429},
	} {
		z0, ee := pozar(row.u, row.er)
		near(t, "Z0, POZ", z0, row.z0, 0.00005)
		near(t, "permittivity, POZ", ee, row.ee, 0.000005)
		g := mustGeometry(t, Microstrip{row.u, 1, 0, row.er, 0, copper})
		near(t, "Z0 against POZ", g.Z0/z0, 1, approximation)
		near(t, "permittivity against POZ", g.Permittivity/ee, 1, approximation)
	}
	// ELL m0186: Wheeler's formula of 1977, 48.0834 ohm (computed), printed as
	// about 50 ohm for h/W = 0.5, er = 4.5.
	near(t, "Z0 against Wheeler", mustGeometry(t, Microstrip{2, 1, 0, 4.5, 0, copper}).Z0/48.083387316, 1, approximation)
}

// TestMicrostripLoss: POZ Example 3.7, w = 0.483 mm on 0.5 mm of er = 9.9 at 10
// GHz. The book takes the permittivity from its own approximation, which moves
// the dielectric loss by half a per cent.
func TestMicrostripLoss(t *testing.T) {
	const f = 10e9
	g := mustGeometry(t, Microstrip{0.482841081985e-3, 0.5e-3, 0, 9.9, 1e-3, copper})
	near(t, "dielectric loss, Np/m", g.Dielectric(f)*g.Z0/2, 0.255, 0.000809)
	near(t, "dielectric loss, dB/cm", g.Dielectric(f)*g.Z0/2*NeperDB/100, 0.022, 0.0005)
	near(t, "conductor loss, Np/cm", g.Conductor(f)/(2*g.Z0)/100, 0.0108, 0.00005)
	near(t, "conductor loss, dB/cm", g.Conductor(f)/(2*g.Z0)*NeperDB/100, 0.094, 0.0005)
	const length = 0.872 // cm, three quarters of a wavelength
	total := (g.Conductor(f)/g.Z0 + g.Dielectric(f)*g.Z0) / 2 * NeperDB / 100 * length
	near(t, "loss, dB", total, 0.101, 0.0005)
}

// TestCurrentCrowding: the loss by receding walls is near the factor exp(-1.2
// (Z0 in air/eta0)^0.7) on that of a uniform current (Hammerstad and Jensen
// 1980, from memory), for strips of the usual thickness.
func TestCurrentCrowding(t *testing.T) {
	const apart = 0.15
	for _, u := range []float64{0.5, 1, 2, 5} {
		x := Microstrip{u * 1e-3, 1e-3, 10e-6, 9.8, 0, copper}
		factor := math.Exp(-1.2 * math.Pow(stripAir(u)/eta0, 0.7))
		near(t, "crowding", x.perMetre()*x.Width/2/factor, 1, apart)
	}
}

// TestNoSheet: as the sheet turns into air its share tends to a value, not to
// a quotient of rounding errors.
func TestNoSheet(t *testing.T) {
	for _, u := range []float64{0.1, 1, 10} {
		air := mustGeometry(t, Microstrip{u, 1, 0, 1, 1e-3, copper})
		near(t, "loss tangent", mustGeometry(t, Microstrip{u, 1, 0, 1 + 1e-6, 1e-3, copper}).LossTangent/air.LossTangent, 1, 1e-5)
		near(t, "velocity factor", air.VelocityFactor, 1, roundTol)
	}
}
