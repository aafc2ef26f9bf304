package canvas

import (
	"math"

	"gonum.org/v1/plot/vg"
)

// Stroke strokes p with the line width and colour in force.
func (c *Canvas) Stroke(p vg.Path) {
	if c.st.width > 0 && c.st.clr.A > 0 {
		c.paint(Simplify(p, Tolerance), "S")
	}
}

// Fill fills p with the colour in force.
func (c *Canvas) Fill(p vg.Path) {
	if c.st.clr.A > 0 {
		c.paint(p, "f")
	}
}

func (c *Canvas) paint(p vg.Path, operator string) {
	if len(p) == 0 {
		return
	}
	t := tracer{c: c}
	for _, s := range p {
		t.add(s)
	}
	c.ops(operator)
}

// tracer writes a path segment by segment.
type tracer struct {
	c          *Canvas
	cur, start vg.Point
	begun      bool
	last       [2]float64 // the last point written, in hundredths of a point
	written    bool
}

func (t *tracer) add(s vg.PathComp) {
	switch s.Type {
	case vg.MoveComp:
		t.move(s.Pos)
	case vg.LineComp:
		t.line(s.Pos)
	case vg.ArcComp:
		t.arc(s)
	case vg.CurveComp:
		t.curve(s)
	case vg.CloseComp:
		t.c.ops("h")
		t.cur, t.written = t.start, false
	default:
		panic("canvas: unknown path component")
	}
}

func (t *tracer) move(p vg.Point) {
	t.emit('m', p)
	t.start, t.cur, t.begun = p, p, true
}

func (t *tracer) line(p vg.Point) {
	if !t.begun {
		t.move(p)
		return
	}
	t.emit('l', p)
	t.cur = p
}

// arc writes an arc as cubic curves of at most a quarter turn, each off the
// true circle by less than 3e-4 of the radius.
func (t *tracer) arc(s vg.PathComp) {
	t.line(polar(s.Pos, s.Radius, s.Start))
	n := int(math.Ceil(math.Abs(s.Angle)/(math.Pi/2) - 1e-9))
	for i := range n {
		step := s.Angle / float64(n)
		a0, a1 := s.Start+float64(i)*step, s.Start+float64(i+1)*step
		handle := s.Radius * vg.Length(4.0/3*math.Tan(step/4))
		p0, p1 := polar(s.Pos, s.Radius, a0), polar(s.Pos, s.Radius, a1)
		t.emit('c', polar(p0, handle, a0+math.Pi/2), polar(p1, -handle, a1+math.Pi/2), p1)
		t.cur = p1
	}
}

// curve writes a quadratic or cubic curve; the page format has only the
// latter.
func (t *tracer) curve(s vg.PathComp) {
	switch len(s.Control) {
	case 1:
		q := s.Control[0]
		t.emit('c', lerp(t.cur, q, 2.0/3), lerp(s.Pos, q, 2.0/3), s.Pos)
	case 2:
		t.emit('c', s.Control[0], s.Control[1], s.Pos)
	default:
		panic("canvas: curve with other than one or two control points")
	}
	t.cur = s.Pos
}

func (t *tracer) emit(operator byte, pts ...vg.Point) {
	for _, p := range pts {
		if !finite(p) {
			t.c.fail("a path has a coordinate that is not finite")
			return
		}
	}
	end := pts[len(pts)-1]
	at := [2]float64{math.Round(end.X.Points() * 100), math.Round(end.Y.Points() * 100)}
	if operator == 'l' && t.written && at == t.last {
		return // the same point at the resolution of the page
	}
	t.last, t.written = at, true
	t.write(operator, pts)
}

func (t *tracer) write(operator byte, pts []vg.Point) {
	b := t.c.out.AvailableBuffer()
	for _, p := range pts {
		b = append(number(b, p.X.Points(), 2), ' ')
		b = append(number(b, p.Y.Points(), 2), ' ')
	}
	t.c.out.Write(append(b, operator, '\n'))
}

func finite(p vg.Point) bool {
	s := float64(p.X + p.Y)
	return !math.IsNaN(s) && !math.IsInf(s, 0)
}

func polar(o vg.Point, r vg.Length, a float64) vg.Point {
	s, c := math.Sincos(a)
	return vg.Point{X: o.X + r*vg.Length(c), Y: o.Y + r*vg.Length(s)}
}

func lerp(a, b vg.Point, t vg.Length) vg.Point {
	return vg.Point{X: a.X + (b.X-a.X)*t, Y: a.Y + (b.Y-a.Y)*t}
}
