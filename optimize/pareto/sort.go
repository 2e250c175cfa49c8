package pareto

import "math"

// Fronts splits designs into fronts: front 0 holds the indices of those that no other beats, front 1 of
// those beaten by designs of front 0 alone, and so on, each in ascending order of index. violations may be
// nil when there are no limits. Equal designs share a front. The cost is of the order of aims * n^2.
//
// Source: K. Deb, A. Pratap, S. Agarwal, T. Meyarivan, A fast and elitist multiobjective genetic
// algorithm, IEEE Transactions on Evolutionary Computation 6 (2002) 182-197, section III.A.
func Fronts(points [][]float64, violations []float64) ([][]int, error) {
	n := len(points)
	for i, f := range points {
		if err := check(i, f); err != nil {
			return nil, err
		}
		if violations != nil && math.IsNaN(violations[i]) {
			return nil, &NaNError{Point: i, Aim: -1}
		}
	}
	beaten := make([]int, n)     // by how many others
	beats := make([][]int, n)    // which others
	store := make([]int, 0, n*4) // one allocation for most of the lists
	violation := func(i int) float64 {
		if violations == nil {
			return 0
		}
		return violations[i]
	}
	for i := range n {
		vi := violation(i)
		begin := len(store)
		for j := range n {
			if i != j && Beats(points[i], vi, points[j], violation(j)) {
				store = append(store, j)
				beaten[j]++
			}
		}
		beats[i] = store[begin:len(store):len(store)]
	}
	var fronts [][]int
	front := make([]int, 0, n)
	for i := range n {
		if beaten[i] == 0 {
			front = append(front, i)
		}
	}
	for len(front) > 0 {
		fronts = append(fronts, front)
		level := make([]bool, n)
		count := 0
		for _, i := range front {
			for _, j := range beats[i] {
				beaten[j]--
				if beaten[j] == 0 {
					level[j] = true
					count++
				}
			}
		}
		front = make([]int, 0, count)
		for j, in := range level {
			if in {
				front = append(front, j)
			}
		}
	}
	return fronts, nil
}
