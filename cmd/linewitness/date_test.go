package main

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// The date is that of the environment, else that of the file, in UTC; standard
// input and what is no file have none.
func TestDateOf(t *testing.T) {
	dir := t.TempDir()
	design := filepath.Join(dir, "feeder.yaml")
	if err := os.WriteFile(design, nil, 0o666); err != nil {
		t.Fatal(err)
	}
	changed := time.Date(2025, time.March, 1, 1, 30, 0, 0, time.FixedZone("", 2*60*60)) // still February in UTC
	if err := os.Chtimes(design, changed, changed); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ epoch, path, date, from string }{
		{"", design, "2025-02-28", "file"},
		{"", standardInput, "", ""},
		{"", dir, "", ""},
		{"0", design, "1970-01-01", "environment"},
		{"1767225600", standardInput, "2026-01-01", "environment"},
		{"253402300799", design, "9999-12-31", "environment"},
	} {
		t.Setenv(epochVariable, c.epoch)
		date, from, err := dateOf(c.path)
		if err != nil || date != c.date || from != c.from {
			t.Errorf("%q, %q: %q from %q, error %v; want %q from %q", c.epoch, c.path, date, from, err, c.date, c.from)
		}
	}
}

func TestDateOfRefuses(t *testing.T) {
	for _, epoch := range []string{"yesterday", "-1", "1.5", "253402300800", "99999999999999999999"} {
		t.Setenv(epochVariable, epoch)
		_, _, err := dateOf(standardInput)
		var f *failure
		if !errors.As(err, &f) || f.status != statusUsage || !strings.Contains(f.message, epoch) {
			t.Errorf("%q: error %v", epoch, err)
		}
	}
	t.Setenv(epochVariable, "")
	var f *failure
	if _, _, err := dateOf(filepath.Join(t.TempDir(), "none")); !errors.As(err, &f) || f.status != statusFile {
		t.Errorf("error %v", err)
	}
}
