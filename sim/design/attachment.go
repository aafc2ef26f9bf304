package design

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"io/fs"
	"strings"

	"linewitness/sim/oneport"
)

// mostAttached is how many bytes the files of a design may have together.
const mostAttached = 16 << 20

// A folder is where the files are that a design refers to. Each is read once,
// whatever the number of parts and cases that name it.
type folder struct {
	open  func(path string) ([]byte, error) // nil: there is none
	known map[string]*opened
	list  []Attachment
	bytes int
}

// opened is a one-port file, or what is wrong with it.
type opened struct {
	table *oneport.Table
	fault *fault
}

func newFolder(open func(path string) ([]byte, error)) *folder {
	return &folder{open: open, known: map[string]*opened{}}
}

// onePort reads a one-port file.
func (d *folder) onePort(path string) (*oneport.Table, *fault) {
	o := d.known[path]
	if o == nil {
		o = &opened{}
		o.table, o.fault = d.read(path)
		d.known[path] = o
	}
	return o.table, o.fault
}

func (d *folder) read(path string) (*oneport.Table, *fault) {
	if f := checkPath(path); f != nil {
		return nil, f
	}
	if d.open == nil {
		return nil, newFault(say("give the design as a file of its own, or write the values out under table:"),
			"%q cannot be read: it is not known which folder the design is in", path)
	}
	data, err := d.open(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, newFault(say("paths are relative to the folder of the design file"), "there is no file %q", path)
	case err != nil:
		return nil, newFault(noHint, "cannot read %q: %s", path, reason(err).Error())
	}
	if d.bytes += len(data); d.bytes > mostAttached {
		return nil, newFault(say("thin the files out"), "with %q the files of the design have more than 16 MiB", path)
	}
	table, err := oneport.Read(path, data)
	var bad *oneport.Error
	if errors.As(err, &bad) {
		where := *bad
		where.Hint = ""
		return nil, newFault(say("%s", rawText(bad.Hint)), "%s", rawText(where.Error()))
	}
	sum := sha256.Sum256(data)
	d.list = append(d.list, Attachment{path, data, hex.EncodeToString(sum[:])})
	return table, nil
}

// reason is an error of the file system without the path, which is that of
// this machine.
func reason(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	return err
}

// checkPath refuses a path that leads out of the folder of the design. A
// record must be repeatable, by someone else, from that folder.
func checkPath(path string) *fault {
	if fs.ValidPath(path) && path != "." && !strings.ContainsAny(path, `\:`) {
		return nil
	}
	return newFault(say("copy the file beside the design and name it antenna.s1p, or measured/antenna.s1p with a folder"),
		"%q is not a path inside the folder of the design, which is all that a record can be repeated from", path)
}
