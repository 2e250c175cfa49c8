package fit

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"

	"gonum.org/v1/gonum/mat"

	"hotfront/optimize/sample"
)

// Problem is a fit. Residuals are differences of model and measurement over the measurement's standard
// uncertainty, so that each is of order one in a good fit.
type Problem struct {
	Names     []string  // of the parameters
	Start     []float64 // within the bounds
	Low, High []float64
	Count     int // of residuals
	// Residuals fills dst at the parameters x. An error says that the model has no result there; such
	// points are passed by.
	Residuals func(dst, x []float64) error
}

// Settings of a fit.
type Settings struct {
	Starts     int // starting points besides Problem.Start; 0 = none
	Iterations int // a start, 0 = 100
}

// Result is a fit and how well it is determined.
type Result struct {
	X         []float64
	Residuals []float64
	Sum       float64 // of squares
	OnBound   []bool  // parameters that ended on a bound

	// Covariance of the parameters that are not on a bound, rows and columns of the others zero:
	// (J'J)^-1, times Sum over the degrees of freedom where that is above one, since the measurements then
	// scatter more than their uncertainties say.
	Covariance  [][]float64
	Uncertainty []float64 // standard uncertainty of each parameter
	Correlation [][]float64
	Condition   float64 // largest over smallest singular value of J, its columns scaled to the bounds' widths
	Undecided   []Pair  // parameters that the data cannot tell apart
	Loose       []int   // parameters that the data hardly touch: uncertainty above the width of the bounds
	Agreeing    int     // starts that ended at the best sum, of those that ended anywhere
	Ended       int
}

// Pair is two parameters by index.
type Pair struct{ A, B int }

// undecided is the correlation above which two parameters count as not told apart.
const undecided = 0.98

// Error is an error to be compared with errors.Is.
type Error string

func (e Error) Error() string { return string(e) }

const (
	// ErrProblem: the problem contradicts itself.
	ErrProblem = Error("fit: problem not valid")
	// ErrNoResult: the model has no result at any starting point.
	ErrNoResult = Error("fit: no starting point has a result")
)

// Minimise finds the least sum of squares by the Levenberg-Marquardt method with parameters kept inside their
// bounds by projection, from Problem.Start and from further points of a Latin hypercube (fixed seed: the same
// problem gives the same result).
//
// Source: D. W. Marquardt, An algorithm for least-squares estimation of nonlinear parameters, Journal of the
// Society for Industrial and Applied Mathematics 11 (1963) 431; bounds and stopping as the code says.
func Minimise(p *Problem, s Settings) (*Result, error) {
	if err := p.check(); err != nil {
		return nil, err
	}
	iterations := s.Iterations
	if iterations == 0 {
		iterations = 100
	}
	starts := [][]float64{slices.Clone(p.Start)}
	if s.Starts > 0 {
		for _, u := range sample.Latin(rand.New(rand.NewPCG(1, 0)), s.Starts, len(p.Start)) {
			x := make([]float64, len(u))
			for i := range x {
				x[i] = p.Low[i] + u[i]*(p.High[i]-p.Low[i])
			}
			starts = append(starts, x)
		}
	}
	var best *descent
	var sums []float64
	for _, x := range starts {
		d := newDescent(p, x)
		if d == nil {
			continue
		}
		d.run(iterations)
		sums = append(sums, d.sum)
		if best == nil || d.sum < best.sum {
			best = d
		}
	}
	if best == nil {
		return nil, ErrNoResult
	}
	r := best.result()
	r.Ended = len(sums)
	for _, sum := range sums {
		if sum <= r.Sum*(1+1e-3)+1e-9 {
			r.Agreeing++
		}
	}
	return r, nil
}

func (p *Problem) check() error {
	n := len(p.Start)
	switch {
	case n == 0 || p.Residuals == nil:
		return fmt.Errorf("%w: nothing to fit", ErrProblem)
	case len(p.Low) != n || len(p.High) != n || len(p.Names) != n:
		return fmt.Errorf("%w: names, start and bounds differ in length", ErrProblem)
	case p.Count < 1:
		return fmt.Errorf("%w: no measurement", ErrProblem)
	}
	for i := range n {
		if !(p.Low[i] < p.High[i]) || !(p.Start[i] >= p.Low[i] && p.Start[i] <= p.High[i]) {
			return fmt.Errorf("%w: %s starts at %g, bounds %g and %g", ErrProblem, p.Names[i], p.Start[i], p.Low[i], p.High[i])
		}
	}
	return nil
}

