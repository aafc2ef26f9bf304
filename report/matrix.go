package report

// sideBySide writes the cases beside each other.
func (d *document) sideBySide() {}
