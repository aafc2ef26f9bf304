package report

import "slices"

// models are the names of the kinds of line of the record by their model.
type models struct{ constant, dispersive []string }

// models returns the kinds of line of all cases by their model. A line that is
// constant in one case and dispersive in another is in both lists.
func (d *document) models() (m models) {
	for _, k := range d.lineKinds() {
		list := &m.constant
		if dispersive(k.ModelLine) {
			list = &m.dispersive
		}
		if !slices.Contains(*list, k.Name) {
			*list = append(*list, k.Name)
		}
	}
	return m
}

// say is a subject and the lines of the record that it stands for, if the
// record names any.
func (models) say(names []string, subject string) string {
	if len(names) == 0 {
		return subject
	}
	return subject + " (here " + among(names, mostNames) + ")"
}

// mostNames is how many names a sentence holds.
const mostNames = 8
