package canvas

import (
	"image"
	"image/color"
	"math"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// Clipped gives a canvas that cannot clip, such as those of gonum for images,
// the ClipRect of Canvas: what is drawn under a clip is cut as geometry before
// it is handed on. Text and images are handed on whole, for no figure puts them
// over the edge of a clip. The coordinates cannot be turned, moved or scaled
// under a clip: that panics.
type Clipped struct {
	under vg.Canvas
	clip  []clip // of every Push, and of the bottom
}

// clip is the area that may be drawn on; all of it if not on.
type clip struct {
	on   bool
	area vg.Rectangle
}

var _ vg.Canvas = (*Clipped)(nil)

// Over returns a canvas that clips and draws on another.
func Over(under vg.Canvas) *Clipped { return &Clipped{under: under, clip: make([]clip, 1)} }

func (c *Clipped) top() *clip { return &c.clip[len(c.clip)-1] }

// ClipRect intersects the clip with r until the enclosing Push is popped.
func (c *Clipped) ClipRect(r vg.Rectangle) {
	t := c.top()
	if t.on {
		r.Min.X, r.Min.Y = max(r.Min.X, t.area.Min.X), max(r.Min.Y, t.area.Min.Y)
		r.Max.X, r.Max.Y = min(r.Max.X, t.area.Max.X), min(r.Max.Y, t.area.Max.Y)
	}
	*t = clip{on: true, area: r}
}

// Push saves the state of the canvas.
func (c *Clipped) Push() {
	c.clip = append(c.clip, *c.top())
	c.under.Push()
}

// Pop restores the state that the last Push saved.
func (c *Clipped) Pop() {
	if len(c.clip) == 1 {
		panic("canvas: Pop without Push")
	}
	c.clip = c.clip[:len(c.clip)-1]
	c.under.Pop()
}

// Stroke strokes the parts of p inside the clip.
func (c *Clipped) Stroke(p vg.Path) {
	t := c.top()
	if !t.on {
		c.under.Stroke(p)
		return
	}
	area := draw.Canvas{Rectangle: t.area}
	for _, line := range flattened(p) {
		for _, piece := range area.ClipLinesXY(line) {
			c.under.Stroke(polyline(piece))
		}
	}
}

// Fill fills the part of p inside the clip.
func (c *Clipped) Fill(p vg.Path) {
	t := c.top()
	if !t.on {
		c.under.Fill(p)
		return
	}
	area := draw.Canvas{Rectangle: t.area}
	for _, line := range flattened(p) {
		if piece := polyline(area.ClipPolygonXY(line)); len(piece) > 0 {
			piece.Close()
			c.under.Fill(piece)
		}
	}
}

// SetLineWidth sets the width of stroked paths.
func (c *Clipped) SetLineWidth(w vg.Length) { c.under.SetLineWidth(w) }

// SetLineDash sets the dash pattern.
func (c *Clipped) SetLineDash(pattern []vg.Length, offset vg.Length) {
	c.under.SetLineDash(pattern, offset)
}

// SetColor sets the colour of strokes, fills and text.
func (c *Clipped) SetColor(clr color.Color) { c.under.SetColor(clr) }

// Rotate turns the coordinates by r radians, counter-clockwise.
func (c *Clipped) Rotate(r float64) { c.steady(); c.under.Rotate(r) }

// Translate moves the origin to p.
func (c *Clipped) Translate(p vg.Point) { c.steady(); c.under.Translate(p) }

// Scale scales the coordinates.
func (c *Clipped) Scale(x, y float64) { c.steady(); c.under.Scale(x, y) }

func (c *Clipped) steady() {
	if c.top().on {
		panic("canvas: coordinates changed under a clip")
	}
}

// FillString draws one line of text with its baseline starting at p.
func (c *Clipped) FillString(f font.Face, p vg.Point, s string) { c.under.FillString(f, p, s) }

// DrawImage draws img into r.
func (c *Clipped) DrawImage(r vg.Rectangle, img image.Image) { c.under.DrawImage(r, img) }

// polyline is the path through points; none for less than two.
func polyline(points []vg.Point) vg.Path {
	if len(points) < 2 {
		return nil
	}
	p := make(vg.Path, 0, len(points)+1)
	p.Move(points[0])
	for _, at := range points[1:] {
		p.Line(at)
	}
	return p
}

// flattened returns the pieces of a path as points. Arcs become polygons that
// are off the circle by less than a fiftieth of a point at the sizes of marks.
func flattened(p vg.Path) (out [][]vg.Point) {
	var cur []vg.Point
	for _, s := range p {
		switch s.Type {
		case vg.MoveComp:
			if len(cur) > 0 {
				out = append(out, cur)
			}
			cur = []vg.Point{s.Pos}
		case vg.LineComp:
			cur = append(cur, s.Pos)
		case vg.ArcComp:
			const step = math.Pi / 16
			n := max(int(math.Ceil(math.Abs(s.Angle)/step)), 1)
			for i := range n + 1 {
				cur = append(cur, polar(s.Pos, s.Radius, s.Start+s.Angle*float64(i)/float64(n)))
			}
		case vg.CloseComp:
			if len(cur) > 0 {
				cur = append(cur, cur[0])
			}
		default:
			panic("canvas: a curve under a clip")
		}
	}
	if len(cur) > 0 {
		out = append(out, cur)
	}
	return out
}
