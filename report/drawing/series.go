package drawing

import (
	"linewitness/sim/record"
)

// Symbols of a series combination stand in a row, shorter the more they are.
const (
	symbolHalf = 3 * mm // half the length of a single symbol on its wire
	seriesGap  = 0.9 * mm
)

// sign is one of the symbols of IEC 60617 that make up a part.
type sign int

const (
	resistor sign = iota
	coil
	capacitor
	transformer
	general // an impedance of whatever kind
)

// signs returns the symbols of a part in their order.
func signs(part *record.ModelPart) []sign {
	switch {
	case part.Ratio != 0:
		return []sign{transformer}
	case combined(part):
		return []sign{general}
	}
	return seriesSigns(part.R, part.L, part.C)
}

// seriesSigns returns the symbols of a series combination; a plain rectangle for
// what has no value.
func seriesSigns(r, l, c float64) []sign {
	var out []sign
	if r > 0 {
		out = append(out, resistor)
	}
	if l > 0 {
		out = append(out, coil)
	}
	if c > 0 {
		out = append(out, capacitor)
	}
	if len(out) == 0 {
		return []sign{resistor}
	}
	return out
}

// each is half the length of one of n symbols in a row.
func each(n int) float64 {
	if n <= 1 {
		return symbolHalf
	}
	return (symbolHalf + 1.9*mm*float64(n-1)) / float64(n)
}

// half is half the length of a row of symbols.
func half(list []sign) float64 {
	n := float64(len(list))
	return n*each(len(list)) + (n-1)*seriesGap/2
}

// row draws symbols one after the other around (x, y), and the wires between
// them.
func (p *pen) row(list []sign, x, y float64) {
	h := each(len(list))
	at := x - half(list) + h
	for i, s := range list {
		if i > 0 {
			p.line(wireStyle, at-h-seriesGap, y, at-h, y)
		}
		p.symbol(s, at, y, h)
		at += 2*h + seriesGap
	}
}
