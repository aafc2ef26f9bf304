package syntax

import (
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

var wide = Limits{Bytes: math.MaxInt32, Objects: 1000, Depth: 20, Values: 10000, Inflated: 1 << 20, Updates: 4}

// read reads one value from text.
func read(text string) (Value, error) {
	values := wide.Values
	l := &lexer{b: []byte(text), n: &values, d: wide.Depth}
	v, err := l.value()
	if l.space(); err == nil && l.i != len(l.b) {
		return v, damaged("%q is left", l.context())
	}
	return v, err
}

func TestValues(t *testing.T) {
	for _, c := range []struct {
		text string
		want Value
	}{
		{"null", Null{}},
		{"true", Bool(true)},
		{"false", Bool(false)},
		{" % comment\r\n-12.50", Number("-12.50")},
		{"+.5", Number("+.5")},
		{"7", Number("7")},
		{"7 0 R", Ref(7)},
		{"[7 0 R 8 9]", Array{Ref(7), Number("8"), Number("9")}},
		{"[7 0 8]", Array{Number("7"), Number("0"), Number("8")}},
		{"/Name", Name("Name")},
		{"/A#20B#23", Name("A B#")},
		{"/", Name("")},
		{"(a(b)c)", String("a(b)c")},
		{`(\(\)\\\n\r\t\b\f\53\0531\400)`, String("()\\\n\r\t\b\f++1\x00")},
		{"(a\\\nb\\\r\nc\r\nd\re)", String("abc\nd\ne")},
		{"<48 65 6C6>", String("Hel`")},
		{"<</A 1/B[<</C(x)>>]>>", Dict{"A": Number("1"), "B": Array{Dict{"C": String("x")}}}},
		{"<< /A 3 0 R /B null >>", Dict{"A": Ref(3), "B": Null{}}},
	} {
		got, err := read(c.text)
		if err != nil || !cmp.Equal(got, c.want) {
			t.Errorf("%q is %#v, want %#v (error %v)", c.text, got, c.want, err)
		}
	}
}

func TestNoValues(t *testing.T) {
	for text, reason := range map[string]string{
		"":                          "no value",
		"nul":                       "no value",
		"1.2.3":                     "no value",
		"--":                        "no value",
		")":                         "no value",
		"(open":                     "open string",
		"<4G>":                      "string at",
		"<41":                       "open string",
		"[1 2":                      "no value",
		"<</A>>":                    "no value",
		"<</A 1":                    "no key",
		"<<1 2>>":                   "no key",
		"<</A 1 /A 2>>":             `key "A" stands twice`,
		"/A#2":                      "name",
		"/A#GG":                     "name",
		"7 1 R":                     "generation 1",
		"0 0 R":                     "object 0",
		strings.Repeat("[", 30):     "limit",
		strings.Repeat("<</A ", 30): "limit",
		"[" + strings.Repeat("0 ", wide.Values) + "]": "limit",
	} {
		if v, err := read(text); err == nil || !strings.Contains(err.Error(), reason) {
			t.Errorf("%.20q is %v, error %v, want one with %q", text, v, err, reason)
		}
	}
}

// values makes values of up to some levels.
func values(depth int) *rapid.Generator[Value] {
	kinds := []*rapid.Generator[Value]{
		rapid.Just[Value](Null{}),
		rapid.Map(rapid.Bool(), func(b bool) Value { return Bool(b) }),
		rapid.Map(rapid.StringMatching(`-?[0-9]{1,9}(\.[0-9]{1,4})?`), func(s string) Value { return Number(s) }),
		rapid.Map(rapid.SliceOf(rapid.Byte()), func(b []byte) Value { return Name(b) }),
		rapid.Map(rapid.SliceOf(rapid.Byte()), func(b []byte) Value { return String(b) }),
		rapid.Map(rapid.IntRange(1, 999), func(n int) Value { return Ref(n) }),
	}
	if depth > 0 {
		kinds = append(kinds,
			rapid.Map(rapid.SliceOfN(values(depth-1), 0, 4), func(a []Value) Value { return append(Array{}, a...) }),
			rapid.Map(rapid.MapOfN(rapid.String(), values(depth-1), 0, 4), func(m map[string]Value) Value {
				d := Dict{}
				for k, v := range m {
					d[Name(k)] = v
				}
				return d
			}))
	}
	return rapid.OneOf(kinds...)
}

// What is written is read back as it was.
func TestWrittenIsRead(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		want := values(3).Draw(t, "value")
		text := string(Append(nil, want))
		if got, err := read(text); err != nil || !cmp.Equal(got, want) {
			t.Fatalf("%q is %#v, want %#v (error %v)", text, got, want, err)
		}
	})
}

// Whatever is read is written so that it is read again as the same.
func FuzzValue(f *testing.F) {
	for _, s := range []string{"<</A [1 0 R (x\\)) <41>] /B#20 -0.5 /C null>>", "[true false % \n /]", "(\\101\r)"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		v, err := read(text)
		if err != nil {
			return
		}
		again, err := read(string(Append(nil, v)))
		if err != nil || !cmp.Equal(again, v) {
			t.Errorf("%#v becomes %#v, error %v", v, again, err)
		}
	})
}
