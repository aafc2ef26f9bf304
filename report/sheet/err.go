package sheet

// Err ends the page in work and returns the first error met so far: for those
// who lay a document out and do not write it.
func (b *Book) Err() error {
	b.close()
	return b.err
}
