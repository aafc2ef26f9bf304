package sim

import (
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// attached are the files that a design reads, for the record.
func attached(f *design.File) []record.Attachment {
	var out []record.Attachment
	for _, a := range f.Attachments {
		out = append(out, record.Attachment{Name: a.Name, Data: a.Data, SHA256: a.SHA256})
	}
	return out
}
