// Package result reads the JSON form of a record back, as package data writes
// it, within limits on its size.
//
// It reads any document of a known format, also one that an older or a newer
// version of the program wrote: what keys there are is for the caller to see.
package result
