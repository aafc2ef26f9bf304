package sheet

// A Foot is how a page ends.
type Foot struct {
	Left   float64 // room below the last block, points
	Headed bool    // the last block is a heading, alone at the foot
	Next   string  // the heading that the next page begins with, if it begins with one
}

// Feet returns how the pages end that are finished. Tests look at it.
func (b *Book) Feet() []Foot { return b.feet }

// began notes that a page begins with a heading.
func (b *Book) began(heading string) {
	if b.Fresh() && len(b.feet) > 0 {
		b.feet[len(b.feet)-1].Next = heading
	}
}
