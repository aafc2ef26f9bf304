package report

import (
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// quantityOf names a requirement's quantity and subject in words.
func quantityOf(q record.Requirement) string {
	s := words(q.Quantity)
	if q.Subject != "" {
		s += ", " + q.Subject
	}
	return s
}

// words spells a name of the design file: "peak_voltage" is "peak voltage",
// and the names that are abbreviations take capitals.
func words(name string) string {
	if name == "vswr" {
		return "VSWR"
	}
	return strings.ReplaceAll(name, "_", " ")
}

// relative returns the margin in dB, or else in percent.
func relative(q record.Requirement) string {
	if q.MarginDB == q.MarginDB { // not NaN
		return format.DB(q.MarginDB)
	}
	return format.Percent(q.MarginPercent / 100)
}

// notes writes a few notes as one paragraph, many as a list.
func (d *document) notes(list []string) {
	const few = 12
	if len(list) == 0 {
		return
	}
	if len(list) <= few {
		d.b.Note(strings.Join(list, " "))
		return
	}
	for _, s := range list {
		d.b.Note(s)
	}
}

func bracket(s string) string {
	if s == "" {
		return ""
	}
	return "[" + s + "]"
}
