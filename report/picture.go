package report

import (
	"fmt"
	"strings"
	"unicode"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/sim/record"
)

// A picture is one figure of the document, drawn alike on a page and into a
// file of its own.
type picture struct {
	name    string         // "nominal-envelopes-main"
	finding string         // what it shows, one line
	height  float64        // points; it is as wide as the text
	key     []figure.Entry // what its lines stand for, drawn above it where it stands alone
	paint   func(draw.Canvas)
}

// show puts a picture on the page, with its finding below it as caption.
func (d *document) show(p picture) {
	label := d.figure()
	d.b.Need(p.height + d.b.CaptionHeight(label, p.finding))
	d.b.Block(p.height, p.paint)
	d.b.Caption(label, p.finding)
	d.note(p)
}

// note keeps a picture for the files, under a name that no other has.
func (d *document) note(p picture) {
	if d.taken == nil {
		d.taken = map[string]bool{}
	}
	p.name = fileName(p.name)
	for base, n := p.name, 2; d.taken[p.name]; n++ {
		p.name = fmt.Sprintf("%s-%d", base, n)
	}
	d.taken[p.name] = true
	d.pictures = append(d.pictures, p)
}

// pictureName joins the case and what is shown.
func pictureName(c *record.Case, parts ...string) string {
	return strings.Join(append([]string{c.Name}, parts...), "-")
}

// longestName is the most bytes of the name of a file, without its ending.
const longestName = 80

// fileName makes a name that every file system takes: lower-case letters,
// digits, hyphens and underscores.
func fileName(s string) string {
	var b strings.Builder
	gap := false
	for _, r := range strings.ToLower(s) {
		switch {
		case r == '_' || r < unicode.MaxASCII && (unicode.IsLetter(r) || unicode.IsDigit(r)):
			if gap && b.Len() > 0 {
				b.WriteByte('-')
			}
			gap = false
			b.WriteRune(r)
		default:
			gap = true
		}
	}
	if b.Len() == 0 {
		return "figure"
	}
	return strings.TrimRight(b.String()[:min(b.Len(), longestName)], "-_")
}

// alone draws a picture with its key above it.
func (p picture) alone(c draw.Canvas) {
	if room := figure.KeyRoom(p.key, c.Size().X.Points()); room > 0 {
		figure.Key(c, p.key)
		c = draw.Crop(c, 0, 0, 0, vg.Points(-room))
	}
	p.paint(c)
}

// full returns the height of a picture with its key, at a width.
func (p picture) full(width float64) float64 { return p.height + figure.KeyRoom(p.key, width) }
