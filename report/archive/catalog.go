package archive

import (
	"linewitness/report/archive/internal/icc"
	"linewitness/report/archive/internal/syntax"
)

// properties writes what the catalog says of the whole document.
func (d *document) properties(metadata syntax.Ref) {
	d.catalog["Metadata"] = metadata // 6.6.2.1
	d.catalog["OutputIntents"] = syntax.Array{d.intent()}
	if d.meta.Lang != "" {
		d.catalog["Lang"] = textString(d.meta.Lang) // ISO 32000-1, 14.9.2
	}
	// The window of a viewer is to have the title, not the name of the file
	// (ISO 32000-1, 12.2).
	d.catalog["ViewerPreferences"] = syntax.Dict{"DisplayDocTitle": syntax.Bool(true)}
	// Pages are called 1, 2, 3 as is printed at their foot (ISO 32000-1, 12.4.2).
	d.catalog["PageLabels"] = syntax.Dict{"Nums": syntax.Array{
		syntax.Number("0"), syntax.Dict{"S": syntax.Name("D")},
	}}
}

// intent says that the colours of the document are those of sRGB (6.2.3).
func (d *document) intent() syntax.Ref {
	const condition = "sRGB IEC61966-2.1"
	profile := syntax.NewStream(syntax.Dict{"N": syntax.Number("3")}, icc.SRGB())
	return d.Add(syntax.Dict{
		"Type":                      syntax.Name("OutputIntent"),
		"S":                         syntax.Name("GTS_PDFA1"),
		"OutputConditionIdentifier": syntax.String(condition),
		"Info":                      syntax.String(condition),
		"DestOutputProfile":         d.Add(profile),
	})
}
