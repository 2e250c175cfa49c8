package testproblem

import "hotfront/optimize/pareto"

// samples is how many points stand for a true front of two aims that is known as a curve. The hypervolume
// of n points of a curve falls short of the curve's own by about 1/(2n) of the curve's box.
const samples = 200_000

// curve is the hypervolume of a front given as a curve f(t), t in [0, 1]; parts that others dominate do not
// matter.
func curve(ref []float64, f func(t float64) []float64) float64 {
	points := make([][]float64, samples+1)
	for i := range points {
		points[i] = f(float64(i) / samples)
	}
	return pareto.Hypervolume(points, ref)
}
