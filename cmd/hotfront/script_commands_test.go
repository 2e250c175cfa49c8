package main

import (
	"bytes"
	"encoding/json"
	"os"
	"reflect"
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

// sameDesign asks that `evaluate` gives, for every design of a front, what the archive holds, bit for bit:
// samedesign FRONT.json DIR.
func sameDesign(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: samedesign FRONT.json DIR")
	}
	data, err := os.ReadFile(ts.MkAbs(args[0]))
	ts.Check(err)
	type design struct {
		ID          string
		Design      map[string]any
		Performance map[string]float64
		Losses      map[string]float64
		Limits      []map[string]any
	}
	var front struct{ Designs []design }
	ts.Check(json.Unmarshal(data, &front))
	if len(front.Designs) == 0 {
		ts.Fatalf("%s has no designs", args[0])
	}
	for _, want := range front.Designs {
		var out, errw bytes.Buffer
		if code := execute([]string{"evaluate", ts.MkAbs(args[1]), "--design", want.ID, "--format", "json"}, nil, &out, &errw); code != 0 {
			ts.Fatalf("evaluate %s: exit code %d: %s", want.ID, code, errw.String())
		}
		var got design
		ts.Check(json.Unmarshal(out.Bytes(), &got))
		got.ID = want.ID
		if !reflect.DeepEqual(got, want) {
			ts.Fatalf("%s evaluated anew is not what the archive holds:\n%v\n%v", want.ID, got, want)
		}
	}
}
