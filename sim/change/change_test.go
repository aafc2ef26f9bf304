package change

import (
	"fmt"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

const base = `format: 1
record: {title: Feeder, number: T-1, revision: A, history: [{revision: A, date: 2026-01-05, by: AB, text: First}]}
source: {at: tx, frequency: 10 MHz, emf: 20 V peak, impedance: 50 ohm}
lines:
  coax: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 10 MHz, attenuation: 2 dB/100m}}
sections:
  main: {from: tx, to: mast, length: 85 m, line: coax}
  stub: {from: mast, to: end, length: 22.5 deg, line: coax}
loads:
  aerial: {at: mast, r: 36.5 ohm, l: 1.2 uH}
  plug: {at: end, impedance: short}
cases:
  iced: {loads: {aerial: {r: 14 ohm, l: 2.4 uH}}}
  arc: {loads: {aerial: {impedance: short}}}
requirements:
  - {id: R1, quantity: vswr, section: main, end: from, max: 1.5}
  - {id: R2, quantity: load_power, load: aerial, min: 0.1 W, cases: [nominal, iced]}
grid: {agreement: 0.5 %}
`

// loaded loads the base with parts exchanged: old and new text in turn.
func loaded(t *testing.T, exchange ...string) *design.File {
	t.Helper()
	text := base
	for i := 0; i < len(exchange); i += 2 {
		if !strings.Contains(text, exchange[i]) {
			t.Fatalf("no %q to exchange", exchange[i])
		}
		text = strings.Replace(text, exchange[i], exchange[i+1], 1)
	}
	f, err := design.Load("test.yaml", []byte(text))
	if err != nil {
		t.Fatal(err)
	}
	return f
}

func told(changes []record.Change) (out []string) {
	for _, c := range changes {
		where := strings.TrimSpace(c.Place + ", " + c.Term)
		if c.Case != "" {
			where = "case " + c.Case + ", " + where
		}
		out = append(out, fmt.Sprintf("%s %s: %s -> %s", c.Kind, strings.TrimSuffix(where, ","), c.Old, c.New))
	}
	return out
}

func TestBetween(t *testing.T) {
	for _, tt := range []struct {
		name     string
		exchange []string
		want     []string
	}{
		{"nothing", nil, nil},
		{"a comment", []string{"format: 1", "format: 1   # yes"}, nil},
		{"a length", []string{"85 m", "87 m"}, []string{"changed section main, length: 85 m -> 87 m"}},
		{"in other words", []string{"85 m", "0.085 km"}, []string{"reworded section main, length: 85 m -> 0.085 km"}},
		{"deeper", []string{"attenuation: 2 dB", "attenuation: 2.4 dB"}, []string{"changed line coax, loss attenuation: 2 dB/100m -> 2.4 dB/100m"}},
		{"a key more and one less", []string{"emf: 20 V peak", "available_power: 1 W"}, []string{"removed source, emf: 20 V peak -> ", "added source, available_power:  -> 1 W"}},
		{"an element", []string{"cases:", "elements:\n  tuning: {at: mast, c: 120 pF}\ncases:"}, []string{"added element tuning:  -> {at: mast, c: 120 pF}"}},
		{"a load less", []string{"  plug: {at: end, impedance: short}\n", ""}, []string{"removed load plug: {at: end, impedance: short} -> "}},
		{"another name", []string{"plug:", "short_circuit:"}, []string{"renamed load short_circuit: plug -> short_circuit"}},
		{"a case", []string{"r: 14 ohm", "r: 12 ohm"}, []string{"changed case iced, load aerial, r: 14 ohm -> 12 ohm"}},
		{"a case less", []string{"  arc: {loads: {aerial: {impedance: short}}}\n", ""}, []string{"removed case arc: {loads: {aerial: {impedance: short}}} -> "}},
		{"more in a case", []string{"l: 2.4 uH}}}", "l: 2.4 uH}}, source: {emf: 10 V peak}}"}, []string{"added case iced, source:  -> {emf: 10 V peak}"}},
		{"a limit", []string{"max: 1.5", "max: 1.3"}, []string{"changed requirement R1, max: 1.5 -> 1.3"}},
		{"the cases of a requirement", []string{"[nominal, iced]", "all"}, []string{"changed requirement R2, cases: [nominal, iced] -> all"}},
		{"the grid", []string{"agreement: 0.5 %", "agreement: 0.2 %, max_periods: 9000"}, []string{"changed grid, agreement: 0.5 % -> 0.2 %", "added grid, max_periods:  -> 9000"}},
		{"a part of the file", []string{"grid: {agreement: 0.5 %}\n", ""}, []string{"removed grid: {agreement: 0.5 %} -> "}},
		{
			"a revision",
			[]string{"revision: A,", "revision: B,", "text: First}", "text: First}, {revision: B, date: 2026-02-01, by: AB, text: Longer}"},
			[]string{"changed record, revision: A -> B", "added record, history B:  -> {revision: B, date: 2026-02-01, by: AB, text: Longer}"},
		},
		{
			"several, in the order of the file",
			[]string{"max: 1.5", "max: 1.4", "20 V peak", "21 V peak", "1.2 uH", "1.3 uH"},
			[]string{"changed source, emf: 20 V peak -> 21 V peak", "changed load aerial, l: 1.2 uH -> 1.3 uH", "changed requirement R1, max: 1.5 -> 1.4"},
		},
	} {
		t.Run(tt.name, func(t *testing.T) {
			got := told(Between(design.Terms(loaded(t)), design.Terms(loaded(t, tt.exchange...))))
			if diff := cmp.Diff(tt.want, got); diff != "" {
				t.Errorf("changes (-want +got):\n%s", diff)
			}
		})
	}
}

// What is removed one way is added the other way.
func TestBetweenReversed(t *testing.T) {
	a := loaded(t)
	b := loaded(t, "85 m", "87 m", "  plug: {at: end, impedance: short}\n", "", "grid: {agreement: 0.5 %}\n", "")
	there, back := Between(design.Terms(a), design.Terms(b)), Between(design.Terms(b), design.Terms(a))
	opposite := map[record.ChangeKind]record.ChangeKind{
		record.AddedTerm: record.RemovedTerm, record.RemovedTerm: record.AddedTerm, record.ChangedTerm: record.ChangedTerm,
	}
	if len(there) != 3 || len(back) != len(there) {
		t.Fatalf("%d changes, and %d back", len(there), len(back))
	}
	for i, c := range there {
		d := back[i]
		if d.Kind != opposite[c.Kind] || d.Place != c.Place || d.Term != c.Term || d.Old != c.New || d.New != c.Old {
			t.Errorf("%+v, back %+v", c, d)
		}
	}
}

// Two entries alike have no one name: nothing is called renamed then.
func TestNoOneName(t *testing.T) {
	a := loaded(t, "cases:", "elements:\n  a: {at: mast, c: 1 pF}\n  b: {at: mast, c: 1 pF}\ncases:")
	b := loaded(t, "cases:", "elements:\n  c: {at: mast, c: 1 pF}\ncases:")
	for _, c := range Between(design.Terms(a), design.Terms(b)) {
		if c.Kind == record.RenamedTerm {
			t.Errorf("%+v", c)
		}
	}
}

// A length in degrees follows the frequency, one in metres does not, and in a case
// it is not told again.
func TestFollows(t *testing.T) {
	got := Follows(loaded(t), loaded(t, "10 MHz", "20 MHz"))
	if len(got) != 1 || got[0].Place != "section stub" || got[0].Kind != record.FollowTerm || got[0].Unit != "m" {
		t.Fatalf("%+v", got)
	}
	if c := got[0]; c.OldSI/c.NewSI < 1.999 || c.OldSI/c.NewSI > 2.001 || c.Old != "22.5 deg" {
		t.Errorf("%+v, want half of it at twice the frequency", c)
	}
	if got := Follows(loaded(t), loaded(t)); got != nil {
		t.Errorf("%+v of nothing", got)
	}
}

func TestFiles(t *testing.T) {
	with := func(name, sum string) *design.File {
		return &design.File{Attachments: []design.Attachment{{Name: name, SHA256: sum}}}
	}
	if got := Files(with("a.s1p", "00"), with("a.s1p", "00")); got != nil {
		t.Errorf("%+v of the same file", got)
	}
	if got := Files(with("a.s1p", "00"), with("b.s1p", "11")); got != nil {
		t.Errorf("%+v: another name is a change of the design", got)
	}
	want := []string{"changed file a.s1p, content, by its SHA-256: 0123456789ab -> ffff"}
	if diff := cmp.Diff(want, told(Files(with("a.s1p", "0123456789abcdef"), with("a.s1p", "ffff")))); diff != "" {
		t.Error(diff)
	}
}
