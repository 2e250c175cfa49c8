package optimize

import (
	"cmp"
	"math"
	"slices"

	"hotfront/optimize/pareto"
)

// survive picks size of all, best first, and returns their indices: by fronts in the feasible-first order, the
// last front that does not fit whole truncated by hypervolume contribution on aims scaled to that front's own
// range. A violation up to epsilon counts as none.
func survive(all []*member, size int, epsilon float64) []int {
	points := make([][]float64, len(all))
	violations := make([]float64, len(all))
	for i, m := range all {
		points[i] = m.f
		if m.violation > epsilon {
			violations[i] = m.violation
		}
	}
	fronts, err := pareto.Fronts(points, violations)
	if err != nil {
		panic(err) // a session lets no NaN through
	}
	kept := make([]int, 0, min(size, len(all)))
	for _, front := range fronts {
		room := size - len(kept)
		if room == 0 {
			break
		}
		if len(front) > room {
			front = truncate(points, front, room)
		}
		kept = append(kept, front...)
	}
	return kept
}

// margin is how far the reference of the truncation lies beyond the front, in parts of the front's range.
const margin = 0.1

// truncate picks keep members of a front.
func truncate(points [][]float64, front []int, keep int) []int {
	aims := len(points[0])
	low, high := slices.Clone(points[front[0]]), slices.Clone(points[front[0]])
	for _, i := range front {
		for k, v := range points[i] {
			low[k], high[k] = min(low[k], v), max(high[k], v)
		}
	}
	scaled := make([][]float64, len(front))
	store := make([]float64, len(front)*aims)
	for j, i := range front {
		p := store[j*aims : (j+1)*aims]
		scaled[j] = p
		for k, v := range points[i] {
			if high[k] > low[k] {
				p[k] = (v - low[k]) / (high[k] - low[k])
			}
		}
	}
	ref := make([]float64, aims)
	for k := range ref {
		ref[k] = 1 + margin
	}
	kept := pareto.Truncate(scaled, ref, keep)
	for j, i := range kept {
		kept[j] = front[i]
	}
	return kept
}

// relaxation is the level of violation that counts as none while no feasible design is known. It begins at
// the given percentile of the first population's violations and falls to zero over a fixed number of
// designs:
//
//	epsilon(n) = epsilon0 (1 - n/horizon)^3
//
// The horizon depends on the population, never on the budget: a run must not change when it is extended.
//
// Source: T. Takahama, S. Sakai, Constrained optimization by the epsilon constrained differential evolution
// with gradient-based mutation and feasible elites, IEEE CEC 2006, 1-8 (the form of the level, from memory).
type relaxation struct {
	begin   float64
	horizon float64
}

const (
	relaxPercentile  = 0.2
	relaxGenerations = 40
)

func newRelaxation(members []*member, size int) relaxation {
	var v []float64
	for _, m := range members {
		if m.violation <= 0 {
			return relaxation{}
		}
		if !math.IsInf(m.violation, 1) {
			v = append(v, m.violation)
		}
	}
	if len(v) == 0 {
		return relaxation{}
	}
	slices.SortFunc(v, cmp.Compare)
	return relaxation{begin: v[int(relaxPercentile*float64(len(v)-1))], horizon: float64(relaxGenerations * size)}
}

func (r relaxation) level(evaluations int) float64 {
	left := 1 - float64(evaluations)/r.horizon
	if r.begin == 0 || left <= 0 {
		return 0
	}
	return r.begin * left * left * left
}
