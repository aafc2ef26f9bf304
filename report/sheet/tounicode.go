package sheet

import (
	"bytes"
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// gofpdf maps character codes to Unicode by one range, <0000> to <FFFF>. Only
// the last byte of a code may vary within a range (ISO 32000-1, 9.10.3), so a
// reader that keeps to this takes Ω for ©. mapToUnicode writes one range for
// each block instead, and the cross-reference table anew.

// cmapStream matches the stream of the map up to the end of its range.
var cmapStream = regexp.MustCompile(
	`<</Length (\d+)>>\nstream\n(/CIDInit [^\x80-\xff]{0,400}?)1 beginbfrange\n<0000> <FFFF> <0000>\nendbfrange`)

// crossReference matches the end of the file, from the table on.
var crossReference = regexp.MustCompile(`xref\n0 \d+\n0000000000 65535 f \n((?:\d{10} 00000 n \n)*)trailer\n[^\x80-\xff]*startxref\n(\d+)\n%%EOF`)

// blocks are the high bytes of the characters that the Liberation faces hold:
// Latin, Greek, Cyrillic, punctuation to box drawing, ligatures.
var blocks = []byte{
	0x00, 0x01, 0x02, 0x03, 0x04, 0x05, 0x1D, 0x1E, 0x1F,
	0x20, 0x21, 0x22, 0x23, 0x25, 0x26, 0x2C, 0xA7, 0xFB, 0xFF,
}

var errNoTable = errors.New("sheet: the document has no cross-reference table")

func mapToUnicode(pdf []byte) ([]byte, error) {
	places := cmapStream.FindAllSubmatchIndex(pdf, -1)
	table := crossReference.FindSubmatchIndex(pdf)
	if table == nil {
		return nil, errNoTable
	}
	var out bytes.Buffer
	var shifts []shift
	from := 0
	for _, p := range places {
		out.Write(pdf[from:p[0]])
		stream, err := mapped(string(pdf[p[2]:p[3]]), string(pdf[p[4]:p[5]]), p[1]-p[4])
		if err != nil {
			return nil, err
		}
		out.WriteString(stream)
		shifts = append(shifts, shift{after: p[0], by: len(stream) - (p[1] - p[0])})
		from = p[1]
	}
	out.Write(pdf[from:table[2]])
	for _, line := range strings.SplitAfter(string(pdf[table[2]:table[3]]), "\n") {
		if line != "" {
			fmt.Fprintf(&out, "%010d 00000 n \n", moved(shifts, line[:10]))
		}
	}
	out.Write(pdf[table[3]:table[4]])
	fmt.Fprintf(&out, "%d\n%%%%EOF\n", moved(shifts, string(pdf[table[4]:table[5]])))
	return out.Bytes(), nil
}

// mapped returns the start of a stream with one range for each block; head is
// what stands before the ranges, old the length of both as they were.
func mapped(length, head string, old int) (string, error) {
	total, err := strconv.Atoi(length)
	if err != nil {
		return "", fmt.Errorf("sheet: length of a stream: %w", err)
	}
	var b strings.Builder
	b.WriteString(head)
	fmt.Fprintf(&b, "%d beginbfrange\n", len(blocks))
	for _, high := range blocks {
		fmt.Fprintf(&b, "<%02X00> <%02XFF> <%02X00>\n", high, high, high)
	}
	b.WriteString("endbfrange")
	return fmt.Sprintf("<</Length %d>>\nstream\n%s", total+b.Len()-old, b.String()), nil
}

// shift says that what came after a place has moved.
type shift struct{ after, by int }

// moved returns where an offset of the old file lies in the new one.
func moved(shifts []shift, offset string) int {
	old, err := strconv.Atoi(offset)
	if err != nil {
		panic("sheet: a match of digits is not a number")
	}
	now := old
	for _, s := range shifts {
		if s.after < old {
			now += s.by
		}
	}
	return now
}
