package report

import (
	"math"
	"math/cmplx"
	"regexp"
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// claimFinding writes what was found of a claim that is not simply confirmed,
// and the slips that would explain it, most likely first.
func (d *document) claimFinding(q *record.Claim) {
	if q.Verdict == record.Confirmed && q.Finding == "" {
		return
	}
	word := capital(string(q.Verdict)) + "."
	text := q.ID + ", " + words(q.Quantity) + subject(q.Subject) + ", case " + q.Case + ". " + ohms.ReplaceAllString(claimReason(q), "${1}"+format.Space+"${2}Ω")
	d.b.Space(5)
	d.b.Need(slipRoom)
	d.b.Verdict(markOfClaim(q.Verdict), colorOfClaim(q.Verdict), word, trimmed(text))
	for i := range q.Slips {
		d.b.Step(format.Count(int64(i+1))+".", slipText(q, &q.Slips[i]))
	}
}

const (
	noSlip   = "no single known slip explains it"
	slipRoom = 44.0 // what a claim needs to begin on a page: its finding and the first slip
)

// claimReason says why a claim has its verdict, and leads to the list of slips.
func claimReason(q *record.Claim) string {
	switch {
	case q.Verdict == record.ClaimOpen && math.IsInf(q.Uncertainty, 0):
		return "The uncertainty has no bound, so that nothing is shown either way."
	case len(q.Slips) == 0 && q.Verdict == record.Contradicted && !strings.Contains(strings.ToLower(q.Finding), noSlip):
		return trimmed(q.Finding + " " + capital(noSlip) + ".")
	case len(q.Slips) == 0:
		return q.Finding
	}
	// The list names the slips, with their values; the finding's name of the
	// first would only repeat it.
	first := q.Slips[0].Name
	if q.Slips[0].Where != "" {
		first += ", " + q.Slips[0].Where
	}
	s := strings.Replace(q.Finding, " Most likely: "+first+".", "", 1)
	if len(q.Slips) == 1 {
		return trimmed(s + " One slip alone would give it:")
	}
	return trimmed(s + " Each of these slips alone would give it, the most likely first:")
}

// ohms finds the unit as the design file writes it.
var ohms = regexp.MustCompile(`(\d) ([kMm]?)ohm\b`)

// slipText says what a slip makes of the claim, what cannot be told from it,
// and what else it explains.
func slipText(q *record.Claim, s *record.Slip) string {
	text := slipName(s)
	if !cmplx.IsNaN(s.Value) {
		text += ": " + claimed(q, s.Value)
	}
	if len(s.Also) > 0 {
		text += "; cannot be told from " + listed(s.Also)
	}
	others := slices.DeleteFunc(slices.Clone(s.Explains), func(id string) bool { return id == q.ID })
	if len(others) > 0 {
		text += "; explains " + listed(others) + " too"
	}
	return text + "."
}

// slipName is a slip and where it was made.
func slipName(s *record.Slip) string {
	switch {
	case s.Where == "":
		return s.Name
	case strings.HasPrefix(s.Where, "section ") || s.Where == "every section":
		return s.Name + " on " + s.Where
	}
	return s.Name + " at " + s.Where
}

// together says which slip explains several claims at once, each set of claims
// by its most likely slip.
func together(all []record.Claim) []string {
	var out []string
	seen := map[string]bool{}
	for i := range all {
		for k := range all[i].Slips {
			s := &all[i].Slips[k]
			set := strings.Join(s.Explains, "\x00")
			if len(s.Explains) < 2 || seen[set] {
				continue
			}
			seen[set] = true
			out = append(out, "One slip explains "+listed(s.Explains)+" together: "+slipName(s)+".")
		}
	}
	return out
}
