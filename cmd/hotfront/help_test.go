package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// commands lists the root and every command below it that help shows.
func commands() []*cobra.Command {
	root := (&program{}).root()
	list := []*cobra.Command{root}
	for _, c := range root.Commands() {
		if c.IsAvailableCommand() {
			list = append(list, c)
		}
	}
	return list
}

// command runs a command line of an example, as a shell splits it, on a budget that a test can wait for.
func command(t *testing.T, line string) (code int, out, errw string) {
	t.Helper()
	line, _, _ = strings.Cut(line, ">")  // where a shell would write to a file
	line, _, _ = strings.Cut(line, "  ") // what the example does
	args := strings.Fields(line)
	if len(args) < 2 || args[0] != "hotfront" {
		t.Fatalf("%q is no command line", line)
	}
	switch args[1] {
	case "search":
		args = append(args, "--evaluations", "60")
	case "survey":
		args = append(args, "--designs", "20")
	}
	var o, e bytes.Buffer
	code = execute(args[1:], strings.NewReader(""), &o, &e)
	return code, o.String(), e.String()
}

// TestHelpExamplesRun: every example line of every command's help runs, in a folder with what it speaks of.
func TestHelpExamplesRun(t *testing.T) {
	shipped, err := filepath.Abs("../../studies/examples")
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	t.Chdir(dir)
	if err := os.CopyFS(filepath.Join("studies", "examples"), os.DirFS(shipped)); err != nil {
		t.Fatal(err)
	}
	tests := "speed,quantity,value\n800 rpm,brake_power,3.5 kW\n1000 rpm,brake_power,4.1 kW\n1200 rpm,brake_power,4.5 kW\n"
	if err := os.WriteFile("bench.csv", []byte(tests), 0o666); err != nil {
		t.Fatal(err)
	}
	run := []string{"search", "studies/examples/sawmill-heat-and-power.yaml", "--run", "runs/sawmill", "--evaluations", "150"}
	for _, args := range [][]string{{"new", "my-engine"}, run} {
		var out, errw bytes.Buffer
		if code := execute(args, nil, &out, &errw); code != exitDone {
			t.Fatalf("%v: exit code %d: %s", args, code, errw.String())
		}
	}
	for _, c := range commands() {
		lines := strings.Split(strings.TrimRight(c.Example, "\n"), "\n")
		if strings.TrimSpace(c.Example) == "" {
			t.Errorf("%s has no example", c.Name())
			continue
		}
		for _, line := range lines {
			line = strings.TrimSpace(line)
			if name, ok := strings.CutPrefix(line, "hotfront new "); ok { // it writes over nothing
				name, _, _ = strings.Cut(name, " ")
				if err := os.RemoveAll(name + ".yaml"); err != nil {
					t.Fatal(err)
				}
			}
			if code, out, errw := command(t, line); code != exitDone || out == "" {
				t.Errorf("%s: exit code %d, %d bytes of output: %s", line, code, len(out), errw)
			}
		}
	}
}

// TestHelpIsWhole: each command says what it does in one line, each flag what it is for, and the help of
// each ends with exit code 0.
func TestHelpIsWhole(t *testing.T) {
	for _, c := range commands() {
		if c.Short == "" || strings.HasSuffix(c.Short, ".") {
			t.Errorf("%s: short help %q", c.Name(), c.Short)
		}
		c.Flags().VisitAll(func(f *pflag.Flag) {
			if f.Usage == "" {
				t.Errorf("%s --%s has no help", c.Name(), f.Name)
			}
		})
		args := []string{"--help"}
		if c.HasParent() {
			args = []string{c.Name(), "--help"}
		}
		var out, errw bytes.Buffer
		if code := execute(args, nil, &out, &errw); code != exitDone || errw.Len() > 0 || !strings.Contains(out.String(), "hotfront") {
			t.Errorf("%v: exit code %d: %s", args, code, errw.String())
		}
		for line := range strings.Lines(out.String()) {
			if n := len([]rune(strings.TrimRight(line, "\n"))); n > 140 {
				t.Errorf("%v: a line of %d letters: %s", args, n, line)
			}
		}
	}
}
