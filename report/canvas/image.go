package canvas

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"image"
	"image/draw"
	"image/png"

	"github.com/jung-kurt/gofpdf"
	"gonum.org/v1/plot/vg"
)

// DrawImage draws img into rect. Equal images are stored once.
func (c *Canvas) DrawImage(rect vg.Rectangle, img image.Image) {
	name, err := c.storeImage(img)
	if err != nil {
		c.fail("image: %w", err)
		return
	}
	// gofpdf places images from the top of the page; undo that, so that the
	// operands are coordinates of this canvas.
	w, h := rect.Size().X.Points(), rect.Size().Y.Points()
	x, y := rect.Min.X.Points(), rect.Min.Y.Points()
	c.flush()
	c.pdf.ImageOptions(name, x/c.k, (c.hPt-y-h)/c.k, w/c.k, h/c.k, false, imageOptions(), 0, "")
}

func imageOptions() gofpdf.ImageOptions {
	return gofpdf.ImageOptions{ImageType: "png", AllowNegativePosition: true}
}

// storeImage adds img to the document under a name made of its content.
func (c *Canvas) storeImage(img image.Image) (name string, err error) {
	n, pixels := eightBits(img)
	bounds := img.Bounds()
	sum := sha256.Sum256(pixels)
	name = fmt.Sprintf("image-%dx%d-%s", bounds.Dx(), bounds.Dy(), hex.EncodeToString(sum[:8]))
	if c.pdf.GetImageInfo(name) != nil {
		return name, nil
	}
	var b bytes.Buffer
	if err := png.Encode(&b, n); err != nil {
		return "", err
	}
	c.pdf.RegisterImageOptionsReader(name, imageOptions(), &b)
	return name, nil
}

// eightBits returns an image of eight bits a channel, for gofpdf refuses
// sixteen, and what tells it from others. One with an opaque palette is left as
// it is: it takes a third of the room.
func eightBits(img image.Image) (image.Image, []byte) {
	if p, ok := img.(*image.Paletted); ok && p.Opaque() && p.Rect.Min == (image.Point{}) && p.Stride == p.Rect.Dx() {
		id := append([]byte{}, p.Pix...)
		for _, clr := range p.Palette {
			r, g, b, _ := clr.RGBA()
			id = append(id, byte(r>>8), byte(g>>8), byte(b>>8))
		}
		return p, id
	}
	bounds := img.Bounds()
	n := image.NewNRGBA(image.Rect(0, 0, bounds.Dx(), bounds.Dy()))
	draw.Draw(n, n.Bounds(), img, bounds.Min, draw.Src)
	return n, n.Pix
}
