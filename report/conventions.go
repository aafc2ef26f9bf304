package report

// conventions writes what the numbers mean.
func (d *document) conventions() {
	d.b.Subheading("Conventions", 70)
	given := "The design file gives complex numbers with j, for e" + sup("+jωt") + "."
	if d.r.Design.Convention == "physics" {
		given = "The design file gives complex numbers with i, for e" + sup("−iωt") + "; they were conjugated on reading."
	}
	for _, s := range []string{
		given + " This document uses j and e" + sup("+jωt") + " throughout.",
		"Amplitudes are peak values unless rms is said. Phases are in degrees, relative to the EMF of the source as a cosine. Times are counted from switch-on.",
		"The EMF is the voltage of the source without a load, behind its impedance " + zs + ". Available power: |EMF|" + sup("2") + "/(8 Re " + zs + "), what the source gives into the conjugate of " + zs + ". Power is the mean over a period, Re(V I*)/2.",
		"Current along a section is positive from its From end to its To end, and the distance z is measured from the From end. An impedance at an end is V/I there, looking along the section towards To; the reference planes are the ends of the sections.",
		"The reflection coefficient is taken against the section's own " + z0 + ": Γ = (Z − " + z0 + ")/(Z + " + z0 + "). VSWR = (1 + |Γ|)/(1 − |Γ|), infinite if |Γ| is 1 or more. Return loss: −20 log" + sub("10") + " |Γ|.",
		"Voltage and current levels are 20 log" + sub("10") + " of a ratio, powers 10 log" + sub("10") + "; dBm is relative to 1 mW. One way loss is that of the matched section.",
		"Wavelengths and degrees are those of the wave on the section at the design frequency. A foot is 0.3048 m; the velocity of light c is 299 792 458 m/s.",
		"An uncertainty after ± is a limit to either side, not a standard deviation. A margin is the distance to the nearer limit, negative beyond it.",
		"A dash (–) stands for what does not apply.",
	} {
		d.b.Item(s)
	}
}

// zs is the sign of the impedance of the source.
var zs = "Z" + sub("s")
