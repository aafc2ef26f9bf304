package report

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/sheet"
)

// signHeight is the height of the block to sign, with room for a hand.
const signHeight = 90.0

// signatures draws the block to sign: for each who answers for the record the
// name, and lines for signature and date.
func (d *document) signatures() {
	g := d.r.Design
	d.b.Space(7)
	d.b.Block(signHeight, func(c draw.Canvas) {
		list := []field{{"Prepared", g.PreparedBy}, {"Checked", g.CheckedBy}, {"Approved", g.ApprovedBy}}
		for i, f := range list {
			d.signature(column(c, i, len(list)), f)
		}
	})
	d.b.Space(7)
}

// signature draws the box of one who signs.
func (d *document) signature(c draw.Canvas, f field) {
	const pad, labels = 6.0, 40.0
	c.SetLineStyle(draw.LineStyle{Color: ink.Hair, Width: 0.5})
	c.Stroke(c.Rectangle.Path())
	x, y, room := c.Min.X.Points()+pad, c.Max.Y.Points(), c.Size().X.Points()-2*pad
	d.b.Draw(c, sheet.NoteStyle, x, y-11, room, f.label)
	for i, label := range []string{"name", "signature", "date"} {
		base := y - []float64{25, 59, 82}[i]
		d.b.Draw(c, sheet.NoteStyle, x, base, labels, label)
		c.SetLineStyle(draw.LineStyle{Color: ink.Soft, Width: 0.4})
		var line vg.Path
		line.Move(vg.Point{X: c.Min.X + vg.Points(pad+labels), Y: vg.Points(base - 2)})
		line.Line(vg.Point{X: c.Max.X - vg.Points(pad), Y: vg.Points(base - 2)})
		c.Stroke(line)
		if i == 0 {
			d.b.Draw(c, sheet.BodyStyle, x+labels, base, room-labels, sheet.BodyStyle.Fit(f.value, room-labels))
		}
	}
}
