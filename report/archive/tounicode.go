package archive

import (
	"fmt"
	"strings"
)

const (
	cmapHead = `/CIDInit /ProcSet findresource begin
12 dict begin
begincmap
/CIDSystemInfo <</Registry (Adobe) /Ordering (UCS) /Supplement 0>> def
/CMapName /Adobe-Identity-UCS def
/CMapType 2 def
1 begincodespacerange
<0000> <FFFF>
endcodespacerange
`
	cmapTail = `endcmap
CMapName currentdict /CMap defineresource pop
end
end`
	cmapEntries = 100 // in one list, at most (Adobe Technical Note 5411)
)

// codes lists the character codes that have a glyph. gofpdf's codes are those of
// Unicode; the map has two bytes for each.
func codes(glyphIDs []byte) []int {
	var out []int
	const last = 0xFFFF // no character
	for c := 0; c < last && 2*c+1 < len(glyphIDs); c++ {
		if glyphIDs[2*c] != 0 || glyphIDs[2*c+1] != 0 {
			out = append(out, c)
		}
	}
	return out
}

// toUnicode maps codes to the characters of the same number (ISO 32000-1,
// 9.10.3). gofpdf writes one range for all; but only the last byte of a code may
// vary in a range, and a reader that keeps to this takes Ω for ©.
func toUnicode(codes []int) []byte {
	var b strings.Builder
	b.WriteString(cmapHead)
	for len(codes) > 0 {
		n := min(len(codes), cmapEntries)
		fmt.Fprintf(&b, "%d beginbfchar\n", n)
		for _, c := range codes[:n] {
			fmt.Fprintf(&b, "<%04X> <%04X>\n", c, c)
		}
		b.WriteString("endbfchar\n")
		codes = codes[n:]
	}
	b.WriteString(cmapTail)
	return []byte(b.String())
}
