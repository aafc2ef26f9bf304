package recheck

import (
	"math"
	"regexp"
	"strconv"
	"strings"
)

// withFigures is the class of sentences that have figures in them: the words are
// the same, and each figure to one step of its last digit.
var withFigures = class{text: func(_ *place, then, now string) bool {
	if figures.ReplaceAllString(then, "#") != figures.ReplaceAllString(now, "#") {
		return false
	}
	before, after := figures.FindAllString(then, -1), figures.FindAllString(now, -1)
	for i := range before {
		if !near(before[i], after[i]) {
			return false
		}
	}
	return true
}}

var figures = regexp.MustCompile(`\d+(\.\d+)?(e[-+]?\d+)?`)

// near reports whether two printed figures differ by at most one step of the
// last digit of the coarser one.
func near(a, b string) bool {
	x, stepX := printed(a)
	y, stepY := printed(b)
	return math.Abs(x-y) <= math.Max(stepX, stepY)*(1+rounding)
}

// printed is a figure and the step of its last digit. What no float64 holds is
// infinite and near to nothing.
func printed(s string) (v, step float64) {
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		return math.Inf(1), 0
	}
	mantissa, exponent, _ := strings.Cut(s, "e")
	_, decimals, _ := strings.Cut(mantissa, ".")
	e, _ := strconv.Atoi(exponent) // 0 where there is none
	return v, math.Pow(10, float64(e-len(decimals)))
}

// pick is the class of the name of one of several, which rounding chooses if they
// are equal: it may change as long as the figure at each path is the same
// within its uncertainty.
func pick(paths ...string) class {
	return class{text: func(at *place, _, _ string) bool { return at.worst(paths) != Different }}
}

// graded is the class of a word or a flag that follows from figures: it may change
// where one of them has changed, within its uncertainty.
func graded(paths ...string) class {
	return class{text: func(at *place, _, _ string) bool { return at.worst(paths) == Within }}
}

// worst is the worst status of the numbers at some paths.
func (at *place) worst(paths []string) Status {
	worst := Same
	for _, path := range paths {
		there, key := at.reach(path)
		if there == nil {
			return Different
		}
		worst = max(worst, there.status(key))
	}
	return worst
}

// reach is the place of the number at a path of ".." and one key, and that key.
func (at *place) reach(path string) (*place, string) {
	up := strings.Count(path, "../")
	if up >= len(at.now) {
		return nil, ""
	}
	depth := len(at.now) - up
	return &place{
		path:  append([]string(nil), at.path[:depth]...),
		index: at.index,
		table: at.table,
		then:  at.then[:depth], now: at.now[:depth],
	}, strings.TrimLeft(path, "./")
}

// status is the status of the number under a key of the innermost holder.
func (at *place) status(key string) Status {
	at.path[len(at.path)-1] = key
	then, now := at.then[len(at.then)-1].Get(key), at.now[len(at.now)-1].Get(key)
	if then == nil || now == nil {
		return Different
	}
	return numbers(at, ruleFor(at.table, at.path), then, now).status
}

// rival is the class of the name of the section with the largest value: another
// may be named if its own largest value, under the key, is as large within the
// uncertainty.
func rival(value, uncertainty, sections, key string) class {
	return class{text: func(at *place, then, _ string) bool {
		other := follow(at.now, sections)
		return other.Float(then, key) >= at.beside(value)-orNothing(at.beside(uncertainty))-rounding*at.beside(value)
	}}
}
