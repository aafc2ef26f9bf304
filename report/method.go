package report

import (
	"slices"

	"linewitness/report/format"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// frac and root mark up the fractions and the roots of equations.
var (
	frac  = typeset.Frac
	root  = typeset.Sqrt
	paren = typeset.Round
	abs   = typeset.Bars
)

// method writes how the numbers were got.
func (d *document) method() {
	d.b.Need(d.b.Body() * caseRoom)
	d.b.Space(22)
	d.b.Heading("Method", 80)
	d.b.Paragraph("Two solutions that share no code are compared: one in the time domain, one in closed form for the steady state. A number in this record was given by both, or is said to come from the time domain alone (peaks, settling), where the closed form has nothing to say.")
	d.methodLine()
	d.methodPhasor()
	d.methodTime()
	d.methodSettling()
	d.methodComparison()
	d.methodEvidence()
	d.methodPower()
	d.methodClaims()
}

// methodPhasor writes the closed form.
func (d *document) methodPhasor() {
	d.b.Subheading("Closed form (phasor)", 60)
	d.b.Equation("On a section of length ℓ the voltage is a sum of two waves, written so that no exponential exceeds 1; at s = jω",
		"V(z) = P e"+sup("−γz")+" + M e"+sup("−γ(ℓ−z)"), z0+" I(z) = P e"+sup("−γz")+" − M e"+sup("−γ(ℓ−z)"),
		"γ = "+root("Z′ Y′"), z0+" = "+root(frac("Z′", "Y′")))
	d.b.Paragraph("Continuity of voltage at both ends of every section and Kirchhoff's current law at every junction give one linear system for P and M of all sections and the junction voltages.")
}

// methodLine writes how a line is modelled.
func (d *document) methodLine() {
	d.b.Subheading("The line", 60)
	d.b.Equation("Each section is a uniform line of one kind. Its series impedance Z′ and shunt admittance Y′ per metre obey the telegrapher's equations",
		frac("dV", "dz")+" = −Z′(s) I", frac("dI", "dz")+" = −Y′(s) V")
	m := d.models()
	if len(m.constant) > 0 || len(m.dispersive) == 0 {
		d.b.Equation(m.say(m.constant, "A line with the constant model")+" has constants R′, L′, G′, C′ per metre that do not change with frequency:",
			"Z′ = R′ + sL′", "Y′ = G′ + sC′", frac("∂v", "∂z")+" = −R′ i − L′ "+frac("∂i", "∂t"), frac("∂i", "∂z")+" = −G′ v − C′ "+frac("∂v", "∂t"))
	}
	if len(m.dispersive) > 0 {
		d.methodDispersive(m)
	}
	d.methodConstants()
}

// methodConstants writes how what is known of a line becomes its constants.
func (d *document) methodConstants() {
	d.b.Equation("A line given by its characteristic impedance, velocity factor and attenuation has, with the velocity v, the attenuation a in nepers per metre at the design frequency and the dielectric's share σ of it, there",
		"L′ = "+frac(z0, "v"), "C′ = "+frac("1", z0+" v"), "R′ = 2 a "+z0+" (1 − σ)", "G′ = "+frac("2 a σ", z0))
	kinds := d.lineKinds()
	if slices.ContainsFunc(kinds, func(k lineKind) bool { return len(k.Fit) > 0 }) {
		d.b.Equation("A table of losses is fitted by a conductor part and a dielectric part, neither negative:",
			"a(f) = k"+sub("1")+" "+root("f")+" + k"+sub("2")+" f")
	}
	if countData(kinds, func(p record.Pedigree) bool { return p.Kind == "geometry" }) == 0 {
		return
	}
	d.b.Equation("A line given by its dimensions has the characteristic impedance of its cross-section, here of a coaxial line with the radii a and b, of two wires of diameter d at the spacing D, and of a wire of radius a at the height h over ground, and the surface resistance of its metal:",
		z0+" = "+frac("η"+sub("0"), "2π "+root("ε"+sub("r")))+" ln "+frac("b", "a"), z0+" = "+frac("η"+sub("0"), "π "+root("ε"+sub("r")))+" arcosh "+frac("D", "d"),
		z0+" = "+frac("η"+sub("0"), "2π "+root("ε"+sub("r")))+" arcosh "+frac("h", "a"), "R"+sub("s")+" = "+root(frac("ω μ"+sub("0"), "2 κ")))
	d.b.Paragraph("with the conductivity κ. A microstrip follows E. Hammerstad and O. Jensen (1980), a stripline S. B. Cohn (1954).")
}

// methodDispersive writes the laws of dispersive lines and their rational
// form. The poles are those of package fdtd.
func (d *document) methodDispersive(m models) {
	w1, w2 := "ω"+sub("1"), "ω"+sub("2")
	d.b.Equation(m.say(m.dispersive, "A line with the dispersive model")+" has the skin effect of conductors much thicker than the skin depth and a dielectric whose loss tangent is nearly constant (wideband Debye form):",
		"Z′ = R + sL + K "+root("s"), "Y′ = G + sC + s D "+frac("ln[("+w2+" + s)/("+w1+" + s)]", "ln("+w2+"/"+w1+")"), w1+" = 2π · 1 kHz", w2+" = 2π · 1 THz")
	d.b.Equation("R, L, G, C are what is left at the highest frequencies; the tables give R′, L′, G′, C′ as they are at the design frequency, where the characteristic impedance and the velocity factor hold too. The closed form uses these laws as they stand. The time domain uses a sum of first-order sections, and likewise for the logarithm:",
		"K "+root("s")+" ≈ Σ "+frac("r"+sub("k")+" s", "s + x"+sub("k")))
	d.b.Paragraph("with two poles x" + sub("k") + " a decade from one and a half decades below the design frequency to as many above, and one section at either end for all that is beyond. Each section is a resistor with an inductor or a capacitor, so that the form is passive whatever its error; each adds one state to a cell, stepped by the trapezoidal rule, and the Courant limit stays that of L and C. The residual of the form stands in the table of the kinds of line and is counted in the expected difference.")
}

// methodComparison writes how the two are compared and judged.
func (d *document) methodComparison() {
	d.b.Subheading("Comparison and verdict", 60)
	d.b.Equation("At every point of the grid (evenly thinned on long sections) the two phasors are compared, voltage and current:",
		"agreement = "+frac("max |V"+sub("fdtd")+"(z) − V"+sub("phasor")+"(z)|", "max |V"+sub("phasor")+"(z)|"), "and likewise for I")
	d.b.Paragraph("The largest value of the section is the scale because at a null of the envelope any error is large in proportion. The limit is " + format.Percent(d.r.Design.Agreement) +
		". Beside the error found stands the error expected from the grid and from the settling residual; an error found far above the expected one is a disagreement even inside the limit.")
	d.b.Paragraph("A requirement is judged on the worse of the two solutions, with an uncertainty made of their difference, of the grid and of the settling: met if value and uncertainty are inside the limit, missed if both are outside, not shown otherwise. A rating, less its derating, is judged likewise: on the larger of the steady amplitude, by the worse solution, and of the largest value ever.")
}

// methodPower writes how the power is accounted for.
func (d *document) methodPower() {
	d.b.Subheading("Power", 60)
	d.b.Equation("Both solutions account for the power from the source by the currents and voltages that take it up; every amplitude is a peak value:",
		"P"+sub("in")+" = "+frac("1", "2")+" Re(V I"+sup("*")+")", "P"+sub("section")+" = "+frac("1", "2")+" ∫ (R′ |I|"+sup("2")+" + G′ |V|"+sup("2")+") dz",
		"P"+sub("in")+" = Σ P"+sub("section")+" + Σ P"+sub("element")+" + Σ P"+sub("load"), "Q = "+frac("ω W", "P"+sub("in")))
	d.b.Paragraph("What is left over must be no more than rounding in the closed form, and in the time domain no more than the settling and the rational forms of dispersive lines explain; W is the mean energy stored. A balance that does not close is a disagreement.")
}

// methodClaims writes how claims are judged, where there are any.
func (d *document) methodClaims() {
	if len(d.allClaims()) == 0 {
		return
	}
	d.b.Subheading("Claims", 40)
	d.b.Equation("With the claimed value c, the tolerance τ, and the uncertainty u that a requirement of the same figure would have, a claim is, for both values f of the solutions,",
		"confirmed if |f − c| + u ≤ τ", "contradicted if |f − c| − u > τ", "not shown otherwise")
	d.b.Paragraph("A contradicted claim is computed again with one mistake at a time, such as the velocity factor left out or rms taken for peak. A slip is named only if it alone would make the claim right and moves the figure by more than the tolerance.")
}
