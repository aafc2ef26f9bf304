package icc

import (
	"encoding/binary"
	"math"
)

const (
	headerSize = 128
	entrySize  = 12
	curveSize  = 1024 // entries of the curve; between them readers draw straight lines
)

var be = binary.BigEndian

// A tag is an element of a profile. One without data shares that of the tag
// before it.
type tag struct {
	signature string
	data      []byte
}

// SRGB returns a display profile of sRGB, version 2.4 of ICC.1: matrix and curve.
// The bytes are always the same.
func SRGB() []byte {
	m := adapted()
	return profile([]tag{
		{"desc", description("sRGB, computed from IEC 61966-2-1")},
		{"cprt", []byte("text\x00\x00\x00\x00No rights are claimed\x00")},
		{"wtpt", xyz(white)},
		{"rXYZ", xyz(m.column(0))},
		{"gXYZ", xyz(m.column(1))},
		{"bXYZ", xyz(m.column(2))},
		{"rTRC", curve()},
		{"gTRC", nil},
		{"bTRC", nil},
	})
}

// profile puts header, tag table and data together (ICC.1, 7).
func profile(tags []tag) []byte {
	table := be.AppendUint32(nil, uint32(len(tags)))
	first := headerSize + 4 + entrySize*len(tags)
	var body []byte
	at, size := 0, 0
	for _, t := range tags {
		if t.data != nil {
			at, size = first+len(body), len(t.data)
			body = append(body, t.data...)
			body = append(body, make([]byte, -len(body)&3)...) // to a multiple of 4
		}
		table = append(table, t.signature...)
		table = be.AppendUint32(table, uint32(at))
		table = be.AppendUint32(table, uint32(size))
	}
	return append(append(header(first+len(body)), table...), body...)
}

// header says that this is a display profile from RGB to XYZ (ICC.1, 7.2).
func header(size int) []byte {
	h := make([]byte, headerSize)
	be.PutUint32(h, uint32(size))
	be.PutUint32(h[8:], 0x02400000) // version 2.4, which every part of ISO 19005 takes
	copy(h[12:], "mntrRGB XYZ ")
	for i, part := range []uint16{2026, 1, 1} { // a date it must have, and not today's
		be.PutUint16(h[24+2*i:], part)
	}
	copy(h[36:], "acsp")
	copy(h[68:], fixed(connection))
	return h
}

func description(s string) []byte {
	b := be.AppendUint32([]byte("desc\x00\x00\x00\x00"), uint32(len(s)+1))
	// Without the forms in Unicode and in Script Code.
	return append(append(b, s...), make([]byte, 1+8+70)...)
}

func xyz(v vector) []byte { return append([]byte("XYZ \x00\x00\x00\x00"), fixed(v)...) }

// fixed writes numbers with 16 binary places.
func fixed(v vector) []byte {
	var b []byte
	for _, x := range v {
		b = be.AppendUint32(b, uint32(int32(math.Round(x*(1<<16)))))
	}
	return b
}

func curve() []byte {
	b := be.AppendUint32([]byte("curv\x00\x00\x00\x00"), curveSize)
	for i := range curveSize {
		b = be.AppendUint16(b, uint16(math.Round(linear(float64(i)/(curveSize-1))*math.MaxUint16)))
	}
	return b
}
