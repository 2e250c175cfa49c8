package main

import (
	"bytes"
	"errors"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"testing"
	"time"
)

// TestKilledSearchGoesOn: the front of a search that was killed (kill -9) three times is that of an
// undisturbed one, byte for byte, and so is that of one and of two workers, on every shipped study.
func TestKilledSearchGoesOn(t *testing.T) {
	program := filepath.Join(t.TempDir(), "hotfront")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		t.Fatalf("build: %v\n%s", err, out)
	}
	files, err := filepath.Glob("../../studies/examples/*.yaml")
	if err != nil || len(files) < 3 {
		t.Fatalf("shipped studies: %v %v", files, err)
	}
	random := rand.New(rand.NewPCG(1, 1))
	for _, file := range files {
		t.Run(filepath.Base(file), func(t *testing.T) {
			dir := t.TempDir()
			search := func(run, workers string) *exec.Cmd {
				return exec.Command(program, "search", file, "--run", filepath.Join(dir, run), "--evaluations", "700", "--workers", workers)
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
				c := search("killed", "2")
				if err := c.Start(); err != nil {
					t.Fatal(err)
				}
				time.Sleep(time.Duration(150+random.IntN(200)) * time.Millisecond)
				if err := c.Process.Kill(); err == nil {
					killed++
				} else if !errors.Is(err, os.ErrProcessDone) {
					t.Fatal(err)
				}
				_ = c.Wait() // its error says that it was killed
			}
			if out, err := search("killed", "2").CombinedOutput(); err != nil {
				t.Fatalf("last: %v\n%s", err, out)
			}
			if killed == 0 {
				t.Error("no search was killed: the test shows nothing")
			}
			want := front("with1")
			if len(bytes.Split(want, []byte("\n"))) < 3 {
				t.Fatalf("front of one line:\n%s", want)
			}
			for _, run := range []string{"with2", "killed"} {
				if !bytes.Equal(front(run), want) {
					t.Errorf("the front of %q is not that of one worker undisturbed", run)
				}
			}
		})
	}
}
