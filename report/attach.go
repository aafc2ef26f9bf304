package report

import (
	"path"
	"strings"

	"linewitness/report/archive"
	"linewitness/report/data"
	"linewitness/sim/record"
)

// largestTable bounds a CSV file that is attached, in bytes, so that all three and
// what else there is can be. A design of some dozen long cases passes it; its
// samples can still be written as files.
const largestTable = archive.MaxContent / 4

// attachments are the files that make a record repeatable and readable by
// machines: the design, what it reads, and the outcome as JSON and CSV. They are
// the same bytes as the files of their own that the record can be written to.
// A CSV file larger than largestTable is left out.
func attachments(r *record.Record) ([]archive.Attachment, error) {
	out := []archive.Attachment{{
		Name: designName(r.Design.File), Role: archive.Design, Relationship: archive.Source,
		MIME: "application/yaml", Description: "the design file", Data: r.Design.Source,
	}}
	for _, a := range r.Attachments {
		out = append(out, archive.Attachment{
			Name: a.Name, Role: archive.Input, Relationship: archive.Source,
			MIME: mime(a.Name), Description: "read by the design file", Data: a.Data,
		})
	}
	stem := strings.TrimSuffix(out[0].Name, path.Ext(out[0].Name))
	result, err := data.JSON(r)
	if err != nil {
		return nil, err
	}
	tables, err := data.CSV(r)
	if err != nil {
		return nil, err
	}
	out = append(out, archive.Attachment{
		Name: unused(out, stem+".json"), Role: archive.Result, Relationship: archive.Data,
		MIME: "application/json", Description: "every figure of the record", Data: result,
	})
	for _, t := range tables {
		if !fits(t) {
			continue
		}
		out = append(out, archive.Attachment{
			Name: unused(out, stem+"."+t.Name+".csv"), Role: archive.Table, Relationship: archive.Data,
			MIME: "text/csv", Description: "samples: " + t.Name, Data: t.Data,
		})
	}
	return out, nil
}

// fits reports whether a table is short enough to be attached.
func fits(t data.CSVFile) bool { return len(t.Data) <= largestTable }

// designName is what the design file is called in the document. A viewer knows
// what to do with it by the end of its name.
func designName(file string) string {
	switch {
	case file == "":
		return "design.yaml"
	case path.Ext(file) == "":
		return file + ".yaml"
	}
	return file
}

// mime is the type of a file that a design reads: all of them are text.
func mime(name string) string {
	if strings.EqualFold(path.Ext(name), ".csv") {
		return "text/csv"
	}
	return "text/plain"
}

// unused is a name that no file has yet, name itself if it can be.
func unused(files []archive.Attachment, name string) string {
	for _, a := range files {
		if a.Name == name {
			return unused(files, "linewitness-"+name)
		}
	}
	return name
}
