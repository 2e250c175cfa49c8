package pareto

import (
	"cmp"
	"math"
	"slices"
	"sort"
)

// Fronts splits designs into fronts: front 0 holds the indices of those that no other beats, front 1 of
// those beaten by designs of front 0 alone, and so on, each in ascending order of index. violations may be
// nil when there are no limits. Equal designs share a front. The cost is of the order of n log n with one and
// two aims, and aims * n^2 with more.
//
// Source: K. Deb, A. Pratap, S. Agarwal, T. Meyarivan, A fast and elitist multiobjective genetic
// algorithm, IEEE Transactions on Evolutionary Computation 6 (2002) 182-197, section III.A. For two aims,
// M. T. Jensen, Reducing the run-time complexity of multiobjective EAs, IEEE Transactions on Evolutionary
// Computation 7 (2003) 503-515, section III (from memory): in the order of the first aim the latest point of
// a front decides whether the front beats the next point.
func Fronts(points [][]float64, violations []float64) ([][]int, error) {
	for i, f := range points {
		if err := check(i, f); err != nil {
			return nil, err
		}
		if violations != nil && math.IsNaN(violations[i]) {
			return nil, &NaNError{Point: i, Aim: -1}
		}
	}
	var meet, miss []int
	room := make([]int, 0, len(points))
	if violations == nil {
		for i := range points {
			room = append(room, i)
		}
		meet = room
	} else {
		for i, v := range violations {
			if v <= 0 {
				room = append(room, i)
			}
		}
		meet = room
		for i, v := range violations {
			if !(v <= 0) {
				room = append(room, i)
			}
		}
		meet, miss = room[:len(meet):len(meet)], room[len(meet):]
	}
	fronts := make([][]int, 0, 16)
	if len(meet) > 0 {
		rank := make([]int, len(points))
		var count int
		if len(points[0]) <= 2 {
			count = rank2(points, meet, rank)
		} else {
			count = rankAny(points, meet, rank)
		}
		fronts = split(fronts, meet, rank, count)
	}
	// Of those that miss limits only the violation counts: equal ones share a front.
	slices.SortStableFunc(miss, func(a, b int) int { return cmp.Compare(violations[a], violations[b]) })
	for len(miss) > 0 {
		n := 1
		for n < len(miss) && violations[miss[n]] == violations[miss[0]] {
			n++
		}
		fronts = append(fronts, miss[:n:n])
		miss = miss[n:]
	}
	return fronts, nil
}

// split appends count fronts of the members by their ranks.
func split(fronts [][]int, members, rank []int, count int) [][]int {
	sizes := make([]int, count)
	for _, i := range members {
		sizes[rank[i]]++
	}
	store := make([]int, len(members))
	base := len(fronts)
	for _, n := range sizes {
		fronts = append(fronts, store[:0:n])
		store = store[n:]
	}
	for _, i := range members {
		fronts[base+rank[i]] = append(fronts[base+rank[i]], i)
	}
	return fronts
}

// rank2 writes the front of every member to rank and returns the number of fronts, for one and two aims.
func rank2(points [][]float64, members, rank []int) int {
	order := slices.Clone(members)
	slices.SortFunc(order, func(a, b int) int {
		p, q := points[a], points[b]
		for k, v := range p {
			if v < q[k] {
				return -1
			} else if v > q[k] {
				return 1
			}
		}
		return a - b
	})
	var latest [][]float64 // point of each front
	for _, i := range order {
		p := points[i]
		k := sort.Search(len(latest), func(k int) bool { return !Dominates(latest[k], p) })
		if k == len(latest) {
			latest = append(latest, p)
		}
		latest[k] = p
		rank[i] = k
	}
	return len(latest)
}

// rankAny is rank2 for any number of aims.
func rankAny(points [][]float64, members, rank []int) int {
	n := len(members)
	beaten := make([]int, n)         // by how many others
	beats := make([][]int, n)        // which others
	store := make([]int, 0, n*(n-1)) // each pair at most once, in a list of fixed room for each member
	for a := range n {
		beats[a] = store[a*(n-1) : a*(n-1) : (a+1)*(n-1)]
	}
	for a := range n {
		p := points[members[a]]
		for b := a + 1; b < n; b++ {
			switch compare(p, points[members[b]]) {
			case -1:
				beats[a] = append(beats[a], b)
				beaten[b]++
			case 1:
				beats[b] = append(beats[b], a)
				beaten[a]++
			}
		}
	}
	var front, next []int
	for a, by := range beaten {
		if by == 0 {
			front = append(front, a)
		}
	}
	count := 0
	for ; len(front) > 0; count++ {
		next = next[:0]
		for _, a := range front {
			rank[members[a]] = count
			for _, b := range beats[a] {
				if beaten[b]--; beaten[b] == 0 {
					next = append(next, b)
				}
			}
		}
		front, next = next, front
	}
	return count
}

// compare is -1 where a dominates b, 1 where b dominates a, else 0.
func compare(a, b []float64) int {
	less, more := false, false
	for i, v := range a {
		if v < b[i] {
			less = true
		} else if v > b[i] {
			more = true
		}
		if less && more {
			return 0
		}
	}
	switch {
	case less:
		return -1
	case more:
		return 1
	}
	return 0
}
