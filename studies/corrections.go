package studies

import (
	"embed"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"go.yaml.in/yaml/v4"

	"hotfront/model"
)

//go:embed corrections/*.yaml
var correctionSets embed.FS // read only; embedding leaves no other way than a variable

// fittedSet is the name of the shipped set, fitted to the tests of a published engine.
const fittedSet = "rig"

// setKeys are the keys of a corrections block that are no factor: the name and version of a set.
func setKeys() []string { return []string{"set", "version"} }

// correctionsBlock reads corrections: none, rig, the file of a set, or a block of factors.
func (r *reader) correctionsBlock(n *yaml.Node) {
	if n.Kind == yaml.ScalarNode {
		r.correctionsWord(scalar{n.Value, n, at(n)})
		return
	}
	entries, ok := r.block(n, "corrections")
	if !ok {
		return
	}
	known := append(correctionNames(), setKeys()...)
	for _, e := range entries {
		if !contains(known, e.key) {
			r.unknownKey(e, "corrections", known)
			continue
		}
		if s, ok := r.scalar(e.value, join("corrections", e.key)); ok {
			r.factor[e.key] = s
		}
	}
}

func (r *reader) correctionsWord(s scalar) {
	clear(r.factor)
	if s.text == "none" {
		return
	}
	data, name, err := r.correctionSet(s.text)
	if err == nil {
		err = r.takeSet(data, s)
	}
	if err == nil && s.text == fittedSet { // the file has the name of the engine it was fitted to
		r.factor["set"] = scalar{text: fittedSet, place: s.place}
	}
	if err != nil {
		r.fault(s.place, "corrections", &fault{Corrections, fmt.Sprintf("%s: %v", name, err),
			"write none, rig, the file of a set that `hotfront calibrate` wrote, or a block with " + orList(correctionNames())})
	}
}

// correctionSet gives the text of a shipped set or of a file, which stands relative to the study's.
func (r *reader) correctionSet(text string) (data []byte, name string, err error) {
	if text == fittedSet {
		data, err = fs.ReadFile(correctionSets, "corrections/"+fittedSet+".yaml")
		return data, fittedSet, err
	}
	if !strings.HasSuffix(text, ".yaml") {
		return nil, fmt.Sprintf("%q", clip(text)), fmt.Errorf("no set of corrections has this name")
	}
	file := text
	if !filepath.IsAbs(file) {
		file = filepath.Join(filepath.Dir(r.file), file)
	}
	data, err = os.ReadFile(file)
	return data, clip(text), err
}

// setFile is a file of corrections: the block, and how it was fitted, which is not read.
type setFile struct {
	Corrections map[string]string `yaml:"corrections"`
	Fit         yaml.Node         `yaml:"fit"`
}

// takeSet takes the factors of a set; its mistakes are reported at the place that names it.
func (r *reader) takeSet(data []byte, s scalar) error {
	if len(data) > maxBytes {
		return fmt.Errorf("more than a file of corrections may have")
	}
	var f setFile
	if err := yaml.Unmarshal(data, &f); err != nil {
		return fmt.Errorf("no file of corrections: %v", err)
	}
	if len(f.Corrections) == 0 {
		return fmt.Errorf("no block `corrections` in it")
	}
	known := append(correctionNames(), setKeys()...)
	for key, text := range f.Corrections {
		if !contains(known, key) {
			return fmt.Errorf("its key %q is none of %s", clip(key), orList(known))
		}
		r.factor[key] = scalar{text: text, place: s.place}
	}
	return nil
}

func correctionNames() []string {
	var names []string
	for _, c := range correctionTable() {
		names = append(names, c.name)
	}
	return names
}

// corrections sets the factors; those not given are neutral.
func (r *reader) corrections() {
	s := r.study
	s.Corrections = model.NoCorrections()
	for _, c := range correctionTable() {
		text, given := r.factor[c.name]
		if !given {
			continue
		}
		v, f := parseQuantity(text.text, c.quantity)
		if f == nil && !c.hard.holds(v) {
			f = outside(v, c.quantity, c.unit, c.hard)
		}
		if f != nil {
			r.fault(text.place, "corrections."+c.name, f)
			continue
		}
		*c.at(&s.Corrections) = v
	}
	s.correctionSet = ""
	if name, ok := r.factor["set"]; ok {
		s.correctionSet = name.text
		if version, ok := r.factor["version"]; ok {
			s.correctionSet += " " + version.text
		}
	}
}

// CorrectionsName says which corrections are in use: none, a set by name and version, or by hand.
func (s *Study) CorrectionsName() string {
	switch {
	case s.Corrections == model.NoCorrections():
		return "none"
	case s.correctionSet != "":
		return s.correctionSet
	}
	return "by hand"
}

// encodeCorrections writes the block of factors, with the name of the set where there is one.
func (s *Study) encodeCorrections() string {
	if s.CorrectionsName() == "none" {
		return "corrections: none\n"
	}
	var b strings.Builder
	b.WriteString("corrections:\n")
	if s.correctionSet != "" {
		name, version, ok := strings.Cut(s.correctionSet, " ")
		fmt.Fprintf(&b, "  set: %s\n", quoted(name))
		if ok {
			fmt.Fprintf(&b, "  version: %s\n", quoted(version))
		}
	}
	for _, c := range correctionTable() {
		fmt.Fprintf(&b, "  %s: %s\n", c.name, exactText(*c.at(&s.Corrections), c.quantity, c.unit))
	}
	return b.String()
}

// Factor is one factor of the corrections, for those who fit them.
type Factor struct {
	Name     string
	Text     string
	Quantity Quantity
	Unit     string
	At       func(c *model.Corrections) *float64
}

// Factors lists the factors by which the model is fitted.
func Factors() []Factor {
	var list []Factor
	for _, c := range correctionTable() {
		list = append(list, Factor{c.name, c.text, c.quantity, c.unit, c.at})
	}
	return list
}
