package main

import (
	"encoding/json"
	"os"
	"strconv"

	"github.com/rogpeppe/go-internal/testscript"
)

// exits runs a command and asks for its exit code: exits CODE COMMAND...
func exits(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: exits CODE COMMAND...")
	}
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	err = ts.Exec(args[1], args[2:]...)
	got := 0
	if e, ok := err.(interface{ ExitCode() int }); ok {
		got = e.ExitCode()
	} else if err != nil {
		ts.Fatalf("%v", err)
	}
	if got != want {
		ts.Fatalf("exit code %d, want %d", got, want)
	}
}

// jsonKeys asks that a file holds one JSON object with these keys: jsonkeys FILE KEY...
func jsonKeys(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: jsonkeys FILE KEY...")
	}
	data, err := os.ReadFile(ts.MkAbs(args[0]))
	ts.Check(err)
	var object map[string]any
	ts.Check(json.Unmarshal(data, &object))
	for _, key := range args[1:] {
		if _, ok := object[key]; !ok {
			ts.Fatalf("%s has no key %q", args[0], key)
		}
	}
}
