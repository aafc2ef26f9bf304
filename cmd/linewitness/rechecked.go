package main

import (
	"encoding/json"
	"fmt"
	"io"
	"math"

	"linewitness/report/recheck"
	"linewitness/report/result"
	"linewitness/sim/record"
)

// A recheckReport is the outcome of a recheck, to be printed.
type recheckReport struct {
	path      string
	then, now *result.Node
	out       *recheck.Outcome
}

// mostDifferences is how many differences are printed.
const mostDifferences = 50

func (r *recheckReport) write(w io.Writer) {
	fmt.Fprintf(w, "%s: %s\n\n", headingOf(r.then), r.out.Status())
	rows := [][]string{
		{"record", r.path + ", by " + madeBy(r.then)},
		{"this run", madeBy(r.now) + ", " + counted(gridsOf(r.now), "grid")},
		{"numbers", countText(r.out.Numbers)},
		{"texts", countText(r.out.Texts)},
	}
	if d := r.out.Largest; d != nil {
		rows = append(rows, []string{"largest", plainNumber(d.Ratio()) + " of the change that is allowed, " + d.Path})
	}
	writeTable(w, rows)
	writeDifferences(w, "different:", r.out.Differences, r.out.Further)
	writeDifferences(w, "not counted:", r.out.Said, 0)
}

func countText(c recheck.Count) string {
	return fmt.Sprintf("%s compared: %s same, %s within their uncertainty, %s different",
		whole(c.Total()), whole(c.Same), whole(c.Within), whole(c.Different))
}

// writeDifferences lists differences under a title and counts the further ones;
// there is nothing without any.
func writeDifferences(w io.Writer, title string, ds []recheck.Difference, further int) {
	if len(ds) == 0 {
		return
	}
	fmt.Fprintf(w, "\n%s\n", title)
	rows := [][]string{{"path", "in the record", "now", "of allowed", "why"}}
	for i := range ds[:min(len(ds), mostDifferences)] {
		d := &ds[i]
		rows = append(rows, []string{d.Path, d.Then, d.Now, plainNumber(d.Ratio()), d.Why})
	}
	writeTable(w, rows)
	if more := len(ds) - mostDifferences + further; more > 0 {
		fmt.Fprintf(w, "  and %s more; --json lists more of them\n", whole(more))
	}
}

// headingOf names the design of a result.
func headingOf(n *result.Node) string {
	d := n.Get("design")
	return heading(record.Design{
		Title: d.String("title"), Number: d.String("number"), Revision: d.String("revision"), File: d.String("file"),
	})
}

// madeBy is the program and the toolchain that made a result.
func madeBy(n *result.Node) string {
	return "linewitness " + n.String("tool", "version") + ", " + n.String("tool", "go")
}

// gridsOf is the number of grids of a result.
func gridsOf(n *result.Node) int {
	most := 0
	for _, c := range n.Get("cases").Nodes {
		most = max(most, len(c.Get("convergence", "grids").Items()))
	}
	return most
}

// jsonDifference is a difference as JSON; what has no number is null.
type jsonDifference struct {
	Path    string   `json:"path"`
	Record  string   `json:"record"`
	Now     string   `json:"now"`
	Change  *float64 `json:"change"`
	Allowed *float64 `json:"allowed"`
	Ratio   *float64 `json:"of_allowed"`
	Why     string   `json:"why"`
}

func jsonDifferences(ds []recheck.Difference) []jsonDifference {
	out := make([]jsonDifference, len(ds))
	for i := range ds {
		d := &ds[i]
		out[i] = jsonDifference{d.Path, d.Then, d.Now, finite(d.Change), finite(d.Allowed), finite(d.Ratio()), d.Why}
	}
	return out
}

func finite(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	return &v
}

func (r *recheckReport) writeJSON(w io.Writer) error {
	type made struct {
		Version string `json:"version"`
		Go      string `json:"go"`
	}
	by := func(n *result.Node) made { return made{n.String("tool", "version"), n.String("tool", "go")} }
	var largest *jsonDifference
	if r.out.Largest != nil {
		largest = &jsonDifferences([]recheck.Difference{*r.out.Largest})[0]
	}
	return writeIndented(w, struct {
		Outcome     string           `json:"outcome"`
		Record      string           `json:"record"`
		Design      string           `json:"design"`
		RecordBy    made             `json:"record_by"`
		NowBy       made             `json:"now_by"`
		Grids       int              `json:"grids"`
		Numbers     recheck.Count    `json:"numbers"`
		Texts       recheck.Count    `json:"texts"`
		Largest     *jsonDifference  `json:"largest"`
		Differences []jsonDifference `json:"differences"`
		Further     int              `json:"further"`
		NotCounted  []jsonDifference `json:"not_counted"`
	}{
		r.out.Status().String(), r.path, headingOf(r.then), by(r.then), by(r.now), gridsOf(r.now), r.out.Numbers, r.out.Texts,
		largest, jsonDifferences(r.out.Differences), r.out.Further, jsonDifferences(r.out.Said),
	})
}

// writeIndented writes a value as indented JSON.
func writeIndented(w io.Writer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(v)
}
