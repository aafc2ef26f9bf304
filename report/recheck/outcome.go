package recheck

// Status is the outcome of the comparison of one value, or of all.
type Status int

// The statuses, from best to worst.
const (
	Same      Status = iota // equal to the printed digits
	Within                  // the same within its uncertainty
	Different               // anything else
)

// String names a status.
func (s Status) String() string {
	return [...]string{"same", "same within uncertainty", "different"}[s]
}

// A Count is how many values have each status.
type Count struct {
	Same      int `json:"same"`
	Within    int `json:"within"`
	Different int `json:"different"`
}

func (c *Count) add(s Status) {
	switch s {
	case Same:
		c.Same++
	case Within:
		c.Within++
	default:
		c.Different++
	}
}

// Total is the number of values.
func (c Count) Total() int { return c.Same + c.Within + c.Different }

// An Outcome is the comparison of two results.
type Outcome struct {
	Numbers Count // a complex number counts as two
	Texts   Count // texts, flags and what is there at all
	// Differences are the values that are different, in the order of the record;
	// the first Most of them, and Further counts the rest.
	Differences []Difference
	Further     int
	// Said are differences that count for nothing: the version of the program, and
	// values that the record's version did not write yet.
	Said []Difference
	// Largest is the change that comes nearest to what is allowed or passes it by
	// most; nil if no number has changed.
	Largest *Difference
	// Unruled are the paths, at most Most, for which the table has no rule. Their values are
	// compared digit by digit.
	Unruled []string
}

// Most bounds the lists of an outcome: a record may have been made to fill the memory.
const Most = 10000

// A Difference is a value that changed.
type Difference struct {
	Path    string // "cases.nominal.requirements[R1 main, from end].value"
	Then    string // as the record has it
	Now     string
	Change  float64 // of a number: how far it moved; else NaN
	Allowed float64 // how far it may; else NaN
	Why     string  // the rule in a few words
}

// Ratio is the change over what is allowed, NaN for what is not a number.
func (d *Difference) Ratio() float64 { return ratio(d.Change, d.Allowed) }

func ratio(change, allowed float64) float64 {
	if change == 0 {
		return 0
	}
	return change / allowed
}

// Status is the worst status of all values.
func (o *Outcome) Status() Status {
	switch {
	case o.Numbers.Different+o.Texts.Different > 0:
		return Different
	case o.Numbers.Within+o.Texts.Within > 0:
		return Within
	}
	return Same
}
