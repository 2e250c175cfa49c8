package studies

import (
	"errors"
	"fmt"
	"math"

	"hotfront/model"
	"hotfront/optimize"
)

var _ optimize.Problem = (*Problem)(nil)

// Problem is a study as a search sees it.
type Problem struct {
	study     *Study
	variables []optimize.Variable
	reference []float64
	scales    []float64 // of each limit, SI
}

// NewProblem makes the search problem of a study. It evaluates the start design once: that of an
// aim to be least gives the point the hypervolume is measured from, that of a limit at 0 its scale.
func NewProblem(s *Study) (*Problem, error) {
	switch {
	case len(s.Free) == 0:
		return nil, errors.New("studies: make problem: nothing is free")
	case len(s.Aims) == 0:
		return nil, errors.New("studies: make problem: there is no aim")
	case s.start == nil:
		return nil, errors.New("studies: make problem: the start design is outside its free ranges")
	}
	p := &Problem{study: s}
	for i := range s.Free {
		f := &s.Free[i]
		v := optimize.Variable{Name: f.Path, Kind: f.Kind, Low: f.Low, High: f.High}
		if f.List != nil {
			v.Low, v.High = 0, float64(len(f.List)-1)
		}
		p.variables = append(p.variables, v)
	}
	var perf model.Performance
	engine := s.EngineAt(s.start)
	model.Evaluate(&perf, &engine, &s.Corrections, model.NewWorkspace())
	valid := perf.Cause == model.None
	for _, a := range s.Aims {
		reference := 0.0
		if !a.Most {
			if !valid {
				return nil, fmt.Errorf("studies: make problem: %s is to be least, which needs a start design with a result: %s", a.Name, perf.Cause)
			}
			reference = 2 * s.outputs[a.output].Get(&perf)
		}
		p.reference = append(p.reference, reference)
	}
	for i := range s.Limits {
		p.scales = append(p.scales, limitScale(&s.Limits[i], &engine, &perf, valid))
	}
	return p, nil
}

// limitScale is what a violation is measured by: the bound itself; for a bound of 0 the value of
// the start design; and one unit of the table when that is 0 too or not known.
func limitScale(l *Limit, e *model.Engine, perf *model.Performance, valid bool) float64 {
	if l.Bound != 0 {
		return math.Abs(l.Bound)
	}
	if valid {
		if v := math.Abs(l.Value(e, perf)); v > 0 && !math.IsInf(v, 0) {
			return v
		}
	}
	if u, ok := unitOf(l.Unit, l.Quantity); ok && l.Unit != "" {
		return u.mul / u.div
	}
	return 1
}

// Study is the study of the problem.
func (p *Problem) Study() *Study { return p.study }

// Variables lists the free variables: numbers in SI, lists by index.
func (p *Problem) Variables() []optimize.Variable {
	return append([]optimize.Variable(nil), p.variables...)
}

// Aims is the number of aims.
func (p *Problem) Aims() int { return len(p.study.Aims) }

// Limits is the number of bounds.
func (p *Problem) Limits() int { return len(p.study.Limits) }

// Start is the study's own design.
func (p *Problem) Start() [][]float64 { return [][]float64{append([]float64(nil), p.study.start...)} }

// Reference is 0 for aims to be most, twice the start design's value for aims to be least.
func (p *Problem) Reference() []float64 { return append([]float64(nil), p.reference...) }

// Extras is the number of results stored with a point: all outputs, then ExtraNames' last three.
func (p *Problem) Extras() int { return len(p.study.outputs) + extraCounts }

// extraCounts are the results that are no float64: warnings, cycles, steps.
const extraCounts = 3

// ExtraNames lists what Point.Extra holds, in order.
func (p *Problem) ExtraNames() []string {
	return append(outputNames(p.study.outputs), "warnings", "cycles", "steps")
}

// PerformanceOf gives the performance that a point's Extra holds.
func (p *Problem) PerformanceOf(extra []float64) model.Performance {
	if len(extra) != p.Extras() {
		panic("studies: a point of another problem")
	}
	var perf model.Performance
	n := len(p.study.outputs)
	for i := range p.study.outputs {
		*p.study.outputs[i].at(&perf) = extra[i]
	}
	perf.Warnings = model.Warnings(extra[n])
	perf.Cycles, perf.Steps = int(extra[n+1]), int(extra[n+2])
	return perf
}
