package main

import (
	"bytes"
	"errors"
	"math/rand/v2"
	"os/exec"
	"path/filepath"
	"reflect"
	"testing"
	"time"

	"hotfront/optimize/archive"
)

// TestHundredKills kills one search at a hundred random moments (ten with -short), with one, two or seven workers in turn. No design
// that was recorded is lost or changed by any kill, and the search that goes on at last ends with the front of an undisturbed one,
// byte for byte.
func TestHundredKills(t *testing.T) {
	kills := 100
	if testing.Short() {
		kills = 10
	}
	program := built(t)
	dir := t.TempDir()
	const file = "../../studies/examples/sawmill-heat-and-power.yaml"
	search := func(run, workers string) *exec.Cmd {
		return exec.Command(program, "search", file, "--run", filepath.Join(dir, run), "--evaluations", "6000", "--workers", workers, "--top", "0", "--format", "csv")
	}
	want, err := search("undisturbed", "2").Output()
	if err != nil {
		t.Fatal(err)
	}
	random := rand.New(rand.NewPCG(3, 1))
	killed, unfinished, recorded := 0, 0, 0
	for i := range kills {
		if kill(t, search("killed", []string{"1", "2", "7"}[i%3]), time.Duration(20+random.IntN(200))*time.Millisecond) {
			killed++
		}
		run, err := archive.Read(filepath.Join(dir, "killed"))
		if errors.Is(err, archive.ErrNoRun) && recorded == 0 {
			continue // killed before there was a run
		}
		if err != nil {
			t.Fatalf("after kill %d: %v", i+1, err)
		}
		n, err := run.Len()
		if err := errors.Join(err, run.Close()); err != nil {
			t.Fatal(err)
		}
		if n < recorded {
			t.Fatalf("after kill %d there are %d designs, %d before", i+1, n, recorded)
		}
		if recorded = n; n < 6000 {
			unfinished++
		}
	}
	got, err := search("killed", "2").Output()
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("%d kills, %d of them of a search that was not at its end; %d designs recorded then", killed, unfinished, recorded)
	if unfinished < kills/2 {
		t.Errorf("only %d of %d kills met a search at work", unfinished, kills)
	}
	if !bytes.Equal(got, want) {
		t.Error("the front is not that of an undisturbed search")
	}
	if !reflect.DeepEqual(recalled(t, filepath.Join(dir, "killed")), recalled(t, filepath.Join(dir, "undisturbed"))) {
		t.Error("the archive does not hold the designs of an undisturbed search")
	}
}
