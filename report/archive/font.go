package archive

import (
	"crypto/sha256"
	"errors"
	"fmt"
	"strconv"

	"linewitness/report/archive/internal/syntax"
	"linewitness/report/archive/internal/truetype"
)

// font is a composite font with its parts (ISO 32000-1, 9.7).
type font struct {
	whole, part, descriptor      syntax.Dict
	program, glyphIDs, toUnicode *syntax.Stream
}

// fonts mends all fonts of the document, and refuses those that are not embedded
// (6.2.11.4).
func (d *document) fonts() error {
	return d.Each(func(_ syntax.Ref, v syntax.Value) error {
		whole, ok := v.(syntax.Dict)
		if !ok || whole["Type"] != syntax.Name("Font") {
			return nil
		}
		switch whole["Subtype"] {
		case syntax.Name("CIDFontType2"): // the part of a whole that is mended
			return nil
		case syntax.Name("Type0"):
			ft, err := d.font(whole)
			if err != nil {
				return err
			}
			return d.mend(ft)
		}
		return fmt.Errorf("font %v is not embedded: set all text in a UTF-8 font", whole["BaseFont"])
	})
}

// font finds the parts of a composite font.
func (d *document) font(whole syntax.Dict) (ft font, err error) {
	ft.whole = whole
	parts, err := syntax.As[syntax.Array](d.File, whole["DescendantFonts"])
	if err != nil || len(parts) != 1 {
		return ft, errors.Join(errors.New("it has no descendant"), err)
	}
	if ft.part, err = syntax.As[syntax.Dict](d.File, parts[0]); err != nil {
		return ft, err
	}
	if ft.descriptor, err = syntax.As[syntax.Dict](d.File, ft.part["FontDescriptor"]); err != nil {
		return ft, err
	}
	for _, s := range []struct {
		to   **syntax.Stream
		from syntax.Value
	}{
		{&ft.program, ft.descriptor["FontFile2"]},
		{&ft.glyphIDs, ft.part["CIDToGIDMap"]},
		{&ft.toUnicode, whole["ToUnicode"]},
	} {
		if *s.to, err = syntax.As[*syntax.Stream](d.File, s.from); err != nil {
			return ft, err
		}
	}
	return ft, nil
}

// mend rebuilds the program, whose table cmap gofpdf writes with a wrong length,
// gives the font its real name after a tag for the subset (6.2.11.4.2;
// ISO 32000-1, 9.6.4), and lists its characters one by one.
func (d *document) mend(ft font) error {
	source, err := d.Decode(ft.program)
	if err != nil {
		return err
	}
	tables, err := truetype.Read(source)
	if err != nil {
		return err
	}
	program, err := tables.Embedded()
	if err != nil {
		return err
	}
	*ft.program = *syntax.NewStream(syntax.Dict{"Length1": syntax.Number(strconv.Itoa(len(program)))}, program)
	name := tables.PostScriptName()
	if name == "" {
		return errors.New("it has no PostScript name")
	}
	full := syntax.Name(subsetTag(program) + "+" + name)
	ft.whole["BaseFont"], ft.part["BaseFont"], ft.descriptor["FontName"] = full, full, full
	glyphs, err := d.Decode(ft.glyphIDs)
	if err != nil {
		return err
	}
	*ft.toUnicode = *syntax.NewStream(syntax.Dict{}, toUnicode(codes(glyphs)))
	return nil
}

// subsetTag is six letters that depend on what is in the subset.
func subsetTag(program []byte) string {
	sum := sha256.Sum256(program)
	const letters = 6
	tag := make([]byte, letters)
	for i := range tag {
		tag[i] = 'A' + sum[i]%26
	}
	return string(tag)
}
