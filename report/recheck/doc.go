// Package recheck compares the result that is attached to a record with the
// result of a new run of the same design, value by value.
//
// Every number, text and flag of the result falls under a rule of the table in
// rules.go, which says how far it may change and why. A value is the same if it
// is equal to the printed digits, the same within its uncertainty if its rule
// allows the change, and different otherwise. How uncertain a number is, the new
// run says: what stands in the record has been out of our hands.
package recheck
