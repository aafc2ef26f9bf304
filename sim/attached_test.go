package sim

import (
	"testing"

	"linewitness/sim/design"
)

// The files that a design reads are kept with its record, byte for byte.
func TestAttached(t *testing.T) {
	f := &design.File{Attachments: []design.Attachment{{Name: "measured/antenna.s1p", Data: []byte("# MHz\n"), SHA256: "00ff"}, {Name: "b.s1p"}}}
	got := attached(f)
	if len(got) != 2 || got[0].Name != "measured/antenna.s1p" || string(got[0].Data) != "# MHz\n" || got[0].SHA256 != "00ff" || got[1].Name != "b.s1p" {
		t.Errorf("%+v", got)
	}
}
