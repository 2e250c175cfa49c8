package studies

import (
	"fmt"
	"slices"
	"strings"

	"hotfront/model"
)

// FieldKind says what values a field takes.
type FieldKind uint8

const (
	Real FieldKind = iota
	Whole
	Choice
)

// Field is one input variable: all that reading, checking, searching and printing know of it.
// Values are SI; a choice has the index of its name in Choices.
type Field struct {
	Path     string // as in a study file, below engine
	Text     string // one line for users
	Kind     FieldKind
	Quantity Quantity
	Unit     string    // in which tables show it
	Choices  []string  // of a Choice, in the order of the model's constants
	Hard     Range     // outside it is a mistake
	Usual    Range     // outside it is a warning; empty for none
	Default  string    // as in a study file; "" for none
	Follows  string    // path whose value it takes when it is not given
	Group    string    // at most one of the fields of a group is given
	Freeable bool      // may be searched over
	When     Condition // when it applies
	Tied     Condition // when it must equal Follows and cannot be freed

	get func(e *model.Engine) float64
	set func(e *model.Engine, v float64)
}

// Range is a closed range of SI values; Low == High means none.
type Range struct{ Low, High float64 }

// Empty says that there is no range.
func (r Range) Empty() bool { return r.Low == r.High }

func (r Range) holds(v float64) bool { return v >= r.Low && v <= r.High }

// Condition says with which machines a field applies.
type Condition struct {
	Words string // completes "applies ..."; empty for always
	ok    func(e *model.Engine) bool
}

// Get reads the field's value from an engine.
func (f *Field) Get(e *model.Engine) float64 { return f.get(e) }

// Set writes the field's value to an engine.
func (f *Field) Set(e *model.Engine, v float64) { f.set(e, v) }

// Applies says whether the field means something in this machine.
func (f *Field) Applies(e *model.Engine) bool { return f.When.ok == nil || f.When.ok(e) }

func (f *Field) tied(e *model.Engine) bool { return f.Tied.ok != nil && f.Tied.ok(e) }

// Format writes a value as tables show it, without its unit.
func (f *Field) Format(v float64) string {
	switch f.Kind {
	case Choice:
		return f.Choices[int(v)]
	case Whole:
		return fmt.Sprintf("%.0f", v)
	}
	return trimmed(FormatSI(v, f.Quantity, f.Unit, 4))
}

// exact writes a value as a study file holds it, so that reading it gives the same value.
func (f *Field) exact(v float64) string {
	if f.Kind == Real {
		return exactText(v, f.Quantity, f.Unit)
	}
	return f.Format(v)
}

// Fields is the table of all input variables, in the order of a study file.
func Fields() []Field {
	return slices.Concat(machineFields(), exchangerFields(), surroundingFields())
}

// FieldNamed gives the field with this path.
func FieldNamed(fields []Field, path string) (*Field, bool) {
	for i := range fields {
		if fields[i].Path == path {
			return &fields[i], true
		}
	}
	return nil, false
}

func fieldPaths(fields []Field) []string {
	paths := make([]string, len(fields))
	for i := range fields {
		paths[i] = fields[i].Path
	}
	return paths
}

// rows of the table: the constructors read the texts "low to high" and panic on a slip in the
// table itself, which a test finds.

// option changes a row.
type option func(*Field)

func measured(path, text string, q Quantity, unitName, hard, usual string, at func(*model.Engine) *float64, options ...option) Field {
	f := Field{
		Path: path, Text: text, Kind: Real, Quantity: q, Unit: unitName, Freeable: true,
		Hard: parseRange(hard, q), Usual: parseRange(usual, q),
		get: func(e *model.Engine) float64 { return *at(e) },
		set: func(e *model.Engine, v float64) { *at(e) = v },
	}
	return f.with(options)
}

func whole(path, text, hard, usual string, at func(*model.Engine) *int, options ...option) Field {
	f := Field{
		Path: path, Text: text, Kind: Whole, Unit: "-", Freeable: true,
		Hard: parseRange(hard, Number), Usual: parseRange(usual, Number),
		get: func(e *model.Engine) float64 { return float64(*at(e)) },
		set: func(e *model.Engine, v float64) { *at(e) = int(v) },
	}
	return f.with(options)
}

// choice makes a row whose values are the constants named, in order, from 0.
func choice[T ~uint8](path, text string, names []string, at func(*model.Engine) *T, options ...option) Field {
	f := Field{
		Path: path, Text: text, Kind: Choice, Unit: "-", Choices: names, Freeable: true,
		get: func(e *model.Engine) float64 { return float64(*at(e)) },
		set: func(e *model.Engine, v float64) { *at(e) = T(v) },
	}
	return f.with(options)
}

func (f Field) with(options []option) Field {
	for _, o := range options {
		o(&f)
	}
	return f
}

func defaults(text string) option { return func(f *Field) { f.Default = text } }
func follows(path string) option  { return func(f *Field) { f.Follows = path } }
func when(c Condition) option     { return func(f *Field) { f.When = c } }
func group(name string) option    { return func(f *Field) { f.Group = name } }
func fixed(f *Field)              { f.Freeable = false }
func tiedTo(p string, c Condition) option {
	return func(f *Field) { f.Follows, f.Tied = p, c }
}

// parseRange reads "low to high"; "" is no range.
func parseRange(text string, q Quantity) Range {
	if text == "" {
		return Range{}
	}
	low, high, ok := strings.Cut(text, " to ")
	l, lf := parseQuantity(low, q)
	h, hf := parseQuantity(high, q)
	if !ok || lf != nil || hf != nil || l >= h {
		panic("studies: bad range in the table of fields: " + text)
	}
	return Range{l, h}
}

// conditions

func whenDisplacer() Condition {
	return Condition{"to beta and gamma machines", func(e *model.Engine) bool { return e.Layout.HasDisplacer() }}
}

func whenAlpha() Condition {
	return Condition{"to alpha machines", func(e *model.Engine) bool { return e.Layout == model.Alpha }}
}

func whenDoubleActing() Condition {
	return Condition{"to double-acting machines", func(e *model.Engine) bool { return e.Layout == model.DoubleActing }}
}

func whenPiston() Condition {
	return Condition{"to beta, gamma and double-acting machines", func(e *model.Engine) bool { return e.Layout != model.Alpha }}
}

func whenBeta() Condition {
	return Condition{"to beta machines", func(e *model.Engine) bool { return e.Layout == model.Beta }}
}
