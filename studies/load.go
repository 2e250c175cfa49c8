package studies

import (
	"fmt"
	"strings"
	"unicode"

	yaml "go.yaml.in/yaml/v4"
)

// place is where something stands: in the file by line and column, or in a --set.
type place struct {
	line, column int
	set          string // the --set, "" for the file
}

func at(n *yaml.Node) place { return place{line: n.Line, column: n.Column} }

// scalar is a value as text, with its place.
type scalar struct {
	text string
	node *yaml.Node // nil when it comes from a --set
	place
}

// entry is one key of a block.
type entry struct {
	key   string
	where place
	value *yaml.Node
}

// reader reads one study and collects everything that is wrong with it.
type reader struct {
	file    string
	issues  Issues
	fields  []Field
	outputs []Output
	study   *Study

	raw      map[string]scalar // engine values by path
	blocks   map[string]place  // where each block begins, by path
	factor   map[string]scalar // corrections by name
	bad      map[string]bool   // engine paths whose value could not be read
	repeated map[place]bool    // keys reported as given twice
	hints    int               // suggestions looked for
	usable   bool              // layout, drive and heat are known
	absent   []Output          // results that mean nothing with this machine
}

// Load reads a study. Each of sets is a path=value that replaces a value of the file. The study is
// nil when there are mistakes; the issues may hold warnings beside a valid study. Load never panics.
func Load(file string, data []byte, sets ...string) (*Study, Issues) {
	r := &reader{
		file: file, fields: Fields(), outputs: Outputs(),
		raw: map[string]scalar{}, blocks: map[string]place{}, factor: map[string]scalar{}, bad: map[string]bool{}, repeated: map[place]bool{},
	}
	r.study = &Study{Evaluations: DefaultEvaluations, Seed: DefaultSeed, fields: r.fields, outputs: r.outputs}
	if root := r.parse(data); root != nil && r.scan(root, "", 0) {
		r.read(root, sets)
	}
	r.issues.sort()
	if len(r.issues.Mistakes()) > 0 {
		return nil, r.issues
	}
	return r.study, r.issues
}

func (r *reader) add(i Issue) {
	if i.File == "" {
		i.File = r.file
	}
	r.issues = append(r.issues, i)
}

// fault adds an issue at a place.
func (r *reader) fault(p place, path string, f *fault) {
	i := Issue{Code: f.code, Line: p.line, Column: p.column, Path: path, Text: f.text, Hint: f.hint}
	if p.set != "" {
		i.File = "--set " + p.set
	}
	r.add(i)
}

func topKeys() []string {
	return []string{"study", "about", "engine", "corrections", "free", "limits", "aims", "budget", "seed"}
}

// read reads the whole study; a mistake in one part does not keep the others from being read.
func (r *reader) read(root *yaml.Node, sets []string) {
	top, ok := r.block(root, "")
	if !ok {
		return
	}
	nodes := map[string]entry{}
	for _, e := range top {
		if !contains(topKeys(), e.key) {
			r.unknownKey(e, "", topKeys())
			continue
		}
		if _, twice := nodes[e.key]; !twice {
			nodes[e.key] = e
		}
	}
	r.texts(root, nodes)
	if e, ok := nodes["engine"]; ok {
		r.blocks[""] = e.where
		r.engineBlock(e.value, "")
	} else {
		r.fault(at(root), "engine", &fault{KeyMissing, "the study has no engine", "write the start design below engine:"})
	}
	if e, ok := nodes["corrections"]; ok {
		r.correctionsBlock(e.value)
	} else {
		r.correctionsWord(scalar{text: fittedSet})
	}
	r.overrides(sets)
	if _, ok := nodes["engine"]; ok {
		r.engine()
	}
	r.corrections()
	if e, ok := nodes["free"]; ok {
		r.free(e.value)
	}
	r.plan()
	if e, ok := nodes["limits"]; ok {
		r.limits(e.value)
	}
	r.aims(nodes["aims"], nodes["free"])
	if e, ok := nodes["budget"]; ok {
		r.budget(e.value)
	}
	if e, ok := nodes["seed"]; ok {
		r.seed(e.value)
	}
}

