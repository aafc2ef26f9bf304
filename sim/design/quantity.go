package design

import (
	"math"
	"strings"

	"linewitness/sim/line"
)

const neperDB = line.NeperDB

// A quantity is a number with its unit.
type quantity struct {
	value float64 // in SI units, or in what unit.of says
	unit  unit
}

// parseQuantity reads a number and a unit of the dimension.
func parseQuantity(text string, d *dimension) (quantity, *fault) {
	n, rest, f := scanNumber(text)
	if f != nil {
		return quantity{}, f
	}
	u, f := d.unit(strings.Join(strings.Fields(rest), " "), text)
	if f != nil {
		return quantity{}, f
	}
	v, f := inRange(n.float(u.exp)*u.factor, n, text)
	if f == nil && u.of == dBm {
		v, f = inRange(1e-3*math.Pow(10, v/10), n, text)
	}
	return quantity{v, u}, f
}

// unit looks a unit up by its name; text is what to quote if it is not there.
func (d *dimension) unit(name, text string) (unit, *fault) {
	u, ok := d.units[plainUnit.Replace(name)]
	accepted := say("accepted units: %s", rawText(d.accepts))
	if _, bare := d.units[""]; bare {
		accepted = say("accepted: %s", rawText(d.accepts))
	}
	switch {
	case ok && u.of == unclear:
		return u, newFault(say("write %s peak, %s rms or %s pp", text, text, text), "%q does not say whether it is peak, rms or peak to peak", text)
	case ok:
		return u, nil
	case name == "":
		return u, newFault(say("accepted units: %s; for example %s", rawText(d.accepts), d.example), "%q has no unit; %s needs one", text, withArticle(d.name))
	}
	for known := range d.units {
		if strings.EqualFold(known, plainUnit.Replace(name)) {
			return u, newFault(accepted, "%q is not a unit of %s: upper and lower case matter", name, d.name)
		}
	}
	return u, newFault(accepted, "%q is not a unit of %s", name, d.name)
}
