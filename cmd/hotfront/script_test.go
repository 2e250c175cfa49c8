package main

import (
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"hotfront": main})
}

// TestScripts runs the sessions of testdata/script. In them $STUDIES is the folder of the shipped studies, and
// `exits CODE COMMAND...` runs a command that must end with this exit code.
func TestScripts(t *testing.T) {
	examples, err := filepath.Abs("../../studies/examples")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: "../../testdata/script",
		Setup: func(e *testscript.Env) error {
			e.Setenv("STUDIES", examples)
			return nil
		},
		Cmds: map[string]func(ts *testscript.TestScript, neg bool, args []string){
			"exits":      exits,
			"jsonkeys":   jsonKeys,
			"samedesign": sameDesign,
		},
		RequireUniqueNames: true,
	})
}
