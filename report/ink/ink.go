// Package ink holds the colours and line styles of a record. They stay apart
// when printed in grey and for the common colour-vision deficiencies, and no
// meaning hangs on a colour alone: every curve also has its own line style,
// every verdict its own shape and word. Text colours have a contrast to white
// of 4.5 to 1 or more, graphic ones of 3 to 1; a test computes both.
package ink

import (
	"image/color"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// The colours of text and rules.
var (
	Text   = color.NRGBA{R: 24, G: 26, B: 30, A: 255}
	Soft   = color.NRGBA{R: 88, G: 92, B: 100, A: 255} // secondary text
	Accent = color.NRGBA{R: 31, G: 56, B: 92, A: 255}  // headings, rules
	White  = color.NRGBA{R: 255, G: 255, B: 255, A: 255}
	Hair   = color.NRGBA{R: 170, G: 176, B: 186, A: 255} // hairlines
	Zebra  = color.NRGBA{R: 243, G: 244, B: 246, A: 255} // every second row
	Panel  = color.NRGBA{R: 233, G: 237, B: 243, A: 255} // the head of a table
	Grid   = color.NRGBA{R: 224, G: 226, B: 230, A: 255}
)

// The colours of verdicts.
var (
	Good  = color.NRGBA{R: 0, G: 104, B: 76, A: 255}
	Bad   = color.NRGBA{R: 184, G: 56, B: 0, A: 255}
	Doubt = color.NRGBA{R: 130, G: 84, B: 0, A: 255}
)

// The colours of curves: the phasor witness is drawn as a wide pale line under
// the narrow dark one of fdtd, so that both show where they coincide.
var (
	Phasor = color.NRGBA{R: 110, G: 160, B: 208, A: 255}
	FDTD   = color.NRGBA{R: 140, G: 40, B: 0, A: 255}
	Peak   = color.NRGBA{R: 70, G: 74, B: 82, A: 255}
	Limit  = color.NRGBA{R: 150, G: 30, B: 70, A: 255}
	Band   = color.NRGBA{R: 205, G: 220, B: 236, A: 255}
)

// The styles of curves.
var (
	PhasorLine = style(Phasor, 2.4)
	FDTDLine   = style(FDTD, 0.75, 3.2, 1.6)
	TraceLine  = style(FDTD, 0.7)
	PeakLine   = style(Peak, 0.7, 0.9, 1.5)
	LimitLine  = style(Limit, 0.9, 6, 1.8, 1.2, 1.8)
	RatedLine  = style(Limit, 0.6, 9, 2.2)
	MarkLine   = style(Soft, 0.45, 1, 1.6)
	FrameLine  = style(Soft, 0.5)
	GridLine   = style(Grid, 0.4)
	HatchLine  = style(Limit, 0.25)
	BandEdge   = style(Phasor, 0.9)
	LevelLine  = style(Soft, 0.5, 5, 2)
	BoundLine  = style(Text, 0.6, 2.2, 1.4)
	FrontLine  = style(Text, 0.8)
	EchoLine   = style(Text, 0.7, 4, 1.8)
	EchoesLine = style(Text, 0.7, 1, 1.6)
	BarEdge    = style(Accent, 0.6)
	BarLine    = style(Accent, 0.45)
)

// Series are styles of curves that are named where they run: told apart by
// their dashes and widths, in grey too.
var Series = []draw.LineStyle{
	style(Accent, 1.1),
	style(FDTD, 0.9, 5, 1.8),
	style(Peak, 0.9, 1, 1.5),
	style(Accent, 0.8, 8, 1.6, 1, 1.6),
	style(FDTD, 0.55),
	style(Peak, 1.5, 2.4, 2.4),
}

func style(c color.Color, width float64, dashes ...float64) draw.LineStyle {
	s := draw.LineStyle{Color: c, Width: vg.Points(width)}
	for _, d := range dashes {
		s.Dashes = append(s.Dashes, vg.Points(d))
	}
	return s
}
