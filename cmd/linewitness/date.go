package main

import (
	"fmt"
	"os"
	"strconv"
	"time"
)

// epochVariable sets the date of what programs make, in seconds since 1970, so
// that it can be made again the same.
const epochVariable = "SOURCE_DATE_EPOCH"

// lastEpoch is the last second of the year 9999.
const lastEpoch = 253402300799

// dateOf is the date of a record whose design file says none, and where it is
// from: the environment, or the time at which the design file was last changed.
// A design from standard input, or from what is no file, has none. The clock is
// never asked: a record made again tomorrow is to be the same record.
func dateOf(path string) (date, from string, err error) {
	if s := os.Getenv(epochVariable); s != "" {
		n, err := strconv.ParseInt(s, 10, 64)
		if err != nil || n < 0 || n > lastEpoch {
			return "", "", usageError(fmt.Sprintf("%s: %q is not a number of seconds since 1970", epochVariable, s),
				"unset it, or give the design file a record.date")
		}
		return day(time.Unix(n, 0)), "environment", nil
	}
	if path == standardInput {
		return "", "", nil
	}
	info, err := os.Stat(path)
	if err != nil {
		return "", "", fileError(err.Error(), "")
	}
	if !info.Mode().IsRegular() {
		return "", "", nil
	}
	return day(info.ModTime()), "file", nil
}

// day is the day of t in UTC.
func day(t time.Time) string { return t.UTC().Format(time.DateOnly) }
