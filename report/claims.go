package report

import (
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// claims writes the chapter of the designer's own figures, if there are any.
func (d *document) claims() {
	all := d.allClaims()
	if len(all) == 0 {
		return
	}
	table := claimTable(all)
	d.b.Need(claimHead + d.b.Kept(table))
	d.b.Space(22)
	d.b.Heading("Claims", claimHead)
	d.b.Paragraph("The design file states figures of the designer's own. Each is compared with both solutions: confirmed if difference and uncertainty are inside its tolerance, contradicted if outside, not shown if the uncertainty straddles it. " + claimTally(all))
	d.b.Table(table)
	d.notes(claimTexts(all))
	for _, s := range together(all) {
		d.b.Paragraph(s)
	}
	for i := range all {
		d.claimFinding(&all[i])
	}
}

// claimHead is the room of the chapter's heading and what it says first.
const claimHead = 80.0

// allClaims returns the claims of all cases.
func (d *document) allClaims() []record.Claim {
	var out []record.Claim
	for _, c := range d.r.Cases {
		for _, q := range c.Claims {
			q.Case = c.Name
			out = append(out, q)
		}
	}
	return out
}

func claimTable(all []record.Claim) sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{
		{Head: "Id"},
		{Head: "Quantity, subject", Grow: 1},
		{Head: "Case"},
		{Head: "Claimed", Align: rightAlign},
		{Head: "Tolerance ±", Align: rightAlign},
		{Head: "Phasor", Align: rightAlign},
		{Head: "Time domain", Align: rightAlign},
		{Head: "Difference", Align: rightAlign},
		{Head: "Uncertainty ±", Align: rightAlign},
		{Head: "Verdict"},
	}}
	for i := range all {
		q := &all[i]
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: q.ID, Bold: true},
			{Text: words(q.Quantity) + subject(q.Subject)},
			{Text: q.Case},
			{Text: claimed(q, q.Claimed)},
			{Text: tolerance(q)},
			{Text: claimed(q, q.Phasor)},
			{Text: claimed(q, q.FDTD)},
			{Text: format.Uncertainty(q.Difference, q.Unit)},
			{Text: format.Uncertainty(q.Uncertainty, q.Unit)},
			{Text: string(q.Verdict), Mark: markOfClaim(q.Verdict), Bold: q.Verdict != record.Confirmed},
		})
	}
	return t
}

func subject(s string) string {
	if s == "" {
		return ""
	}
	return ", " + s
}

// claimed prints a value of a claim in its unit.
func claimed(q *record.Claim, z complex128) string {
	if q.Complex {
		return format.Phasor(z, q.Unit)
	}
	return format.Quantity(real(z), q.Unit)
}

// tolerance prints the tolerance in the unit of the claim, and as it was given
// where that is a part of the claimed value.
func tolerance(q *record.Claim) string {
	s := format.Uncertainty(q.Tolerance, q.Unit)
	if strings.Contains(q.ToleranceText, "%") {
		s += " (" + unbroken(q.ToleranceText) + ")"
	}
	return s
}

// claimTexts are the texts and the sources of the claims, and what the file
// says.
func claimTexts(all []record.Claim) []string {
	var out []string
	for _, q := range all {
		s := trimmed(strings.TrimSuffix(q.Text, ".") + " " + bracket(q.Source))
		if q.ClaimedText != "" {
			if s != "" {
				s += ", "
			}
			s += "given as “" + format.Signed(q.ClaimedText) + "”"
		}
		if s != "" {
			out = append(out, q.ID+": "+s+".")
		}
	}
	return out
}

// countClaims counts claims by their verdict: confirmed, contradicted, open.
func countClaims(all []record.Claim) (confirmed, contradicted, open int) {
	for _, q := range all {
		switch q.Verdict {
		case record.Confirmed:
			confirmed++
		case record.Contradicted:
			contradicted++
		default:
			open++
		}
	}
	return confirmed, contradicted, open
}

// claimTally says how many claims stand.
func claimTally(all []record.Claim) string {
	confirmed, contradicted, open := countClaims(all)
	var parts []string
	for _, p := range []struct {
		n    int
		word string
	}{{confirmed, "confirmed"}, {contradicted, "contradicted"}, {open, "not shown"}} {
		if p.n > 0 {
			parts = append(parts, format.Count(int64(p.n))+format.Space+p.word)
		}
	}
	return "Claims: " + strings.Join(parts, ", ") + "."
}

// claimsOfCase counts the claims of a case in a sentence.
func claimsOfCase(c *record.Case) string {
	if len(c.Claims) == 0 {
		return ""
	}
	return " " + claimTally(c.Claims)
}

// coverClaims writes how many claims stand.
func (d *document) coverClaims() {
	all := d.allClaims()
	if len(all) == 0 {
		return
	}
	worst, word, explained := record.Confirmed, "Claims confirmed.", ""
	switch _, contradicted, open := countClaims(all); {
	case contradicted > 0:
		worst, word = record.Contradicted, "Claims contradicted: "+among(claimsOf(all, record.Contradicted), mostNames)+"."
		explained = ", and the slips that would explain them"
	case open > 0:
		worst, word = record.ClaimOpen, "Claims not shown: "+among(claimsOf(all, record.ClaimOpen), mostNames)+"."
	}
	d.b.Space(5)
	d.b.Verdict(markOfClaim(worst), colorOfClaim(worst), word, claimTally(all)+d.claimsElsewhere(explained))
}

// claimsElsewhere says where the claims are, in a document that has them.
func (d *document) claimsElsewhere(explained string) string {
	if d.opt.Summary {
		return ""
	}
	return " The chapter Claims has the figures" + explained + "."
}

// claimsOf returns the ids of the claims of a verdict.
func claimsOf(all []record.Claim, v record.ClaimVerdict) (ids []string) {
	for _, q := range all {
		if q.Verdict == v {
			ids = append(ids, q.ID)
		}
	}
	return ids
}
