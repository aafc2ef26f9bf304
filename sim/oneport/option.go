package oneport

import "strings"

// options are what the option line says.
type options struct {
	shift     int     // the power of ten of the frequency unit
	parameter byte    // S, Y or Z
	format    string  // MA, DB or RI
	reference float64 // ohm
}

// defaults hold for what the option line leaves out: # GHz S MA R 50.
var defaults = options{9, 'S', "MA", 50}

const optionHint = "the option line is # HZ|KHZ|MHZ|GHZ S|Y|Z MA|DB|RI R ohms, in any order; what is left out is GHz S MA R 50"

// optionLine reads the option line. Later ones count for nothing.
func (r *reader) optionLine(l line) error {
	if r.optioned {
		return nil
	}
	r.optioned, r.options = true, defaults
	given := map[string]bool{}
	for words := l.words(0)[1:]; len(words) > 0; {
		w := words[0]
		words = words[1:]
		kind, ok := r.option(strings.ToUpper(w.text))
		switch {
		case kind == "hybrid":
			return r.fail(l, w, "G and H parameters need two ports", "a one-port has S, Y or Z")
		case !ok:
			return r.fail(l, w, "unknown option "+quote(w.text), optionHint)
		case given[kind]:
			return r.fail(l, w, "the "+kind+" is given twice", "leave one")
		}
		given[kind] = true
		if kind != "reference" {
			continue
		}
		var err error
		if words, err = r.reference(l, w, words); err != nil {
			return err
		}
	}
	return nil
}

// option takes one word of the option line and tells what kind it is.
func (r *reader) option(text string) (kind string, ok bool) {
	o := &r.options
	switch text {
	case "HZ", "KHZ", "MHZ", "GHZ":
		o.shift = map[string]int{"HZ": 0, "KHZ": 3, "MHZ": 6, "GHZ": 9}[text]
		return "frequency unit", true
	case "S", "Y", "Z":
		o.parameter = text[0]
		return "parameter", true
	case "G", "H":
		return "hybrid", true
	case "MA", "DB", "RI":
		o.format = text
		return "format", true
	case "R":
		return "reference", true
	}
	return "", false
}

// reference takes the number after R, and gives the words after it. Version
// 2.1 lets R have a number for each port.
func (r *reader) reference(l line, key word, rest []word) ([]word, error) {
	var values []float64
	for len(rest) > 0 {
		x, ok := number(rest[0].text, 0)
		if !ok {
			break
		}
		if x <= 0 {
			return nil, r.fail(l, rest[0], "the reference must be above 0 ohm", "")
		}
		values, rest = append(values, x), rest[1:]
	}
	switch len(values) {
	case 0:
		return nil, r.fail(l, key, "no number follows "+quote(key.text), "write the reference resistance, such as R 50")
	case 1:
		r.options.reference = values[0]
		return rest, nil
	}
	return nil, r.notOnePort(l, key, len(values))
}
