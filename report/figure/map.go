package figure

import (
	"image"
	"image/color"
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Map is a quantity over a plane, by shade, with a scale at the right that
// reaches below zero if a value does.
type Map struct {
	*Panel // its axes
	Symbol string
	Unit   string      // of the quantity
	X, Y   []float64   // ascending
	V      [][]float64 // at V[y][x]
}

// A Segment is a straight line over a panel.
type Segment struct {
	X0, Y0, X1, Y1 float64
	Style          draw.LineStyle
}

// The measures of a map.
const (
	mapBar     = 46.0 // points: the scale at the right and its labels
	mapColumns = 600  // of its image, at most
	mapRows    = 400
	mapLevels  = 60 // shades to either side of zero
	linePitch  = 4  // rows from line to line over what is negative
)

// Segments draws straight lines on a white ground, so that they show on any
// shade.
func (pn *Panel) Segments(list []Segment) {
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		for _, under := range []bool{true, false} {
			for _, s := range list {
				st := s.Style
				if under {
					st = draw.LineStyle{Color: ink.White, Width: s.Style.Width + vg.Points(1)}
				}
				if finite(s.X0, s.Y0, s.X1, s.Y1) {
					c.StrokeLine2(st, x(pn.x.at(s.X0)), y(pn.y.at(s.Y0)), x(pn.x.at(s.X1)), y(pn.y.at(s.Y1)))
				}
			}
		}
	}))
}

// Draw draws the map over the whole of c.
func (m *Map) Draw(c draw.Canvas) {
	top, signed := m.largest()
	plotted := draw.Crop(c, 0, -vg.Points(mapBar), 0, 0)
	if top > 0 {
		img := m.raster(top)
		m.p.Add(inData(func(c draw.Canvas, _, _ func(float64) vg.Length) { c.DrawImage(c.Rectangle, img) }))
	} else {
		m.Say("zero throughout, or nothing finite")
	}
	m.p.Add(frame{bare: true})
	m.Panel.Draw(plotted)
	if top > 0 {
		m.bar(c, m.area, top, signed)
	}
}

// largest returns the largest finite magnitude, and whether a value is negative.
func (m *Map) largest() (top float64, signed bool) {
	for _, row := range m.V {
		for _, v := range row {
			if finite(v) {
				top, signed = math.Max(top, math.Abs(v)), signed || v < 0
			}
		}
	}
	return top, signed
}

// raster makes the image: of the values that fall on a dot the largest in size,
// and between them the nearest. Rows that are linePitch apart are lighter where
// the value is negative, which marks the sign in a print in grey.
func (m *Map) raster(top float64) *image.Paletted {
	columns := min(len(m.X), mapColumns)
	img := image.NewPaletted(image.Rect(0, 0, columns, mapRows), mapPalette())
	xs, ys := bins(m.X, columns), bins(m.Y, mapRows)
	for row := range mapRows {
		for column := range columns {
			v := m.extreme(xs[column], ys[row])
			img.SetColorIndex(column, mapRows-1-row, shade(v/top, row%linePitch == 0))
		}
	}
	return img
}

// extreme is the value of the largest size in a bin; NaN if none is finite.
func (m *Map) extreme(xs, ys [2]int) float64 {
	most := math.NaN()
	for j := ys[0]; j < min(ys[1], len(m.V)); j++ {
		for i := xs[0]; i < min(xs[1], len(m.V[j])); i++ {
			if v := m.V[j][i]; finite(v) && !(math.Abs(v) <= math.Abs(most)) {
				most = v
			}
		}
	}
	return most
}

// bins parts ascending places into n equal parts of their range, and gives of
// each the first index and the one after the last; a part without a place has
// the nearest.
func bins(at []float64, n int) [][2]int {
	out := make([][2]int, n)
	first, last := at[0], at[len(at)-1]
	k := 0
	for b := range out {
		end := first + (last-first)*float64(b+1)/float64(n)
		from := k
		for k < len(at) && (at[k] <= end || b == n-1) {
			k++
		}
		out[b] = [2]int{from, k}
		if from == k {
			middle := first + (last-first)*(float64(b)+0.5)/float64(n)
			near := min(k, len(at)-1)
			if near > 0 && middle-at[near-1] < at[near]-middle {
				near--
			}
			out[b] = [2]int{near, near + 1}
		}
	}
	return out
}

// The indices of a palette: nothing, then the levels of positive and negative
// values, then negative ones on a line.
const (
	shadeNone = iota
	shadeZero
	shadePositive
	shadeNegative = shadePositive + mapLevels
	shadeLined    = shadeNegative + mapLevels
)

// shade returns the index of a value from -1 to 1.
func shade(v float64, lined bool) uint8 {
	if !finite(v) {
		return shadeNone
	}
	level := int(math.Round(math.Min(math.Abs(v), 1) * mapLevels))
	switch {
	case level == 0:
		return shadeZero
	case v > 0:
		return uint8(shadePositive + level - 1)
	case lined:
		return uint8(shadeLined + level - 1)
	}
	return uint8(shadeNegative + level - 1)
}

func mapPalette() color.Palette {
	const light = 0.62 // of the way to white, of a line
	p := color.Palette{shadeNone: ink.Hair, shadeZero: ink.Diverging(0)}
	for k := 1; k <= mapLevels; k++ {
		p = append(p, ink.Diverging(float64(k)/mapLevels))
	}
	for k := 1; k <= mapLevels; k++ {
		p = append(p, ink.Diverging(-float64(k)/mapLevels))
	}
	for k := 1; k <= mapLevels; k++ {
		p = append(p, ink.Mix(ink.Diverging(-float64(k)/mapLevels), ink.White, light))
	}
	return p
}

// bar draws the scale at the right of the data area.
func (m *Map) bar(c draw.Canvas, data vg.Rectangle, top float64, signed bool) {
	const gap, width, steps = 11.0, 7.0, 160
	low := 0.0
	if signed {
		low = -top
	}
	img := image.NewPaletted(image.Rect(0, 0, 1, steps), mapPalette())
	for k := range steps {
		part := (float64(k) + 0.5) / steps
		img.SetColorIndex(0, k, shade(1+part*(low/top-1), k%linePitch == 0))
	}
	box := data
	box.Min.X = data.Max.X + vg.Points(gap)
	box.Max.X = box.Min.X + vg.Points(width)
	c.DrawImage(box, img)
	c.SetLineStyle(ink.FrameLine)
	c.Stroke(box.Path())
	s := newScale(Axis{Unit: m.Unit, Min: low, Max: top})
	lo, hi := s.at(low), s.at(top)
	t := ticks{s: s, length: box.Size().Y.Points(), wish: 22, need: func(string) float64 { return tickStyle.Size + 2.5 }}
	for _, tick := range t.Ticks(lo, hi) {
		at := box.Min.Y + box.Size().Y*vg.Length((tick.Value-lo)/(hi-lo))
		c.StrokeLine2(ink.FrameLine, box.Max.X, at, box.Max.X+vg.Points(2.5), at)
		tickStyle.Draw(c, box.Max.X.Points()+4.5, at.Points()-2.3, tick.Label, typeset.Left)
	}
	textStyle.Draw(c, box.Min.X.Points(), box.Max.Y.Points()+3.5+m.headsHeight()/2, m.Symbol+format.Space+"("+s.unit()+")", typeset.Left)
}
