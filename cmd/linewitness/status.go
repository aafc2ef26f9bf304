package main

import "linewitness/sim/record"

// The exit statuses. A run over several designs ends with the highest.
const (
	statusVerified    = 0   // all is as it should be
	statusMissed      = 1   // a requirement is missed or not shown to be met, a claim contradicted, or a verdict is worse than it was
	statusUsage       = 2   // the command line or a design file is wrong
	statusDisagree    = 3   // the two methods disagree, or a recheck with its record
	statusUnsettled   = 4   // there is no steady state
	statusFile        = 5   // a file could not be read or written
	statusInterrupted = 130 // stopped by a signal; 128 + SIGINT, as shells have it
)

func statusOf(v record.Verdict) int {
	switch v {
	case record.Verified:
		return statusVerified
	case record.Missed, record.Doubted, record.NotShown:
		return statusMissed
	case record.Disagree:
		return statusDisagree
	case record.Unsettle:
		return statusUnsettled
	}
	panic("linewitness: a verdict without an exit status")
}

// A failure ends the program, or its work on one design, with a status. The
// message is one line; the hint says how to mend it and may be empty.
type failure struct {
	status        int
	message, hint string
}

func (f *failure) Error() string { return f.message }

func usageError(message, hint string) *failure {
	return &failure{statusUsage, message, hint}
}

func fileError(message, hint string) *failure {
	return &failure{statusFile, message, hint}
}

// errStatus ends the program with a status after everything was said.
type errStatus int

func (errStatus) Error() string { return "" }
