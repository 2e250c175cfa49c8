package studies

import (
	"os"
	"strings"
	"testing"
)

// TestReadmeFields holds the README's list of variables to the table; UPDATE_GOLDEN=1 writes it anew.
func TestReadmeFields(t *testing.T) {
	const file, begin, end = "../README.md", "<!-- fields:begin -->\n", "<!-- fields:end -->"
	data, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	head, rest, ok := strings.Cut(string(data), begin)
	old, tail, ok2 := strings.Cut(rest, end)
	if !ok || !ok2 {
		t.Fatalf("%s has no place for the list of variables", file)
	}
	want := readmeFields()
	if old == want {
		return
	}
	if os.Getenv("UPDATE_GOLDEN") == "" {
		t.Fatalf("the list of variables in %s is not that of the table; run UPDATE_GOLDEN=1 go test ./studies", file)
	}
	if err := os.WriteFile(file, []byte(head+begin+want+end+tail), 0o644); err != nil {
		t.Fatal(err)
	}
}

func readmeFields() string {
	var b strings.Builder
	b.WriteString("<details><summary>All variables of <code>engine:</code></summary>\n\n| variable | unit | default | meaning |\n| --- | --- | --- | --- |\n")
	for _, f := range Fields() {
		unit, text := f.Unit, f.Text
		if f.Kind == Choice {
			unit = strings.Join(f.Choices, ", ")
		}
		if f.When.Words != "" {
			text += " (applies " + f.When.Words + ")"
		}
		b.WriteString("| `" + f.Path + "` | " + unit + " | " + f.Default + " | " + text + " |\n")
	}
	b.WriteString("\n</details>\n")
	return b.String()
}
