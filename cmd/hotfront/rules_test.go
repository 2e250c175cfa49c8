package main

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// source is one Go file of the tree.
type source struct {
	path string // from the root, with slashes
	dir  string
	test bool
	file *ast.File
}

func sources(t *testing.T) ([]source, *token.FileSet) {
	t.Helper()
	fset := token.NewFileSet()
	var list []source
	root := "../.."
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && path != root && (strings.HasPrefix(d.Name(), ".") || d.Name() == "testdata") {
			return filepath.SkipDir
		}
		if !strings.HasSuffix(path, ".go") {
			return nil
		}
		file, err := parser.ParseFile(fset, path, nil, parser.ParseComments)
		if err != nil {
			return err
		}
		rel, err := filepath.Rel(root, path)
		if err != nil {
			return err
		}
		rel = filepath.ToSlash(rel)
		list = append(list, source{path: rel, dir: filepath.ToSlash(filepath.Dir(rel)), test: strings.HasSuffix(rel, "_test.go"), file: file})
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(list) < 100 {
		t.Fatalf("only %d Go files found: the test looks in the wrong place", len(list))
	}
	return list, fset
}

func under(dir, tree string) bool { return dir == tree || strings.HasPrefix(dir, tree+"/") }

// TestImports holds the way of the data: study -> model, optimize -> report, and never back; and keeps
// files, logs, flags, YAML and SQL out of the numerical packages.
func TestImports(t *testing.T) {
	list, _ := sources(t)
	outside := []string{"os", "log", "net", "io/ioutil", "syscall", "database/sql", "flag", "github.com/spf13", "go.yaml.in", "gopkg.in/yaml", "modernc.org"}
	for _, s := range list {
		if s.test {
			continue
		}
		numerical := under(s.dir, "model") || under(s.dir, "optimize") && !under(s.dir, "optimize/archive")
		for _, imp := range s.file.Imports {
			path := strings.Trim(imp.Path.Value, `"`)
			for _, tree := range outside {
				if numerical && under(path, tree) {
					t.Errorf("%s imports %s", s.path, path)
				}
			}
			ours, ok := strings.CutPrefix(path, "hotfront/")
			if !ok {
				continue
			}
			allowed := true
			switch {
			case under(s.dir, "model"):
				allowed = under(ours, "model")
			case under(s.dir, "optimize"):
				allowed = under(ours, "optimize")
			case under(s.dir, "studies"):
				allowed = !under(ours, "cmd") && !under(ours, "optimize/archive")
			}
			leaf := s.dir == "optimize/pareto" || s.dir == "optimize/sample" || s.dir == "optimize/batch" ||
				s.dir == "model/gas" || s.dir == "model/correlation" || s.dir == "model/loss" || s.dir == "model/metal" || s.dir == "model/drive" || s.dir == "model/heat"
			if !allowed || leaf {
				t.Errorf("%s imports %s", s.path, path)
			}
		}
	}
}

// TestHouseRules: goroutines only in the worker pool and for signals; no package variables but embedded
// files and interface checks; no init; one package comment a package.
func TestHouseRules(t *testing.T) {
	list, fset := sources(t)
	docs := map[string]int{}
	for _, s := range list {
		if s.test {
			continue
		}
		if _, ok := docs[s.dir]; !ok {
			docs[s.dir] = 0
		}
		if s.file.Doc != nil {
			docs[s.dir]++
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			if g, ok := n.(*ast.GoStmt); ok && s.dir != "optimize/batch" && s.path != "cmd/hotfront/signals.go" {
				t.Errorf("%v starts a goroutine", fset.Position(g.Pos()))
			}
			return true
		})
		for _, decl := range s.file.Decls {
			switch d := decl.(type) {
			case *ast.FuncDecl:
				if d.Recv == nil && d.Name.Name == "init" {
					t.Errorf("%s has an init function", s.path)
				}
			case *ast.GenDecl:
				if d.Tok != token.VAR || d.Doc != nil && strings.Contains(d.Doc.List[0].Text, "go:embed") {
					continue
				}
				for _, spec := range d.Specs {
					for _, name := range spec.(*ast.ValueSpec).Names {
						if name.Name != "_" {
							t.Errorf("%v: package variable %s", fset.Position(name.Pos()), name.Name)
						}
					}
				}
			}
		}
	}
	for dir, n := range docs {
		if n != 1 {
			t.Errorf("package %s has %d package comments", dir, n)
		}
	}
}

// TestUnits: each exported number of the model's inputs and results says its unit.
func TestUnits(t *testing.T) {
	list, fset := sources(t)
	unit := regexp.MustCompile(`\[[^\]]+\]`)
	checked := 0
	for _, s := range list {
		if s.dir != "model" || s.test {
			continue
		}
		ast.Inspect(s.file, func(n ast.Node) bool {
			st, ok := n.(*ast.StructType)
			if !ok {
				return true
			}
			for _, f := range st.Fields.List {
				if ident, ok := f.Type.(*ast.Ident); !ok || ident.Name != "float64" {
					continue
				}
				for _, name := range f.Names {
					if !name.IsExported() {
						continue
					}
					checked++
					if !unit.MatchString(f.Comment.Text() + f.Doc.Text()) {
						t.Errorf("%v: %s has no [unit] in its comment", fset.Position(f.Pos()), name.Name)
					}
				}
			}
			return true
		})
	}
	if checked < 100 {
		t.Errorf("only %d numbers checked", checked)
	}
}
