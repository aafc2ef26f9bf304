package design

import "math"

// walkSource reads the source. Times in periods need its frequency, so that
// comes first.
func (w *walker) walkSource(f *fields) {
	if f == nil {
		return
	}
	s := &w.design.Source
	s.Pos, s.At = f.pos, f.junction("at")
	if n := f.node("at"); n != nil {
		w.sourceAt = n.pos
	}
	s.Frequency, _ = f.value("frequency", frequency, positive)
	s.Impedance, s.Warnings = f.sourceImpedance()
	s.EMF, _ = f.value("emf", voltage, positive)
	if p, ok := f.value("available_power", power, positive); ok {
		w.available(f, p)
	}
	s.Start = Start{Pos: f.pos, Worst: true, Text: "abrupt, worst phase"}
	if n := f.node("start"); n != nil {
		s.Start = w.walkStart(w.fields(n, f.at["start"].key.pos, "the start of the source", startTable))
	}
	if n := f.node("stop"); n != nil {
		s.Stop = w.walkStop(w.fields(n, f.at["stop"].key.pos, "the stop of the source", stopTable))
	}
}

// available works the EMF out from the available power, |EMF|^2 = 8 R P.
func (w *walker) available(f *fields, p Value) {
	s := &w.design.Source
	r := s.Impedance.resistance()
	if r <= 0 && f.node("impedance") != nil && !w.flawed {
		w.problem(p.Pos, say("give the emf instead, or a source impedance with a resistance"),
			"a source without resistance has no available power")
		return
	}
	s.Available = &p
	s.EMF = Value{SI: math.Sqrt(8 * r * p.SI), Text: p.Text + " available", Pos: p.Pos}
}

// sourceImpedance reads a complex value, series parts, a table or a file.
func (f *fields) sourceImpedance() (z Impedance, warnings []string) {
	n := f.node("impedance")
	if n == nil {
		return Impedance{}, nil
	}
	word := n.text
	if n.kind == mapping {
		in := f.w.fields(n, f.at["impedance"].key.pos, "the impedance of the source", seriesTable)
		if in == nil {
			return Impedance{}, nil
		}
		z, warnings = in.partImpedance()
		z.Pos, word = n.pos, "open"
	} else {
		z = f.impedance("impedance")
	}
	switch z.Kind {
	case Short:
		f.w.problem(n.pos, say("write 0 ohm for an ideal source"), "the impedance of the source cannot be short")
	case Open, Matched:
		f.w.problem(n.pos, say("give a complex value or series parts {r: 50 ohm, l: 2 uH, c: 1 nF}"), "the impedance of the source cannot be %s", word)
	}
	return z, warnings
}

func (w *walker) walkStart(f *fields) Start {
	if f == nil {
		return Start{}
	}
	s := Start{Pos: f.pos, Worst: true, Text: "abrupt"}
	profile := f.oneOf("profile", "abrupt", "ramp")
	_, rise := f.at["rise"]
	switch {
	case profile == "abrupt" && rise:
		w.problem(f.at["rise"].key.pos, say("write profile: ramp if the source rises slowly"), "an abrupt start has no \"rise\"")
	case profile == "ramp" && !rise:
		w.problem(f.pos, say("for example rise: 3 periods"), "missing \"rise\", which goes with profile: ramp")
	case profile == "ramp":
		var text string
		s.Ramp = true
		s.Rise, text = f.time("rise", positive)
		s.Text = "raised-cosine rise over " + text
	}
	s.Text += ", " + w.startPhase(f, &s)
	return s
}

// startPhase reads the phase of the start into s and words it. The record
// speaks the engineering convention throughout.
func (w *walker) startPhase(f *fields, s *Start) string {
	n := f.scalar("phase")
	if n == nil || n.text == "worst" {
		return "worst phase"
	}
	q, fault := parseQuantity(n.text, angle)
	if fault != nil {
		fault.hint = say("write worst, or an angle in deg or rad")
		w.fault(n, f.name("phase"), fault)
		return ""
	}
	s.Worst, s.Phase = false, w.design.Convention.sign()*q.value+0
	if w.design.Convention == Physics {
		return "phase " + conjugated(n.text)
	}
	return "phase " + n.text
}

// conjugated marks a text of a physics file whose value was conjugated.
func conjugated(text string) string { return text + " in e^{-iwt}" }

func (w *walker) walkStop(f *fields) *Stop {
	if f == nil {
		return nil
	}
	s := &Stop{Pos: f.pos}
	var at, fall string
	s.At, at = f.time("at", positive)
	s.Fall, fall = f.time("fall", notNegative)
	s.Text = "at " + at + ", abrupt"
	if s.Fall > 0 {
		s.Text = "at " + at + ", raised-cosine fall over " + fall
	}
	return s
}

// time reads a time in seconds or periods of the source.
func (f *fields) time(key string, sign sign) (seconds float64, text string) {
	q, n, ok := f.quantity(key, timeSpan)
	if !ok || !f.hasSign(key, n, q.value, sign) {
		return 0, ""
	}
	if q.unit.of == periods {
		if f.w.design.Source.Frequency.SI == 0 {
			return 0, n.text // the frequency has been told of
		}
		return q.value / f.w.design.Source.Frequency.SI, n.text
	}
	return q.value, n.text
}
