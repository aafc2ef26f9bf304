package report

import "strings"

// methodEvidence writes how the uncertainties are got and how the curves are
// graded.
func (d *document) methodEvidence() {
	f := func(i string) string { return "f" + sub(i) }
	d.b.Subheading("Grid convergence and validation", 60)
	d.b.Equation("The settling run is made on three grids, cells and steps halved twice, so that every Courant number stays what it was. With the values f"+sub("1")+", f"+sub("2")+", f"+sub("3")+
		" of a figure, finest grid first, the observed order, the value at a step of zero and the grid convergence index are",
		"p = "+frac("1", "ln 2")+" ln "+abs(frac(f("3")+" − "+f("2"), f("2")+" − "+f("1"))), f("0")+" = "+f("1")+" + "+frac(f("1")+" − "+f("2"), "2"+sup("p")+" − 1"),
		"GCI = F "+frac("|"+f("1")+" − "+f("2")+"|", "2"+sup("p")+" − 1"))
	d.b.Paragraph("with the factor F of 1.25 where the observed order is in range and of 3 otherwise (Roache 1998; Celik et al., J. Fluids Eng. 130, 2008; ASME V&V 20-2009). Without an observed order p is the formal one, 2; where the changes grow, p is a half and the larger change counts. A figure whose changes are no larger than rounding and what the settling leaves is called exact; one whose changes differ in sign, oscillatory.")
	d.b.Equation("The validation sets the error of each figure against its uncertainty, as in ASME V&V 20-2009:",
		"E = f"+sub("fdtd")+" − f"+sub("phasor"), "u = u"+sub("grid")+" + u"+sub("settling")+" + u"+sub("form")+" + u"+sub("rounding"), "explained if |E| ≤ u")
	d.b.Paragraph("The uncertainties are limits and are added as such, not as squares.")
	d.methodFidelity()
}

// methodFidelity writes how curves are graded.
func (d *document) methodFidelity() {
	d.b.Subheading("Feature selective validation", 60)
	d.b.Equation("The curves of the two solutions are compared by the feature selective validation of IEEE Std 1597.1: in amplitude (ADM), in feature (FDM) and in both (GDM), point by point, with the mean over the points in words: excellent below 0.1, very good below 0.2, good below 0.4, fair below 0.8, poor below 1.6, very poor beyond. "+
		"Each curve is parted by a Fourier transform into an offset DC, a slow part Lo and a fast part Hi; with differences of neighbouring points as ′ and ″, indices for the two curves and means over all points",
		"ADM = "+contrast("Lo")+" + O e"+sup("O"), "O = "+contrast("DC"), "GDM = "+root("ADM"+sup("2")+" + FDM"+sup("2")),
		"FDM = 2 "+abs(signedContrast("Lo", "′", "2")+" + "+signedContrast("Hi", "′", "6")+" + "+signedContrast("Hi", "″", "7.2")))
	d.b.Paragraph("The measure takes magnitudes and is blind to a reversal of sign; a curve and its negative are graded excellent. Its words describe and do not accept: the verdict rests on the agreement and on the uncertainties, not on them.")
	choices := d.r.Design.FSVChoices
	if len(choices) == 0 {
		return
	}
	d.b.Paragraph("The standard leaves choices open, which move the values. Those made here:")
	for _, s := range choices {
		d.b.Item(strings.TrimSuffix(s, ".") + ".")
	}
}

// contrast is the size of the difference of a part of two curves over its mean.
func contrast(part string) string {
	a, b := "|"+part+sub("1")+"|", "|"+part+sub("2")+"|"
	return frac(abs(a+" − "+b), "mean("+a+" + "+b+")")
}

// signedContrast is a contrast with its sign.
func signedContrast(part, derived, factor string) string {
	a, b := "|"+part+derived+sub("1")+"|", "|"+part+derived+sub("2")+"|"
	return frac(a+" − "+b, factor+" mean("+a+" + "+b+")")
}
