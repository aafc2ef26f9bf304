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

// storeImage adds img to the document under a name made of its content. It is
// converted to eight bits a channel, for gofpdf refuses sixteen.
func (c *Canvas) storeImage(img image.Image) (name string, err error) {
	bounds := img.Bounds()
	n := image.NewNRGBA(image.Rect(0, 0, bounds.Dx(), bounds.Dy()))
	draw.Draw(n, n.Bounds(), img, bounds.Min, draw.Src)
	sum := sha256.Sum256(n.Pix)
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
