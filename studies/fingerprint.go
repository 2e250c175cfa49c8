package studies

import (
	"bufio"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"io"
	"strconv"
)

// Fingerprint identifies what a search over this study computes: the engine, what is free, limits,
// aims, corrections and seed, with the version of the model. Name, about and budget are left out, so
// that a run can go on with a larger budget; so are comments, units and the order of keys. The order
// of free variables, limits and aims counts, for it is that of X, G and F.
func (s *Study) Fingerprint(version string) string {
	h := sha256.New()
	w := bufio.NewWriter(h)
	fmt.Fprintf(w, "version %s\n", strconv.Quote(version))
	s.writeMeaning(w)
	if err := w.Flush(); err != nil {
		panic("studies: a hash does not fail to write: " + err.Error())
	}
	return hex.EncodeToString(h.Sum(nil))
}

// writeMeaning writes numbers as hexadecimal floats: exact, and one text for one value.
func (s *Study) writeMeaning(w io.Writer) {
	for _, v := range s.Design(&s.Engine) {
		text := hexFloat(v.SI)
		if v.Field.Kind == Choice {
			text = v.Field.Choices[int(v.SI)]
		}
		fmt.Fprintf(w, "engine %s %s\n", v.Field.Path, text)
	}
	for _, c := range correctionTable() {
		fmt.Fprintf(w, "corrections %s %s\n", c.name, hexFloat(*c.at(&s.Corrections)))
	}
	for i := range s.Free {
		f := &s.Free[i]
		fmt.Fprintf(w, "free %s %d %s %s", f.Path, f.Kind, hexFloat(f.Low), hexFloat(f.High))
		for _, v := range f.List {
			text := hexFloat(v)
			if field := &s.fields[f.field]; field.Kind == Choice {
				text = field.Choices[int(v)]
			}
			fmt.Fprintf(w, " %s", text)
		}
		fmt.Fprintln(w)
	}
	for i := range s.Limits {
		l := &s.Limits[i]
		fmt.Fprintf(w, "limit %s %s %t %s\n", strconv.Quote(l.Name), strconv.Quote(l.Expr), l.AtMost, hexFloat(l.Bound))
	}
	for _, a := range s.Aims {
		fmt.Fprintf(w, "aim %s %t\n", a.Name, a.Most)
	}
	fmt.Fprintf(w, "seed %d\n", s.Seed)
}

func hexFloat(v float64) string {
	return strconv.FormatFloat(v+0, 'x', -1, 64) // + 0 makes 0 of -0
}
