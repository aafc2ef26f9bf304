package archive

import (
	"crypto/sha256"
	"fmt"

	"linewitness/report/archive/internal/syntax"
)

// An identifier is the SHA-256 of the document as it would be written without
// its identifier: two documents have the same one only if they are the same.
type identifier [sha256.Size]byte

// uuid is the identifier as a UUID of version 8 (RFC 9562, 5.8), for XMP.
func (id identifier) uuid() string {
	u := id
	u[6] = u[6]&0x0F | 0x80
	u[8] = u[8]&0x3F | 0x80
	return fmt.Sprintf("uuid:%x-%x-%x-%x-%x", u[0:4], u[4:6], u[6:8], u[8:10], u[10:16])
}

// file is the identifier as the trailer has it (6.1.3; ISO 32000-1, 14.4).
func (id identifier) file() []byte { return id[:16] }

// identified writes the document with its identifier.
func (d *document) identified(metadata *syntax.Stream) ([]byte, error) {
	var id identifier
	_, err := d.Bytes(func(body []byte) []byte {
		id = sha256.Sum256(body)
		return nil
	})
	if err != nil {
		return nil, err
	}
	metadata.Data = d.meta.metadata(id)
	return d.Bytes(func([]byte) []byte { return id.file() })
}
