package studies

import (
	"os"
	"testing"
)

func mustLoad(t testing.TB, data []byte, sets ...string) *Study {
	t.Helper()
	s, issues := Load("test.yaml", data, sets...)
	if s == nil {
		t.Fatalf("study not valid:\n%v", issues)
	}
	return s
}

func refuge(t testing.TB) []byte {
	t.Helper()
	data, err := os.ReadFile("../testdata/studies/refuge-heat-and-power.yaml")
	if err != nil {
		t.Fatal(err)
	}
	return data
}

func TestExamplesAreValid(t *testing.T) {
	examples, err := Examples()
	if err != nil || len(examples) == 0 {
		t.Fatalf("%d examples, error %v", len(examples), err)
	}
	for _, e := range examples {
		s, issues := Load(e.Name+".yaml", e.Data)
		if s == nil || len(issues) > 0 {
			t.Errorf("%s: %v", e.Name, issues)
		} else if s.Name != e.Name {
			t.Errorf("%s: study is called %q", e.Name, s.Name)
		}
	}
}
