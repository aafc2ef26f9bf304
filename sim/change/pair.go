package change

import (
	"slices"

	"linewitness/sim/design"
)

// A pair is a term in the old and in the new design; one may be nil.
type pair struct{ old, now *term }

// term is a term of a design; nil has no text and nothing in it.
type term design.Term

func (t *term) text() string {
	if t == nil {
		return ""
	}
	return t.Text
}

func (t *term) terms() []design.Term {
	if t == nil {
		return nil
	}
	return t.Terms
}

// key is the key of a pair, that of the new design where there is one.
func (p pair) key() string {
	if p.now != nil {
		return p.now.Key
	}
	return p.old.Key
}

func (p pair) renamed() bool { return p.old != nil && p.now != nil && p.old.Key != p.now.Key }

// aligned sets the terms of two mappings side by side, in the order of the new
// one. One that is no more comes after the one that it followed.
func aligned(old, now []design.Term) []pair {
	var all []pair
	for i := range now {
		p := pair{now: (*term)(&now[i])}
		if k := indexOf(old, now[i].Key); k >= 0 {
			p.old = (*term)(&old[k])
		}
		all = append(all, p)
	}
	for i := range old {
		if indexOf(now, old[i].Key) >= 0 {
			continue
		}
		at := 0
		if i > 0 {
			at = 1 + slices.IndexFunc(all, func(p pair) bool { return p.old != nil && p.old.Key == old[i-1].Key })
		}
		all = slices.Insert(all, at, pair{old: (*term)(&old[i])})
	}
	return all
}

func indexOf(terms []design.Term, key string) int {
	return slices.IndexFunc(terms, func(t design.Term) bool { return t.Key == key })
}

// paired makes one pair of an entry that is gone and one that has come with the
// same content: it has another name only. An entry whose content two others have
// is left alone.
func paired(all []pair) (out []pair) {
	for _, p := range all {
		if p.old != nil && p.now != nil {
			out = append(out, p)
			continue
		}
		twin, only := twinOf(all, p)
		switch {
		case !only:
			out = append(out, p)
		case p.now != nil:
			out = append(out, pair{twin.old, p.now})
		}
	}
	return out
}

// twinOf finds the pair that is there on the other side alone with the text of p;
// only is false if there is none, or if another of p's side has that text too.
func twinOf(all []pair, p pair) (twin pair, only bool) {
	twins, same := 0, 0
	for _, other := range all {
		if other.old != nil && other.now != nil {
			continue
		}
		switch {
		case (other.old == nil) == (p.old == nil):
			if other.content() == p.content() {
				same++
			}
		case other.content() == p.content():
			twin, twins = other, twins+1
		}
	}
	return twin, twins == 1 && same == 1
}

// content is the text of the one side that is there.
func (p pair) content() string {
	if p.now != nil {
		return p.now.text()
	}
	return p.old.text()
}
