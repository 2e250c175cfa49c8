//go:build unix

package main

import (
	"bytes"
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
	"time"

	"hotfront/optimize/archive"
)

// startSearch starts a search that has far more to do than a test waits for, as a process of its own, and
// waits until it has stored designs.
func startSearch(t *testing.T) (c *exec.Cmd, dir string, stderr *bytes.Buffer) {
	t.Helper()
	program, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	dir = filepath.Join(t.TempDir(), "run")
	stderr = new(bytes.Buffer)
	c = exec.Command(program)
	c.Args = []string{"hotfront", "search", "../../studies/examples/kiln-waste-heat.yaml", "--run", dir, "--evaluations", "10000000", "--workers", "1"}
	c.Stderr = stderr
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		if c.ProcessState == nil {
			_ = c.Process.Kill() // the test has failed
			_ = c.Wait()
		}
	})
	for end := time.Now().Add(20 * time.Second); time.Now().Before(end); time.Sleep(20 * time.Millisecond) {
		if stored(t, dir) > 0 {
			return c, dir, stderr
		}
	}
	t.Fatalf("no design after 20 s: %s", stderr)
	return nil, "", nil
}

// stored is the number of designs in a run folder, 0 while there is none.
func stored(t *testing.T, dir string) int {
	t.Helper()
	run, err := archive.Read(dir)
	if errors.Is(err, archive.ErrNoRun) {
		return 0
	} else if err != nil {
		t.Fatal(err)
	}
	n, err := run.Len()
	if err := errors.Join(err, run.Close()); err != nil {
		t.Fatal(err)
	}
	return n
}

// TestFirstSignalStopsWithCheckpoint: each of the signals ends a search with exit code 75, says how to go
// on, and leaves a folder that can be taken up.
func TestFirstSignalStopsWithCheckpoint(t *testing.T) {
	for _, s := range []syscall.Signal{syscall.SIGINT, syscall.SIGTERM, syscall.SIGUSR1} {
		c, dir, stderr := startSearch(t)
		if err := c.Process.Signal(s); err != nil {
			t.Fatal(err)
		}
		_ = c.Wait() // the exit code is looked at below
		if code := c.ProcessState.ExitCode(); code != exitStopped {
			t.Errorf("%v: exit code %d, want %d: %s", s, code, exitStopped, stderr)
		}
		if !strings.Contains(stderr.String(), "the same command goes on") {
			t.Errorf("%v: no word on how to go on: %s", s, stderr)
		}
		if stored(t, dir) == 0 {
			t.Errorf("%v: nothing stored", s)
		}
	}
}

// TestSecondSignalStopsAtOnce: two signals that are there together end the search with exit code 130.
// While the process is held, both wait for it.
func TestSecondSignalStopsAtOnce(t *testing.T) {
	c, dir, stderr := startSearch(t)
	for _, s := range []syscall.Signal{syscall.SIGSTOP, syscall.SIGINT, syscall.SIGTERM, syscall.SIGCONT} {
		if err := c.Process.Signal(s); err != nil {
			t.Fatal(err)
		}
	}
	_ = c.Wait() // the exit code is looked at below
	if code := c.ProcessState.ExitCode(); code != exitInterrupted {
		t.Errorf("exit code %d, want %d: %s", code, exitInterrupted, stderr)
	}
	if stored(t, dir) == 0 {
		t.Error("nothing stored")
	}
}

// TestSecondSearchIsRefused: a folder takes one search at a time.
func TestSecondSearchIsRefused(t *testing.T) {
	c, dir, _ := startSearch(t)
	var out, errw bytes.Buffer
	code := execute([]string{"search", "../../studies/examples/kiln-waste-heat.yaml", "--run", dir}, nil, &out, &errw)
	if code != exitFailure || !strings.Contains(errw.String(), "another search is writing to") {
		t.Errorf("second search: exit code %d: %s", code, errw.String())
	}
	if err := c.Process.Kill(); err != nil {
		t.Fatal(err)
	}
	_ = c.Wait() // killed
	code = execute([]string{"search", "../../studies/examples/kiln-waste-heat.yaml", "--run", dir, "--evaluations", "60"}, nil, &out, &errw)
	if code != exitDone {
		t.Errorf("after the first was killed: exit code %d: %s", code, errw.String())
	}
}
