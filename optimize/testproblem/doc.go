// Package testproblem holds problems whose best designs are known from outside: by a closed form, by
// dense sampling of a known front, or, where it says so, by merging long runs. Drivers are measured on
// them; nothing of the search may depend on their names.
package testproblem

import (
	"strconv"

	"hotfront/optimize"
)

// Problem is a test problem. It is an optimize.Problem and safe for use by several goroutines.
type Problem struct {
	Name  string
	About string // what it tries, and where it comes from

	// Ideal is the hypervolume of the true front from Reference, or for one aim the lowest value. How it
	// is known stands in IdealFrom.
	Ideal     float64
	IdealFrom string

	Vars       []optimize.Variable
	AimCount   int
	LimitCount int
	Ref        []float64
	Starts     [][]float64
	Function   func(f, g, x []float64)
}

var _ optimize.Problem = (*Problem)(nil)

// Variables lists the variables.
func (p *Problem) Variables() []optimize.Variable { return p.Vars }

// Aims is the number of aims.
func (p *Problem) Aims() int { return p.AimCount }

// Limits is the number of limits.
func (p *Problem) Limits() int { return p.LimitCount }

// Extras is zero.
func (p *Problem) Extras() int { return 0 }

// Start lists start designs; most problems have none.
func (p *Problem) Start() [][]float64 { return p.Starts }

// Reference is the point hypervolume is measured from.
func (p *Problem) Reference() []float64 { return p.Ref }

// NewEvaluator makes an evaluator without a workspace.
func (p *Problem) NewEvaluator() optimize.Evaluator { return evaluator{p.Function} }

type evaluator struct{ function func(f, g, x []float64) }

// Evaluate computes the aims and limits.
func (e evaluator) Evaluate(p *optimize.Point) { e.function(p.F, p.G, p.X) }

// box is n real variables with the same bounds.
func box(n int, low, high float64) []optimize.Variable {
	vars := make([]optimize.Variable, n)
	for i := range vars {
		vars[i] = number("x"+strconv.Itoa(i+1), low, high)
	}
	return vars
}

func number(name string, low, high float64) optimize.Variable {
	return optimize.Variable{Name: name, Kind: optimize.Real, Low: low, High: high}
}
