package recheck

import (
	"math"

	"linewitness/report/result"
)

// cellValue: a cell of the matrix is a figure of one case, and as uncertain.
var cellValue = by(func(at *place, _ float64) float64 { return orNothing(at.cellUncertainty(at.column())) })

// cellDifference: the difference from the first case is as uncertain as both.
var cellDifference = by(func(at *place, _ float64) float64 {
	return orNothing(at.cellUncertainty(at.column())) + orNothing(at.cellUncertainty(0))
})

// column is the number of the cell that the value is in.
func (at *place) column() int { return at.index }

// cellUncertainty is the uncertainty of the figure of a row in the case of a
// column, which stands with the requirements or the key figures of that case.
func (at *place) cellUncertainty(column int) float64 {
	root := at.now[0]
	names := root.Get("matrix", "cases").Items()
	if column >= len(names) {
		return math.NaN()
	}
	c := root.Get("cases", names[column].Text)
	row := at.now[len(at.now)-3] // above the cell and the list of cells
	id, label := row.String("id"), row.String("label")
	list := c.Get("requirements")
	if id == "" {
		list = c.Get("convergence", "figures")
	}
	for _, f := range list.Items() {
		if f.String("id") == id && figureLabel(f) == label {
			return f.Float("uncertainty")
		}
	}
	return math.NaN()
}

// figureLabel is the label of the row of a figure.
func figureLabel(f *result.Node) string {
	if s := f.String("subject"); s != "" {
		return f.String("quantity") + ", " + s
	}
	return f.String("quantity")
}
