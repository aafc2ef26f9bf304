package design

import (
	"math"
	"strings"
)

// A demand is a requirement with the nodes that later checks point at.
type demand struct {
	Requirement
	fields   *fields
	all      bool    // cases: all
	explicit []*node // the cases it names
	between  [2]*node
}

// walkRequirements reads the requirements of the nominal design.
func (w *walker) walkRequirements(file *fields, cases []string) (demands []*demand) {
	n := file.node("requirements")
	if n == nil || !w.isKind(n, file.name("requirements"), list) {
		return nil
	}
	if len(n.items) > most["requirements"] {
		w.problem(n.items[most["requirements"]].pos, say("split the design"), "more than %d %s", most["requirements"], "requirements")
		return nil
	}
	first := map[string]int{}
	for _, item := range n.items {
		w.takeID(item, first)
		if d := w.walkRequirement(item, cases); d != nil {
			demands = append(demands, d)
		}
	}
	return demands
}

// takeID reports an id that another requirement has, whatever else is wrong
// with this one; first holds the lines of the ids so far.
func (w *walker) takeID(item *node, first map[string]int) {
	if item.kind != mapping {
		return
	}
	id := item.get("id")
	if id == nil || id.kind != scalar || id.text == "" {
		return
	}
	if line := first[id.text]; line > 0 {
		w.problem(id.pos, say("number each requirement"), "the id %q is taken by the requirement on line %d", id.text, line)
		return
	}
	first[id.text] = item.pos.Line
}

// walkRequirement reads one requirement. Which keys it has depends on its
// quantity, so that is read first.
func (w *walker) walkRequirement(n *node, cases []string) *demand {
	if !w.isKind(n, "a requirement", mapping) {
		return nil
	}
	what := "a requirement"
	if id := n.get("id"); id != nil && id.text != "" {
		what = `requirement "` + id.text + `"`
	}
	q := n.get("quantity")
	if q == nil || q.kind != scalar {
		w.problem(n.pos, say("one of %s", rawText(strings.Join(quantityNames, ", "))), "missing %q in %s", "quantity", what)
		return nil
	}
	name := Quantity(q.text)
	kind, ok := quantities[name]
	if !ok {
		w.problem(q.pos, didYouMean(q.text, quantityNames), "there is no quantity %q", q.text)
		// The other mistakes are looked for as if the nearest were meant.
		name = Quantity(nearest(q.text, quantityNames))
		if kind, ok = quantities[name]; !ok {
			return nil
		}
	}
	f := w.fields(n, n.pos, what, kind.table)
	d := &demand{fields: f, Requirement: Requirement{
		Pos: n.pos, ID: f.id(), Text: f.prose("text"), Document: f.line("source"), Quantity: name,
		Section: f.text("section"), End: f.oneOf("end", "from", "to"),
		At: f.text("at"), Load: f.text("load"), RelativeTo: f.text("relative_to"),
	}}
	d.Between, d.between, _ = f.pair("between")
	if v, ok := f.value("reference", resistance, positive); ok {
		d.Reference = &v
	}
	w.walkLimits(d, kind)
	w.resolveCases(d, cases)
	return d
}

func (f *fields) id() string {
	n := f.scalar("id")
	if n == nil {
		return ""
	}
	if !isID(n.text) {
		f.w.problem(n.pos, say("an id is made of letters, digits, _, -, . and /, at most %d in all", longestName), "%q is not an id for a requirement", n.text)
	}
	return n.text
}

// walkLimits reads what the quantity is limited to.
func (w *walker) walkLimits(d *demand, kind judged) {
	f := d.fields
	switch {
	case d.Quantity == InputImpedance:
		d.R, d.X = f.window("r", false), f.window("x", true)
		d.Within = f.circle("within")
		return
	case d.Quantity == SettleTime:
		d.Settled = f.settled("within")
	}
	dim := kind.limits
	if d.RelativeTo != "" {
		dim = kind.relative
	}
	d.Min, d.Max = f.limitPair(dim, kind.odd)
	l := limits{math.Inf(-1), math.Inf(1)}
	if d.Min != nil {
		l.min = d.Min.SI
	}
	if d.Max != nil {
		l.max = d.Max.SI
	}
	if kind.impossible == nil || d.RelativeTo != "" && dim == level {
		return
	}
	if reason := kind.impossible(l); reason != "" {
		w.problem(f.at[f.firstOf([]string{"max", "min"})].value.pos, noHint, "%s asks for the impossible: %s", f.what, rawText(reason))
	}
}

