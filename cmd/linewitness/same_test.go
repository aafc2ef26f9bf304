package main

import (
	"bytes"
	"crypto/sha256"
	"os"
	"os/exec"
	"path/filepath"
	"testing"
)

// twoCases is a small design with what could come out in another order: cases
// side by side, several sections and waveforms of each.
const twoCases = `format: 1
record: {title: Short feeder, number: T-1, revision: A}
source: {at: tx, frequency: 10 MHz, emf: 20 V peak, impedance: 50 ohm, start: {profile: abrupt, phase: worst}}
lines:
  coax: {z0: 50 ohm, velocity_factor: 0.66}
sections:
  main: {from: tx, to: mast, length: 0.25 wavelengths, line: coax}
  stub: {from: mast, to: end, length: 0.1 wavelengths, line: coax}
loads:
  aerial: {at: mast, r: 40 ohm}
cases:
  iced: {loads: {aerial: {r: 20 ohm}}}
requirements:
  - {id: R1, quantity: vswr, section: main, end: from, max: 3, cases: all}
`

// Two runs give the same files, whatever the processors, the memory and the time
// zone are: eight processes, each under other conditions.
func TestSameBytesFromEveryProcess(t *testing.T) {
	dir := t.TempDir()
	design := filepath.Join(dir, "feeder.yaml")
	if err := os.WriteFile(design, []byte(twoCases), 0o666); err != nil {
		t.Fatal(err)
	}
	want := map[string][sha256.Size]byte{}
	for i, env := range [][]string{
		{"GOMAXPROCS=1", "GOGC=100", "TZ=UTC"},
		{"GOMAXPROCS=2", "GOGC=20", "TZ=Asia/Kolkata"},
		{"GOMAXPROCS=3", "GOGC=50", "TZ=America/New_York"},
		{"GOMAXPROCS=4", "GOGC=200", "TZ=Pacific/Kiritimati"},
		{"GOMAXPROCS=5", "GOGC=400", "TZ=Pacific/Pago_Pago"},
		{"GOMAXPROCS=6", "GOGC=off", "TZ=Europe/Berlin"},
		{"GOMAXPROCS=7", "GOGC=30", "TZ=UTC"},
		{"GOMAXPROCS=8", "GOGC=1000", "TZ=Australia/Lord_Howe"},
	} {
		out := filepath.Join(dir, env[0])
		run := exec.Command("linewitness", "verify", "-o", out, design)
		run.Env = append(append(os.Environ(), epochVariable+"=1767225599"), env...) // a second before 2026
		if text, err := run.CombinedOutput(); err != nil {
			t.Fatalf("%v: %v\n%s", env, err, text)
		}
		for _, name := range []string{"feeder.pdf", "feeder.json"} {
			content, err := os.ReadFile(filepath.Join(out, name))
			if err != nil {
				t.Fatal(err)
			}
			sum := sha256.Sum256(content)
			if i == 0 {
				want[name] = sum
			}
			if sum != want[name] {
				t.Errorf("%v: %s is another one", env, name)
			}
			if i == 0 && name == "feeder.pdf" && !bytes.Contains(content, []byte("/CreationDate (D:20251231000000+00'00')")) {
				t.Errorf("%s is not of the last day of 2025", name)
			}
		}
	}
}
