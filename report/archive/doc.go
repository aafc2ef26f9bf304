// Package archive gives the document of a record the form in which it is kept,
// and reads the files that are attached to one back.
//
// [Finish] rewrites what gofpdf writes: it is written to PDF/A-3b (ISO 19005-3,
// level B; clauses without another standard's name are of that part). The bytes
// are a function of the arguments alone: no clock, no random number, and the
// document's identifier is made from its content.
//
// Beside the attached files stands a manifest, an attached file too, with the
// role, the size and the SHA-256 of each. [Open] checks every file against it,
// and so finds what was damaged, edited or lost. It is no signature: whoever
// rewrites the manifest as well is not found out.
package archive
