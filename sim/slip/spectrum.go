package slip

import "linewitness/sim/design"

// The coherent gains of the usual windows, the means of their samples: Hann,
// Hamming, Blackman and flat-top (common practice).
var windowGains = []float64{0.5, 0.54, 0.42, 0.2156}

// The lengths of spectra that are tried: powers of two, and round numbers.
var spectrumLengths = []int{
	64, 128, 256, 512, 1024, 2048, 4096, 8192, 16384, 32768, 65536,
	100, 200, 400, 500, 1000, 2000, 4000, 5000, 10000,
}

// spectra are the factors of amplitudes that are read from a spectrum. A peak
// over all time is not read from one.
func (r Reading) spectra() []Misreading {
	switch {
	case !amplitude(r.Quantity), r.Quantity == design.PeakVoltage, r.Quantity == design.PeakCurrent:
		return nil
	}
	lengths := spectrumLengths
	if r.Steps > 0 {
		lengths = append([]int{r.Steps}, lengths...)
	}
	var raw, scaled, half []float64
	for _, n := range lengths {
		raw, scaled = append(raw, float64(n)/2), append(scaled, 2/float64(n))
	}
	for _, g := range windowGains {
		half = append(half, g/2)
	}
	return []Misreading{
		r.times(HalfSpectrum, 0.5), r.times(DoubleSpectrum, 2),
		r.times(WindowGain, windowGains...), r.times(WindowTwice, half...),
		r.times(RawSpectrum, raw...), r.times(SpectrumScaled, scaled...),
	}
}
