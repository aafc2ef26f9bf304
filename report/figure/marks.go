package figure

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// A Mark is an upright line with a label at its head.
type Mark struct {
	At    float64
	Label string
}

// markRows is how many labels of marks may stand one above the other.
const markRows = 3

// Marks draws upright lines, ascending, with their labels at the head of the
// panel, in as many rows as they need to stand clear of each other. A label
// that finds no room in markRows rows is left out; its line is not.
func (pn *Panel) Marks(marks []Mark, style draw.LineStyle) {
	at := func(m Mark, x func(float64) vg.Length) vg.Length { return x(pn.x.at(m.At)) }
	pn.p.Add(inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		for _, m := range marks {
			if finite(m.At) {
				c.StrokeLine2(style, at(m, x), c.Min.Y, at(m, x), c.Max.Y)
			}
		}
	}))
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		var end [markRows]float64
		for _, m := range marks {
			if !finite(m.At) || m.Label == "" {
				continue
			}
			label := tagStyle.Fit(m.Label, longestTag)
			left, w := at(m, x).Points()+2, tagStyle.Width(label)
			if left+w > c.Max.X.Points()-2 {
				left = at(m, x).Points() - 2 - w
			}
			for row := range end {
				if left > end[row] {
					tagAt(c, left, c.Max.Y.Points()-tagStyle.Size-float64(row)*TagHeight, label, style)
					end[row] = left + w + 4
					pn.tags = append(pn.tags, tagBox(left, c.Max.Y.Points()-tagStyle.Size-float64(row)*TagHeight, label))
					break
				}
			}
		}
	}))
}
