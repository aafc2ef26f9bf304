package sheet

import (
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/typeset"
)

// The measures of equations, points.
const (
	equationIndent = 16
	equationSize   = 9.2
	equationGap    = 22.0 // between two on a line
	equationAir    = 2.5  // above and below a line
)

// Equation writes a paragraph and below it equations side by side, as many on a
// line as find room, indented. Their markup is that of [typeset.Style.Formula]. The
// end of the paragraph stays with the first line of equations.
func (b *Book) Equation(s string, formulas ...string) {
	lines := b.equationLines(formulas)
	above, below, _ := extent(lines[0])
	b.Space(4)
	b.linesBefore(BodyStyle, s, above+below+2*equationAir+4)
	b.Space(4)
	for _, line := range lines {
		b.equationLine(line)
	}
	b.Space(6)
}

// equationLines sets formulas and puts them into lines.
func (b *Book) equationLines(formulas []string) (lines [][]typeset.Box) {
	width := 0.0
	for _, f := range formulas {
		box := BodyStyle.At(equationSize).Formula(f)
		if len(lines) == 0 || width+equationGap+box.Width > b.Width()-equationIndent {
			lines, width = append(lines, nil), -equationGap
		}
		last := len(lines) - 1
		lines[last], width = append(lines[last], box), width+equationGap+box.Width
	}
	return lines
}

// extent returns the height of a line of equations above and below its baseline,
// and its width.
func extent(line []typeset.Box) (above, below, width float64) {
	width = -equationGap
	for _, f := range line {
		above, below = max(above, f.Above), max(below, f.Below)
		width += equationGap + f.Width
	}
	return above, below, width
}

// equationLine writes one line of equations.
func (b *Book) equationLine(line []typeset.Box) {
	above, below, width := extent(line)
	if width > b.Width()-equationIndent {
		b.Overfull++
	}
	b.Block(above+below+2*equationAir, func(c draw.Canvas) {
		x, y := c.Min.X.Points()+equationIndent, c.Max.Y.Points()-equationAir-above
		for _, f := range line {
			f.Draw(c, x, y)
			x += f.Width + equationGap
		}
	})
}
