package oneport

import (
	"fmt"
	"math"
	"strconv"
)

const maxBytes = 4 << 20

// Read reads a one-port file of the Touchstone format; name is what errors
// call it. Z and Y data of version 1 are normalised to the reference, those
// of version 2 are not. An error is an *Error.
func Read(name string, src []byte) (*Table, error) {
	if len(src) > maxBytes {
		return nil, &Error{File: name, Message: fmt.Sprintf("the file has %d bytes, and at most 4 MiB are read", len(src)), Hint: "thin out the points"}
	}
	lines, err := scan(name, src)
	if err != nil {
		return nil, err
	}
	r := &reader{name: name, version: "1", given: map[string]bool{}}
	for i, l := range lines {
		r.rest = lines[i:]
		if err := r.line(l); err != nil {
			return nil, err
		}
	}
	if err := r.complete(); err != nil {
		return nil, err
	}
	return &Table{name, r.version, r.options.reference, r.points}, nil
}

// A reader is where Read is in a file.
type reader struct {
	name     string
	version  string
	rest     []line // from the one being read on
	optioned bool
	options  options
	points   []Point

	// Of version 2.
	given     map[string]bool // keywords so far
	awaited   bool            // the value of [Reference] is on the next line
	frequency int             // [Number of Frequencies]
	skipping  bool            // within [Begin Information]
}

// keyed reports whether the file is of version 2.
func (r *reader) keyed() bool { return r.version != "1" }

func (r *reader) line(l line) error {
	words := l.words(0)
	switch {
	case r.given["end"]:
		return nil
	case r.skipping:
		r.skipping = keywordOf(l) != "end information"
		return nil
	case words[0].text[0] == '[':
		return r.keyword(l, words[0])
	case words[0].text == "#":
		return r.optionLine(l)
	case !r.optioned:
		return r.fail(l, words[0], "there is no option line before "+quote(words[0].text), "begin the data with a line such as # MHz S RI R 50; a bare # means GHz S MA R 50")
	case r.awaited:
		r.awaited = false
		return r.referenceValue(l, words[0], words)
	case r.keyed() && !r.given["network data"]:
		return r.fail(l, words[0], "there are data before [Network Data]", "put the keyword on the line before them")
	}
	return r.data(l, words)
}

// complete tells what is missing at the end of the file.
func (r *reader) complete() error {
	whole := func(message, hint string) error { return &Error{File: r.name, Message: message, Hint: hint} }
	switch {
	case r.skipping:
		return whole("[Begin Information] has no [End Information]", "")
	case r.keyed() && !r.given["network data"]:
		return whole("there is no [Network Data]", "")
	case r.keyed() && !r.given["end"]:
		return whole("there is no [End]", "is the file whole?")
	case len(r.points) == 0:
		return whole("the file has no data", "a one-port has lines of a frequency and two numbers after the option line")
	case r.keyed() && r.frequency != len(r.points):
		return whole(fmt.Sprintf("[Number of Frequencies] is %d and there are %d", r.frequency, len(r.points)), "is the file whole?")
	}
	return nil
}

// data reads a line of the network data: a frequency and a pair of numbers.
func (r *reader) data(l line, words []word) error {
	if len(words) != 3 {
		if n := seemingPorts(r.rest); n > 1 {
			return r.notOnePort(l, words[0], n)
		}
		return r.fail(l, words[len(words)-1], fmt.Sprintf("the line has %d numbers", len(words)), "a line of a one-port has three: frequency and a pair")
	}
	var x [3]float64
	for i, w := range words {
		shift := 0
		if i == 0 {
			shift = r.options.shift
		}
		var ok bool
		if x[i], ok = number(w.text, shift); !ok {
			return r.fail(l, w, quote(w.text)+" is not a number", "")
		}
	}
	if err := r.rising(l, words[0], x[0]); err != nil {
		return err
	}
	return r.point(l, words[1], x)
}

func (r *reader) rising(l line, w word, f float64) error {
	if f < 0 {
		return r.fail(l, w, "the frequency is negative", "")
	}
	if n := len(r.points); n > 0 && f <= r.points[n-1].F {
		return r.fail(l, w, fmt.Sprintf("the frequency %s does not come after %s", hertz(f), hertz(r.points[n-1].F)), "sort the lines by frequency; each occurs once")
	}
	return nil
}

// point turns a line of numbers into a point.
func (r *reader) point(l line, w word, x [3]float64) error {
	o := r.options
	if o.format == "MA" && x[1] < 0 {
		return r.fail(l, w, "the magnitude is negative", "is the format RI or DB?")
	}
	value := complex(x[1], x[2])
	switch o.format {
	case "MA":
		value = polar(x[1], x[2])
	case "DB":
		value = polar(math.Pow(10, x[1]/20), x[2])
	}
	p := r.parameter(x[0], value)
	if !finite(p.S) || o.parameter == 'Z' && !finite(p.Z) {
		return r.fail(l, w, "the value is infinite", "is it a negative resistance or too large a number?")
	}
	r.points = append(r.points, p)
	return nil
}

// parameter takes the value as what the option line says it is.
func (r *reader) parameter(f float64, value complex128) Point {
	reference := r.options.reference
	unit := complex(1, 0)
	if !r.keyed() {
		unit = complex(reference, 0)
	}
	switch {
	case r.options.parameter == 'S':
		return fromReflection(f, value, reference)
	case r.options.parameter == 'Z':
		return fromImpedance(f, value*unit, reference)
	case value == 0:
		return fromReflection(f, 1, reference)
	}
	return fromImpedance(f, unit/value, reference)
}

// seemingPorts guesses the number of ports of a file that is not of a
// one-port. The first line of a frequency has an odd count of numbers, the
// others have pairs: together 1 + 2 n^2 for n ports. It is 0 if they do not
// fit.
func seemingPorts(lines []line) int {
	count := 0
	for i, l := range lines {
		n := len(l.words(0))
		if i > 0 && n%2 == 1 {
			break
		}
		count += n
	}
	n := int(math.Round(math.Sqrt(float64(count-1) / 2)))
	if count != 1+2*n*n {
		return 0
	}
	return n
}

func (r *reader) notOnePort(l line, w word, ports int) error {
	return r.fail(l, w, fmt.Sprintf("the file seems to have %d ports", ports), "a load is a one-port; export the one reflection that is wanted")
}

func (r *reader) fail(l line, w word, message, hint string) error {
	return &Error{r.name, l.number, w.column, message, hint}
}

// quote quotes a word of a file, shortened.
func quote(s string) string {
	const longest = 30
	if len(s) > longest {
		s = s[:longest] + "..."
	}
	return strconv.Quote(s)
}
