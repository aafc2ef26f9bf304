package main

import (
	"fmt"
	"io"
	"os"
	"strings"
	"testing"

	"golang.org/x/sys/unix"
)

// openTerminal returns the two ends of a pseudo-terminal.
func openTerminal(t *testing.T) (screen, terminal *os.File) {
	t.Helper()
	screen, err := os.OpenFile("/dev/ptmx", os.O_RDWR, 0)
	if err != nil {
		t.Skip("no pseudo-terminals here: ", err)
	}
	t.Cleanup(func() { screen.Close() })
	fd := int(screen.Fd())
	if err := unix.IoctlSetPointerInt(fd, unix.TIOCSPTLCK, 0); err != nil {
		t.Fatal(err)
	}
	n, err := unix.IoctlGetInt(fd, unix.TIOCGPTN)
	if err != nil {
		t.Fatal(err)
	}
	terminal, err = os.OpenFile(fmt.Sprintf("/dev/pts/%d", n), os.O_RDWR|unix.O_NOCTTY, 0)
	if err != nil {
		t.Skip("no pseudo-terminals here: ", err)
	}
	if err := unix.IoctlSetWinsize(int(terminal.Fd()), unix.TIOCSWINSZ, &unix.Winsize{Row: 24, Col: 80}); err != nil {
		t.Fatal(err)
	}
	return screen, terminal
}

// The bar is on a terminal and says how much is done and what time is left.
func TestBarOnTerminal(t *testing.T) {
	t.Setenv("TERM", "xterm")
	screen, terminal := openTerminal(t)
	b := startBar(terminal, "feeder")
	if b == nil {
		t.Fatal("no bar on a terminal")
	}
	b.progress()(0.5)
	var seen strings.Builder
	chunk := make([]byte, 4096)
	for !strings.Contains(seen.String(), "left") { // the bar's own pace; a bar without it ends by the test's limit
		n, err := screen.Read(chunk)
		if err != nil {
			t.Fatalf("%v after %q", err, seen.String())
		}
		seen.Write(chunk[:n])
	}
	b.stop()
	b.stop() // a deferred second stop does no harm
	terminal.Close()
	rest, _ := io.ReadAll(screen) // ends in EIO on Linux when the other end is closed
	seen.Write(rest)
	if text := seen.String(); !strings.Contains(text, "feeder") || !strings.Contains(text, "%") {
		t.Errorf("the bar shows %q", text)
	}
}

func TestColourful(t *testing.T) {
	_, terminal := openTerminal(t)
	defer terminal.Close()
	file, err := os.Create(t.TempDir() + "/file")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	for _, tt := range []struct {
		name            string
		w               io.Writer
		term, noColor   string
		watched, colour bool
	}{
		{"terminal", terminal, "xterm", "", true, true},
		{"NO_COLOR", terminal, "xterm", "1", true, false},
		{"dumb", terminal, "dumb", "", false, false},
		{"file", file, "xterm", "", false, false},
		{"buffer", new(strings.Builder), "xterm", "", false, false},
	} {
		t.Setenv("TERM", tt.term)
		t.Setenv("NO_COLOR", tt.noColor)
		if w, c := isTerminal(tt.w), colourful(tt.w); w != tt.watched || c != tt.colour {
			t.Errorf("%s: terminal %t, colour %t; want %t, %t", tt.name, w, c, tt.watched, tt.colour)
		}
		if !tt.watched && startBar(tt.w, "x") != nil {
			t.Errorf("%s: a bar where nobody watches", tt.name)
		}
	}
}
