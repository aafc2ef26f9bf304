package sheet

import (
	"slices"
	"strings"
)

// fit returns the widths of the columns. Each gets its natural width if all
// find room, and what is left over goes to the columns that grow. Otherwise
// the columns shrink in proportion to what wrapping can save. If that is not
// enough, the columns with the longest words are made narrower than those.
func (l *layout) fit(width float64) []float64 {
	natural, least := l.natural()
	if shared := l.shared(natural, width); shared != nil {
		return shared
	}
	spare := width - sum(natural)
	if spare >= 0 {
		return l.grow(natural, spare)
	}
	saving := sum(natural) - sum(least)
	if saving >= -spare {
		for i := range natural {
			natural[i] += spare * (natural[i] - least[i]) / saving
		}
		return natural
	}
	return capped(least, width)
}

// shared returns the widths of a table with columns that share the width; nil
// if there are none, or if a column would become too narrow that way. The other
// columns are as wide as they are by nature.
func (l *layout) shared(natural []float64, width float64) []float64 {
	const (
		others = 0.25 // of the width, at most
		least  = 32.0 // room for a mark and two characters
	)
	var shares, own float64
	for i, c := range l.t.Columns {
		shares += c.Share
		if c.Share == 0 {
			own += natural[i]
		}
	}
	if shares == 0 || own > others*width {
		return nil
	}
	out := slices.Clone(natural)
	for i, c := range l.t.Columns {
		if c.Share > 0 {
			out[i] = (width - own) * c.Share / shares
			if out[i] < least {
				return nil
			}
		}
	}
	return out
}

// capped lowers the largest widths to one cap, so that all add up to total,
// which is less than they do.
func capped(widths []float64, total float64) []float64 {
	order := slices.Clone(widths)
	slices.Sort(order)
	limit := total / float64(len(order))
	for i, w := range order {
		limit = total / float64(len(order)-i)
		if w > limit {
			break
		}
		total -= w
	}
	for i := range widths {
		widths[i] = min(widths[i], limit)
	}
	return widths
}

// natural returns the width of each column without any wrapping, and with
// wrapping at every space.
func (l *layout) natural() (natural, least []float64) {
	for i, col := range l.t.Columns {
		head := l.headStyle()
		w := widestWord(col.Head, head.Width)
		n := w // heads wrap before anything else does
		for _, row := range l.t.Rows {
			if i >= len(row) || row[i].Span {
				continue
			}
			var mark float64
			if row[i].Mark != NoMark {
				mark = markRoom
			}
			st := l.style(i, row[i])
			n = max(n, st.Width(row[i].Text)+mark, l.noteStyle().Width(row[i].Note))
			w = max(w, widestWord(row[i].Text, st.Width)+mark, widestWord(row[i].Note, l.noteStyle().Width))
		}
		natural = append(natural, n+2*cellPad+0.1)
		least = append(least, w+2*cellPad+0.1)
	}
	return natural, least
}

// grow shares out the spare width.
func (l *layout) grow(widths []float64, spare float64) []float64 {
	var shares float64
	for _, c := range l.t.Columns {
		shares += c.Grow
	}
	for i, c := range l.t.Columns {
		if shares > 0 {
			widths[i] += spare * c.Grow / shares
		} else {
			widths[i] += spare / float64(len(widths))
		}
	}
	return widths
}

func widestWord(s string, width func(string) float64) float64 {
	var w float64
	for _, word := range strings.Split(s, " ") {
		w = max(w, width(word))
	}
	return w
}

func sum(vs []float64) float64 {
	var s float64
	for _, v := range vs {
		s += v
	}
	return s
}
