package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// timeRow is a place, its times to 10 %, 1 % and 0.1 %, and from a stop to
// -20, -40 and -60 dB.
type timeRow struct {
	name  string
	times [6]float64
	bold  bool
}

// settlingTimes writes how long every junction and load takes to come to its
// final phasor and, where the source stops, to fall after it.
func (d *document) settlingTimes(c *record.Case) {
	rows := timeRows(c.Settling)
	if len(rows) == 0 {
		return
	}
	if !c.Settling.Settled {
		d.b.Note(noTimes(c.Settling.Predicted))
		return
	}
	ringing := len(c.Settling.RingDown) > 0
	t := timesTable(rows, ringing)
	d.b.Table(t)
	d.b.Note(timesNote(c, rows, ringing))
}

// noTimes says why a run that did not settle has no times, and what the slowest
// mode alone would take.
func noTimes(p record.PredictedSettling) string {
	s := "No times to the final phasors are given, for none was reached."
	if p.To1Percent > 0 && !math.IsInf(p.To1Percent, 0) {
		s += " The slowest mode alone takes " + format.SI(p.To10Percent, "s") + " to 10" + format.Space + "%, " + format.SI(p.To1Percent, "s") +
			" to 1" + format.Space + "% and " + format.SI(p.ToTenth, "s") + " to 0.1" + format.Space + "% (predicted, from the end of the source's own rise)."
	}
	return s
}

// timeRows lists the prediction and the places.
func timeRows(s record.Settling) []timeRow {
	if len(s.Places) == 0 && len(s.RingDown) == 0 {
		return nil
	}
	nan, p := math.NaN(), s.Predicted
	rows := []timeRow{{name: "Predicted, slowest mode", times: [6]float64{p.To10Percent, p.To1Percent, p.ToTenth, nan, nan, p.RingDown60}, bold: true}}
	at := map[string]int{}
	for _, q := range s.Places {
		if q.Kind == "junction" {
			at[q.Name] = len(rows)
		}
		rows = append(rows, timeRow{name: placeName(q), times: [6]float64{q.To10Percent, q.To1Percent, q.ToTenth, nan, nan, nan}})
	}
	for _, r := range s.RingDown {
		i, ok := at[r.Name]
		if !ok {
			i = len(rows)
			rows = append(rows, timeRow{name: r.Name, times: [6]float64{nan, nan, nan}})
		}
		rows[i].times[3], rows[i].times[4], rows[i].times[5] = r.To20, r.To40, r.To60dB
	}
	return rows
}

// placeName names a place; a load says so, and whether its current is meant.
func placeName(p record.SettlingPlace) string {
	switch {
	case p.Kind != "load":
		return p.Name
	case p.Quantity == "current":
		return p.Name + " (load, current)"
	}
	return p.Name + " (load)"
}

// manyTimes is how many rows stand one under the other; more stand in pairs.
const manyTimes = 6

func timesTable(rows []timeRow, ringing bool) sheet.Table {
	t := sheet.Table{Size: 7}
	count, each := 3, 1
	switch {
	case ringing:
		count = 6
	case len(rows) > manyTimes:
		each = 2
	}
	heads := []string{"Within 10" + format.Space + "% after", "1" + format.Space + "%", "0.1" + format.Space + "%"}
	if ringing {
		heads = append(heads, "From the stop to "+decibel(-20), decibel(-40), decibel(-60))
	}
	for k := range each {
		if k > 0 {
			t.Columns = append(t.Columns, sheet.Column{}) // keeps the pair apart
		}
		t.Columns = append(t.Columns, left("Junction or load"))
		for _, h := range heads {
			t.Columns = append(t.Columns, right(h))
		}
	}
	half := (len(rows) + each - 1) / each
	for i := range half {
		var cells []sheet.Cell
		for k := i; k < len(rows); k += half {
			if k > i {
				cells = append(cells, sheet.Cell{})
			}
			cells = append(cells, sheet.Cell{Text: rows[k].name, Bold: rows[k].bold})
			for _, v := range rows[k].times[:count] {
				cells = append(cells, sheet.Cell{Text: format.SI(v, "s")})
			}
		}
		t.Rows = append(t.Rows, cells)
	}
	return t
}

func decibel(v float64) string { return format.Fixed(v, 0) + format.Space + "dB" }

// timesNote says what the times are, and what a dash among them means.
func timesNote(c *record.Case, rows []timeRow, ringing bool) string {
	s := "From switch-on, in the run with the source as it starts in service, until the phasor over the following period stays within that part of its final value. The prediction is from the end of the source's own rise."
	dashes := false
	for _, r := range rows[1:] {
		for _, v := range r.times[:3] {
			dashes = dashes || math.IsNaN(v)
		}
	}
	if dashes {
		s += " A dash: not within the run of " + format.SI(c.Stress.Duration, "s") + "."
	}
	if ringing {
		s += " After the stop: until the amplitude stays below that part of what it was; a dash: not within the run, or not of a junction."
	}
	return s
}
