package optimize

import (
	"slices"

	gopt "gonum.org/v1/gonum/optimize"

	"hotfront/optimize/batch"
)

// simplex drives one gonum Nelder-Mead minimisation by question and answer: ask gives the next place to
// evaluate, tell answers it. The library's method runs in a goroutine of its own and talks through channels,
// one question at a time, so that the course of a simplex depends on its answers alone.
//
// Source of the method: J. A. Nelder, R. Mead, A simplex method for function minimization, Computer Journal 7
// (1965) 308-313, with the coefficients of F. Gao, L. Han, Computational Optimization and Applications 51
// (2012) 259-277, as gonum has it.
type simplex struct {
	operations chan gopt.Task
	results    chan gopt.Task
	wait       func()
	task       gopt.Task
}

// newSimplex begins a minimisation from the given vertices, one more than they are long, and their values.
func newSimplex(vertices [][]float64, values []float64) *simplex {
	s := &simplex{operations: make(chan gopt.Task, 1), results: make(chan gopt.Task, 1)}
	dim := len(vertices[0])
	method := &gopt.NelderMead{InitialVertices: vertices, InitialValues: values}
	method.Init(dim, 1)
	first := gopt.Task{Op: gopt.FuncEvaluation, Location: &gopt.Location{X: slices.Clone(vertices[0]), F: values[0]}}
	s.wait = batch.Beside(func() { method.Run(s.operations, s.results, []gopt.Task{first}) })
	return s
}

// ask is the next place to evaluate; it stays valid until tell.
func (s *simplex) ask() []float64 {
	for {
		s.task = <-s.operations
		if s.task.Op&gopt.FuncEvaluation != 0 {
			return s.task.Location.X
		}
		s.results <- s.task // nothing to do but to go on
	}
}

// tell answers the place that ask gave.
func (s *simplex) tell(value float64) {
	s.task.Location.F = value
	s.results <- s.task
}

// stop ends the minimisation, in the middle of a question or between two.
func (s *simplex) stop() {
	s.results <- gopt.Task{Op: gopt.PostIteration}
	close(s.results)
	for range s.operations {
	}
	s.wait()
}
