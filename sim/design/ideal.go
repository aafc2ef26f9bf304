package design

import "math"

// checkIdealLoops tells of loops of branches without any impedance, in which
// the current is undefined. A transformer is such a branch: what is short on
// one of its sides is short on the other.
//
// Each branch is an equation between junction voltages,
//
//	short: Va = Vb,  ideal source: Va = E,  transformer: Vto = n Vfrom
//
// and the currents are defined as long as no equation follows from others.
func (w *walker) checkIdealLoops() {
	d := w.design
	tied := ties{}
	if d.Source.Impedance.ideal() {
		tied.fix(d.Source.At)
	}
	for _, p := range d.parts() {
		independent := true
		switch {
		case p.Ratio > 0:
			independent = tied.tie(p.At, p.To, p.Ratio)
		case !p.Impedance.ideal():
		case p.To == "":
			independent = tied.fix(p.At)
		default:
			independent = tied.tie(p.At, p.To, 1)
		}
		if !independent {
			w.problem(p.Impedance.Pos, say("give it or another branch of the loop an impedance, or take it away"),
				"%s %q closes a loop of branches without impedance, in which the current is undefined", p.kind, p.Name)
		}
	}
}

// ties are junctions whose voltages are tied to one another by factors, and
// some of which are fixed (union-find with a factor on each link).
type ties map[string]tie

// A tie is V = factor Vto. A root is tied to itself.
type tie struct {
	to     string
	factor float64
	fixed  bool // of a root: its voltage is given
}

// root is the junction that j is tied to, with V(j) = factor V(root).
func (t ties) root(j string) (root string, factor float64) {
	up, ok := t[j]
	if !ok || up.to == j {
		return j, 1
	}
	root, above := t.root(up.to)
	t[j] = tie{to: root, factor: up.factor * above}
	return root, up.factor * above
}

// fix gives a junction its voltage. It reports false if it has one already.
func (t ties) fix(j string) bool {
	root, _ := t.root(j)
	if t[root].fixed {
		return false
	}
	t[root] = tie{to: root, factor: 1, fixed: true}
	return true
}

// sameFactor is how near two factors are that only rounding tells apart: each
// is a product of a few quotients.
const sameFactor = 1e-12

// tie makes V(b) = ratio V(a). It reports false if that follows from what is
// tied already. If it contradicts a tie of the two, the voltages can only be
// zero, which fixes them: a new fact, not a repeated one.
func (t ties) tie(a, b string, ratio float64) bool {
	rootA, a1 := t.root(a)
	rootB, b1 := t.root(b)
	if rootA == rootB {
		if t[rootA].fixed || math.Abs(b1-ratio*a1) <= sameFactor*math.Abs(b1) {
			return false
		}
		return t.fix(rootA)
	}
	if t[rootA].fixed && t[rootB].fixed {
		return false
	}
	// V(b) = b1 V(rootB) = ratio a1 V(rootA)
	if t[rootB].fixed {
		t[rootA] = tie{to: rootB, factor: b1 / (ratio * a1)}
	} else {
		t[rootB] = tie{to: rootA, factor: ratio * a1 / b1}
	}
	return true
}
