package main

import (
	"fmt"
	"io"
	"strings"

	"linewitness/sim/record"
)

// writeOutcome writes the short form of a record: the verdict, and for each
// case the agreement, the settling, the evidence, the requirements and the claims.
func writeOutcome(w io.Writer, r *record.Record) {
	fmt.Fprintf(w, "%s: %s\n", heading(r.Design), r.Verdict)
	for i := range r.Cases {
		c := &r.Cases[i]
		fmt.Fprintf(w, "\n%s: %s\n", c.Name, c.Verdict)
		writeTable(w, append([][]string{
			{"agreement", agreementText(c.Agreement)},
			{"settling", settlingText(c.Settling)},
		}, evidenceRows(c)...))
		writeTable(w, requirementRows(c.Requirements))
		writeTable(w, claimRows(c.Claims))
		writeTable(w, ratingRows(c.Ratings))
	}
	if ws := warnings(r.Cases); len(ws) > 0 {
		fmt.Fprintf(w, "\n%s\n", strings.Join(ws, "\n"))
	}
}

// warnings are the warnings of all cases, each once, with the cases that have
// it unless all do.
func warnings(cases []record.Case) []string {
	var texts []string
	having := map[string][]string{}
	for _, c := range cases {
		for _, text := range c.Warnings {
			if having[text] == nil {
				texts = append(texts, text)
			}
			having[text] = append(having[text], c.Name)
		}
	}
	out := make([]string, len(texts))
	for i, text := range texts {
		out[i] = "warning: " + text
		if len(having[text]) < len(cases) {
			out[i] = "warning in " + strings.Join(having[text], ", ") + ": " + text
		}
	}
	return out
}

// heading names a design by what its file says of it, in the order in which a
// document is cited.
func heading(d record.Design) string {
	var parts []string
	if d.Number != "" {
		parts = append(parts, d.Number)
	}
	if d.Revision != "" {
		parts = append(parts, "revision "+d.Revision)
	}
	id := strings.Join(parts, " ")
	title := d.Title
	if title == "" {
		title = d.File
	}
	if id == "" {
		return title
	}
	return title + " (" + id + ")"
}

func agreementText(a record.Agreement) string {
	return fmt.Sprintf("%s found, %s expected, limit %s",
		percent(max(a.Voltage, a.Current)), percent(a.Expected), percent(a.Limit))
}

func settlingText(s record.Settling) string {
	if !s.Settled {
		return "no steady state: " + s.Decay
	}
	return fmt.Sprintf("%s, %s, remaining error %s, loop factor %s",
		inSI(s.Time, "s"), counted(s.Periods, "period"), percent(s.Residual), plainNumber(s.LoopFactor))
}

// requirementRows are the rows of the table of requirements, header first;
// there are none without requirements.
func requirementRows(rs []record.Requirement) [][]string {
	if len(rs) == 0 {
		return nil
	}
	rows := [][]string{{"id", "quantity", "value", "limit", "margin", "uncertainty", "verdict"}}
	for _, r := range rs {
		quantity := r.Quantity
		if r.Subject != "" {
			quantity += " " + r.Subject
		}
		verdict := string(r.Verdict)
		if r.Note != "" {
			verdict += ": " + r.Note
		}
		rows = append(rows, []string{
			r.ID, quantity, inUnit(r.Value, r.Unit), r.Limit,
			inUnit(r.Margin, differenceUnit(r.Unit)), spread(r.Uncertainty, differenceUnit(r.Unit)), verdict,
		})
	}
	return rows
}

// mostRatings is how many ratings of a case are listed; they come worst first.
const mostRatings = 4

// ratingRows are the rows of the table of ratings, header first; there are
// none where nothing is rated.
func ratingRows(rs []record.Rating) [][]string {
	if len(rs) == 0 {
		return nil
	}
	rows := [][]string{{"rated", "largest", "rating", "allowed", "margin", "uncertainty", "verdict"}}
	for i, r := range rs {
		if i == mostRatings {
			rows = append(rows, []string{fmt.Sprintf("and %d more, in the record", len(rs)-i)})
			break
		}
		peak := r.Unit + " peak"
		rows = append(rows, []string{
			r.Section + " " + r.Quantity, inUnit(max(r.Steady, r.Peak), peak), r.Text,
			inUnit(r.Allowed, peak), inUnit(r.MarginDB, "dB"), spread(r.Uncertainty, peak), string(r.Verdict),
		})
	}
	return rows
}

// differenceUnit is the unit of the difference of two values: two levels in
// dBm differ by so many dB.
func differenceUnit(unit string) string {
	if strings.HasPrefix(unit, "dB") {
		return "dB"
	}
	return unit
}
