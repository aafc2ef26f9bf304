package canvas

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// ClipRect intersects the clip with r until the enclosing Push is popped.
func (c *Canvas) ClipRect(r vg.Rectangle) {
	c.ops(fine(r.Min.X.Points()), fine(r.Min.Y.Points()),
		fine(r.Size().X.Points()), fine(r.Size().Y.Points()), "re W n")
}

// clipper is a canvas that can clip, such as Canvas.
type clipper interface{ ClipRect(vg.Rectangle) }

// Clip clips to r the canvas under c if it can clip, until the enclosing Push
// is popped. gonum clips lines to the data area but not polygons; and cropping
// nests draw.Canvas values, which have to be unwrapped to find the canvas.
func Clip(c vg.Canvas, r vg.Rectangle) {
	for {
		switch t := c.(type) {
		case draw.Canvas:
			c = t.Canvas
		case *draw.Canvas:
			c = t.Canvas
		case clipper:
			t.ClipRect(r)
			return
		default:
			return
		}
	}
}
