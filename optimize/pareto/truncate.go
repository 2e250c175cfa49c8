package pareto

import (
	"math"
	"slices"
)

// Truncate picks keep of the points, all of which should be non-dominated, by dropping again and again the
// point that contributes least to the hypervolume of those left (the highest index among equals). It
// returns the indices kept, ascending. A point that is the only one with the lowest value of an aim stays as
// long as any other can go.
//
// Source: N. Beume, B. Naujoks, M. Emmerich, SMS-EMOA: multiobjective selection based on dominated
// hypervolume, European Journal of Operational Research 181 (2007) 1653-1669, section 2.
func Truncate(points [][]float64, ref []float64, keep int) []int {
	n := len(points)
	out := make([]bool, n)
	if n > keep {
		if len(ref) == 2 {
			truncate2(points, ref, n-keep, out)
		} else {
			truncate(points, ref, n-keep, out)
		}
	}
	kept := make([]int, 0, keep)
	for i, gone := range out {
		if !gone {
			kept = append(kept, i)
		}
	}
	return kept
}

// truncate2 drops points of a front of two aims; only the neighbours of a dropped point change.
func truncate2(points [][]float64, ref []float64, drop int, out []bool) {
	n := len(points)
	order := make([]int, n)
	for i := range order {
		order[i] = i
	}
	slices.SortFunc(order, func(a, b int) int {
		switch p, q := points[a], points[b]; {
		case p[0] < q[0], p[0] == q[0] && p[1] < q[1]:
			return -1
		case p[0] > q[0], p[1] > q[1]:
			return 1
		}
		return a - b
	})
	prev, next := make([]int, n), make([]int, n) // positions in order; -1 and n are the ends
	for k := range n {
		prev[k], next[k] = k-1, k+1
	}
	share := make([]float64, n)
	update := func(k int) {
		p := points[order[k]]
		if prev[k] < 0 || next[k] >= n {
			share[k] = math.Inf(1)
			return
		}
		right, top := points[order[next[k]]][0], points[order[prev[k]]][1]
		share[k] = max(0, min(right, ref[0])-p[0]) * max(0, min(top, ref[1])-p[1])
	}
	for k := range n {
		update(k)
	}
	begin := 0
	for range drop {
		worst := begin
		for k := next[begin]; k < n; k = next[k] {
			if share[k] < share[worst] || share[k] == share[worst] && order[k] > order[worst] {
				worst = k
			}
		}
		out[order[worst]] = true
		p, q := prev[worst], next[worst]
		if p >= 0 {
			next[p] = q
			update(p)
		} else {
			begin = q
		}
		if q < n {
			prev[q] = p
			update(q)
		}
	}
}

// truncate drops points of a front of any number of aims. The contributions of the points left grow when
// one is dropped, so a contribution computed earlier is a lower bound: only bounds below the least
// contribution found in a round need a new look.
func truncate(points [][]float64, ref []float64, drop int, out []bool) {
	n := len(points)
	extreme := extremes(points)
	var c contributor
	share := make([]float64, n)
	fresh := make([]int, n) // the round share was computed in
	for i := range points {
		share[i] = c.alone(points, nil, i, ref)
		if extreme[i] {
			share[i] = math.Inf(1)
		}
	}
	for round := range drop {
		worst := -1
		for {
			worst = -1
			for i := range n {
				if out[i] {
					continue
				}
				if worst < 0 || share[i] < share[worst] || share[i] == share[worst] && i > worst {
					worst = i
				}
			}
			if fresh[worst] == round || math.IsInf(share[worst], 1) {
				break
			}
			share[worst] = c.alone(points, out, worst, ref)
			fresh[worst] = round
		}
		out[worst] = true
	}
}

// extremes marks the points that alone have the lowest value of some aim.
func extremes(points [][]float64) []bool {
	mark := make([]bool, len(points))
	if len(points) == 0 {
		return mark
	}
	for k := range points[0] {
		best, alone := 0, true
		for i := 1; i < len(points); i++ {
			switch v, b := points[i][k], points[best][k]; {
			case v < b:
				best, alone = i, true
			case v == b:
				alone = false
			}
		}
		if alone {
			mark[best] = true
		}
	}
	return mark
}
