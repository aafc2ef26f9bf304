package truetype

import "unicode/utf16"

// postScriptName is the number of that name in the name table.
const postScriptName = 6

// PostScriptName returns the name under which the font is known to documents, or
// nothing if its name table has none.
func (p Program) PostScriptName() string {
	table := p["name"]
	if len(table) < 6 {
		return ""
	}
	store := int(be.Uint16(table[4:]))
	for i := range int(be.Uint16(table[2:])) {
		at := 6 + 12*i
		if at+12 > len(table) {
			return ""
		}
		e := table[at : at+12]
		start, size := store+int(be.Uint16(e[10:])), int(be.Uint16(e[8:]))
		if be.Uint16(e[6:]) != postScriptName || start+size > len(table) {
			continue
		}
		if name := decode(be.Uint16(e), table[start:start+size]); regular(name) {
			return name
		}
	}
	return ""
}

// decode reads a name; on platform 1 it is in one byte a character.
func decode(platform uint16, b []byte) string {
	if platform == 1 {
		return string(b)
	}
	var units []uint16
	for ; len(b) >= 2; b = b[2:] {
		units = append(units, be.Uint16(b))
	}
	return string(utf16.Decode(units))
}

// regular reports whether a name has the letters, digits and hyphens that names
// of fonts are made of.
func regular(s string) bool {
	for _, c := range []byte(s) {
		if !('a' <= c && c <= 'z' || 'A' <= c && c <= 'Z' || '0' <= c && c <= '9' || c == '-') {
			return false
		}
	}
	return s != ""
}
