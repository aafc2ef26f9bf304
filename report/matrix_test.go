package report

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// Every case but the nominal one stands in one table, none is wider than a
// page holds, and the nominal case leads each.
func TestColumnsOf(t *testing.T) {
	for n := 2; n < 60; n++ {
		groups := columnsOf(n, matrixCases)
		next, least, most := 1, n, 0
		for _, g := range groups {
			least, most = min(least, len(g)), max(most, len(g))
			if g[0] != 0 || len(g) < 2 || len(g) > matrixCases {
				t.Fatalf("%d cases: group %v", n, g)
			}
			for _, k := range g[1:] {
				if k != next {
					t.Fatalf("%d cases: %v, want %d next", n, groups, next)
				}
				next++
			}
		}
		if next != n || most-least > 1 {
			t.Fatalf("%d cases: %v", n, groups)
		}
	}
	if got := fmt.Sprint(columnsOf(9, 8)); got != "[[0 1 2 3 4] [0 5 6 7 8]]" {
		t.Errorf("9 cases: %s", got)
	}
}

func TestMatrixCell(t *testing.T) {
	r := &record.MatrixRow{Unit: "V rms", Cells: []record.MatrixCell{
		{Present: true, Value: 10, Difference: math.NaN(), Verdict: record.Met},
		{Present: true, Value: 12, Difference: 2, Verdict: record.MissedReq, Worst: true},
		{Present: true, Value: 10, Difference: 1e-12},
		{Value: 5},
	}}
	for k, want := range []sheet.Cell{
		{Text: "10.00 V", Mark: sheet.Holds},
		{Text: "12.00 V", Mark: sheet.Fails, Bold: true, Note: "worst +2.000 V"},
		{Text: "10.00 V", Note: "the same"},
		{Text: "–"},
		{Text: "–"}, // a row that is shorter than the list of cases
	} {
		got := matrixCell(r, k)
		got.Text, got.Note = readable(got.Text), readable(got.Note)
		if got != want {
			t.Errorf("cell %d is %+v, want %+v", k, got, want)
		}
	}
}

func TestMatrixFinding(t *testing.T) {
	row := func(id string, worst int) record.MatrixRow {
		r := record.MatrixRow{ID: id, Cells: make([]record.MatrixCell, 3)}
		if worst >= 0 {
			r.Cells[worst].Worst = true
		}
		return r
	}
	for _, c := range []struct {
		rows []record.MatrixRow
		want string
	}{
		{[]record.MatrixRow{row("", 1), row("R1", -1)}, "Key figures of 3 cases; no requirement is judged in any."},
		{[]record.MatrixRow{row("R1", 1), row("R2", 2), row("R3", 2)}, "Of 3 requirements the least margin is found for 2 in c and 1 in b."},
		{[]record.MatrixRow{row("R1", 1), row("", 2)}, "Of 1 requirement the least margin is found for 1 in b."},
	} {
		if got := readable(matrixFinding(&record.Matrix{Cases: []string{"a", "b", "c"}, Rows: c.rows})); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}

// Twenty cases go into three tables.
func TestManyCases(t *testing.T) {
	r := reporttest.Feeder()
	m := &r.Matrix
	for k := len(m.Cases); k < 20; k++ {
		m.Cases = append(m.Cases, fmt.Sprintf("variant_%d", k))
		for i := range m.Rows {
			m.Rows[i].Cells = append(m.Rows[i].Cells, record.MatrixCell{Present: true, Value: float64(k), Difference: 1, Verdict: record.Met})
		}
	}
	all := strings.Join(text(t, r, Options{}), "\n")
	if got := strings.Count(all, "Requirement or key figure"); got != 3 {
		t.Errorf("%d tables, want 3", got)
	}
	for k := 4; k < 20; k++ {
		if s := fmt.Sprintf("variant_%d", k); !strings.Contains(all, s) {
			t.Errorf("the text lacks %s", s)
		}
	}
}

// A key figure that a requirement is about fills the cases in which the
// requirement is not judged, and has no row of its own; none of the filled
// cells is the worst of the requirement.
func TestMerged(t *testing.T) {
	nan := math.NaN()
	m := &record.Matrix{Cases: []string{"a", "b", "c"}, Rows: []record.MatrixRow{
		{ID: "R1", Label: "steady_voltage, main", Unit: "V peak", Cells: []record.MatrixCell{
			{Difference: nan}, {Present: true, Value: 2, Difference: nan, Verdict: record.Met, Worst: true}, {Difference: nan},
		}},
		{Label: "steady_voltage, main", Unit: "V peak", Cells: []record.MatrixCell{
			{Present: true, Value: 1, Difference: nan}, {Present: true, Value: 2, Difference: 1}, {Present: true, Value: 9, Difference: 8, Worst: true},
		}},
		{Label: "steady_voltage, main", Unit: "dB", Cells: make([]record.MatrixCell, 3)},
	}}
	got := merged(m)
	if len(got.Rows) != 2 || got.Rows[1].Unit != "dB" {
		t.Fatalf("rows %+v", got.Rows)
	}
	r := &got.Rows[0]
	for k, want := range []sheet.Cell{
		{Text: "1.000 V"},
		{Text: "2.000 V", Mark: sheet.Holds, Note: "+1.000 V"}, // judged in one case alone: nothing to be worst of
		{Text: "9.000 V", Note: "+8.000 V"},
	} {
		c := matrixCell(r, k)
		if c.Text, c.Note = readable(c.Text), readable(c.Note); c != want {
			t.Errorf("cell %d is %+v, want %+v", k, c, want)
		}
	}
	if m.Rows[0].Cells[0].Present {
		t.Error("the record itself was changed")
	}
	if got := matrixLabel(&record.MatrixRow{Label: "power_split, rack_2 to rack_1"}); got != "power split, rack_2 to rack_1" {
		t.Errorf("label %q", got)
	}
}
