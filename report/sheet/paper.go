package sheet

// A Paper is a sheet size in points.
type Paper struct{ Width, Height float64 }

const mm = 72 / 25.4

// The sheet sizes (ISO 216; ANSI/ASME Y14.1).
var (
	A4     = Paper{210 * mm, 297 * mm}
	Letter = Paper{8.5 * 72, 11 * 72}
)

// The margins: at the left room for punching.
const (
	marginLeft   = 22 * mm
	marginRight  = 16 * mm
	marginTop    = 21 * mm
	marginBottom = 18 * mm
	headerDrop   = 13 * mm // from the upper edge to the baseline of the header
	footerRise   = 10 * mm // from the lower edge to the baseline of the footer
)
