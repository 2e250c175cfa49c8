package studies

import (
	"bytes"
	"errors"
	"fmt"
	"unicode/utf8"

	yaml "go.yaml.in/yaml/v4"
)

const (
	maxBytes = 1 << 20 // of a study file
	maxDepth = 24      // of nesting; a study needs 4
)

// guard refuses, in one pass and without recursion, what the YAML parser should not be given.
func guard(data []byte) *fault {
	switch {
	case len(data) > maxBytes:
		return &fault{FileTooBig, fmt.Sprintf("%.1f MB is more than the 1 MB a study may have", float64(len(data))/1e6), ""}
	case bytes.IndexByte(data, 0) >= 0 || !utf8.Valid(data):
		return &fault{FileNotText, "this is not UTF-8 text", "save the study as plain text in UTF-8"}
	case len(bytes.TrimSpace(bytes.TrimPrefix(data, []byte("\ufeff")))) == 0:
		return &fault{FileEmpty, "the file is empty", "`hotfront new` writes a study to begin with"}
	}
	if line := tooDeep(data); line > 0 {
		return &fault{FileTooDeep, fmt.Sprintf("line %d is nested deeper than %d blocks", line, maxDepth), "a study needs no more than 4"}
	}
	return nil
}

// tooDeep gives the first line whose brackets, leading list marks or indentation could nest deeper
// than maxDepth; 0 for none. Quotes and comments are not told apart from the rest: brackets that
// are not closed count wherever they stand, which no honest study has by the dozen.
func tooDeep(data []byte) int {
	line, open, marks, indent := 1, 0, 0, 0
	leading := true
	for _, c := range data {
		switch c {
		case '\n':
			line++
			marks, indent, leading = 0, 0, true
			continue
		case '[', '{':
			open++
		case ']', '}':
			open = max(0, open-1)
		}
		if leading {
			switch c {
			case ' ', '\t':
				indent++
			case '-', '?', ':':
				marks++
			default:
				leading = false
			}
		}
		if open > maxDepth || marks > maxDepth || indent > 8*maxDepth {
			return line
		}
	}
	return 0
}

// parse gives the root of the only document in the file.
func (r *reader) parse(data []byte) *yaml.Node {
	if f := guard(data); f != nil {
		r.fault(place{}, "", f)
		return nil
	}
	var documents []yaml.Node
	if err := yaml.Load(data, &documents, yaml.WithAllDocuments()); err != nil {
		r.syntax(err)
		return nil
	}
	if len(documents) > 1 {
		n := &documents[1]
		r.add(Issue{Code: SeveralDocuments, Line: n.Line, Column: n.Column, Text: "a second YAML document begins here", Hint: "one study a file: remove the line ---"})
		return nil
	}
	if len(documents) == 0 {
		r.fault(place{}, "", &fault{FileEmpty, "the file holds comments only", "`hotfront new` writes a study to begin with"})
		return nil
	}
	root := &documents[0]
	if root.Kind == yaml.DocumentNode {
		if len(root.Content) != 1 {
			r.fault(place{}, "", &fault{FileEmpty, "the document is empty", ""})
			return nil
		}
		root = root.Content[0]
	}
	return root
}

// syntax reports what the YAML parser refused.
func (r *reader) syntax(err error) {
	issue := Issue{Code: FileNotYAML, Text: "not valid YAML: " + clip(err.Error()), Hint: "put text with special characters between quotes"}
	if le, ok := errors.AsType[*yaml.LoadError](err); ok {
		issue.Line, issue.Column = le.Mark.Line, le.Mark.Column
		issue.Text = "not valid YAML: " + clip(le.Message)
		switch {
		case bytes.Contains([]byte(le.Message), []byte("unknown anchor")):
			issue.Code, issue.Hint = YAMLFeature, "aliases (*name) are not used in studies: write the value again"
		case bytes.Contains([]byte(le.Message), []byte("cannot start any token")) || bytes.Contains([]byte(le.Message), []byte("block scalar")):
			issue.Hint = "a value cannot begin with this character: use max: and min: for bounds, and quotes for text"
		case bytes.Contains([]byte(le.Message), []byte("tab")):
			issue.Hint = "indent with spaces"
		}
	}
	r.add(issue)
}

// scan walks the whole tree once and reports YAML features that studies do without, keys given
// twice and nesting the guard let pass. It says whether the tree may be read.
func (r *reader) scan(n *yaml.Node, path string, depth int) bool {
	if depth > maxDepth {
		r.fault(at(n), path, &fault{FileTooDeep, fmt.Sprintf("nested deeper than %d blocks", maxDepth), "a study needs no more than 4"})
		return false
	}
	switch {
	case n.Kind == yaml.AliasNode:
		r.fault(at(n), path, &fault{YAMLFeature, "an alias (*name)", "write the value again"})
		return false
	case n.Anchor != "":
		r.fault(at(n), path, &fault{YAMLFeature, fmt.Sprintf("an anchor (&%s)", clip(n.Anchor)), "take it out"})
		return false
	case n.Style&yaml.TaggedStyle != 0:
		r.fault(at(n), path, &fault{YAMLFeature, fmt.Sprintf("a tag (%s)", clip(n.Tag)), "take it out"})
		return false
	}
	if n.Kind != yaml.MappingNode {
		ok := true
		for _, c := range n.Content {
			ok = r.scan(c, path, depth+1) && ok
		}
		return ok
	}
	ok := true
	first := make(map[string]int, len(n.Content)/2)
	for i := 0; i+1 < len(n.Content); i += 2 {
		key, value := n.Content[i], n.Content[i+1]
		switch {
		case key.Tag == "!!merge":
			r.fault(at(key), path, &fault{YAMLFeature, "a merge key (<<)", "write the values themselves"})
			ok = false
			continue
		case key.Kind != yaml.ScalarNode:
			r.fault(at(key), path, &fault{ShapeWrong, "a key must be a plain word", ""})
			ok = false
			continue
		}
		p := join(path, key.Value)
		if line, twice := first[key.Value]; twice {
			r.repeated[at(key)] = true
			r.fault(at(key), p, &fault{KeyTwice, "given twice", fmt.Sprintf("it is already on line %d", line)})
		} else {
			first[key.Value] = key.Line
		}
		ok = r.scan(key, p, depth+1) && ok
		ok = r.scan(value, p, depth+1) && ok
	}
	return ok
}

func join(path, key string) string {
	if path == "" {
		return clip(key)
	}
	return path + "." + clip(key)
}
