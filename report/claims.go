package report

import "linewitness/sim/record"

// claims writes the chapter of the designer's own figures.
func (d *document) claims() {}

// claimsOfCase counts the claims of a case in a sentence.
func claimsOfCase(*record.Case) string { return "" }
