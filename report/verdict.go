package report

import (
	"image/color"
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// markOf returns the shape that goes with a verdict.
func markOf(v record.Verdict) sheet.Mark {
	switch v {
	case record.Verified:
		return sheet.Holds
	case record.NotShown:
		return sheet.Open
	case record.Doubted, record.Missed:
		return sheet.Fails
	case record.Disagree:
		return sheet.Differs
	}
	return sheet.Unsettled
}

func colorOf(v record.Verdict) color.Color {
	switch v {
	case record.Verified:
		return ink.Good
	case record.NotShown:
		return ink.Doubt
	}
	return ink.Bad
}

func markOfRequirement(v record.RequirementVerdict) sheet.Mark {
	switch v {
	case record.Met:
		return sheet.Holds
	case record.MissedReq:
		return sheet.Fails
	}
	return sheet.Open
}

func markOfClaim(v record.ClaimVerdict) sheet.Mark {
	switch v {
	case record.Confirmed:
		return sheet.Holds
	case record.Contradicted:
		return sheet.Fails
	}
	return sheet.Open
}

func colorOfClaim(v record.ClaimVerdict) color.Color {
	switch v {
	case record.Confirmed:
		return ink.Good
	case record.Contradicted:
		return ink.Bad
	}
	return ink.Doubt
}

// tally counts requirements by their verdict.
type tally struct{ met, missed, open int }

func count(qs []record.Requirement) (t tally) {
	for _, q := range qs {
		t.add(q.Verdict)
	}
	return t
}

func (t *tally) add(v record.RequirementVerdict) {
	switch v {
	case record.Met:
		t.met++
	case record.MissedReq:
		t.missed++
	default:
		t.open++
	}
}

func (t tally) String() string {
	if t == (tally{}) {
		return "none"
	}
	var parts []string
	for _, p := range []struct {
		n    int
		word string
	}{{t.met, "met"}, {t.missed, "missed"}, {t.open, "not shown"}} {
		if p.n > 0 {
			parts = append(parts, format.Count(int64(p.n))+format.Space+p.word)
		}
	}
	return strings.Join(parts, ", ")
}

// reason says in a sentence or two what the verdict of the record rests on.
func (d *document) reason() string {
	var parts []string
	for _, c := range d.r.Cases {
		if !c.Settling.Settled {
			parts = append(parts, "Case "+c.Name+" reached no steady state within "+format.Plural(int64(c.Settling.Periods), "period")+".")
		}
		if c.Verdict == record.Disagree && largest(c.Agreement) > c.Agreement.Limit {
			parts = append(parts, "In case "+c.Name+" the two solutions differ by "+format.Percent(largest(c.Agreement))+"; the limit is "+format.Percent(c.Agreement.Limit)+".")
		} else if c.Verdict == record.Disagree {
			parts = append(parts, unexplained(&c))
		}
	}
	parts = append(parts, d.named(record.MissedReq, "missed")...)
	parts = append(parts, d.disputed(record.Contradicted)...)
	parts = append(parts, d.named(record.NotShownReq, "not shown")...)
	parts = append(parts, d.disputed(record.ClaimOpen)...)
	counted, advised := d.broken()
	parts = append(parts, counted...)
	if len(parts) == 0 {
		parts = append(parts, d.allMet())
	}
	parts = append(parts, advised...)
	return strings.Join(parts, " ")
}

// named lists the requirements of one verdict with their cases.
func (d *document) named(v record.RequirementVerdict, word string) []string {
	var list casesOf
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			if q.Verdict == v {
				list.add(q.ID, c.Name)
			}
		}
	}
	return list.gathered(word).sentences("further requirements are " + word)
}

// disputed names the claims of one verdict, a sentence for each case.
func (d *document) disputed(v record.ClaimVerdict) (parts []string) {
	for _, c := range d.r.Cases {
		ids := claimsOf(c.Claims, v)
		switch len(ids) {
		case 0:
		case 1:
			parts = append(parts, "Claim "+ids[0]+" is "+string(v)+" in "+c.Name+".")
		default:
			parts = append(parts, "Claims "+among(ids, mostNames)+" are "+string(v)+" in "+c.Name+".")
		}
	}
	return parts
}

// casesOf collects statements and the cases in which each holds.
type casesOf struct {
	statements []string
	cases      map[string][]string
}

func (l *casesOf) add(statement, name string) {
	if l.cases == nil {
		l.cases = map[string][]string{}
	}
	if l.cases[statement] == nil {
		l.statements = append(l.statements, statement)
	}
	l.cases[statement] = append(l.cases[statement], name)
}

// gathered joins ids that hold in the same cases into one statement: "R1, R2
// are missed".
func (l *casesOf) gathered(word string) *casesOf {
	var out casesOf
	done := map[string]bool{}
	for i, id := range l.statements {
		ids := []string{id}
		for _, o := range l.statements[i+1:] {
			if !done[o] && slices.Equal(l.cases[id], l.cases[o]) {
				ids = append(ids, o)
			}
		}
		if done[id] {
			continue
		}
		verb := " is "
		if len(ids) > 1 {
			verb = " are "
		}
		for _, o := range ids {
			done[o] = true
		}
		for _, c := range l.cases[id] {
			out.add(among(ids, mostNames)+verb+word, c)
		}
	}
	return &out
}

// sentences makes a sentence of each statement, of the first few; further says
// what the rest are.
func (l *casesOf) sentences(further string) []string {
	const most = 6 // more would push the table off the page; it has them all
	var parts []string
	for i, s := range l.statements {
		if i == most {
			parts = append(parts, format.Count(int64(len(l.statements)-most))+" "+further+".")
			break
		}
		parts = append(parts, s+" in "+among(l.cases[s], most)+".")
	}
	return parts
}

// among joins names, naming at most n.
func among(names []string, n int) string {
	if len(names) > n {
		return strings.Join(names[:n], ", ") + " and " + format.Count(int64(len(names)-n)) + " more"
	}
	return strings.Join(names, ", ")
}

func (d *document) allMet() string {
	n, kept := 0, 0
	var worst float64
	for _, c := range d.r.Cases {
		n += len(c.Requirements)
		kept += countRatings(c.Ratings).met
		worst = max(worst, largest(c.Agreement))
	}
	agree := "the two solutions differ by at most " + format.Percent(worst) + " of a section's largest value."
	if len(d.allClaims()) > 0 {
		agree = "every claim is confirmed; " + agree
	}
	switch {
	case n == 0 && kept == 0:
		return "The design states no requirement; " + agree
	case n == 0:
		return "The design states no requirement; every rating is kept in every case; " + agree
	case kept > 0:
		return "Every requirement is met in every case that it applies to, and every rating is kept; " + agree
	}
	return "Every requirement is met in every case that it applies to; " + agree
}

// largest returns the larger of the two agreement errors.
func largest(a record.Agreement) float64 { return max(a.Voltage, a.Current) }
