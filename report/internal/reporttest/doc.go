// Package reporttest makes records for the tests of package report: networks
// solved in closed form, with the second witness, the transients and the
// judgements made up around that solution so that they look as a real run's.
// Nothing but tests may use it.
package reporttest
