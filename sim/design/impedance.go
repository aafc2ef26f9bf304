package design

// resistance is the resistive part of what a source may have, ohm.
func (z Impedance) resistance() float64 {
	switch z.Kind {
	case SeriesParts:
		return z.R
	case Complex:
		return real(z.Z)
	default:
		return 0
	}
}

// resistive reports whether an impedance takes energy away. A matched load
// does: its line has a characteristic impedance.
func (z Impedance) resistive() bool {
	switch z.Kind {
	case Matched:
		return true
	case Combination:
		return z.Tree.resistive()
	default:
		return z.resistance() > 0
	}
}

// ideal reports an impedance of exactly zero. A combination is none: its
// members have impedances.
func (z Impedance) ideal() bool {
	return z.Kind == Short ||
		z.Kind == Complex && z.Z == 0 ||
		z.Kind == SeriesParts && z.R == 0 && z.L == 0 && z.C == 0
}
