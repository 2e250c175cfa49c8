package pareto

import "container/heap"

// Choose picks k of the points, or all if they are fewer, so that together they dominate as much as
// possible: beginning with none, it takes again and again the point that adds the most hypervolume (the
// lowest index among equals). It returns indices in the order of the choice and stops early when no
// point adds anything. The greedy choice reaches at least 1 - 1/e = 63 % of the best choice of k.
//
// Source: the bound is G. L. Nemhauser, L. A. Wolsey, M. L. Fisher, An analysis of approximations for
// maximizing submodular set functions, Mathematical Programming 14 (1978) 265-294 (from memory).
func Choose(points [][]float64, ref []float64, k int) []int {
	// The gain of a point only falls as the chosen set grows. So gains of earlier rounds are upper
	// bounds, and a point whose gain is fresh and on top of all bounds is the next one.
	q := &gains{gain: make([]float64, len(points)), fresh: make([]int, len(points))}
	for i, p := range points {
		if below(p, ref) {
			q.gain[i] = 1
			for m, v := range p {
				q.gain[i] *= ref[m] - v
			}
			q.order = append(q.order, i)
		}
	}
	heap.Init(q)
	var c contributor
	var chosen []int
	var set [][]float64
	for len(chosen) < k && len(q.order) > 0 {
		i := q.order[0]
		switch {
		case q.gain[i] <= 0:
			return chosen
		case q.fresh[i] == len(chosen):
			heap.Pop(q)
			chosen = append(chosen, i)
			set = append(set, points[i])
		default:
			q.gain[i] = c.alone(append(set, points[i]), nil, len(set), ref)
			q.fresh[i] = len(chosen)
			heap.Fix(q, 0)
		}
	}
	return chosen
}

// gains is a heap of point indices, the largest gain on top, the lowest index among equals.
type gains struct {
	gain  []float64
	fresh []int // size of the chosen set that the gain was computed for
	order []int
}

func (q *gains) Len() int { return len(q.order) }

func (q *gains) Less(a, b int) bool {
	i, j := q.order[a], q.order[b]
	if q.gain[i] != q.gain[j] {
		return q.gain[i] > q.gain[j]
	}
	return i < j
}

func (q *gains) Swap(a, b int) { q.order[a], q.order[b] = q.order[b], q.order[a] }

func (q *gains) Push(x any) { q.order = append(q.order, x.(int)) }

func (q *gains) Pop() any {
	last := len(q.order) - 1
	i := q.order[last]
	q.order = q.order[:last]
	return i
}
