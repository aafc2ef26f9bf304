package figure

import (
	"math"
	"slices"
	"unicode/utf8"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A head is a strip above the data area of a panel, under its title.
type head struct {
	height float64
	draw   func(data draw.Canvas, base float64) // base is its lower edge
}

// headsHeight returns the height of all strips.
func (pn *Panel) headsHeight() (h float64) {
	for _, s := range pn.heads {
		h += s.height
	}
	return h
}

// drawHeads draws the strips, the first next to the data area.
func (pn *Panel) drawHeads(data draw.Canvas) {
	base := data.Max.Y.Points()
	for _, s := range pn.heads {
		s.draw(data, base)
		base += s.height
	}
}

// A Part is a named part of the horizontal axis.
type Part struct {
	From, To float64
	Name     string
}

// stripHeight is the height of a strip of names, points.
const stripHeight = 8.6

// Parts writes names over parts of the horizontal axis; one that does not fit
// over its part is shortened, and left out where little of it would be read.
func (pn *Panel) Parts(parts []Part) {
	pn.heads = append(pn.heads, head{stripHeight, func(data draw.Canvas, base float64) {
		st := tagStyle.In(typeset.Bold)
		for _, p := range parts {
			from, to := pn.across(data, p.From), pn.across(data, p.To)
			const least = 5 // characters
			if s := st.Fit(p.Name, to-from-3); s == p.Name || utf8.RuneCountInString(s) > least {
				st.Draw(data, (from+to)/2, base+2.2, s, typeset.Center)
			}
		}
	}})
}

// Bounds draws upright lines and writes their names at their heads: the first,
// the last, and of the others those that have room beside the ones before.
func (pn *Panel) Bounds(marks []Mark) {
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		under := draw.LineStyle{Color: ink.White, Width: ink.BoundLine.Width + vg.Points(0.8)}
		for _, m := range marks {
			if !finite(m.At) {
				continue
			}
			at := x(pn.x.at(m.At))
			c.StrokeLine2(under, at, c.Min.Y, at, c.Max.Y)
			c.StrokeLine2(ink.BoundLine, at, c.Min.Y, at, c.Max.Y)
		}
	}))
	pn.heads = append(pn.heads, head{stripHeight, func(data draw.Canvas, base float64) {
		st := tagStyle.In(typeset.Italic).Of(ink.Accent)
		var taken [][2]float64
		for _, i := range outerFirst(len(marks)) {
			s := st.Fit(marks[i].Label, longestTag)
			w := st.Width(s)
			left := pn.across(data, marks[i].At) - w/2
			left = math.Max(math.Min(left, data.Max.X.Points()+insetRight-w), data.Min.X.Points()-insetLeft)
			meets := func(o [2]float64) bool { return left < o[1]+4 && left+w+4 > o[0] }
			if !finite(left) || slices.ContainsFunc(taken, meets) {
				continue
			}
			st.Draw(data, left, base+2.2, s, typeset.Left)
			taken = append(taken, [2]float64{left, left + w})
		}
	}})
}

// outerFirst returns the indices of n things: the first, the last, the others.
func outerFirst(n int) []int {
	out := make([]int, 0, n)
	for i := range n {
		if i == 1 {
			out = append(out, n-1)
		}
		if i < n-1 || n == 1 {
			out = append(out, i)
		}
	}
	return out
}

// across returns the place of a value of the horizontal axis.
func (pn *Panel) across(data draw.Canvas, v float64) float64 {
	lo, hi := pn.x.at(pn.x.Min), pn.x.at(pn.x.Max)
	return data.Min.X.Points() + (pn.x.at(v)-lo)/(hi-lo)*data.Size().X.Points()
}