// limitPair reads min and max. A quantity whose sign the physics convention
// turns has its limits turned and exchanged.
func (f *fields) limitPair(d *dimension, odd bool) (lower, upper *Limit) {
	lower, upper = f.limit("min", d), f.limit("max", d)
	if lower != nil && upper != nil && lower.SI > upper.SI {
		f.w.problem(upper.Pos, say("exchange them if they are the wrong way round"), "%s can never be met: min %s is above max %s", f.what, lower.Text, upper.Text)
	}
	if odd && f.w.design.Convention == Physics {
		lower, upper = turned(upper), turned(lower)
	}
	return lower, upper
}

func turned(l *Limit) *Limit {
	if l == nil {
		return nil
	}
	return &Limit{-l.SI + 0, l.Unit, conjugated(l.Text), l.Pos}
}

func (f *fields) limit(key string, d *dimension) *Limit {
	q, n, ok := f.quantity(key, d)
	if !ok {
		return nil
	}
	l := &Limit{SI: q.value, Unit: q.unit.name, Text: n.text, Pos: n.pos}
	switch {
	case q.unit.of == bare:
		l.Unit = "1"
	case q.unit.of == periods:
		l.SI = 0
		if s := f.w.design.Source.Frequency.SI; s > 0 {
			l.SI = q.value / s
		}
	}
	return l
}

// window reads the bounds of a part of an impedance.
func (f *fields) window(key string, odd bool) *Window {
	n := f.node(key)
	if n == nil {
		return nil
	}
	in := f.w.fields(n, f.at[key].key.pos, f.name(key), windowTable)
	if in == nil {
		return nil
	}
	lower, upper := in.limitPair(resistance, odd)
	if key == "r" && upper != nil && upper.SI < 0 {
		f.w.problem(upper.Pos, noHint, "%s can never be met: the resistance of a passive network is never below 0", f.name(key))
	}
	return &Window{lower, upper}
}

// circle reads "2 ohm of 50 - j3 ohm": a radius and a centre.
func (f *fields) circle(key string) *Circle {
	n := f.scalar(key)
	if n == nil {
		return nil
	}
	size, of, ok := strings.Cut(n.text, " of ")
	if !ok {
		f.w.problem(n.pos, say("write a radius and a centre: 2 ohm of 50 ohm, or 5 %% of 50 + j10 ohm"), "%s is not a circle: %q", f.name(key), n.text)
		return nil
	}
	q, fault := parseQuantity(strings.TrimSpace(size), spread)
	c := &Circle{Text: n.text, Pos: n.pos}
	if fault == nil {
		c.Of, fault = parseComplex(strings.TrimSpace(of), resistance, f.w.design.Convention)
	}
	if fault != nil {
		f.w.fault(n, f.name(key), fault)
		return nil
	}
	c.Radius = q.value
	if q.unit.of == percent {
		c.Radius *= math.Hypot(real(c.Of), imag(c.Of))
	}
	switch {
	case q.value <= 0:
		f.w.problem(n.pos, say("give a radius above zero"), "%s can never be met: its radius is %s", f.name(key), strings.TrimSpace(size))
	case real(c.Of)+c.Radius < 0:
		f.w.problem(n.pos, say("check the sign"), "%s can never be met: it holds no impedance with R of zero or more", f.name(key))
	}
	return c
}

// defaultSettled is the fraction that counts as settled: 1 %, the figure
// usual in specifications of settling time (common practice).
const defaultSettled = 0.01

func (f *fields) settled(key string) float64 {
	q, n, ok := f.quantity(key, percentage)
	if !ok {
		return defaultSettled
	}
	if q.value <= 0 || q.value >= 1 {
		f.w.problem(n.pos, say("1 %% is the default"), "%s must be above 0 and below 100 %%, not %q", f.name(key), n.text)
	}
	return q.value
}
