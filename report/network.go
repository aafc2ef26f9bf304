package report

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/drawing"
	"linewitness/sim/record"
)

// slideRows is how many rows of the drawing of a network a file holds: as many
// as fit on a slide.
const slideRows = 9

// noteNetwork keeps the drawing of the network for the files, a slide full of
// bands in each.
func (d *document) noteNetwork(m record.Model) {
	l := drawing.Lay(m, slideRows)
	for from := 0; from < len(l.Bands); {
		to, rows := from, 0
		for to < len(l.Bands) && (to == from || rows+l.Bands[to].Rows <= slideRows) {
			rows += l.Bands[to].Rows
			to++
		}
		bands := l.Bands[from:to]
		d.note(picture{
			name: "network", finding: networkFinding(m), height: float64(rows) * drawing.RowHeight,
			paint: func(c draw.Canvas) { paintBands(c, l, bands) },
		})
		from = to
	}
}

// paintBands draws bands one under the other.
func paintBands(c draw.Canvas, l *drawing.Layout, bands []*drawing.Band) {
	for _, b := range bands {
		l.Draw(c, b)
		c = draw.Crop(c, 0, 0, 0, vg.Points(-float64(b.Rows)*drawing.RowHeight))
	}
}
