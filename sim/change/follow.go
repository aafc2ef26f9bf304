package change

import (
	"math"
	"slices"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// Follows lists the lengths that are written as they were and are others all the
// same: a length in degrees is another one at another frequency.
func Follows(old, now *design.File) []record.Change {
	all := lengths("", old.Nominal, now.Nominal)
	for _, c := range now.Cases {
		i := slices.IndexFunc(old.Cases, func(k design.Case) bool { return k.Name == c.Name })
		if i < 0 {
			continue
		}
		for _, f := range lengths(c.Name, old.Cases[i].Design, c.Design) {
			inherited := slices.ContainsFunc(all, func(n record.Change) bool {
				return n.Case == "" && n.Place == f.Place && n.OldSI == f.OldSI && n.NewSI == f.NewSI
			})
			if !inherited {
				all = append(all, f)
			}
		}
	}
	return all
}

func lengths(inCase string, old, now *design.Design) (all []record.Change) {
	const rounding = 1e-9
	for _, s := range now.Sections {
		i := slices.IndexFunc(old.Sections, func(o design.Section) bool { return o.Name == s.Name })
		if i < 0 || old.Sections[i].Length.Text != s.Length.Text {
			continue
		}
		was := old.Sections[i].Length
		if math.Abs(was.SI-s.Length.SI) > rounding*s.Length.SI {
			all = append(all, record.Change{
				Kind: record.FollowTerm, Case: inCase, Place: "section " + s.Name, Term: "length",
				Old: was.Text, New: s.Length.Text, OldSI: was.SI, NewSI: s.Length.SI, Unit: "m",
			})
		}
	}
	return all
}
