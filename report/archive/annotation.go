package archive

import "linewitness/report/archive/internal/syntax"

// annotations makes links indirect objects, which viewers expect, and gives them
// the flag to be printed (6.3.2); gofpdf writes them into their page without it.
func (d *document) annotations() error {
	return d.Each(func(_ syntax.Ref, v syntax.Value) error {
		page, ok := v.(syntax.Dict)
		if !ok || page["Type"] != syntax.Name("Page") || page["Annots"] == nil {
			return nil
		}
		list, err := syntax.As[syntax.Array](d.File, page["Annots"])
		if err != nil {
			return err
		}
		refs := make(syntax.Array, len(list))
		for i := range list {
			a, err := syntax.As[syntax.Dict](d.File, list[i])
			if err != nil {
				return err
			}
			a["F"] = syntax.Number("4")
			refs[i] = d.Add(a)
		}
		page["Annots"] = refs
		return nil
	})
}
