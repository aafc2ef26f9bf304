package syntax

import (
	"bytes"
	"encoding/hex"
	"fmt"
	"strconv"
)

// Append appends the written form of a value that is no stream.
func Append(b []byte, v Value) []byte {
	switch v := v.(type) {
	case nil, Null:
		return append(b, "null"...)
	case Bool:
		return strconv.AppendBool(b, bool(v))
	case Number:
		return append(b, v...)
	case Name:
		return appendName(b, v)
	case String:
		return appendString(b, v)
	case Array:
		return appendArray(b, v)
	case Dict:
		return appendDict(b, v)
	case Ref:
		return append(strconv.AppendInt(b, int64(v), 10), " 0 R"...)
	}
	panic("syntax: a value of no kind that is written")
}

func appendArray(b []byte, a Array) []byte {
	b = append(b, '[')
	for i, v := range a {
		if i > 0 {
			b = append(b, ' ')
		}
		b = Append(b, v)
	}
	return append(b, ']')
}

// appendDict writes the keys in order, so that equal dictionaries are equal bytes.
func appendDict(b []byte, d Dict) []byte {
	b = append(b, "<<"...)
	for _, k := range d.Keys() {
		b = append(appendName(b, k), ' ')
		b = append(Append(b, d[k]), '\n')
	}
	return append(b, ">>"...)
}

func appendName(b []byte, n Name) []byte {
	b = append(b, '/')
	for _, c := range []byte(n) {
		if c <= ' ' || c > '~' || c == '#' || isDelim(c) {
			b = fmt.Appendf(b, "#%02X", c)
		} else {
			b = append(b, c)
		}
	}
	return b
}

// appendString writes printable ASCII as it is and anything else in hexadecimal.
func appendString(b []byte, s String) []byte {
	for _, c := range []byte(s) {
		if c < ' ' || c > '~' {
			return append(hex.AppendEncode(append(b, '<'), []byte(s)), '>')
		}
	}
	b = append(b, '(')
	for _, c := range []byte(s) {
		if c == '\\' || c == '(' || c == ')' {
			b = append(b, '\\')
		}
		b = append(b, c)
	}
	return append(b, ')')
}

// appendObject writes an indirect object with the reference number n.
func appendObject(b *bytes.Buffer, n int, v Value) {
	fmt.Fprintf(b, "%d 0 obj\n", n)
	if s, ok := v.(*Stream); ok {
		d := Dict{"Length": Number(strconv.Itoa(len(s.Data)))}
		for k, v := range s.Dict {
			if k != "Length" {
				d[k] = v
			}
		}
		b.Write(Append(nil, d))
		b.WriteString("\nstream\n")
		b.Write(s.Data)
		b.WriteString("\nendstream")
	} else {
		b.Write(Append(nil, v))
	}
	b.WriteString("\nendobj\n")
}
