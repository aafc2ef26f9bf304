package archive

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
)

const (
	manifestName   = "manifest.json"
	manifestFormat = 1 // it grows only when a reader of the old form would misread the new one
	program        = "linewitness"
)

// ComparisonCreator begins the Creator of the page of a comparison: a document of
// this program, but no record.
const ComparisonCreator = program + " compare"

// manifest is the attached list of the attached files. It marks a document as a
// record of this program.
type manifest struct {
	Program string  `json:"program"`
	Format  int     `json:"format"`
	Version string  `json:"version"`
	Files   []entry `json:"files"`
}

// entry is what the manifest says of a file.
type entry struct {
	Name         string       `json:"name"`
	Role         Role         `json:"role"`
	Relationship Relationship `json:"relationship"`
	MIME         string       `json:"mime"`
	Description  string       `json:"description"`
	Size         int          `json:"size"`
	SHA256       string       `json:"sha256"`
}

// list makes the manifest of files, as a file.
func list(version string, files []Attachment) (Attachment, error) {
	m := manifest{Program: program, Format: manifestFormat, Version: version, Files: []entry{}}
	for _, a := range files {
		m.Files = append(m.Files, entry{a.Name, a.Role, a.Relationship, a.MIME, a.Description, len(a.Data), sha256Of(a.Data)})
	}
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	err := e.Encode(m)
	return Attachment{
		Name: manifestName, Relationship: Supplement, MIME: "application/json",
		Description: "the attached files with their SHA-256", Data: b.Bytes(),
	}, err
}

func sha256Of(data []byte) string {
	sum := sha256.Sum256(data)
	return hex.EncodeToString(sum[:])
}

// readManifest reads a manifest and checks that it is one of ours and whole.
func readManifest(data []byte) (*manifest, error) {
	m := &manifest{}
	if err := json.Unmarshal(data, m); err != nil {
		return nil, because(ErrNotRecord, "%s: %v", manifestName, err)
	}
	if m.Program != program || m.Format < 1 {
		return nil, because(ErrNotRecord, "%s is of another program", manifestName)
	}
	if m.Format > manifestFormat {
		return nil, because(ErrNewer, "%s has format %d, this program reads up to %d", manifestName, m.Format, manifestFormat)
	}
	count := map[Role]int{}
	for _, e := range m.Files {
		count[e.Role]++
	}
	for _, r := range []Role{Design, Result} {
		switch {
		case count[r] == 0:
			return nil, because(ErrMissing, "%s lists no %s", manifestName, r)
		case count[r] > 1:
			return nil, because(ErrDamaged, "%s lists %d files as %s", manifestName, count[r], r)
		}
	}
	return m, nil
}
