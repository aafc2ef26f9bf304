package oneport

import (
	"strconv"
	"strings"
)

// keywordOf gives the keyword of a line in lower case with single blanks,
// without its brackets; "" if the line does not begin with one.
func keywordOf(l line) string {
	s := strings.TrimLeft(l.text, " \t")
	i := strings.IndexByte(s, ']')
	if s[0] != '[' || i < 0 {
		return ""
	}
	return strings.Join(strings.Fields(strings.ToLower(s[1:i])), " ")
}

// keyword reads a line that begins with a bracket, as version 2 has them.
func (r *reader) keyword(l line, at word) error {
	key := keywordOf(l)
	args := l.words(strings.IndexByte(l.text, ']') + 1)
	switch {
	case key == "":
		return r.fail(l, at, "the bracket is not closed", "")
	case key == "version":
		return r.versionLine(l, at, args)
	case !r.keyed():
		return r.fail(l, at, "["+key+"] belongs to version 2", "begin the file with [Version] 2.0, or leave out the keyword")
	case !r.optioned:
		return r.fail(l, at, "there is no option line before ["+key+"]", "it follows [Version]; a bare # means GHz S MA R 50")
	case r.given[key] && key != "begin information":
		return r.fail(l, at, "["+key+"] occurs twice", "")
	}
	r.given[key] = true
	return r.take(key, l, at, args)
}

// take does what a keyword says.
func (r *reader) take(key string, l line, at word, args []word) error {
	switch key {
	case "number of ports":
		n, err := r.count(l, at, args)
		if err == nil && n != 1 {
			return r.notOnePort(l, args[0], n)
		}
		return err
	case "number of frequencies":
		n, err := r.count(l, at, args)
		r.frequency = n
		return err
	case "reference":
		if r.awaited = len(args) == 0; r.awaited {
			return nil
		}
		return r.referenceValue(l, at, args)
	case "network data":
		return r.begin(l, at)
	case "begin information":
		r.skipping = true
		return nil
	case "matrix format", "end":
		return nil // Full, Lower and Upper are the same for one element
	case "noise data", "number of noise frequencies", "two-port data order":
		return r.fail(l, at, "["+key+"] belongs to two-port files", "leave it out")
	case "mixed-mode order":
		return r.fail(l, at, "[mixed-mode order] needs two ports or more", "leave it out")
	}
	return r.fail(l, at, "unknown keyword "+quote("["+key+"]"), "")
}

func (r *reader) versionLine(l line, at word, args []word) error {
	if r.optioned || r.keyed() || len(r.given) > 0 {
		return r.fail(l, at, "[version] is not on the first line", "only comments may come before it, and it occurs once")
	}
	if len(args) != 1 || args[0].text != "2.0" && args[0].text != "2.1" {
		return r.fail(l, at, "the version is not known", "versions 2.0 and 2.1 are; a file of version 1 has no such line")
	}
	r.version = args[0].text
	return nil
}

// begin begins the network data, for which all must have been said.
func (r *reader) begin(l line, at word) error {
	for _, key := range []string{"Number of Ports", "Number of Frequencies"} {
		if !r.given[strings.ToLower(key)] {
			return r.fail(l, at, "there is no ["+key+"] before [Network Data]", "it is required")
		}
	}
	if r.awaited {
		return r.fail(l, at, "[Reference] has no value", "write one in ohm, such as [Reference] 50")
	}
	return nil
}

func (r *reader) count(l line, at word, args []word) (int, error) {
	if len(args) == 1 {
		if n, err := strconv.Atoi(args[0].text); err == nil && n > 0 {
			return n, nil
		}
		at = args[0]
	}
	return 0, r.fail(l, at, "a whole number above 0 is wanted", "")
}

// referenceValue takes the value of [Reference], which overrides the option
// line.
func (r *reader) referenceValue(l line, at word, args []word) error {
	if len(r.points) > 0 {
		return r.fail(l, at, "[Reference] comes after data", "put it before [Network Data]")
	}
	rest, err := r.reference(l, at, args)
	if err == nil && len(rest) > 0 {
		return r.fail(l, rest[0], quote(rest[0].text)+" is not a number", "")
	}
	return err
}