// descent is one run of the method from one start.
type descent struct {
	p        *Problem
	x        []float64
	r        []float64
	sum      float64
	jacobian *mat.Dense // Count x parameters, in shares of the bounds' widths
}

func newDescent(p *Problem, x []float64) *descent {
	d := &descent{p: p, x: x, r: make([]float64, p.Count), jacobian: mat.NewDense(p.Count, len(x), nil)}
	if p.evaluate(d.r, x) != nil {
		return nil
	}
	d.sum = square(d.r)
	return d
}

const errNotFinite = Error("fit: residual not finite")

func (p *Problem) evaluate(dst, x []float64) error {
	if err := p.Residuals(dst, x); err != nil {
		return err
	}
	for _, v := range dst {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return errNotFinite
		}
	}
	return nil
}

func square(r []float64) float64 {
	sum := 0.0
	for _, v := range r {
		sum += v * v
	}
	return sum
}

// differentiate fills the Jacobian by central differences of a thousandth of the bounds' widths, one-sided
// at a bound. A model that has no result on one side is taken from the other; on neither, the column is zero.
func (d *descent) differentiate() {
	const step = 1e-3
	p := d.p
	up, down := make([]float64, p.Count), make([]float64, p.Count)
	x := slices.Clone(d.x)
	for k := range x {
		width := p.High[k] - p.Low[k]
		hi, lo := min(d.x[k]+step*width, p.High[k]), max(d.x[k]-step*width, p.Low[k])
		x[k] = hi
		if p.evaluate(up, x) != nil {
			hi = d.x[k]
			copy(up, d.r)
		}
		x[k] = lo
		if p.evaluate(down, x) != nil {
			lo = d.x[k]
			copy(down, d.r)
		}
		x[k] = d.x[k]
		for i := range up {
			v := 0.0
			if hi > lo {
				v = (up[i] - down[i]) / (hi - lo) * width
			}
			d.jacobian.Set(i, k, v)
		}
	}
}

// run goes down until no step helps or the iterations are used up.
func (d *descent) run(iterations int) {
	p := d.p
	n := len(d.x)
	lambda := 1e-3
	trial, r := make([]float64, n), make([]float64, p.Count)
	for range iterations {
		d.differentiate()
		moved := false
		for range 12 {
			step := d.step(lambda)
			change := 0.0
			for k := range trial {
				width := p.High[k] - p.Low[k]
				trial[k] = min(max(d.x[k]+step[k]*width, p.Low[k]), p.High[k])
				change = max(change, math.Abs(trial[k]-d.x[k])/width)
			}
			if change < 1e-9 {
				return
			}
			if p.evaluate(r, trial) == nil && square(r) < d.sum {
				better := d.sum - square(r)
				copy(d.x, trial)
				copy(d.r, r)
				d.sum = square(r)
				lambda = max(lambda*0.2, 1e-12)
				moved = better > 1e-12*d.sum
				break
			}
			lambda *= 4
		}
		if !moved {
			return
		}
	}
}

// step solves (J'J + lambda diag(J'J)) s = -J'r for the parameters that are not held by a bound which the
// descent points out of; s is in shares of the bounds' widths.
func (d *descent) step(lambda float64) []float64 {
	n := len(d.x)
	var normal mat.Dense
	normal.Mul(d.jacobian.T(), d.jacobian)
	gradient := make([]float64, n)
	for k := range n {
		for i, v := range d.r {
			gradient[k] += d.jacobian.At(i, k) * v
		}
	}
	var free []int
	for k := range n {
		atLow := d.x[k] <= d.p.Low[k] && gradient[k] > 0
		atHigh := d.x[k] >= d.p.High[k] && gradient[k] < 0
		if !atLow && !atHigh && normal.At(k, k) > 0 {
			free = append(free, k)
		}
	}
	s := make([]float64, n)
	if len(free) == 0 {
		return s
	}
	a := mat.NewDense(len(free), len(free), nil)
	b := mat.NewVecDense(len(free), nil)
	for i, k := range free {
		b.SetVec(i, -gradient[k])
		for j, l := range free {
			v := normal.At(k, l)
			if i == j {
				v *= 1 + lambda
			}
			a.Set(i, j, v)
		}
	}
	var x mat.VecDense
	if err := x.SolveVec(a, b); err != nil {
		if _, badly := errors.AsType[mat.Condition](err); !badly {
			return s
		}
	}
	for i, k := range free {
		s[k] = x.AtVec(i)
	}
	return s
}
