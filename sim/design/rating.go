package design

// rating reads what a line or section stands. What it does not say is as
// inherited: from the cable table for a line, from its line for a section.
func (f *fields) rating(of string, inherited Rating) Rating {
	r := inherited
	n := f.node("rating")
	if n == nil {
		return r
	}
	in := f.w.fields(n, f.at["rating"].key.pos, "the rating of "+f.what, ratingTable)
	if in == nil {
		return r
	}
	if l := in.amplitude("voltage", voltage); l != nil {
		r.Voltage, r.VoltageSource = l, of
	}
	if l := in.amplitude("current", current); l != nil {
		r.Current, r.CurrentSource = l, of
	}
	if m, ok := in.value("margin", level, notNegative); ok {
		r.MarginDB = m.SI
	}
	if r.Voltage == nil && r.Current == nil && in.firstOf([]string{"voltage", "current", "margin"}) == "margin" {
		f.w.problem(in.at["margin"].key.pos, say("give the voltage or the current that it is kept from"), "%s has a margin and no limit", in.what)
	}
	return r
}

// sectionRating is the rating of a section of a line, which is nil if its name
// leads nowhere.
func (f *fields) sectionRating(name string, l *Line) Rating {
	inherited := Rating{Voltage: &Limit{}} // so that a margin alone is not told of
	if l != nil {
		inherited = l.Rating
	}
	return f.rating("section "+name, inherited)
}

// amplitude reads a limit above zero.
func (f *fields) amplitude(key string, d *dimension) *Limit {
	l := f.limit(key, d)
	if l == nil || !f.hasSign(key, f.node(key), l.SI, positive) {
		return nil
	}
	return l
}
