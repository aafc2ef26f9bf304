package sheet

import (
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/typeset"
)

// The measures of equations, points.
const (
	equationIndent = 16
	equationSize   = 9.2
	equationGap    = 22 // between two on a line
)

// Equation writes equations side by side, as many on a line as find room,
// indented. Their markup is that of [typeset.Style.Formula].
func (b *Book) Equation(formulas ...string) {
	st := BodyStyle.At(equationSize)
	b.Space(4)
	var line []typeset.Box
	width := 0.0
	for _, f := range formulas {
		box := st.Formula(f)
		if len(line) > 0 && width+equationGap+box.Width > b.Width()-equationIndent {
			b.equationLine(line)
			line, width = nil, 0
		}
		if len(line) > 0 {
			width += equationGap
		}
		line, width = append(line, box), width+box.Width
	}
	b.equationLine(line)
	b.Space(6)
}

// equationLine writes one line of equations.
func (b *Book) equationLine(line []typeset.Box) {
	const air = 2.5 // above and below, points
	var above, below, width float64
	for _, f := range line {
		above, below = max(above, f.Above), max(below, f.Below)
		width += f.Width + equationGap
	}
	if width-equationGap > b.Width()-equationIndent {
		b.Overfull++
	}
	b.Block(above+below+2*air, func(c draw.Canvas) {
		x, y := c.Min.X.Points()+equationIndent, c.Max.Y.Points()-air-above
		for _, f := range line {
			f.Draw(c, x, y)
			x += f.Width + equationGap
		}
	})
}
