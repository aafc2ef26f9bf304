package design

import (
	"fmt"
	"math"

	"linewitness/sim/line"
)

// fromTable is what is to be known of every value of the cable table.
const fromTable = "nominal, from memory; to be replaced by the sheet of the cable in hand"

// cable reads a line that is a row of the cable table.
func (f *fields) cable(l *Line) (known, bool) {
	n := f.scalar("cable")
	if n == nil {
		return known{}, false
	}
	c, ok := line.FindCable(n.text)
	if !ok {
		f.w.problem(n.pos, didYouMean(n.text, line.CableNames()), "there is no cable %q in the cable table", n.text)
		return known{}, false
	}
	l.Nominal = &Nominal{Z0: c.Z0, VelocityFactor: c.VelocityFactor}
	l.Text = c.Type + " of the cable table"
	l.listed("z0", fmt.Sprintf("%g ohm", c.Z0))
	l.listed("velocity factor", fmt.Sprintf("%g", c.VelocityFactor))
	l.warn("%s is taken from the cable table: its values are nominal and from memory; replace them by the sheet of the cable in hand", c.Type)
	if c.Capacitance > 0 {
		l.listed("capacitance", fmt.Sprintf("%g pF/m", round(c.Capacitance*1e12)))
		l.warnOf(line.CapacitanceWarning(c.Z0, c.VelocityFactor, c.Capacitance))
	}
	f.cableLoss(l, c)
	f.cableRating(n, l, c)
	return knownNominal(*l.Nominal, f.w.reference())
}

func (f *fields) cableLoss(l *Line, c line.Cable) {
	var texts []string
	for _, p := range c.Loss {
		text := fmt.Sprintf("%g dB/100m at %g MHz", round(p.Attenuation*line.NeperDB*100), round(p.F/1e6))
		l.listed("loss", text)
		texts = append(texts, text)
	}
	fit, err := line.FitLoss(c.Loss)
	if err != nil {
		panic("design: a row of the cable table has no good loss table")
	}
	f.fitted(l, fit, texts)
}

func (f *fields) cableRating(n *node, l *Line, c line.Cable) {
	if c.MaxVoltage == 0 {
		return
	}
	text := fmt.Sprintf("%g V rms", c.MaxVoltage)
	l.listed("voltage rating", text)
	l.Rating.Voltage = &Limit{SI: c.MaxVoltage * math.Sqrt2, Unit: "V rms", Text: text, Pos: n.pos}
	l.Rating.VoltageSource = CableTable
}

// listed adds a value of the cable table to the pedigree.
func (l *Line) listed(what, text string) { l.trace(what, text, Catalogue, fromTable) }

// round takes away what the conversion to SI units and back has left: the
// table has four digits at most.
func round(v float64) float64 { return math.Round(v*1e6) / 1e6 }
