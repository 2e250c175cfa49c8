package studies

import (
	"bytes"
	"fmt"
	"strconv"
	"strings"
)

// Encode writes a study as a study file. Reading it gives the same study; comments, units and
// numbers given as expressions of other units are not kept.
func (s *Study) Encode() []byte {
	var b bytes.Buffer
	fmt.Fprintf(&b, "study: %s\n", quoted(s.Name))
	if s.About != "" {
		fmt.Fprintf(&b, "about: %s\n", quoted(s.About))
	}
	s.encodeEngine(&b)
	b.WriteString(s.encodeCorrections())
	s.encodeFree(&b)
	s.encodeLimits(&b)
	if len(s.Aims) > 0 {
		fmt.Fprintf(&b, "aims:\n")
		for _, a := range s.Aims {
			direction := "least"
			if a.Most {
				direction = "most"
			}
			fmt.Fprintf(&b, "  %s: %s\n", a.Name, direction)
		}
	}
	fmt.Fprintf(&b, "budget:\n  evaluations: %d\nseed: %d\n", s.Evaluations, s.Seed)
	return b.Bytes()
}

func (s *Study) encodeEngine(b *bytes.Buffer) {
	fmt.Fprintf(b, "engine:\n")
	written := map[string]bool{}
	values := s.Design(&s.Engine)
	for _, v := range values {
		block, _, nested := strings.Cut(v.Field.Path, ".")
		if !nested {
			fmt.Fprintf(b, "  %s: %s\n", v.Field.Path, v.Field.exact(v.SI))
			continue
		}
		if written[block] {
			continue
		}
		written[block] = true // rows of a block need not stand together in the table
		fmt.Fprintf(b, "  %s:\n", block)
		for _, o := range values {
			if key, ok := strings.CutPrefix(o.Field.Path, block+"."); ok {
				fmt.Fprintf(b, "    %s: %s\n", key, o.Field.exact(o.SI))
			}
		}
	}
}

func (s *Study) encodeFree(b *bytes.Buffer) {
	if len(s.Free) == 0 {
		return
	}
	fmt.Fprintf(b, "free:\n")
	for i := range s.Free {
		f := &s.Free[i]
		field := &s.fields[f.field]
		if f.List == nil {
			fmt.Fprintf(b, "  %s: {from: %s, to: %s}\n", f.Path, field.exact(f.Low), field.exact(f.High))
			continue
		}
		texts := make([]string, len(f.List))
		for j, v := range f.List {
			texts[j] = field.exact(v)
		}
		fmt.Fprintf(b, "  %s: {of: [%s]}\n", f.Path, strings.Join(texts, ", "))
	}
}

func (s *Study) encodeLimits(b *bytes.Buffer) {
	if len(s.Limits) == 0 {
		return
	}
	fmt.Fprintf(b, "limits:\n")
	for i := 0; i < len(s.Limits); i++ {
		l := &s.Limits[i]
		var parts []string
		if l.Expr != "" {
			parts = append(parts, "expr: "+quoted(l.Expr))
		}
		parts = append(parts, l.boundText())
		if i+1 < len(s.Limits) && s.Limits[i+1].Name == l.Name {
			i++
			parts = append(parts, s.Limits[i].boundText())
		}
		fmt.Fprintf(b, "  %s: {%s}\n", quoted(l.Name), strings.Join(parts, ", "))
	}
}

func (l *Limit) boundText() string {
	key, text := "min", plainNumber(l.Bound)
	if l.AtMost {
		key = "max"
	}
	if l.Unit != "" {
		text = exactText(l.Bound, l.Quantity, l.Unit)
	}
	return key + ": " + text
}

// quoted writes text plainly when nothing in it can be taken for YAML, else between quotes. The
// escapes of Go's quotes are all escapes of YAML's.
func quoted(s string) string {
	for i, c := range s {
		letter := c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z'
		if !letter && (i == 0 || !(c >= '0' && c <= '9' || c == '-' || c == '_' || c == '.')) {
			return strconv.Quote(s)
		}
	}
	switch strings.ToLower(s) {
	case "", "null", "true", "false", "yes", "no", "on", "off", "y", "n":
		return strconv.Quote(s)
	}
	return s
}
