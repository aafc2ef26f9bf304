package truetype

import (
	"encoding/binary"
	"fmt"
	"slices"
)

var be = binary.BigEndian

// A Program is the tables of a font by their tags.
type Program map[string][]byte

const (
	directory = 12 // bytes before the first entry of the table directory
	entrySize = 16
)

// Read finds the tables of a font. They share its bytes.
func Read(font []byte) (Program, error) {
	if len(font) < directory {
		return nil, fmt.Errorf("truetype: a font of %d bytes", len(font))
	}
	p := Program{}
	for i := range int(be.Uint16(font[4:])) {
		at := directory + entrySize*i
		if at+entrySize > len(font) {
			return nil, fmt.Errorf("truetype: the table directory is cut off")
		}
		e := font[at : at+entrySize]
		start, size := int(be.Uint32(e[8:])), int(be.Uint32(e[12:]))
		if start > len(font) || size > len(font)-start {
			return nil, fmt.Errorf("truetype: table %q is outside the font", e[:4])
		}
		p[string(e[:4])] = font[start : start+size]
	}
	return p, nil
}

// cidTables are the tables that a CIDFont of type 2 needs (ISO 32000-1, 9.9,
// table 126); the others, cmap and name among them, are of no use there.
var cidTables = []string{"cvt ", "fpgm", "glyf", "head", "hhea", "hmtx", "loca", "maxp", "prep"}

// Embedded returns a font of the tables alone that a CIDFont needs. It is an
// error if one of those that every font has is missing.
func (p Program) Embedded() ([]byte, error) {
	for _, t := range []string{"glyf", "head", "hhea", "hmtx", "loca", "maxp"} {
		if p[t] == nil {
			return nil, fmt.Errorf("truetype: no table %q", t)
		}
	}
	if len(p["head"]) < 12 {
		return nil, fmt.Errorf("truetype: table \"head\" is cut off")
	}
	var tags []string
	for _, t := range cidTables {
		if p[t] != nil {
			tags = append(tags, t)
		}
	}
	return p.build(tags), nil
}

// build writes the tables of sorted tags, with the check sums that the format
// asks for.
func (p Program) build(tags []string) []byte {
	out := header(len(tags))
	var body []byte
	head := 0
	for _, t := range tags {
		data := slices.Clone(p[t])
		at := directory + entrySize*len(tags) + len(body)
		if t == "head" {
			head = at
			be.PutUint32(data[8:], 0) // the sum of the whole does not count itself
		}
		out = append(out, t...)
		for _, x := range []uint32{sum(data), uint32(at), uint32(len(data))} {
			out = be.AppendUint32(out, x)
		}
		body = append(body, data...)
		body = append(body, make([]byte, -len(body)&3)...)
	}
	out = append(out, body...)
	be.PutUint32(out[head+8:], 0xB1B0AFBA-sum(out))
	return out
}

// header writes the number of tables and what a binary search over them needs.
func header(tables int) []byte {
	power, log := 1, 0
	for 2*power <= tables {
		power, log = 2*power, log+1
	}
	out := be.AppendUint32(nil, 0x00010000)
	for _, x := range []int{tables, entrySize * power, log, entrySize * (tables - power)} {
		out = be.AppendUint16(out, uint16(x))
	}
	return out
}

// sum adds up the words of a table, which ends in zeros.
func sum(b []byte) (s uint32) {
	for len(b) >= 4 {
		s += be.Uint32(b)
		b = b[4:]
	}
	var last [4]byte
	copy(last[:], b)
	return s + be.Uint32(last[:])
}
