package report

import (
	"linewitness/report/format"
)

// method writes how the numbers were got.
func (d *document) method() {
	d.b.Need(d.b.Body() * caseRoom)
	d.b.Space(22)
	d.b.Heading("Method", 80)
	d.b.Paragraph("Two solutions that share no code are compared: one in the time domain, one in closed form for the steady state. A number in this record was given by both, or is said to come from the time domain alone (peaks, settling), where the closed form has nothing to say.")
	d.methodLine()
	d.b.Subheading("Closed form (phasor)", 60)
	d.b.Paragraph("On a section of length ℓ the voltage is a sum of two waves, written so that no exponential exceeds 1:")
	d.b.Equation("V(z) = P e" + sup("−γz") + " + M e" + sup("−γ(ℓ−z)") + ",   " + z0 + " I(z) = P e" + sup("−γz") + " − M e" + sup("−γ(ℓ−z)") +
		",   γ = √(Z′ Y′),   " + z0 + " = √(Z′/Y′)   at s = jω")
	d.b.Paragraph("Continuity of voltage at both ends of every section and Kirchhoff's current law at every junction give one linear system for P and M of all sections and the junction voltages.")
	d.methodTime()
	d.methodComparison()
	d.methodEvidence()
}

// methodLine writes how a line is modelled.
func (d *document) methodLine() {
	d.b.Subheading("The line", 60)
	d.b.Paragraph("Each section is a uniform line of one kind. Its series impedance Z′ and shunt admittance Y′ per metre obey")
	d.b.Equation("dV/dz = −Z′(s) I,   dI/dz = −Y′(s) V")
	m := d.models()
	if len(m.constant) > 0 || len(m.dispersive) == 0 {
		d.b.Paragraph(m.say(m.constant, "A line with the constant model") + " has constants R′, L′, G′, C′ per metre that do not change with frequency:")
		d.b.Equation("Z′ = R′ + sL′,   Y′ = G′ + sC′;   ∂v/∂z = −R′ i − L′ ∂i/∂t,   ∂i/∂z = −G′ v − C′ ∂v/∂t")
	}
	if len(m.dispersive) > 0 {
		d.methodDispersive(m)
	}
	d.b.Paragraph("A line given by its characteristic impedance, velocity factor and attenuation has, with the velocity v, the attenuation a in nepers per metre at the design frequency and the dielectric's share σ of it, there")
	d.b.Equation("L′ = " + z0 + "/v,   C′ = 1/(" + z0 + " v),   R′ = 2 a " + z0 + " (1 − σ),   G′ = 2 a σ/" + z0)
}

// methodDispersive writes the laws of dispersive lines and their rational
// form. The poles are those of package fdtd.
func (d *document) methodDispersive(m models) {
	d.b.Paragraph(m.say(m.dispersive, "A line with the dispersive model") + " has the skin effect of conductors much thicker than the skin depth and a dielectric whose loss tangent is nearly constant (wideband Debye form):")
	d.b.Equation("Z′ = R + sL + K√s,   Y′ = G + sC + s D ln((ω" + sub("2") + " + s)/(ω" + sub("1") + " + s))/ln(ω" + sub("2") + "/ω" + sub("1") + "),   ω" + sub("1") + " = 2π · 1 kHz,   ω" + sub("2") + " = 2π · 1 THz")
	d.b.Paragraph("R, L, G, C are what is left at the highest frequencies; the tables give R′, L′, G′, C′ as they are at the design frequency, where the characteristic impedance and the velocity factor hold too. The closed form uses these laws as they stand. The time domain uses a sum of first-order sections,")
	d.b.Equation("K√s ≈ Σ r" + sub("k") + " s/(s + x" + sub("k") + "),   and likewise for the logarithm")
	d.b.Paragraph("with two poles x" + sub("k") + " a decade from one and a half decades below the design frequency to as many above, and one section at either end for all that is beyond. Each section is a resistor with an inductor or a capacitor, so that the form is passive whatever its error; each adds one state to a cell, stepped by the trapezoidal rule, and the Courant limit stays that of L and C. The residual of the form stands in the table of the kinds of line and is counted in the expected difference.")
}

