package sim

import (
	"fmt"
	"math"
	"math/cmplx"
	"strconv"
	"strings"

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

// words is a figure in the claim's unit, to four figures.
func (c *claimed) words(in complex128) string {
	size := cmplx.Abs(in)
	factor, unit := prefixed(scaleFor(c.Unit).unit, size)
	switch {
	case !c.Complex:
		return figures(real(in)/factor, 4) + unit
	case c.Quantity == design.InputImpedance:
		sign := "+"
		if math.Signbit(imag(in)) {
			sign = "-"
		}
		return fmt.Sprintf("%s %s j%s%s", figures(real(in)/factor, 4), sign, figures(math.Abs(imag(in))/factor, 4), unit)
	}
	return fmt.Sprintf("%s%s at %s deg", figures(size/factor, 4), unit, figures(cmplx.Phase(in)*180/pi, 4))
}

// size is a difference in the claim's unit, to three figures.
func (c *claimed) size(d float64) string {
	unit := scaleFor(c.Unit).unit
	if unit == "dBm" {
		unit = "dB"
	}
	factor, unit := prefixed(unit, d)
	return figures(d/factor, 3) + unit
}

// figures is a number rounded to n figures, without an exponent where it has
// no more than six digits before or after the point.
func figures(v float64, n int) string {
	text := strconv.FormatFloat(v, 'g', n, 64)
	rounded, err := strconv.ParseFloat(text, 64)
	if size := math.Abs(v); err != nil || size >= 1e6 || size < 1e-6 {
		return text
	}
	return strconv.FormatFloat(rounded, 'f', -1, 64)
}

// prefixed is the prefix of a unit, as a factor, that suits a size, and the unit
// with it and a space before, or nothing for a plain number.
func prefixed(unit string, size float64) (factor float64, with string) {
	switch {
	case unit == "1":
		return 1, ""
	case unit != "W" && unit != "s" && unit != "ohm" && !strings.HasPrefix(unit, "V ") && !strings.HasPrefix(unit, "A "):
		return 1, " " + unit // levels, angles and parts of a whole have none
	case unit == "ohm" && size < 1:
		return 1, " " + unit
	}
	for _, p := range []struct {
		factor float64
		name   string
	}{{1e6, "M"}, {1e3, "k"}, {1, ""}, {1e-3, "m"}, {1e-6, "u"}, {1e-9, "n"}} {
		if size >= p.factor && !math.IsInf(size, 0) {
			return p.factor, " " + p.name + unit
		}
	}
	return 1, " " + unit
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

// turned says of a confirmed angle that the record gives it a turn away.
func (c *claimed) turned(r record.Claim) string {
	if !angular(c.Quantity) || math.Abs(real(c.Value)) <= pi*(1+1e-9) {
		return ""
	}
	at := real(r.Claimed)
	return fmt.Sprintf("An angle of %.6g deg is the same as one of %.6g deg.", at, math.Remainder(at, 360))
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
