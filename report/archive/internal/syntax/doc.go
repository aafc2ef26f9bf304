// Package syntax reads and writes the objects of a PDF file (ISO 32000-1,
// clause 7).
//
// The reader is strict and takes what this program writes and what common tools
// make of it: cross-reference tables and streams, object streams, chains of
// updates; streams without a filter or with FlateDecode and PNG predictors. It
// does not read encrypted files, generation numbers other than 0, hybrid files,
// other filters, and it repairs nothing. Its work and memory are bounded by
// [Limits], whatever the file says of itself; it never panics on a file.
package syntax
