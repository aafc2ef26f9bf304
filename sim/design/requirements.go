package design

import (
	"math"
	"strings"
)

// A demand is a requirement, or what a claim is about, with the nodes that
// later checks point at.
type demand struct {
	Requirement
	fields   *fields
	all      bool    // cases: all
	explicit []*node // the cases it names
	between  [2]*node
}

// walkRequirements reads the requirements of the nominal design.
func (w *walker) walkRequirements(file *fields, cases []string, taken ids) (demands []*demand) {
	for _, item := range w.entries(file, "requirements") {
		w.takeID(item, "requirement", taken)
		if d := w.walkRequirement(item, cases); d != nil {
			demands = append(demands, d)
		}
	}
	return demands
}

// entries returns the items of a list of the file.
func (w *walker) entries(file *fields, key string) []*node {
	n := file.node(key)
	if n == nil || !w.isKind(n, file.name(key), list) {
		return nil
	}
	if len(n.items) > most[key] {
		w.problem(n.items[most[key]].pos, say("split the design"), "more than %d %s", most[key], key)
		return nil
	}
	return n.items
}

// ids are the ids that requirements and claims have, each with who has it. No
// two may be the same: the record speaks of both by their ids.
type ids map[string]string

// takeID reports an id that another requirement or claim has, whatever else is
// wrong with this one.
func (w *walker) takeID(item *node, kind string, taken ids) {
	if item.kind != mapping {
		return
	}
	id := item.get("id")
	if id == nil || id.kind != scalar || id.text == "" {
		return
	}
	if owner := taken[id.text]; owner != "" {
		w.problem(id.pos, say("number each %s", kind), "the id %q is taken by the %s", id.text, owner)
		return
	}
	taken[id.text] = sprintf("%s on line %d", kind, item.pos.Line)
}

// walkRequirement reads one requirement. Which keys it has depends on its
// quantity, so that is read first.
func (w *walker) walkRequirement(n *node, cases []string) *demand {
	what, name, ok := w.quantityOf(n, "requirement", quantityNames)
	if !ok {
		return nil
	}
	kind := quantities[name]
	d := w.demand(n, what, name, kind.table)
	d.RelativeTo = d.fields.text("relative_to")
	w.walkLimits(d, kind)
	w.resolveCases(d, cases)
	return d
}

// quantityOf reads the quantity of a requirement or claim, one of the known
// ones; what is how diagnostics call it.
func (w *walker) quantityOf(n *node, kind string, known []string) (what string, name Quantity, ok bool) {
	what = withArticle(kind)
	if !w.isKind(n, what, mapping) {
		return "", "", false
	}
	if id := n.get("id"); id != nil && id.text != "" {
		what = kind + ` "` + id.text + `"`
	}
	q := n.get("quantity")
	if q == nil || q.kind != scalar {
		w.problem(n.pos, say("one of %s", rawText(strings.Join(known, ", "))), "missing %q in %s", "quantity", what)
		return "", "", false
	}
	if contains(known, q.text) {
		return what, Quantity(q.text), true
	}
	w.noQuantity(q, known)
	// The other mistakes are looked for as if the nearest were meant.
	meant := nearest(q.text, known)
	return what, Quantity(meant), meant != ""
}

// noQuantity tells of a quantity that cannot be named where it is.
func (w *walker) noQuantity(q *node, known []string) {
	switch name := Quantity(q.text); {
	case name == Agreement:
		w.problem(q.pos, say("a requirement can limit it"), "%q cannot be claimed: it is how far this program's two solutions are apart, no figure of a hand calculation", q.text)
	case name == Voltage || name == Current:
		w.problem(q.pos, didYouMean("steady_"+q.text, known), "there is no quantity %q in requirements; it can be claimed", q.text)
	default:
		w.problem(q.pos, didYouMean(q.text, known), "there is no quantity %q", q.text)
	}
}

// demand reads what a requirement or claim is about.
func (w *walker) demand(n *node, what string, name Quantity, t *table) *demand {
	f := w.fields(n, n.pos, what, t)
	d := &demand{fields: f, Requirement: Requirement{
		Pos: n.pos, ID: f.id(), Text: f.prose("text"), Document: f.line("source"), Quantity: name,
		Section: f.text("section"), End: f.oneOf("end", "from", "to"),
		At: f.text("at"), Load: f.text("load"),
	}}
	d.Between, d.between, _ = f.pair("between")
	if v, ok := f.value("reference", resistance, positive); ok {
		d.Reference = &v
	}
	if name == SettleTime {
		d.Settled = f.settled("within")
	}
	return d
}

func (f *fields) id() string {
	n := f.scalar("id")
	if n == nil {
		return ""
	}
	if !isID(n.text) {
		f.w.problem(n.pos, say("an id is made of letters, digits, _, -, . and /, at most %d in all", longestName), "%q is not an id for a requirement or claim", n.text)
	}
	return n.text
}

// walkLimits reads what the quantity is limited to.
func (w *walker) walkLimits(d *demand, kind judged) {
	f := d.fields
	if d.Quantity == InputImpedance {
		d.R, d.X = f.window("r", false), f.window("x", true)
		d.Within = f.circle("within")
		return
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
	l := &Limit{SI: q.value, Unit: q.unit.label(), Text: n.text, Pos: n.pos}
	if q.unit.of == periods {
		s := f.w.design.Source.Frequency.SI
		if s == 0 {
			return nil // the frequency has been told of
		}
		l.SI = q.value / s
	}
	return l
}

// label is the unit as Limit names it.
func (u unit) label() string {
	if u.of == bare {
		return "1"
	}
	return u.name
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
