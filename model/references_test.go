package model

import (
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// TestReferences holds the bibliography together: every [Key] in a comment of the model has a line in
// REFERENCES.md, and every line there is named by some comment. A key is a word of four or more letters and
// digits that begins with a capital letter (or, as vanLeer1979, holds one and a year), so units in brackets
// and short Go names are none; comments of the model therefore use no Go doc links of that form.
func TestReferences(t *testing.T) {
	text, err := os.ReadFile("REFERENCES.md")
	if err != nil {
		t.Fatal(err)
	}
	// - [Key] Authors, title, where, year.
	line := regexp.MustCompile(`^- \[([A-Za-z][A-Za-z0-9]{2,})\] [^,]+, .+, .+, [^,]*([0-9]{4}|undated)\.$`)
	listed := map[string]bool{}
	last := ""
	for _, l := range strings.Split(string(text), "\n") {
		if !strings.HasPrefix(l, "- ") {
			continue
		}
		m := line.FindStringSubmatch(l)
		if m == nil {
			t.Errorf("REFERENCES.md: not in the form `- [Key] Authors, title, where, year.`: %s", l)
			continue
		}
		if listed[m[1]] {
			t.Errorf("REFERENCES.md: [%s] twice", m[1])
		}
		if key := strings.ToLower(m[1]); key < last {
			t.Errorf("REFERENCES.md: [%s] is out of order", m[1])
		} else {
			last = key
		}
		listed[m[1]] = true
	}

	cite := regexp.MustCompile(`\[([A-Z][A-Za-z0-9]{2,}|[a-z]+[A-Z][a-z]+[0-9]{4})\]`)
	source := regexp.MustCompile(`Source: \[([^\]]*)\]`)
	used := map[string]bool{}
	files := 0
	err = filepath.WalkDir(".", func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(path, ".go") || path == "references_test.go" {
			return err
		}
		files++
		fset := token.NewFileSet()
		file, err := parser.ParseFile(fset, path, nil, parser.ParseComments)
		if err != nil {
			return err
		}
		for _, group := range file.Comments {
			for _, c := range group.List {
				where := fset.Position(c.Pos())
				for _, re := range []*regexp.Regexp{source, cite} {
					for _, m := range re.FindAllStringSubmatch(c.Text, -1) {
						if re == cite && (len(m[1]) < 4 && !listed[m[1]]) {
							continue
						}
						used[m[1]] = true
						if !listed[m[1]] {
							t.Errorf("%s: [%s] is not in REFERENCES.md", where, m[1])
						}
					}
				}
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if files < 20 || len(used) < 10 {
		t.Errorf("only %d files and %d keys found: is the test in its place?", files, len(used))
	}
	for key := range listed {
		if !used[key] {
			t.Errorf("REFERENCES.md: no comment names [%s]", key)
		}
	}
}
