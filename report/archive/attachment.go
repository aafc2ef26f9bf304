package archive

import "slices"

// Relationship says what an attached file is to the document (6.8 and annex E:
// AFRelationship).
type Relationship string

// The relationships in use.
const (
	Source     Relationship = "Source"     // the document was made from it
	Data       Relationship = "Data"       // what tables and figures of the document show
	Supplement Relationship = "Supplement" // more of the same
)

// Role says what an attached file is to the program.
type Role string

// The roles.
const (
	Design Role = "design" // the design file; there is one
	Result Role = "result" // the JSON form of the record; there is one
	Input  Role = "input"  // a file that the design file reads
	Table  Role = "table"  // a CSV file
)

var (
	relationships = []Relationship{Source, Data, Supplement}
	roles         = []Role{Design, Result, Input, Table}
)

// Attachment is a file in the document.
type Attachment struct {
	Name         string // as its user knows it; no two are alike
	Role         Role
	Relationship Relationship
	MIME         string // "text/csv"
	Description  string // in a few words, for the list that a viewer shows
	Data         []byte
}

// check says what is wrong with the attachments of a new document.
func check(files []Attachment) error {
	count := map[string]int{manifestName: 1}
	size := 0
	for _, a := range files {
		count[a.Name]++
		size += len(a.Data)
		switch {
		case a.Name == "":
			return fault("an attachment has no name")
		case count[a.Name] > 1:
			return fault("two attachments are called %q", a.Name)
		case !slices.Contains(roles, a.Role):
			return fault("attachment %q: unknown role %q", a.Name, a.Role)
		case !slices.Contains(relationships, a.Relationship):
			return fault("attachment %q: unknown relationship %q", a.Name, a.Relationship)
		case a.MIME == "":
			return fault("attachment %q: no MIME type", a.Name)
		case size > MaxContent:
			return fault("the attachments have more than %d bytes", MaxContent)
		}
	}
	return nil
}
