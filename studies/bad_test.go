package studies

import (
	"bytes"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"
)

const badFolder = "../testdata/bad"

func readBad(code Code) ([]byte, error) {
	return os.ReadFile(filepath.Join(badFolder, string(code)+".yaml"))
}

// setsOf reads the lines "# --set path=value" at the head of a bad study.
func setsOf(data []byte) []string {
	var sets []string
	for line := range strings.Lines(string(data)) {
		set, ok := strings.CutPrefix(strings.TrimSpace(line), "# --set ")
		if !ok {
			break
		}
		sets = append(sets, set)
	}
	return sets
}

// TestBadFiles reads testdata/bad/<code>.yaml for every code and finds exactly that code.
func TestBadFiles(t *testing.T) {
	for _, code := range Codes() {
		if code == FileTooBig {
			continue // made in TestHugeFiles: a megabyte of nothing has no place in the tree
		}
		data, err := readBad(code)
		if err != nil {
			t.Error(err)
			continue
		}
		s, issues := Load(string(code)+".yaml", data, setsOf(data)...)
		if len(issues) != 1 || issues[0].Code != code {
			t.Errorf("%s: found\n%v", code, issues)
			continue
		}
		if (s != nil) != code.Warning() {
			t.Errorf("%s: study %v, warning %v", code, s != nil, code.Warning())
		}
		i := issues[0]
		hasPlace := i.Line > 0 && i.Column > 0 || strings.HasPrefix(i.File, "--set ")
		if !hasPlace && code != FileEmpty && code != FileNotText && code != FileTooDeep {
			t.Errorf("%s: no place in %v", code, i)
		}
		if i.Text == "" {
			t.Errorf("%s: no text", code)
		}
	}
}

// TestNoOrphanBadFiles fails on a file that stands for no code.
func TestNoOrphanBadFiles(t *testing.T) {
	files, err := filepath.Glob(filepath.Join(badFolder, "*"))
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range files {
		name := strings.TrimSuffix(filepath.Base(f), ".yaml")
		if name != "several" && !slices.Contains(Codes(), Code(name)) {
			t.Errorf("%s stands for no code", f)
		}
	}
}

func TestSeveralMistakesAtOnce(t *testing.T) {
	data, err := os.ReadFile(filepath.Join(badFolder, "several.yaml"))
	if err != nil {
		t.Fatal(err)
	}
	_, issues := Load("several.yaml", data)
	want := []string{
		"several.yaml:2:1: engine.speed: missing; revolutions",
		"several.yaml:4:8: engine.gas: \"helum\" is not one of its values; did you mean helium?",
		"several.yaml:5:20: engine.charge_pressure: \"mm\" is a unit of length, a pressure is wanted; write it in Pa, kPa, bar or MPa",
		"several.yaml:12:83: engine.regenerator.porosity: 1.2 is outside the physical range 0.25 to 0.98",
		"several.yaml:17:29: free.heater.tube_count: from 80 is not below to 20; the smaller one comes first",
		"several.yaml:20:27: aims.brake_eficiency: no result is called \"brake_eficiency\"; did you mean brake_efficiency?",
	}
	if got := issues.Error(); got != strings.Join(want, "\n") {
		t.Errorf("got\n%s\nwant\n%s", got, strings.Join(want, "\n"))
	}
}

// TestHugeFiles: files that would take long or overflow a stack are refused at once.
func TestHugeFiles(t *testing.T) {
	const soon = 2 * time.Second // 10 MB are refused by size alone; 1 MB is scanned once
	cases := []struct {
		name string
		data []byte
		code Code
	}{
		{"10 MB of brackets", bytes.Repeat([]byte("["), 10<<20), FileTooBig},
		{"one byte too many", append(refuge(t), bytes.Repeat([]byte("#"), maxBytes)...), FileTooBig},
		{"1 MB of brackets", bytes.Repeat([]byte("["), maxBytes), FileTooDeep},
		{"1 MB of braces", bytes.Repeat([]byte("{a: "), maxBytes/4), FileTooDeep},
		{"1 MB of list marks", bytes.Repeat([]byte("- "), maxBytes/2), FileTooDeep},
		{"1 MB of key marks", bytes.Repeat([]byte("? "), maxBytes/2), FileTooDeep},
		{"30 blocks", nested(30), FileTooDeep},
		{"500 blocks", nested(500), FileTooDeep},
		{"brackets in a formula", []byte("limits: {a: {expr: '" + strings.Repeat("(", 200000) + "', max: 1}}"), ExprSyntax},
	}
	for _, c := range cases {
		begin := time.Now()
		_, issues := Load(c.name, c.data)
		if took := time.Since(begin); took > soon {
			t.Errorf("%s: %v", c.name, took)
		}
		if !slices.ContainsFunc(issues, func(i Issue) bool { return i.Code == c.code }) {
			t.Errorf("%s: %s not found in %v", c.name, c.code, issues)
		}
	}
}

// nested is a study of n blocks, each in the one before.
func nested(n int) []byte {
	var b bytes.Buffer
	for i := range n {
		b.WriteString(strings.Repeat(" ", i) + "a:\n")
	}
	return b.Bytes()
}
