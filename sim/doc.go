// Package sim is the job: it takes a design file through every case - plan
// the grid, solve with both witnesses, compare, judge - and returns the
// record. It prints nothing and writes no file.
package sim
