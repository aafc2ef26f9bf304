package design

// A figure is a claim with the nodes that later checks point at.
type figure struct {
	*demand
	claim     Claim
	kind      claimed
	frequency float64 // of the case that it is made of, Hz; 0 if it is not known
}

// walkClaims reads the designer's own figures. That comes after the cases: a
// time in periods is in those of the case that it is claimed of.
func (w *walker) walkClaims(file *fields, s stock, taken ids) (figures []*figure) {
	for _, item := range w.entries(file, "claims") {
		w.takeID(item, "claim", taken)
		if x := w.walkClaim(item, s); x != nil {
			figures = append(figures, x)
		}
	}
	return figures
}

// walkClaim reads one claim, like a requirement by way of its quantity.
func (w *walker) walkClaim(n *node, s stock) *figure {
	what, name, ok := w.quantityOf(n, "claim", claimNames)
	if !ok {
		return nil
	}
	x := &figure{kind: claimable[name]}
	x.demand = w.demand(n, what, name, x.kind.table)
	x.resolveCase(s)
	x.readTolerance(x.readValue())
	return x
}

// resolveCase reads the case that a claim is made of.
func (x *figure) resolveCase(s stock) {
	x.Cases = []string{nominalName}
	w := s.order[0].w
	if n := x.fields.scalar("case"); n != nil {
		x.Cases = []string{n.text}
		if s.of[n.text] == nil {
			h := didYouMean(n.text, s.names())
			if n.text == "all" {
				h = say("a claim is made of one case; make another for each further one")
			}
			w.problem(n.pos, h, "there is no case %q", n.text)
			return
		}
		w = s.of[n.text].w
	}
	x.frequency = w.design.Source.Frequency.SI
}

func (s stock) names() (names []string) {
	for _, i := range s.order {
		names = append(names, i.name())
	}
	return names
}

// name is the case of an inventory.
func (i *inventory) name() string {
	if i.w.patch == nil {
		return nominalName
	}
	return i.w.patch.name
}

// check checks what the claims name against the design of their case, and
// returns them.
func (s stock) check(figures []*figure) (out []Claim) {
	for _, x := range figures {
		s.checkSubjects(x.demand, say("keep it, or make the claim on line %d of another case", x.Pos.Line))
		x.checkSource(s.of[x.Cases[0]])
		x.claim.Requirement = x.Requirement
		out = append(out, x.claim)
	}
	return out
}

// checkSource tells of a current at a junction that is not the source's: of
// the several currents there it names none.
func (x *figure) checkSource(i *inventory) {
	n := x.fields.node("at")
	if x.Quantity != Current || n == nil || i == nil || !i.w.whole || !i.junctions[n.text] || n.text == i.w.design.Source.At {
		return
	}
	i.w.problem(n.pos, say("give a section and its end, or a load; at %q it is the current out of the source", i.w.design.Source.At),
		"%s names none of the currents at %q", x.fields.what, n.text)
}
