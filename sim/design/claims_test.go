package design

import (
	"fmt"
	"math"
	"math/cmplx"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

func claimsOf(t *testing.T, file string) map[string]Claim {
	t.Helper()
	m := map[string]Claim{}
	for _, c := range goodFile(t, file).Nominal.Claims {
		m[c.ID] = c
	}
	return m
}

// A reading is what a claim is read as.
type reading struct {
	value     complex128
	tolerance float64
	unit, of  string
	text      string // of the tolerance
	complex   bool
}

// checkReadings compares claims with what they are to be read as.
func checkReadings(t *testing.T, claims map[string]Claim, want map[string]reading) {
	t.Helper()
	if len(claims) != len(want) {
		t.Errorf("%d claims, want %d", len(claims), len(want))
	}
	for id, w := range want {
		c := claims[id]
		if cmplx.Abs(c.Value-w.value) > valueTol*cmplx.Abs(w.value) {
			t.Errorf("%s: value %v, want %v", id, c.Value, w.value)
		}
		near(t, id+": tolerance", c.Tolerance, w.tolerance)
		got := reading{w.value, w.tolerance, c.Unit, c.Of, c.ToleranceText, c.Complex}
		if diff := cmp.Diff(w, got, cmp.AllowUnexported(reading{})); diff != "" {
			t.Errorf("%s (-want +got):\n%s", id, diff)
		}
	}
}

func TestClaims(t *testing.T) {
	const mW = 1e-3
	rms := math.Sqrt2
	checkReadings(t, claimsOf(t, "claims.yaml"), map[string]reading{
		"C1":  {36.5 - 61.1i, math.Hypot(36.5, 61.1) / 100, "ohm", "36.5 - j61.1 ohm", "1 %", true},
		"C2":  {cmplx.Rect(1200, math.Pi/6), 2, "kohm", "1.2 kohm at 30 deg", "2 ohm", true},
		"C3":  {cmplx.Rect(71.2, 1.5708), 2, "ohm", "71.2 ohm at 1.5708 rad", "2 ohm", true}, // R is -0.3 mohm: a pure reactance, rounded
		"C4":  {1.83, 0.02, "1", "1.83", "0.02", false},
		"C5":  {1.5, 0.03, "1", "1.5:1", "2 %", false},
		"C6":  {20, 1, "dB", "20 dB", "5 % of 20 dB", false},
		"C7":  {0.45, 0.009, "1", "0.45", "2 %", false},
		"C8":  {0.45, 0.02, "%", "45 %", "2 percentage points", false},
		"C9":  {0.3 - 0.4i, 0.01, "1", "0.3 - j0.4", "2 %", true},
		"C10": {-0.45, 0.02, "1", "0.45 at 180 deg", "0.02", true},
		"C11": {complex(80*rms, 0), 2 * rms, "V rms", "80 V rms", "2 V rms", false},
		"C12": {1, 0.05, "A pp", "2 A pp", "5 %", false},
		"C13": {150, 5, "kV peak", "0.15 kV peak", "10 V pp", false},
		"C14": {3, 0.1, "A peak", "3 A peak", "0.1 A peak", false},
		"C15": {0, 0.01, "%", "0 %", "1 percentage point", false},
		"C16": {2e-6, 50e-9, "us", "2 us", "50 ns", false},
		"C17": {2e-6, 0.1e-6, "periods", "20 periods", "1 period", false},
		"C18": {4e-6, 0.2e-6, "periods", "20 periods", "1 period", false}, // of the case, at half the frequency
		"C19": {1, 0.01, "dBm", "30 dBm", "1 %", false},
		"C20": {1.2, 50 * mW, "W", "1.2 W", "50 mW", false},
		"C21": {0.82, 0.015, "%", "82 %", "1.5 percentage points", false},
		"C22": {0.85, 0.05, "dB", "0.85 dB", "0.05 dB", false},
		"C23": {complex(-math.Pi/6, 0), math.Pi / 360, "deg", "-30 deg", "0.5 deg", false},
		"C24": {1, 0.01, "rad", "1 rad", "0.01 rad", false},
		"C25": {0, 0.1, "dB", "0 dB", "0.1 dB", false},
		"C26": {cmplx.Rect(120, -math.Pi/6), 2.4, "V peak", "120 V peak at -30 deg", "2 %", true},
		"C27": {complex(85*rms, 0), 3, "V rms", "85 V rms", "3 V peak", false},
		"C28": {30 + 40i, 1, "V pp", "60 + j80 V pp", "2 %", true},
		"C29": {complex(0, 2.1*rms), 0.021 * rms, "A rms", "2.1 A rms at 90 deg", "1 %", true},
		"C30": {2.1, 0.021, "A peak", "2.1 A peak", "1 %", false},
		"C31": {0.5, 0.005, "mA peak", "500 mA peak at 0 deg", "1 %", true},
		"C32": {2, 0.02, "A peak", "2 A peak", "1 %", false},
	})
}

// What a claim is about stands where a requirement has it.
func TestClaimSubjects(t *testing.T) {
	c := claimsOf(t, "claims.yaml")
	for _, tt := range []struct {
		id   string
		want Requirement
	}{
		{"C1", Requirement{Text: "At the flange", Document: "calc sheet 3", Quantity: InputImpedance, Section: "main", End: "from"}},
		{"C13", Requirement{Quantity: PeakVoltage, At: "mast", Cases: []string{"iced"}}},
		{"C16", Requirement{Quantity: SettleTime, Settled: 0.001}},
		{"C17", Requirement{Quantity: SettleTime, Settled: 0.01}},
		{"C24", Requirement{Quantity: PhaseDifference, Between: [2]string{"aerial", "hut"}}},
		{"C27", Requirement{Quantity: Voltage, Load: "aerial"}},
		{"C29", Requirement{Quantity: Current, Section: "main", End: "to"}},
		{"C32", Requirement{Quantity: Current, At: "hut", Cases: []string{"moved"}}},
	} {
		tt.want.ID, tt.want.Pos = tt.id, c[tt.id].Pos
		if tt.want.Cases == nil {
			tt.want.Cases = []string{"nominal"}
		}
		if diff := cmp.Diff(tt.want, c[tt.id].Requirement); diff != "" {
			t.Errorf("%s (-want +got):\n%s", tt.id, diff)
		}
	}
	if r := c["C4"].Reference; r == nil || r.SI != 75 {
		t.Errorf("C4: reference %v", r)
	}
	for id, x := range c {
		want := slices.Contains([]Quantity{ReturnLoss, Loss, PowerSplit}, x.Quantity)
		if x.Level != want {
			t.Errorf("%s: level %v, want %v", id, x.Level, want)
		}
	}
}

// Under the physics convention phasors, impedances and phases are turned;
// sizes, tolerances and texts are not.
func TestClaimsInPhysics(t *testing.T) {
	checkReadings(t, claimsOf(t, "claims_physics.yaml"), map[string]reading{
		"Z": {36.5 + 61.1i, math.Hypot(36.5, 61.1) / 100, "ohm", "36.5 - i61.1 ohm", "1 %", true},
		"G": {-0.5i, 0.02, "1", "0.5 at 90 deg", "0.02", true},
		"S": {0.5, 0.02, "1", "0.5", "0.02", false},
		"V": {-120i, 2.4, "V peak", "120 V peak at 90 deg", "2 %", true},
		"I": {1 + 2i, 0.02 * math.Sqrt(5), "A peak", "1 - i2 A peak", "2 %", true},
		"P": {complex(-math.Pi/6, 0), math.Pi / 180, "deg", "30 deg", "1 deg", false},
		"D": {complex(math.Pi/9, 0), math.Pi / 180, "deg", "-20 deg", "1 deg", false},
		"N": {1.5, 0.03, "1", "1.5", "2 %", false},
	})
}

func TestClaimsAreTheSameInEveryCase(t *testing.T) {
	f := goodFile(t, "claims.yaml")
	for _, c := range f.Cases {
		if diff := cmp.Diff(f.Nominal.Claims, c.Design.Claims); diff != "" || len(c.Design.Claims) == 0 {
			t.Errorf("case %s: %s", c.Name, diff)
		}
	}
}

// Every quantity of requirements but agreement can be claimed, and names what
// it is about by the same keys; each has a tolerance.
func TestClaimable(t *testing.T) {
	limiting := []string{"min", "max", "cases", "relative_to", "r", "x"}
	for q, kind := range quantities {
		c, ok := claimable[q]
		if !ok {
			if q != Agreement {
				t.Errorf("%s cannot be claimed", q)
			}
			continue
		}
		own := slices.DeleteFunc(kind.table.names(), func(k string) bool {
			return contains(limiting, k) || k == "within" && q == InputImpedance
		})
		got := slices.DeleteFunc(c.table.names(), func(k string) bool { return contains([]string{"value", "tolerance", "case"}, k) })
		if diff := cmp.Diff(own, got); diff != "" {
			t.Errorf("%s: keys of its requirement (-) and its claim (+):\n%s", q, diff)
		}
	}
	for q, c := range claimable {
		if c.limits == nil || bands[c.limits] == nil {
			t.Errorf("%s has no dimension or no tolerance", q)
		}
		if len(c.table.choices) > 1 {
			t.Errorf("%s still chooses between limits: %v", q, c.table.choices)
		}
	}
}

// A printed claim is read as it was, in any unit and in both conventions.
func TestClaimRoundTrip(t *testing.T) {
	// printed is what cutting to 15 digits, a sine and a cosine may do.
	const printed = 1e-13
	rapid.Check(t, func(t *rapid.T) {
		unit := rapid.SampledFrom([]string{"V peak", "V rms", "V pp", "mV rms", "kV pp"}).Draw(t, "unit")
		size := rapid.Float64Range(1e-3, 1e3).Draw(t, "size")
		phase := rapid.Float64Range(-180, 180).Draw(t, "phase")
		percent := rapid.Float64Range(1e-6, 49).Draw(t, "percent")
		convention := rapid.SampledFrom([]Convention{Engineering, Physics}).Draw(t, "convention")
		text := fmt.Sprintf("%.15g %s at %.13f deg", size, unit, phase)
		src := "format: 1\nrecord: {title: T, number: 1}\nconvention: " + convention.String() +
			"\nsource: {at: a, frequency: 1 MHz, emf: 1 V peak, impedance: 50 ohm}\n" +
			"lines: {k: {z0: 50 ohm, velocity_factor: 1}}\nsections: {m: {from: a, to: b, length: 1 m, line: k}}\n" +
			fmt.Sprintf("claims: [{id: C, quantity: voltage, at: b, value: %s, tolerance: %.15g %%}]\n", text, percent)
		f, err := Load("x", []byte(src))
		if err != nil {
			t.Fatal(err)
		}
		c, u := f.Nominal.Claims[0], voltage.units[unit]
		want := cmplx.Rect(size*math.Pow10(u.exp)*u.factor, convention.sign()*phase*degree)
		if cmplx.Abs(c.Value-want) > printed*cmplx.Abs(want) || !c.Complex || c.Unit != unit || c.Of != text {
			t.Fatalf("%s is read as %+v, want %v", text, c, want)
		}
		if got, want := c.Tolerance, percent/100*cmplx.Abs(want); math.Abs(got-want) > printed*want {
			t.Fatalf("tolerance %v, want %v", got, want)
		}
	})
}