// methodTime writes the time-domain part.
func (d *document) methodTime() {
	d.b.Subheading("Time domain (fdtd)", 60)
	d.b.Paragraph("Voltage and current are stepped in turn on a grid, currents half a cell and half a step from the voltages, with the losses averaged over the step; where the constants do not change with frequency that is")
	d.b.Equation("(C′/Δt + G′/2) v" + sup("n+1") + " = (C′/Δt − G′/2) v" + sup("n") + " − Δi/Δz,   (L′/Δt + R′/2) i" + sup("n+½") + " = (L′/Δt − R′/2) i" + sup("n−½") + " − Δv/Δz")
	d.b.Paragraph("The step is a whole fraction of the period. Each section's Courant number S = v Δt/Δz is at most 1 and as near to 1 as its length allows, for the error of the grid over a section of electrical length ℓ/λ with N steps a period is")
	d.b.Equation("Δφ ≈ 60° (π/N)" + sup("2") + " (1 − S" + sup("2") + ") ℓ/λ")
	d.b.Paragraph("A junction owns the half cells of the sections that meet in it; lumped parts use the trapezoidal rule, each part of a combination for itself, and an ideal transformer is exact. Two runs are made. The settling run starts with a smooth rise of the source and gives the steady state. The stress run starts (and stops) as the source does in service and gives the peaks. " +
		"It carries the source as a cosine and as a sine at once: the largest value over all start phases at a place and a time is √(v" + sub("cos") + sup("2") + " + v" + sub("sin") + sup("2") + ").")
	d.b.Paragraph("Steady state is shown, not assumed: windows one longest round trip apart are compared at every recorded point; with the measured factor ρ from window to window the remaining error is")
	d.b.Equation("error ≈ change · ρ/(1 − ρ)")
	d.b.Paragraph("and must be below the tolerance of " + format.Percent(d.r.Design.Tolerance) + " twice in a row, as must the mean and the second and third harmonics. A run that has not got there after " +
		format.Plural(int64(d.r.Design.MaxPeriods), "period") + " is reported as not settled. Phasors are the fundamental of a Fourier transform over whole periods.")
}

// methodComparison writes how the two are compared and judged.
func (d *document) methodComparison() {
	d.b.Subheading("Comparison and verdict", 60)
	d.b.Paragraph("At every point of the grid (evenly thinned on long sections) the two phasors are compared, voltage and current:")
	d.b.Equation("agreement = max |V" + sub("fdtd") + "(z) − V" + sub("phasor") + "(z)|/max |V" + sub("phasor") + "|,   likewise for I")
	d.b.Paragraph("The largest value of the section is the scale because at a null of the envelope any error is large in proportion. The limit is " + format.Percent(d.r.Design.Agreement) +
		". Beside the error found stands the error expected from the grid and from the settling residual; an error found far above the expected one is a disagreement even inside the limit.")
	d.b.Paragraph("A requirement is judged on the worse of the two solutions, with their difference as its uncertainty: met if value and uncertainty are inside the limit, missed if both are outside, not shown otherwise. A rating, less its derating, is judged likewise: on the larger of the steady amplitude, by the worse solution, and of the largest value ever.")
}

// cautions writes what a reader must know before touching the plant.
func (d *document) cautions() {
	d.b.Heading("Cautions", 60)
	for _, c := range []struct{ term, text string }{
		{"RF burns", "Contact with a conductor at radio frequency burns deeply, often without a warning shock, and at levels far below those in this record. Switch off, isolate, lock out and earth before touching any conductor, the outer one included."},
		{"High voltage", "Standing waves and switching put voltages on lines, open ends and stubs that exceed the source's own; this record shows where. Long lines keep a charge after they are disconnected: discharge and earth them."},
		{"Exposure", "People near lines, aerials and open ends may be exposed beyond what is permitted. Observe the limits of IEEE Std C95.1, of the ICNIRP guidelines and of local law, whichever is strictest; this record does not compute exposure."},
		{"Breakdown, heating", "A rating that is exceeded even once can start an arc that the source then feeds. Ratings fall with altitude, humidity, dirt, age and temperature; keep the margins that the maker and the applicable code ask for."},
		{"Responsibility", "This record is calculation. It does not replace measurement on the finished plant, the local electrical and radio codes, or the judgement of a licensed practitioner; where they differ from it, they prevail."},
	} {
		d.b.Term(c.term, c.text)
	}
}
