package sheet

// floatRoom is the part of a page below which it is not worth filling.
const floatRoom = 0.2

// floated is a piece that waits for a page with room.
type floated struct {
	need float64
	draw func()
}

// Float draws a piece that begins with a heading and takes need. Where it has no
// room, and much of the page is left, what comes after it is set first, and the
// piece comes before the next heading that has no room there either.
func (b *Book) Float(need float64, draw func()) {
	if b.Room() >= need || b.Fresh() || b.Room() < floatRoom*b.Body() {
		draw()
		return
	}
	b.floats = append(b.floats, floated{need, draw})
}

// land draws the pieces that wait, as far as it is time for them: before a chapter
// all, else those that have room and, where the heading that takes need has none,
// the first.
func (b *Book) land(level int, need float64) {
	if b.landing {
		return
	}
	b.landing = true
	defer func() { b.landing = false }()
	for len(b.floats) > 0 {
		f := b.floats[0]
		if level > 0 && b.Room() < f.need && b.Room() >= max(need, floatRoom*b.Body()) {
			return
		}
		b.floats = b.floats[1:]
		f.draw()
	}
}
