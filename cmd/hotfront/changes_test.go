package main

import (
	"slices"
	"testing"

	"hotfront/studies"
)

func TestChanges(t *testing.T) {
	examples, err := studies.Examples()
	if err != nil {
		t.Fatal(err)
	}
	encoded := func(sets ...string) string {
		s, issues := studies.Load("example", examples[0].Data, sets...)
		if s == nil {
			t.Fatal(issues)
		}
		return string(s.Encode())
	}
	same := []string{"  the order of free variables, limits or aims"}
	if got := changes(encoded(), encoded()); !slices.Equal(got, same) {
		t.Errorf("no change: %q", got)
	}
	got := changes(encoded(), encoded("heater.end_loss=2", "corrections.cycle_work=0.7"))
	if !slices.Contains(got, "  engine.heater.end_loss: 1.5 there, 2 asked for") || len(got) < 2 {
		t.Errorf("changes: %q", got)
	}
	before := "study: a\nengine:\n  speed: 10 Hz\n  gas: air\nseed: 1\n"
	after := "study: b\nengine:\n  speed: 12 Hz\n  heater:\n    alloy: N06625\nseed: 2\n"
	want := []string{
		"  engine.gas: air there, not in this study",
		"  engine.heater.alloy: not there, N06625 asked for",
		"  engine.speed: 10 Hz there, 12 Hz asked for",
	}
	if got := changes(before, after); !slices.Equal(got, want) {
		t.Errorf("changes %q, want %q", got, want)
	}
}
