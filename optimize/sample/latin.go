package sample

import "math/rand/v2"

// Latin returns n points in [0, 1)^d of which each n-th part of every axis holds exactly one, at a random
// place inside.
//
//	x[i][k] = (pi_k(i) + u) / n
//
// with a random permutation pi_k per axis and u uniform in [0, 1).
//
// Source: M. D. McKay, R. J. Beckman, W. J. Conover, A comparison of three methods for selecting values of
// input variables in the analysis of output from a computer code, Technometrics 21 (1979) 239-245.
func Latin(rng *rand.Rand, n, d int) [][]float64 {
	store := make([]float64, n*d)
	points := make([][]float64, n)
	for i := range points {
		points[i] = store[i*d : (i+1)*d : (i+1)*d]
	}
	for k := range d {
		for i, cell := range rng.Perm(n) {
			points[i][k] = min((float64(cell)+rng.Float64())/float64(n), below1)
		}
	}
	return points
}

// below1 is the largest number below one.
const below1 = 1 - 1.0/(1<<53)
