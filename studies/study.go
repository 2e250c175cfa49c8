package studies

import (
	"hotfront/model"
	"hotfront/optimize"
)

const (
	DefaultEvaluations = 5000 // of a study without a budget
	DefaultSeed        = 1    // of a study without a seed
)

// Study is a study file that was read and found valid.
type Study struct {
	Name        string
	About       string
	Engine      model.Engine // the start design
	Corrections model.Corrections
	Free        []Free
	Limits      []Limit
	Aims        []Aim
	Evaluations int // budget of a search
	Seed        uint64

	fields  []Field
	outputs []Output
	steps   []step    // how a design is made from the start design
	start   []float64 // the start design as X; nil when a --set put it outside
	written []int     // fields that say the start design, in order

	correctionSet string // name and version of the set of corrections; empty for none
}

// Free is one free variable.
type Free struct {
	Path string
	Kind optimize.Kind
	Low  float64   // SI; of a range
	High float64   // SI; of a range
	List []float64 // of a list: SI values, or the indices of choices

	field int
}

// Aim is one aim of a search.
type Aim struct {
	Name string
	Most bool // else least

	output int
}

// Limit is one bound on a result, an input or a formula of both.
type Limit struct {
	Name     string
	Expr     string   // empty when Name is that of a result or input
	Bound    float64  // SI
	AtMost   bool     // else at least
	Quantity Quantity // of the bound
	Unit     string   // in which tables show it

	program *program
}

// Fields is the table the study was read with.
func (s *Study) Fields() []Field { return s.fields }

// Outputs is the table of results.
func (s *Study) Outputs() []Output { return s.outputs }

// Value is one input of a design.
type Value struct {
	Field *Field
	SI    float64
	Free  bool
}

// Design lists the inputs that say a design, in the order of the table: those that apply and do
// not follow from others.
func (s *Study) Design(e *model.Engine) []Value {
	values := make([]Value, 0, len(s.written))
	for _, i := range s.written {
		f := &s.fields[i]
		values = append(values, Value{Field: f, SI: f.Get(e), Free: s.isFree(f.Path)})
	}
	return values
}

func (s *Study) isFree(path string) bool {
	for i := range s.Free {
		if s.Free[i].Path == path {
			return true
		}
	}
	return false
}

// Value of the limited quantity for a design and its performance.
func (l *Limit) Value(e *model.Engine, p *model.Performance) float64 {
	return l.program.run(e, p)
}

// Margin is the room left to the bound, SI; negative when the limit is not met.
func (l *Limit) Margin(value float64) float64 {
	if l.AtMost {
		return l.Bound - value
	}
	return value - l.Bound
}

// Format writes a value of the limited quantity as tables show it, without its unit.
func (l *Limit) Format(v float64) string {
	if l.Unit == "" {
		return trimmed(FormatNumber(v, 4))
	}
	return trimmed(FormatSI(v, l.Quantity, l.Unit, 4))
}
