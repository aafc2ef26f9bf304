package archive

import (
	"errors"
	"strconv"

	"linewitness/report/archive/internal/syntax"
)

// outline writes how many entries of the outline are visible: the first level is
// open and all below it closed (ISO 32000-1, 12.3.3). gofpdf counts none.
func (d *document) outline() error {
	if d.catalog["Outlines"] == nil {
		return nil
	}
	root, err := syntax.As[syntax.Dict](d.File, d.catalog["Outlines"])
	if err != nil {
		return err
	}
	c := counter{d.File, map[syntax.Value]bool{}}
	n, err := c.children(root)
	root["Count"] = syntax.Number(strconv.Itoa(n))
	return err
}

// counter remembers which entries it has met.
type counter struct {
	f   *syntax.File
	met map[syntax.Value]bool
}

// children counts the entries right below one and writes the counts of those.
func (c counter) children(of syntax.Dict) (n int, err error) {
	for next := of["First"]; next != nil; n++ {
		if c.met[next] {
			return 0, errors.New("an entry is met twice")
		}
		c.met[next] = true
		entry, err := syntax.As[syntax.Dict](c.f, next)
		if err != nil {
			return 0, err
		}
		below, err := c.children(entry)
		if err != nil {
			return 0, err
		}
		delete(entry, "Count")
		if below > 0 {
			entry["Count"] = syntax.Number(strconv.Itoa(-below)) // closed
		}
		next = entry["Next"]
	}
	return n, nil
}
