package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"syscall"
	"testing"

	"golang.org/x/sys/unix"
)

// onTerminal runs the program with its output on a terminal of some width and gives what the terminal got.
func onTerminal(t *testing.T, width int, env []string, args ...string) string {
	t.Helper()
	host, err := os.OpenFile("/dev/ptmx", os.O_RDWR|unix.O_NOCTTY, 0)
	if err != nil {
		t.Fatal(err)
	}
	defer host.Close()
	if err := unix.IoctlSetPointerInt(int(host.Fd()), unix.TIOCSPTLCK, 0); err != nil {
		t.Fatal(err)
	}
	number, err := unix.IoctlGetInt(int(host.Fd()), unix.TIOCGPTN)
	if err != nil {
		t.Fatal(err)
	}
	if err := unix.IoctlSetWinsize(int(host.Fd()), unix.TIOCSWINSZ, &unix.Winsize{Row: 24, Col: uint16(width)}); err != nil {
		t.Fatal(err)
	}
	terminal, err := os.OpenFile(fmt.Sprintf("/dev/pts/%d", number), os.O_RDWR|unix.O_NOCTTY, 0)
	if err != nil {
		t.Fatal(err)
	}
	program, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	c := exec.Command(program)
	c.Args = append([]string{"hotfront"}, args...)
	c.Env = append(append(os.Environ(), "TERM=xterm-256color", "NO_COLOR="), env...)
	c.Stdin, c.Stdout, c.Stderr = terminal, terminal, terminal
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	if err := terminal.Close(); err != nil {
		t.Fatal(err)
	}
	var text bytes.Buffer
	if _, err := io.Copy(&text, host); err != nil && !errors.Is(err, syscall.EIO) { // EIO: the other end is closed
		t.Fatal(err)
	}
	if err := c.Wait(); err != nil {
		t.Fatalf("%v: %v\n%s", args, err, text.String())
	}
	return strings.ReplaceAll(text.String(), "\r\n", "\n")
}

// TestNoColor: NO_COLOR takes every colour from a terminal.
func TestNoColor(t *testing.T) {
	colour := regexp.MustCompile("\x1b\\[[0-9;]*m")
	args := []string{"search", sawmill, "--evaluations", "60", "--run"}
	dir := t.TempDir()
	if text := onTerminal(t, 100, nil, append(args, filepath.Join(dir, "a"))...); !colour.MatchString(text) {
		t.Errorf("no colour at all on a terminal, the test shows nothing: %q", text)
	}
	if text := onTerminal(t, 100, []string{"NO_COLOR=1"}, append(args, filepath.Join(dir, "b"))...); colour.MatchString(text) {
		t.Errorf("colour in spite of NO_COLOR: %q", text)
	}
}

// TestTablesKeepToTheTerminal: no line of a table is wider than the terminal. (A terminal breaks the
// sentences around the tables itself.)
func TestTablesKeepToTheTerminal(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "run")
	must(t, "search", sawmill, "--run", dir, "--evaluations", "150")
	for _, c := range []struct {
		width int
		args  []string
	}{
		{60, []string{"front", dir}}, {80, []string{"front", dir}}, {131, []string{"front", dir}},
		{80, []string{"evaluate", sawmill}}, {131, []string{"evaluate", sawmill}}, {80, []string{"check", sawmill}},
		{80, []string{"fields"}}, {131, []string{"fields"}}, {80, []string{"survey", sawmill, "--designs", "20"}},
	} {
		ruled := false
		for line := range strings.Lines(onTerminal(t, c.width, nil, c.args...)) {
			line = strings.TrimSuffix(line, "\n")
			rule := line != "" && strings.Trim(line, "-") == ""
			ruled = ruled || rule
			if n := len([]rune(line)); n > c.width && (rule || strings.Contains(line, "  ")) {
				t.Errorf("%s on %d columns: a line of %d: %s", c.args[0], c.width, n, line)
			}
		}
		if !ruled {
			t.Errorf("%s on %d columns: no line below the heads", c.args[0], c.width)
		}
	}
}
