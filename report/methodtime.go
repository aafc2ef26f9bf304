package report

import "linewitness/report/format"

// methodTime writes the time-domain part.
func (d *document) methodTime() {
	half := func(x, y string) string { return frac(x, "Δt") + " + " + frac(y, "2") }
	less := func(x, y string) string { return frac(x, "Δt") + " − " + frac(y, "2") }
	d.b.Subheading("Time domain (fdtd)", 60)
	d.b.Equation("Voltage and current are stepped in turn on a grid, currents half a cell and half a step from the voltages, with the losses averaged over the step; where the constants do not change with frequency that is",
		paren(half("C′", "G′"))+" v"+sup("n+1")+" = "+paren(less("C′", "G′"))+" v"+sup("n")+" − "+frac("Δi", "Δz"),
		paren(half("L′", "R′"))+" i"+sup("n+½")+" = "+paren(less("L′", "R′"))+" i"+sup("n−½")+" − "+frac("Δv", "Δz"))
	d.b.Equation("The step is a whole fraction of the period, Δt = T/N. Each section's Courant number S is at most 1 and as near to 1 as its length allows, for on a lossless line a wave of the grid has the phase constant k and over a section of electrical length ℓ/λ is late by Δφ:",
		"S = v "+frac("Δt", "Δz"), "sin "+frac("ωΔt", "2")+" = S sin "+frac("kΔz", "2"), "Δφ ≈ 60° "+paren(frac("π", "N"))+sup("2")+" (1 − S"+sup("2")+") "+frac("ℓ", "λ"))
	d.b.Equation("The expected difference is worked out with the full relation of the grid, losses and the half cells at the ends included. A junction owns the half cells of the sections that meet in it. Lumped parts use the trapezoidal rule, each part of a combination for itself; a series R, L and C with the voltage u across it then is, averaged over a step,",
		"u = "+paren("R + "+frac("2L", "Δt")+" + "+frac("Δt", "2C"))+" i − "+frac("2L", "Δt")+" i"+sub("0")+" + "+frac("q"+sub("0"), "C"), "i"+sub("1")+" = 2i − i"+sub("0"), "q"+sub("1")+" = q"+sub("0")+" + i Δt")
	d.b.Paragraph("with the current and the charge at the start (0) and at the end (1) of the step; L and C are scaled so that their reactance at the source frequency is exact. An ideal transformer is exact.")
	d.b.Equation("Two runs are made. The settling run starts with a smooth rise of the source and gives the steady state. The stress run starts (and stops) as the source does in service and gives the peaks. "+
		"It carries the source as a cosine and as a sine at once, so that the largest value over all start phases, at each place and time, is",
		"v"+sub("max")+" = "+root("v"+sub("cos")+sup("2")+" + v"+sub("sin")+sup("2")))
}

// methodSettling writes how steady state is shown.
func (d *document) methodSettling() {
	d.b.Subheading("Settling", 60)
	d.b.Equation("Steady state is shown, not assumed: windows one longest round trip apart are compared at every recorded point, none before the end of the rise and a round trip. With the measured factor ρ from window to window the error that is left is the sum of a geometric series,",
		"error ≈ change · "+frac("ρ", "1 − ρ"))
	d.b.Paragraph("It must be below the tolerance of " + format.Percent(d.r.Design.Tolerance) + " twice in a row, as must the mean and the second and third harmonics. A run that has not got there after " +
		format.Plural(int64(d.r.Design.MaxPeriods), "period") + " is reported as not settled. Phasors are the fundamental of a Fourier transform over whole periods.")
}
