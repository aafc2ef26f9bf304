package design

import "strings"

// largestRatio bounds the turns ratio of a transformer either way; what is
// beyond is a slip of the pen.
const largestRatio = 1000

// transformer reads an ideal transformer between two junctions.
func (f *fields) transformer(p *Part) {
	p.At, p.To = f.junction("from"), f.junction("to")
	p.Impedance.Kind = Transformer
	if p.At == p.To && p.At != "" {
		f.w.problem(f.at["to"].value.pos, say("give its two sides a junction each"), "%s has both sides at %q", f.what, p.At)
	}
	n := f.scalar("ratio")
	if n == nil {
		return
	}
	var fault *fault
	if p.Ratio, fault = parseRatio(n.text); fault != nil {
		f.w.fault(n, f.name("ratio"), fault)
		return
	}
	if p.Ratio < 1/largestRatio || p.Ratio > largestRatio {
		f.w.problem(n.pos, say("check the digits"), "%s must be from 1000:1 to 1:1000, not %q", f.name("ratio"), n.text)
	}
	p.Impedance.Pos, p.RatioText = n.pos, n.text
	p.Impedance.Text = "ideal transformer " + n.text
}

// parseRatio reads turns at one side to turns at the other, 1:4, and returns
// the second over the first.
func parseRatio(text string) (float64, *fault) {
	from, to, ok := strings.Cut(text, ":")
	if !ok {
		return 0, newFault(say("write the turns at from and at to, 1:4 or 1:2.5"), "%q is not a ratio of turns", text)
	}
	a, f := plainNumber(strings.TrimSpace(from))
	if f != nil {
		return 0, f
	}
	b, f := plainNumber(strings.TrimSpace(to))
	switch {
	case f != nil:
		return 0, f
	case a <= 0 || b <= 0:
		return 0, newFault(say("the polarity cannot be turned: both sides share the return conductor"), "%q has turns that are not above zero", text)
	}
	return b / a, nil
}
