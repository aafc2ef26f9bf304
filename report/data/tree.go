package data

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"
	"strconv"
	"strings"
)

// An object is a JSON object whose keys keep their order.
type object []member

type member struct {
	key   string // never empty in an object
	value any    // object, list, string, bool, int, float64, complex128 or nil
}

type list []any

// jsonDigits is the number of significant digits of a JSON number.
const jsonDigits = 12

// lineWidth is the width in bytes up to which an object or a list of plain
// values stays on one line.
const lineWidth = 100

// render returns v as indented JSON with a final newline.
func render(v any) []byte {
	var p printer
	p.value(v, 0)
	p.WriteByte('\n')
	return p.Bytes()
}

// A printer writes JSON and knows the column it is at.
type printer struct {
	bytes.Buffer
}

func (p *printer) column() int {
	return p.Len() - 1 - bytes.LastIndexByte(p.Bytes(), '\n')
}

func (p *printer) newline(indent int) {
	p.WriteByte('\n')
	p.WriteString(strings.Repeat("  ", indent))
}

func (p *printer) value(v any, indent int) {
	switch v := v.(type) {
	case object:
		p.group('{', v, '}', indent)
	case list:
		items := make([]member, len(v))
		for i, x := range v {
			items[i].value = x
		}
		p.group('[', items, ']', indent)
	default:
		p.WriteString(scalar(v))
	}
}

// group writes an object, or a list as members without keys.
func (p *printer) group(open byte, ms []member, end byte, indent int) {
	if line, ok := flat(ms); ok && (len(ms) == 0 || p.column()+len(line)+2 <= lineWidth) {
		p.WriteString(string(open) + line + string(end))
		return
	}
	p.WriteByte(open)
	for i, m := range ms {
		if i > 0 {
			p.WriteByte(',')
		}
		p.newline(indent + 1)
		p.WriteString(m.prefix())
		p.value(m.value, indent+1)
	}
	p.newline(indent)
	p.WriteByte(end)
}

// prefix is the key of m with its colon, or nothing for an item of a list.
func (m member) prefix() string {
	if m.key == "" {
		return ""
	}
	return quote(m.key) + ": "
}

// flat returns the members on one line, if none of them is nested.
func flat(ms []member) (line string, ok bool) {
	parts := make([]string, len(ms))
	for i, m := range ms {
		if nested(m.value) {
			return "", false
		}
		parts[i] = m.prefix() + scalar(m.value)
	}
	return strings.Join(parts, ", "), true
}

// nested reports whether v holds further values that deserve lines of their
// own; a complex number does not.
func nested(v any) bool {
	switch v.(type) {
	case object, list:
		return true
	}
	return false
}

func scalar(v any) string {
	switch v := v.(type) {
	case nil:
		return "null"
	case bool:
		return strconv.FormatBool(v)
	case int:
		return strconv.Itoa(v)
	case float64:
		return number(v)
	case complex128:
		return complexNumber(v)
	case string:
		return quote(v)
	}
	panic(fmt.Sprintf("data: no JSON form for %T", v))
}

func number(x float64) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "null"
	}
	return strconv.FormatFloat(x+0, 'g', jsonDigits, 64) // x+0 turns -0 into 0
}

// complexNumber is null as a whole if a part of z is not a number: half an
// impedance helps nobody.
func complexNumber(z complex128) string {
	re, im := number(real(z)), number(imag(z))
	if re == "null" || im == "null" {
		return "null"
	}
	return `{"re": ` + re + `, "im": ` + im + "}"
}

// quote returns s as a JSON string. Invalid UTF-8 becomes U+FFFD, as
// encoding/json has it.
func quote(s string) string {
	var b strings.Builder
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false) // the file is not put into a web page; < stays readable
	if err := e.Encode(s); err != nil {
		panic("data: a string that has no JSON form")
	}
	return strings.TrimSuffix(b.String(), "\n")
}
