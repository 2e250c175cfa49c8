package fit

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/mat"
)

// result works out how well the parameters are determined where the descent ended.
func (d *descent) result() *Result {
	d.differentiate()
	p := d.p
	n := len(d.x)
	r := &Result{X: d.x, Residuals: d.r, Sum: d.sum, OnBound: make([]bool, n), Uncertainty: make([]float64, n),
		Covariance: square2(n), Correlation: square2(n)}
	var free []int
	for k := range n {
		r.OnBound[k] = d.x[k] <= p.Low[k] || d.x[k] >= p.High[k]
		if !r.OnBound[k] {
			free = append(free, k)
		}
	}
	if len(free) == 0 {
		return r
	}
	j := mat.NewDense(p.Count, len(free), nil)
	for i := range p.Count {
		for c, k := range free {
			j.Set(i, c, d.jacobian.At(i, k))
		}
	}
	var svd mat.SVD
	if !svd.Factorize(j, mat.SVDThin) {
		r.Condition = math.Inf(1)
		return r
	}
	values := svd.Values(nil)
	r.Condition = values[0] / values[len(values)-1]
	var v mat.Dense
	svd.VTo(&v)
	scatter := 1.0
	if freedom := p.Count - len(free); freedom > 0 {
		scatter = max(1, d.sum/float64(freedom))
	}
	for a, k := range free {
		for b, l := range free {
			sum := 0.0
			for i, s := range values {
				// Directions that the data leave open count with the precision of the numbers.
				s = max(s, 1e-12*values[0])
				sum += v.At(a, i) * v.At(b, i) / (s * s)
			}
			if len(values) < len(free) { // fewer measurements than parameters: open directions
				sum = math.Inf(1)
			}
			r.Covariance[k][l] = sum * scatter * (p.High[k] - p.Low[k]) * (p.High[l] - p.Low[l])
		}
	}
	for _, k := range free {
		r.Uncertainty[k] = math.Sqrt(r.Covariance[k][k])
		if !(r.Uncertainty[k] <= p.High[k]-p.Low[k]) {
			r.Loose = append(r.Loose, k)
		}
	}
	for i, k := range free {
		for _, l := range free[:i+1] {
			c := r.Covariance[k][l] / (r.Uncertainty[k] * r.Uncertainty[l])
			if math.IsNaN(c) {
				c = 1
			}
			r.Correlation[k][l], r.Correlation[l][k] = c, c
			if k != l && math.Abs(c) > undecided {
				r.Undecided = append(r.Undecided, Pair{l, k})
			}
		}
	}
	return r
}

func square2(n int) [][]float64 {
	m := make([][]float64, n)
	for i := range m {
		m[i] = make([]float64, n)
	}
	return m
}

// LeaveOut fits again without one residual after the other, beginning at from, and gives, for each, the
// residual that the fit to the others leaves there: how well the rest predicts it. NaN where the rest has no
// result.
func LeaveOut(p *Problem, from []float64, s Settings) []float64 {
	left := make([]float64, p.Count)
	for skip := range left {
		all := make([]float64, p.Count)
		q := *p
		q.Count = p.Count - 1
		q.Start = slices.Clone(from)
		q.Residuals = func(dst, x []float64) error {
			if err := p.Residuals(all, x); err != nil {
				return err
			}
			copy(dst, all[:skip])
			copy(dst[skip:], all[skip+1:])
			return nil
		}
		left[skip] = math.NaN()
		r, err := Minimise(&q, s)
		if err != nil {
			continue
		}
		if p.Residuals(all, r.X) == nil {
			left[skip] = all[skip]
		}
	}
	return left
}