// texts reads the name and the sentence about the study.
func (r *reader) texts(root *yaml.Node, nodes map[string]entry) {
	const longestName, longestAbout = 80, 2000
	e, ok := nodes["study"]
	if !ok {
		r.fault(at(root), "study", &fault{KeyMissing, "the study has no name", "begin with study: a-name"})
	} else if s, ok := r.scalar(e.value, "study"); ok {
		if bad := badText(s.text, longestName); bad != "" {
			r.fault(s.place, "study", &fault{TextExpected, "the name " + bad, "a short name on one line"})
		}
		r.study.Name = s.text
	}
	if e, ok := nodes["about"]; ok {
		if s, ok := r.scalar(e.value, "about"); ok {
			if len(s.text) > longestAbout {
				r.fault(s.place, "about", &fault{TextExpected, fmt.Sprintf("longer than %d letters", longestAbout), "a sentence or two"})
			}
			r.study.About = s.text
		}
	}
}

// badText says what is wrong with a one-line text.
func badText(s string, longest int) string {
	visible := false
	for _, c := range s {
		if unicode.IsControl(c) {
			return "holds control characters"
		}
		visible = visible || unicode.IsPrint(c) && c != ' '
	}
	switch {
	case !visible:
		return "is empty"
	case len(s) > longest:
		return fmt.Sprintf("is longer than %d letters", longest)
	}
	return ""
}

// mostKeys is how many keys a block, or values a list, may have.
const mostKeys = 1000

// block gives the entries of a block, or says that there is none. Keys given twice were reported.
func (r *reader) block(n *yaml.Node, path string) ([]entry, bool) {
	return r.blockAs(n, path, "")
}

// blockAs is block with an example for the message.
func (r *reader) blockAs(n *yaml.Node, path, example string) ([]entry, bool) {
	if n.Kind != yaml.MappingNode {
		what := "a value"
		switch {
		case n.Kind == yaml.SequenceNode:
			what = "a list"
		case n.Tag == "!!null":
			what = "nothing"
		}
		r.fault(at(n), path, &fault{ShapeWrong, "a block of keys is wanted here, not " + what, example})
		return nil, false
	}
	if keys := len(n.Content) / 2; keys > mostKeys {
		r.fault(at(n), path, &fault{ShapeWrong, fmt.Sprintf("%d keys in one block, at most %d are read", keys, mostKeys), ""})
		return nil, false
	}
	var entries []entry
	for i := 0; i+1 < len(n.Content); i += 2 {
		entries = append(entries, entry{n.Content[i].Value, at(n.Content[i]), n.Content[i+1]})
	}
	return entries, true
}

// scalar gives a value as text.
func (r *reader) scalar(n *yaml.Node, path string) (scalar, bool) {
	switch {
	case n.Kind != yaml.ScalarNode:
		what := "block"
		if n.Kind == yaml.SequenceNode {
			what = "list"
		}
		r.fault(at(n), path, &fault{ShapeWrong, "a value is wanted here, not a " + what, ""})
		return scalar{}, false
	case n.Tag == "!!null":
		r.fault(at(n), path, &fault{ShapeWrong, "no value", ""})
		return scalar{}, false
	}
	return scalar{n.Value, n, at(n)}, true
}

func (r *reader) unknownKey(e entry, path string, candidates []string) {
	r.fault(e.where, join(path, e.key), &fault{KeyUnknown, fmt.Sprintf("unknown key %q", clip(e.key)), r.suggestOne(e.key, candidates)})
}

// mostHints is how many suggestions one reading looks for: a file with more mistakes is no study,
// and looking for thousands takes time.
const mostHints = 200

// suggest is the hint for an unknown name, "" when no candidate is near.
func (r *reader) suggest(word string, candidates []string) string {
	if r.hints++; r.hints > mostHints {
		return ""
	}
	return suggestion(word, candidates)
}

// suggestOne is suggest with a list of the candidates when none is near.
func (r *reader) suggestOne(word string, candidates []string) string {
	if s := r.suggest(word, candidates); s != "" || r.hints > mostHints {
		return s
	}
	return "one of " + strings.Join(candidates, ", ")
}

func contains(words []string, word string) bool {
	for _, w := range words {
		if w == word {
			return true
		}
	}
	return false
}
