package main

import (
	"bytes"
	"errors"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
	"time"

	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/studies"
)

// TestKilledSearchGoesOn: the front of a search that was killed (kill -9) three times is that of an
// undisturbed one, byte for byte, and so is that of one and of two workers, on every shipped study and on one
// with a single aim over numbers, which goes to the other driver.
func TestKilledSearchGoesOn(t *testing.T) {
	program := built(t)
	files, err := filepath.Glob("../../studies/examples/*.yaml")
	if err != nil || len(files) < 3 {
		t.Fatalf("shipped studies: %v %v", files, err)
	}
	files = append(files, oneAim(t, files[len(files)-1]))
	random := rand.New(rand.NewPCG(1, 1))
	for _, file := range files {
		t.Run(filepath.Base(file), func(t *testing.T) {
			dir := t.TempDir()
			search := func(run, workers string) *exec.Cmd {
				return exec.Command(program, "search", file, "--run", filepath.Join(dir, run), "--evaluations", "500", "--workers", workers)
			}
			front := func(run string) []byte {
				out, err := exec.Command(program, "front", filepath.Join(dir, run), "--top", "0", "--format", "csv").Output()
				if err != nil {
					t.Fatalf("front of %s: %v", run, err)
				}
				return out
			}
			for _, workers := range []string{"1", "2"} {
				if out, err := search("with"+workers, workers).CombinedOutput(); err != nil {
					t.Fatalf("%s workers: %v\n%s", workers, err, out)
				}
			}
			killed := 0
			for range 3 {
				if kill(t, search("killed", "2"), time.Duration(100+random.IntN(150))*time.Millisecond) {
					killed++
				}
			}
			if out, err := search("killed", "2").CombinedOutput(); err != nil {
				t.Fatalf("last: %v\n%s", err, out)
			}
			if killed == 0 {
				t.Error("no search was killed: the test shows nothing")
			}
			want := front("with1")
			if len(bytes.Split(want, []byte("\n"))) < 3 { // the head, a design, and nothing behind the last line end
				t.Fatalf("front without a design:\n%s", want)
			}
			for _, run := range []string{"with2", "killed"} {
				if !bytes.Equal(front(run), want) {
					t.Errorf("the front of %q is not that of one worker undisturbed", run)
				}
				if !reflect.DeepEqual(recalled(t, filepath.Join(dir, run)), recalled(t, filepath.Join(dir, "with1"))) {
					t.Errorf("the archive of %q does not hold the designs of one worker undisturbed", run)
				}
			}
		})
	}
}

// built makes the program.
func built(t *testing.T) string {
	t.Helper()
	program := filepath.Join(t.TempDir(), "hotfront")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		t.Fatalf("build: %v\n%s", err, out)
	}
	return program
}

// kill starts a command and kills it after a while, and reports whether it was still there.
func kill(t *testing.T, c *exec.Cmd, after time.Duration) bool {
	t.Helper()
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	time.Sleep(after)
	err := c.Process.Kill()
	if err != nil && !errors.Is(err, os.ErrProcessDone) {
		t.Fatal(err)
	}
	_ = c.Wait() // its error says that it was killed
	return err == nil
}

// recalled gives all designs of a run.
func recalled(t *testing.T, dir string) []optimize.Point {
	t.Helper()
	run, err := archive.Read(dir)
	if err != nil {
		t.Fatal(err)
	}
	n, err := run.Len()
	if err != nil {
		t.Fatal(err)
	}
	points := make([]optimize.Point, n)
	if _, err := run.Recall(0, points); err != nil {
		t.Fatal(err)
	}
	if err := run.Close(); err != nil {
		t.Fatal(err)
	}
	return points
}

// oneAim writes a study with one aim and without choices, made from another, and gives its name.
func oneAim(t *testing.T, from string) string {
	t.Helper()
	text, err := os.ReadFile(from)
	if err != nil {
		t.Fatal(err)
	}
	var kept strings.Builder
	for line := range strings.Lines(string(text)) {
		switch {
		case strings.Contains(line, "{of:"):
		case strings.HasPrefix(line, "aims:"):
			kept.WriteString("aims: {brake_efficiency: most}\n")
		default:
			kept.WriteString(line)
		}
	}
	file := filepath.Join(t.TempDir(), "one-aim.yaml")
	if err := os.WriteFile(file, []byte(kept.String()), 0o666); err != nil {
		t.Fatal(err)
	}
	s, issues := studies.Load(file, []byte(kept.String()))
	if s == nil {
		t.Fatal(issues)
	}
	p, err := studies.NewProblem(s)
	if err != nil {
		t.Fatal(err)
	}
	if driver, err := chooseDriver("", p); err != nil || driver != optimize.Simplex {
		t.Fatalf("driver %v, %v", driver, err)
	}
	return file
}
