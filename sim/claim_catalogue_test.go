package sim

import (
	"math"
	"testing"

	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// referenceCase is a line for which the wrong results of well-known slips were
// computed independently of this program, by a program with real characteristic
// impedances: 100 MHz, 3.2 m of 50 ohm with a velocity factor of 0.66 and 0.16
// dB/m, 25 - j40 ohm, an EMF of 20 V behind 50 ohm.
func referenceCase() *network.Network {
	f := newFeeder(100e6, 20, 50, "source", "end")
	return &f.line("main", 0, 1, 50, 0.66, 0.16, 3.2).load("load", 1, 25-40i).Network
}

// The figures that the reference case is asked for.
var (
	zin     = design.Requirement{Quantity: design.InputImpedance, Section: "main", End: "from"}
	vswrIn  = design.Requirement{Quantity: design.VSWR, Section: "main", End: "from"}
	vswrEnd = design.Requirement{Quantity: design.VSWR, Section: "main", End: "to"}
	vIn     = design.Requirement{Quantity: design.Voltage, At: "source"}
	vEnd    = design.Requirement{Quantity: design.Voltage, At: "end"}
	turn    = design.Requirement{Quantity: design.PhaseDifference, Between: [2]string{"end", "source"}}
	watts   = design.Requirement{Quantity: design.LoadPower, Load: "load"}
)

// printedTol is the tolerance of the claims of these tests, a hundredth: the
// figures are printed to three or four digits.
const printedTol = 0.01

const deg = pi / 180 // rad

// TestReferenceRight: the right results of the reference case are confirmed,
// and no slip is named.
func TestReferenceRight(t *testing.T) {
	a := assessorOf(t, referenceCase())
	for _, tt := range []struct {
		about design.Requirement
		value complex128
	}{
		{zin, 16.97 - 0.63i},
		{vswrEnd, 3.494},
		{vswrIn, 2.947},
		{design.Requirement{Quantity: design.Reflection, Section: "main", End: "from"}, 0.4932},
		{vIn, 5.072},
		{vEnd, 10.464},
		{turn, 109.44 * deg},
		{turn, (109.44 - 360) * deg},
		{watts, 0.615},
	} {
		got := assessOne(t, a, claimOf(tt.about, tt.value, 1e-3)) // they are printed to four digits
		if got.Verdict != record.Confirmed || len(got.Slips) > 0 {
			t.Errorf("%s %v: %s, %v off, slips %v", tt.about.Quantity, tt.value, got.Verdict, got.Difference, got.Slips)
		}
	}
}

// TestReferenceSlips: each wrong result of the reference case is recognised as
// the slip that it came from. The numbers are those of the catalogue, computed
// independently of this program.
func TestReferenceSlips(t *testing.T) {
	const main = "section main"
	a := assessorOf(t, referenceCase())
	for _, tt := range []struct {
		row   int // of the catalogue
		about design.Requirement
		value complex128
		id    slip.ID
		where string
	}{
		{1, zin, 16.97 + 0.63i, slip.ResultSign, ""},
		{1, turn, -109.44 * deg, slip.ResultSign, ""},
		{1, turn, -109.44 * deg, slip.PhaseReversed, ""},
		{2, zin, 139.97 + 30.09i, slip.LoadSign, "load load"},
		{2, vIn, 14.89, slip.LoadSign, "load load"},
		{3, vEnd, 7.399, slip.RMSForPeak, ""},
		{3, watts, 0.3075, slip.RMSForPeak, ""},
		{3, vEnd, 10.464 * 1.4142, slip.PeakForRMS, ""},
		{3, watts, 2 * 0.615, slip.PeakForRMS, ""},
		{4, vEnd, 20.93, slip.PeakToPeakForPeak, ""},
		{5, vEnd, 20.93, slip.EMFForMatched, "the source"},
		{5, watts, 2.460, slip.EMFForMatched, "the source"},
		{5, vEnd, 10.464 / 2, slip.MatchedForEMF, "the source"},
		{6, watts, 0.757, slip.InputForDelivered, ""}, // 1 W available times 1 - |G|^2 at the input
		{6, watts, 1, slip.AvailableForDelivered, ""},
		{6, watts, 1, slip.ForwardForDelivered, main}, // the source is matched
		{7, zin, 18.68 - 14.84i, slip.VelocityOmitted, main},
		{7, turn, -27.9 * deg, slip.VelocityOmitted, main},
		{8, zin, 52.26 - 57.92i, slip.VelocityTwice, main},
		{10, zin, 18.16 + 12.38i, slip.DegreesForRadians, main},
		{10, zin, 22.95 - 27.28i, slip.RadiansForDegrees, main},
		{11, zin, 28.19 - 42.31i, slip.MetresForFeet, main},
		{11, zin, 69.66 + 43.83i, slip.FeetForMetres, main},
		{12, vswrIn, 1.498, slip.NeperForDecibel, main},
		{12, watts, 0.249, slip.NeperForDecibel, main},
		{12, vswrIn, 3.419, slip.DecibelForNeper, main},
		{14, vswrIn, 3.194, slip.OneWayLoss, main},
		{16, zin, 139.97 - 30.09i, slip.TowardLoad, main},
		{17, zin, 147.10 + 5.44i, slip.CurrentReflection, ""},
		{23, vswrEnd, 2.947, slip.OtherEnd, "from end of section main"},
		{23, vswrIn, 3.494, slip.OtherEnd, "to end of section main"},
		{27, vEnd, 10.464 * 200, slip.RawSpectrum, ""}, // N = 400
		{27, vEnd, 10.464 * 0.5, slip.HalfSpectrum, ""},
		{27, vEnd, 10.464 * 0.54, slip.WindowGain, ""},
		{27, vEnd, 10.464 * 0.42, slip.WindowGain, ""},
		{27, vEnd, 10.464 * 0.2156, slip.WindowGain, ""},
		{27, vEnd, 10.464 * 0.25, slip.WindowTwice, ""}, // Hann
		{31, vEnd, 20.63, slip.SourceForced, "the source"},
	} {
		got := assessOne(t, a, claimOf(tt.about, tt.value, printedTol))
		if got.Verdict != record.Contradicted || !firstNamed(got, tt.id, tt.where) {
			t.Errorf("row %d, %s %v (%s): %s, slips %+v", tt.row, tt.about.Quantity, tt.value, tt.id.Name(), got.Verdict, got.Slips)
		}
	}
}

// stubbed is a lossless line of 50 ohm with a stub in shunt, at a distance in
// wavelengths from a load of 28 + j18 ohm, that adds the normalised admittance
// jb. The stub is shorted and shorter than half a wave.
func stubbed(distance, b float64) *network.Network {
	f := newFeeder(100e6, 20, 50, "source", "tee", "antenna", "stub end")
	wave := line.C0 / f.Frequency
	length := math.Mod(math.Atan2(1, -b)+2*pi, pi) / (2 * pi) // tan(beta l) = -1/b
	f.line("main", 0, 1, 50, 1, 0, 3*wave).line("tail", 1, 2, 50, 1, 0, distance*wave).line("stub", 1, 3, 50, 1, 0, length*wave)
	return &f.load("antenna", 2, 28+18i).part("end", network.Load, 3, network.Branch{}).Network
}

// TestStubSlips: what slips make of a shunt stub that matches 28 + j18 ohm, as
// computed independently of this program, rows 18 to 22 of the catalogue: at
// 0.3313 or 0.0235 wavelength the line has y = 1 + j0.7598 or its conjugate, at a
// quarter wave from there its z is that.
func TestStubSlips(t *testing.T) {
	const b = 0.75976
	vswr := design.Requirement{Quantity: design.VSWR, Section: "main", End: "from"}
	for _, tt := range []struct {
		row         int
		distance, b float64 // of the design
		value       complex128
		id          slip.ID
		where       string
	}{
		{18, 0.0813, 1 / b, 1, slip.StubOnImpedance, "section stub"},                     // its impedance is that wanted: the design reads 2.97
		{18, 0.0813, -b, 1, slip.StubOnImpedance, "section stub by way of section tail"}, // its admittance is: 4.42
		{19, 0.3313, -b, 4.06, slip.StubSign, "section stub"},
		{19, 0.3313, b, 1, slip.StubSign, "section stub"}, // the design itself reads 4.06
		{20, 0.3313, -b, 3.65, slip.TowardLoad, "section tail"},
		{20, 0.0235, b, 1.60, slip.TowardLoad, "section tail"},
		{21, 0.3313, -b, 6.15, slip.ShortForOpen, "load end"},
		{22, 0.3313, -b, 4.42, slip.StubOnImpedance, "section stub"},
		{22, 0.3313, -b, 2.97, slip.StubInSeries, "section stub"},
	} {
		got := assessOne(t, assessorOf(t, stubbed(tt.distance, tt.b)), claimOf(vswr, tt.value, printedTol))
		if got.Verdict != record.Contradicted || !firstNamed(got, tt.id, tt.where) {
			t.Errorf("row %d, %v: %s, %v by phasor, slips %+v", tt.row, tt.value, got.Verdict, got.Phasor, got.Slips)
		}
	}
}

// TestOtherEndOfTheLine: the hilltop feeder without its stub has a VSWR of
// 1.826 at the transmitter and of 2.102 at the antenna, two sections away
// (computed independently of this program).
func TestOtherEndOfTheLine(t *testing.T) {
	f := newFeeder(98.1e6, 2000, 50, "transmitter", "tee", "antenna")
	f.line("main", 0, 1, 50, 0.921, 0.007, 120).line("tail", 1, 2, 50, 0.921, 0.007, 0.932).load("antenna", 2, 28+18i)
	a := assessorOf(t, &f.Network)
	at := design.Requirement{Quantity: design.VSWR, Section: "tail", End: "to"}
	if got := assessOne(t, a, claimOf(at, 2.102, printedTol)); got.Verdict != record.Confirmed {
		t.Errorf("2.102 at the antenna: %s, %v", got.Verdict, got.Phasor)
	}
	if got := assessOne(t, a, claimOf(at, 1.826, printedTol)); !firstNamed(got, slip.OtherEnd, "from end of section main") {
		t.Errorf("1.826 at the antenna: %s, slips %+v", got.Verdict, got.Slips)
	}
}
