package sim

import (
	"fmt"
	"math"
	"math/cmplx"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// record is the claim in its own unit, without its slips and its finding.
func (c *claimed) record(name string) record.Claim {
	sc := scaleFor(c.Unit)
	return record.Claim{
		ID: c.ID, Text: c.Text, Source: c.Document,
		Quantity: string(c.Quantity), Subject: subject(c.Requirement), Case: name,
		Unit: sc.unit, Complex: c.Complex,
		Claimed: c.inUnit(c.Value), Phasor: c.inUnit(c.exact), FDTD: c.inUnit(c.found),
		ClaimedText: c.Of, ToleranceText: c.ToleranceText,
		Tolerance:   c.width(c.Tolerance),
		Difference:  c.width(c.difference()),
		Uncertainty: c.width(c.spread),
		Verdict:     c.verdict,
	}
}

// inUnit is a figure in the claim's unit.
func (c *claimed) inUnit(v complex128) complex128 {
	sc := scaleFor(c.Unit)
	if !c.Complex {
		return complex(sc.from(real(v)), 0)
	}
	return complex(sc.from(real(v)), sc.from(imag(v)))
}

// width is a difference in the claim's unit. Of a power in dBm it is that
// above the claim.
func (c *claimed) width(d float64) float64 {
	sc := scaleFor(c.Unit)
	if c.Complex {
		return sc.from(d)
	}
	at := real(c.Value)
	return math.Abs(sc.from(at+d) - sc.from(at))
}

// slip is the record of a candidate that makes v of the claim.
func (c *claimed) slip(k *candidate, v complex128) record.Slip {
	in := c.inUnit(v)
	return record.Slip{
		Name: k.Name(), Where: k.Where, Value: in, Explains: k.explains,
		Text: fmt.Sprintf("%s This gives %s.", k.Says(), c.words(in)),
	}
}

// words is a figure with the claim's unit, to four figures.
func (c *claimed) words(in complex128) string {
	unit := scaleFor(c.Unit).unit
	if unit == "1" {
		unit = ""
	} else {
		unit = " " + unit
	}
	if !c.Complex {
		return fmt.Sprintf("%.4g%s", real(in), unit)
	}
	switch c.Quantity {
	case design.InputImpedance:
		sign := "+"
		if math.Signbit(imag(in)) {
			sign = "-"
		}
		return fmt.Sprintf("%.4g %s j%.4g%s", real(in), sign, math.Abs(imag(in)), unit)
	}
	return fmt.Sprintf("%.4g%s at %.4g deg", cmplx.Abs(in), unit, cmplx.Phase(in)*180/pi)
}

// finding is what was found of a claim, in a sentence or two; nothing of one
// that is confirmed as it stands.
func (c *claimed) finding(r record.Claim, note string) string {
	switch r.Verdict {
	case record.Confirmed:
		return c.turned(r)
	case record.ClaimOpen:
		return c.open(r)
	}
	text := fmt.Sprintf("The difference of %s is more than the tolerance of %s.", c.size(r.Difference), c.size(r.Tolerance))
	if len(r.Slips) == 0 {
		text += " No single known slip explains it."
		if note != "" {
			text += " Of the slips, " + note + "."
		}
	} else {
		text += " Most likely: " + label(r.Slips[0]) + "."
	}
	if timeOnly(c.Quantity) {
		text += " Only the time domain has this quantity, so only slips in the result and in the strength of the source were looked for."
	}
	return text
}

// label is a slip with its place.
func label(s record.Slip) string {
	if s.Where == "" {
		return s.Name
	}
	return s.Name + ", " + s.Where
}

// size is a difference with its unit.
func (c *claimed) size(d float64) string {
	unit := scaleFor(c.Unit).unit
	switch unit {
	case "1":
		return fmt.Sprintf("%.3g", d)
	case "dBm":
		unit = "dB"
	}
	return fmt.Sprintf("%.3g %s", d, unit)
}

// turned says of a confirmed angle that the record gives it a turn away.
func (c *claimed) turned(r record.Claim) string {
	if !angular(c.Quantity) || math.Abs(real(c.Value)) <= pi*(1+1e-9) {
		return ""
	}
	return fmt.Sprintf("%s is the same angle as %.4g deg.", c.Of, math.Remainder(real(r.Claimed), 360))
}

// open says why a claim is neither confirmed nor contradicted.
func (c *claimed) open(r record.Claim) string {
	switch {
	case cmplx.IsNaN(c.found) || c.timed == nil && cmplx.IsNaN(c.exact):
		if c.timed != nil && c.timed.note != "" {
			return "There is no such figure: " + c.timed.note + "."
		}
		return "There is no such figure here."
	case c.timed != nil && c.timed.unfinished:
		return "Not shown: " + c.timed.note + "."
	}
	return fmt.Sprintf("The difference of %s and its uncertainty of %s straddle the tolerance of %s.",
		c.size(r.Difference), c.size(r.Uncertainty), c.size(r.Tolerance))
}
