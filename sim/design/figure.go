package design

import (
	"math"
	"math/cmplx"
	"strings"
)

// readValue reads the figure itself; ok is false if it did not read.
func (x *figure) readValue() (ok bool) {
	n := x.fields.scalar("value")
	if n == nil {
		return false
	}
	q, fault := x.parse(n.text)
	if fault != nil {
		x.fields.w.fault(n, x.fields.name("value"), fault)
		return false
	}
	if q.unit.name == "" && !q.both && !x.fields.isPlain("value", n) {
		return false
	}
	c := &x.claim
	c.Complex, c.Level = q.both || x.kind.parts == bothParts, q.unit.of == decibels
	c.Unit, c.Of = q.unit.label(), n.text
	if q.unit.of == periods {
		if x.frequency == 0 {
			return false // the frequency, or the case, has been told of
		}
		q.value /= complex(x.frequency, 0)
	}
	c.Value = q.value
	x.checkPossible(n)
	return true
}

// parse reads the text of a value. What the physics convention turns is
// turned.
func (x *figure) parse(text string) (complexQuantity, *fault) {
	convention := x.fields.w.design.Convention
	if x.kind.parts != sizeOnly {
		return parseBoth(text, x.kind.limits, convention)
	}
	if strings.Contains(text, " at ") {
		return complexQuantity{}, newFault(say("only voltage, current, reflection and input_impedance have angles"), "%q has an angle, and %s is a size", text, x.Quantity)
	}
	q, fault := parseQuantity(text, x.kind.limits)
	if x.kind.odd {
		q.value = convention.sign()*q.value + 0
	}
	return complexQuantity{complex(q.value, 0), q.unit, false}, fault
}

// roundedAngle is what an angle that is written to a tenth of a degree may
// leave of a resistance where there is none, as a part of the impedance.
const roundedAngle = 1e-3

// checkPossible tells of a value that no design has.
func (x *figure) checkPossible(n *node) {
	v, reason, h := x.claim.Value, "", noHint
	size := real(v)
	if x.claim.Complex {
		size = cmplx.Abs(v)
	}
	switch {
	case x.Quantity == InputImpedance:
		reason = when(real(v) < -roundedAngle*size, "the resistance of a passive network is never below 0")
	case x.kind.impossible != nil:
		reason = x.kind.impossible(limits{size, size})
	}
	if x.kind.parts == sizeOrBoth && size < 0 {
		h = say("without an angle only its size is claimed; with one write %s at 180 deg", strings.TrimPrefix(n.text, "-"))
	}
	if reason != "" {
		x.fields.w.problem(n.pos, h, "%s claims the impossible: %s", x.fields.what, rawText(reason))
	}
}

// loosest is the part of a value that a tolerance must be less than. A figure
// that may as well be half or double confirms no calculation.
const loosest = 0.5

// readTolerance reads how far a witness may be from the value. It takes a
// part of the value only if that has been read.
func (x *figure) readTolerance(read bool) {
	f, c := x.fields, &x.claim
	q, n, ok := f.quantity("tolerance", bands[x.kind.limits])
	if !ok || !x.isTolerance(q, n) || !f.hasSign("tolerance", n, q.value, positive) || !read {
		return
	}
	c.Tolerance, c.ToleranceText = q.value, n.text
	switch {
	case q.unit.of == periods && x.frequency > 0: // else it has been told of
		c.Tolerance /= x.frequency
	case q.unit.of != percent:
	case c.Unit == "%":
		c.ToleranceText = points(n.text)
	case c.Value == 0:
		f.w.problem(n.pos, say("give it as a size: %s", rawText(x.kind.limits.accepts)), "%s: a percentage of a value of zero is nothing", f.name("tolerance"))
	default:
		c.Tolerance *= cmplx.Abs(c.Value)
		if c.Level {
			c.ToleranceText += " of " + c.Of
		}
	}
}

// isTolerance tells of a tolerance that is of no use for the quantity.
func (x *figure) isTolerance(q quantity, n *node) bool {
	f := x.fields
	phase := x.kind.limits == angle
	switch {
	case phase && q.unit.of == percent:
		f.w.problem(n.pos, say("give it as an angle, for example 0.5 deg"), "%s: a phase has no natural zero that a percentage could count from", f.name("tolerance"))
	case phase && q.value >= math.Pi:
		f.w.problem(n.pos, noHint, "%s is %q: no phase is further from another, so it claims nothing", f.name("tolerance"), n.text)
	case q.unit.of == percent && q.value >= loosest:
		f.w.problem(n.pos, say("give less than 50 %%"), "%s is %q: a claim that loose claims nothing", f.name("tolerance"), n.text)
	default:
		return true
	}
	return false
}

// points words a percentage as percentage points: of a value that is itself in
// %, as an efficiency is, 1 % is from 81 % to 83 %, not from 81.2 % to 82.8 %.
func points(text string) string {
	number := strings.TrimSpace(strings.TrimSuffix(text, "%"))
	if number == "1" {
		return "1 percentage point"
	}
	return number + " percentage points"
}
